#pragma once

#include "contract/findings.hpp"
#include "contract/json.hpp"
#include "contract/place.hpp"
#include "contract/writer.hpp"
#include "dates/date.hpp"
#include "dates/special_days.hpp"
#include "dates/tenor.hpp"

#include <initializer_list>
#include <limits>
#include <optional>
#include <string>
#include <string_view>
#include <variant>
#include <vector>

namespace forwright::contract {

/// The numbers that a member may have.
struct Range {
    static constexpr double unbounded = std::numeric_limits<double>::infinity();
    double low = -unbounded;
    double high = unbounded;
    bool lowIsOut = false; ///< the bound itself is not allowed
    bool highIsOut = false;
};
inline constexpr Range anyNumber{};
inline constexpr Range positive{0.0, Range::unbounded, true, false};
inline constexpr Range notNegative{0.0, Range::unbounded, false, false};
inline constexpr Range rateRange{-0.99, 10.0, false, false};
inline constexpr Range fractionRange{-1.0, 1.0, true, true};
inline constexpr Range shareRange{0.0, 1.0, false, false};
inline constexpr Range costRange{0.0, 1.0, false, true};

inline constexpr std::size_t mostRows = 10'000; ///< of any list
inline constexpr std::size_t longestName = 200; ///< characters

class Reader;

/// A value of the request at its place, or the want of one. Each question is answered by what was asked for,
/// or by nothing, with the fault found; where there is no value (its fault is told already, or it may be left
/// out) the answer is nothing.
class Value {
  public:
    Value(std::optional<Json> json, const Place& place, Findings& findings)
        : json_(json), place_(place), findings_(&findings) {}

    [[nodiscard]] bool present() const { return json_.has_value(); }
    [[nodiscard]] bool isObject() const { return json_ && json_->isObject(); }
    [[nodiscard]] bool isList() const { return json_ && json_->isList(); }
    [[nodiscard]] bool isNumber() const { return json_ && json_->isNumber(); }
    /// Whether it is an object with that member.
    [[nodiscard]] bool has(std::string_view name) const {
        return isObject() && json_->find(name).has_value();
    }
    [[nodiscard]] const Json& json() const { return *json_; }
    [[nodiscard]] const Place& place() const { return place_; }
    [[nodiscard]] Findings& findings() const { return *findings_; }

    [[nodiscard]] std::optional<double> number(const Range& range) const;
    [[nodiscard]] std::optional<int> integer(int low, int high) const;
    [[nodiscard]] std::optional<std::string_view> text() const;
    [[nodiscard]] std::optional<dates::Date> date() const;
    [[nodiscard]] std::optional<std::variant<dates::Date, dates::Tenor>> dateOrTenor() const;
    /// A maturity: a date, a tenor, ON, TN, SN, or a month's third Wednesday or Friday.
    [[nodiscard]] std::optional<std::variant<dates::Date, dates::Tenor, dates::ShortPeriod, dates::ThirdDay>>
    maturity() const;

    /// One of `allowed`, by the names that `nameOf` gives them.
    template <class Choice>
    [[nodiscard]] std::optional<Choice> choice(std::initializer_list<Choice> allowed) const {
        const std::optional<std::string_view> name = text();
        if (!name) {
            return std::nullopt;
        }
        std::vector<std::string_view> names;
        for (const Choice candidate : allowed) {
            names.push_back(nameOf(candidate));
            if (names.back() == *name) {
                return candidate;
            }
        }
        notOneOf(*name, names);
        return std::nullopt;
    }

    /// Hands every row on, with its index, where this is a list of at most `most` rows. Whether it was one.
    template <class Take> bool rows(Take take, std::size_t most = mostRows) const {
        if (!listOfAtMost(most)) {
            return false;
        }
        std::size_t index = 0;
        for (const Json row : json_->items()) {
            const Place at = place_.row(index);
            take(Value{row, at, *findings_}, index);
            ++index;
        }
        return true;
    }

    void fault(std::string_view code, std::string message) const {
        findings_->fault(place_, code, std::move(message));
    }
    /// The fault `wrong-type`: something else was `expected` ("a number").
    void wrongType(std::string_view expected) const;
    /// The fault `not-one-of`.
    void notOneOf(std::string_view name, const std::vector<std::string_view>& allowed) const;

  private:
    [[nodiscard]] bool listOfAtMost(std::size_t most) const;

    std::optional<Json> json_;
    Place place_;
    Findings* findings_;
};

/// Reads an object member by member. What nobody has asked for when the reader goes is told as
/// `unknown-member`. Where the value is not there or is no object every member is wanting without a further
/// fault.
class Reader {
  public:
    /// A value that is there and no object is the fault `wrong-type`.
    explicit Reader(const Value& object);
    Reader(const Reader&) = delete;
    Reader& operator=(const Reader&) = delete;
    ~Reader();

    [[nodiscard]] bool present() const { return object_.has_value(); }
    [[nodiscard]] Findings& findings() const { return *findings_; }
    [[nodiscard]] const Place& place() const { return place_; }
    /// Where that member stands, or would.
    [[nodiscard]] Place at(std::string_view name) const { return place_.member(name); }

    /// The member, `missing` where it isn't there; `what` says in words what it would be ("the spot price").
    [[nodiscard]] Value required(std::string_view name, std::string_view what);
    /// The member, which may be left out without anything in its place.
    [[nodiscard]] Value optional(std::string_view name);
    /// The member, which may be left out; then `json` is listed as assumed.
    [[nodiscard]] Value optional(std::string_view name, std::string_view json);

    [[nodiscard]] double number(std::string_view name, const Range& range, double fallback) {
        return optional(name, numberText(fallback)).number(range).value_or(fallback);
    }
    template <class Choice>
    [[nodiscard]] Choice choice(std::string_view name, std::initializer_list<Choice> allowed,
                                Choice fallback) {
        return optional(name, quotedText(nameOf(fallback))).choice(allowed).value_or(fallback);
    }

    /// The member has no meaning here: the fault `not-applicable` where it stands; `why` is the sentence.
    void forbid(std::string_view name, std::string_view why);

    /// What the object is cannot be told, so its other members are neither known nor unknown.
    void passOver() { object_.reset(); }

  private:
    void reportUnknown() const;

    std::optional<Json> object_;
    Place place_;
    Findings* findings_;
    std::vector<std::string_view> known_;
};

/// Text of the request fit to stand in a sentence: in quotes, cut where it is long.
[[nodiscard]] std::string shownText(std::string_view text);
/// "a, b or c".
[[nodiscard]] std::string listedText(const std::vector<std::string_view>& names);
/// Of `names` the one that is nearest to `name`, where it is near enough to have been meant; else empty.
[[nodiscard]] std::string_view nearest(std::string_view name, const std::vector<std::string_view>& names);

} // namespace forwright::contract
