#include "contract/reader.hpp"

#include <algorithm>
#include <cmath>

namespace forwright::contract {

namespace {

/// A continuation byte of UTF-8.
bool continues(char c) {
    return (static_cast<unsigned char>(c) & 0xC0U) == 0x80U;
}

bool inside(double value, const Range& range) {
    const bool above = range.lowIsOut ? value > range.low : value >= range.low;
    const bool below = range.highIsOut ? value < range.high : value <= range.high;
    return above && below;
}

std::string_view codeOf(const Range& range) {
    if (range.low == 0.0 && range.high == Range::unbounded) {
        return range.lowIsOut ? "not-positive" : "negative";
    }
    return "out-of-range";
}

/// "above 0", "from 0 to 1", "above -1 and below 1", …
std::string inWords(const Range& range) {
    if (range.high == Range::unbounded) {
        return (range.lowIsOut ? "above " : "at least ") + numberText(range.low);
    }
    if (!range.lowIsOut && !range.highIsOut) {
        return "from " + numberText(range.low) + " to " + numberText(range.high);
    }
    return (range.lowIsOut ? "above " : "at least ") + numberText(range.low) + " and " +
           (range.highIsOut ? "below " : "at most ") + numberText(range.high);
}

bool looksLikeDate(std::string_view text) {
    return std::count(text.begin(), text.end(), '-') == 2;
}

std::string noDate(std::string_view text) {
    return shownText(text) + " is no date: give a day that exists as YYYY-MM-DD, from " +
           dates::toIso(dates::earliest) + " to " + dates::toIso(dates::latest) + ".";
}

/// Letters to change, add, drop or swap with the next to come from one name to the other (optimal string
/// alignment, by rows of the table of all beginnings).
std::size_t distance(std::string_view one, std::string_view other) {
    const std::size_t width = other.size() + 1;
    std::vector<std::size_t> table((one.size() + 1) * width);
    for (std::size_t i = 0; i <= one.size(); ++i) {
        for (std::size_t j = 0; j <= other.size(); ++j) {
            std::size_t& here = table[i * width + j];
            if (i == 0 || j == 0) {
                here = i + j;
                continue;
            }
            const std::size_t change = one[i - 1] == other[j - 1] ? 0 : 1;
            here = std::min({table[(i - 1) * width + j] + 1, table[i * width + j - 1] + 1,
                             table[(i - 1) * width + j - 1] + change});
            if (i > 1 && j > 1 && one[i - 1] == other[j - 2] && one[i - 2] == other[j - 1]) {
                here = std::min(here, table[(i - 2) * width + j - 2] + 1);
            }
        }
    }
    return table.back();
}

} // namespace

std::string shownText(std::string_view text) {
    constexpr std::size_t longest = 40;
    std::size_t cut = text.size();
    if (cut > longest) {
        for (cut = longest; cut > 0 && continues(text[cut]);) {
            --cut;
        }
    }
    std::string shown{'"'};
    shown += text.substr(0, cut);
    shown += cut < text.size() ? "…\"" : "\"";
    return shown;
}

std::string listedText(const std::vector<std::string_view>& names) {
    std::string list;
    for (std::size_t i = 0; i < names.size(); ++i) {
        list += i == 0 ? "" : i + 1 == names.size() ? " or " : ", ";
        list += names[i];
    }
    return list;
}

std::string_view nearest(std::string_view name, const std::vector<std::string_view>& names) {
    constexpr std::size_t longestCompared = 40;
    if (name.size() > longestCompared) {
        return {};
    }
    std::size_t best = std::max<std::size_t>(1, name.size() / 3) + 1;
    std::string_view found;
    for (const std::string_view candidate : names) {
        if (const std::size_t away = distance(name, candidate); away < best) {
            best = away;
            found = candidate;
        }
    }
    return found;
}

std::optional<double> Value::number(const Range& range) const {
    if (!json_) {
        return std::nullopt;
    }
    if (!json_->isNumber()) {
        wrongType("a number");
        return std::nullopt;
    }
    const double value = json_->number();
    if (!inside(value, range)) {
        fault(codeOf(range),
              "This number has to be " + inWords(range) + "; it is " + numberText(value) + ".");
        return std::nullopt;
    }
    return value;
}

std::optional<int> Value::integer(int low, int high) const {
    const std::optional<double> value =
        number({static_cast<double>(low), static_cast<double>(high), false, false});
    if (value && std::floor(*value) != *value) {
        fault("not-whole", "This has to be a whole number from " + std::to_string(low) + " to " +
                               std::to_string(high) + "; it is " + numberText(*value) + ".");
        return std::nullopt;
    }
    return value ? std::optional{static_cast<int>(*value)} : std::nullopt;
}

std::optional<std::string_view> Value::text() const {
    if (!json_) {
        return std::nullopt;
    }
    if (!json_->isText()) {
        wrongType("text");
        return std::nullopt;
    }
    return json_->text();
}

std::optional<dates::Date> Value::date() const {
    const std::optional<std::string_view> written = text();
    if (!written) {
        return std::nullopt;
    }
    const std::optional<dates::Date> day = dates::parseIso(*written);
    if (!day) {
        fault("not-a-date", noDate(*written));
    }
    return day;
}

std::optional<std::variant<dates::Date, dates::Tenor>> Value::dateOrTenor() const {
    const std::optional<std::string_view> written = text();
    if (!written) {
        return std::nullopt;
    }
    if (const std::optional<dates::Date> day = dates::parseIso(*written)) {
        return *day;
    }
    if (const std::optional<dates::Tenor> tenor = dates::parseTenor(*written)) {
        return *tenor;
    }
    if (looksLikeDate(*written)) {
        fault("not-a-date", noDate(*written));
    } else {
        fault("not-a-date-or-tenor",
              shownText(*written) +
                  " is neither a date (2027-06-18) nor a tenor (2D, 1W, 3M, 5Y, up to 100 years).");
    }
    return std::nullopt;
}

std::optional<std::variant<dates::Date, dates::Tenor, dates::ShortPeriod, dates::ThirdDay>>
Value::maturity() const {
    if (json_ && json_->isText()) {
        if (const auto period = dates::parseShortPeriod(json_->text())) {
            return *period;
        }
        if (const auto third = dates::parseThirdDay(json_->text())) {
            return *third;
        }
    }
    const auto at = dateOrTenor();
    if (!at) {
        return std::nullopt;
    }
    if (const auto* tenor = std::get_if<dates::Tenor>(&*at)) {
        return *tenor;
    }
    return std::get<dates::Date>(*at);
}

void Value::wrongType(std::string_view expected) const {
    fault("wrong-type",
          "Here " + std::string{expected} + " is wanted; it is " + std::string{json_->kindInWords()} + ".");
}

void Value::notOneOf(std::string_view name, const std::vector<std::string_view>& allowed) const {
    fault("not-one-of", shownText(name) + " is not known here: give " + listedText(allowed) + ".");
}

bool Value::listOfAtMost(std::size_t most) const {
    if (!json_) {
        return false;
    }
    if (!json_->isList()) {
        wrongType("a list");
        return false;
    }
    if (json_->size() > most) {
        fault("too-many-rows", "A list may have " + std::to_string(most) + " rows here; it has " +
                                   std::to_string(json_->size()) + ".");
        return false;
    }
    return true;
}

Reader::Reader(const Value& object) : place_(object.place()), findings_(&object.findings()) {
    if (object.isObject()) {
        object_ = object.json();
    } else if (object.present()) {
        object.wrongType("an object");
    }
}

Reader::~Reader() {
    if (object_) {
        reportUnknown();
    }
}

Value Reader::optional(std::string_view name) {
    known_.push_back(name);
    return {object_ ? object_->find(name) : std::nullopt, at(name), *findings_};
}

Value Reader::optional(std::string_view name, std::string_view json) {
    Value value = optional(name);
    if (!value.present()) {
        findings_->assume(value.place(), std::string{json});
    }
    return value;
}

Value Reader::required(std::string_view name, std::string_view what) {
    Value value = optional(name);
    if (object_ && !value.present()) {
        value.fault("missing", "This member is missing: give " + std::string{what} + ".");
    }
    return value;
}

void Reader::forbid(std::string_view name, std::string_view why) {
    if (const Value value = optional(name); value.present()) {
        value.fault("not-applicable", std::string{why});
    }
}

void Reader::reportUnknown() const {
    bool isName = true;
    for (const Json item : object_->items()) {
        if (isName && std::find(known_.begin(), known_.end(), item.text()) == known_.end()) {
            const std::string_view meant = nearest(item.text(), known_);
            findings_->fault(
                at(item.text()), "unknown-member",
                "There is no member " + shownText(item.text()) + " here" +
                    (meant.empty() ? ": take it out." : "; " + shownText(meant) + " may be meant."));
        }
        isName = !isName;
    }
}

} // namespace forwright::contract
