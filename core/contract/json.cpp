#include "contract/json.hpp"

#include "contract/place.hpp"

#include <nlohmann/json.hpp>

#include <algorithm>
#include <utility>

namespace forwright::contract {

using outcome::Fault;
using outcome::Faults;
using outcome::Outcome;

namespace {

/// Line and column, counted from 1, of the byte at `position` (counted from 1, as the lexer does).
std::string lineAndColumn(std::string_view text, std::size_t position) {
    const std::string_view before = text.substr(0, position == 0 ? 0 : position - 1);
    const auto lines = std::count(before.begin(), before.end(), '\n');
    const std::size_t lineBegin = lines == 0 ? 0 : before.rfind('\n') + 1;
    return "line " + std::to_string(lines + 1) + ", column " + std::to_string(before.size() - lineBegin + 1);
}

/// What was last read, fit to stand in a sentence: its end, printable ASCII only.
std::string shown(std::string_view token) {
    constexpr std::size_t longest = 20;
    std::string text;
    for (const char c : token.substr(token.size() - std::min(token.size(), longest))) {
        text += c >= ' ' && c <= '~' ? c : '?';
    }
    return text;
}

Fault notJson(std::string_view text, std::size_t position, std::string_view lastToken) {
    const std::string near = shown(lastToken);
    return {"", "not-json",
            "The request is no JSON text (RFC 8259): it cannot be read from " +
                lineAndColumn(text, position) + " on" + (near.empty() ? "" : ", near " + near) + "."};
}

Fault tooLarge(const std::string& what) {
    return {"", "too-large", what + "; split the request."};
}

} // namespace

/// Takes the parser's events and lays the cells.
class DocumentBuilder {
  public:
    explicit DocumentBuilder(std::string_view source) : source_(source) {}

    bool null() { return add({}); }
    bool boolean(bool value) { return addNumber(Json::Kind::boolean, value ? 1.0 : 0.0); }
    bool number_integer(std::int64_t value) {
        return addNumber(Json::Kind::number, static_cast<double>(value));
    }
    bool number_unsigned(std::uint64_t value) {
        return addNumber(Json::Kind::number, static_cast<double>(value));
    }
    bool number_float(double value, const std::string& /*token*/) {
        return addNumber(Json::Kind::number, value);
    }
    bool string(const std::string& value) { return addText(value); }
    bool binary(const std::vector<std::uint8_t>& /*value*/) { return false; } // JSON text has none
    bool start_object(std::size_t /*size*/) { return open(Json::Kind::object); }
    bool start_array(std::size_t /*size*/) { return open(Json::Kind::list); }
    bool end_object() {
        reportDuplicates();
        return close();
    }
    bool end_array() { return close(); }
    bool key(const std::string& name) {
        ++cellOf(open_.back()).extent.size;
        open_.back().key = static_cast<std::uint32_t>(cells().size());
        return addCell(Json::Kind::text, name);
    }
    bool parse_error(std::size_t position, const std::string& lastToken,
                     const nlohmann::detail::exception& /*why*/) {
        fault_ = notJson(source_, position, lastToken);
        return false;
    }

    [[nodiscard]] const std::optional<Fault>& fault() const { return fault_; }
    Parsed take() { return std::move(parsed_); }

  private:
    using Cell = Document::Cell;
    /// A list or object that is not closed yet.
    struct Open {
        std::uint32_t cell;    ///< its own
        std::uint32_t key = 0; ///< of an object, the name of the member being read
    };

    std::vector<Cell>& cells() { return parsed_.document.cells_; }
    Cell& cellOf(const Open& open) { return cells()[open.cell]; }
    std::string_view textOf(const Cell& cell) {
        return std::string_view{parsed_.document.text_}.substr(cell.extent.begin, cell.extent.size);
    }

    bool addNumber(Json::Kind kind, double number) {
        Cell cell;
        cell.kind = kind;
        cell.number = number;
        return add(cell);
    }

    bool addText(const std::string& value) {
        countInList();
        return addCell(Json::Kind::text, value);
    }

    bool add(Cell cell) {
        countInList();
        return lay(cell);
    }

    bool addCell(Json::Kind kind, const std::string& value) {
        std::string& text = parsed_.document.text_;
        Cell cell;
        cell.kind = kind;
        cell.extent = {static_cast<std::uint32_t>(text.size()), static_cast<std::uint32_t>(value.size())};
        text += value;
        return lay(cell);
    }

    bool lay(Cell cell) {
        if (cells().size() == mostValues) {
            fault_ = tooLarge("The request has more than " + std::to_string(mostValues) + " values");
            return false;
        }
        cell.next = static_cast<std::uint32_t>(cells().size()) + 1;
        cells().push_back(cell);
        return true;
    }

    /// Members are counted by their names.
    void countInList() {
        if (!open_.empty() && cellOf(open_.back()).kind == Json::Kind::list) {
            ++cellOf(open_.back()).extent.size;
        }
    }

    bool open(Json::Kind kind) {
        countInList();
        if (open_.size() == deepestNesting) {
            fault_ = Fault{pointer(), "too-deep",
                           "Objects and lists may stand " + std::to_string(deepestNesting) +
                               " deep in each other; here one more is opened."};
            return false;
        }
        Cell cell;
        cell.kind = kind;
        cell.extent = {0, 0};
        if (!lay(cell)) {
            return false;
        }
        open_.push_back({static_cast<std::uint32_t>(cells().size()) - 1});
        return true;
    }

    bool close() {
        cellOf(open_.back()).next = static_cast<std::uint32_t>(cells().size());
        open_.pop_back();
        return true;
    }

    /// The pointer of the value being read.
    std::string pointer() {
        std::string pointer;
        for (const Open& open : open_) {
            const Cell& cell = cellOf(open);
            appendToPointer(pointer, cell.kind == Json::Kind::object ? std::string(textOf(cells()[open.key]))
                                                                     : std::to_string(cell.extent.size - 1));
        }
        return pointer;
    }

    /// Names of the object just read that stand there more than once, each told once.
    void reportDuplicates() {
        std::vector<std::string_view> names;
        names.reserve(cellOf(open_.back()).extent.size);
        for (std::uint32_t i = open_.back().cell + 1; i < cells().size(); i = cells()[i + 1].next) {
            names.push_back(textOf(cells()[i]));
        }
        std::sort(names.begin(), names.end());
        for (auto same = names.begin(); (same = std::adjacent_find(same, names.end())) != names.end();) {
            const std::string_view name = *same;
            report(name);
            same = std::find_if(same, names.end(), [name](std::string_view other) { return other != name; });
        }
    }

    void report(std::string_view name) {
        constexpr std::size_t mostReported = 1000;
        if (parsed_.duplicates.size() == mostReported) {
            return;
        }
        const Open object = open_.back();
        open_.pop_back();
        std::string at = pointer();
        open_.push_back(object);
        appendToPointer(at, name);
        parsed_.duplicates.push_back({std::move(at), "duplicate-member",
                                      "This member stands more than once in its object; give it once."});
    }

    std::string_view source_;
    Parsed parsed_;
    std::vector<Open> open_;
    std::optional<Fault> fault_;
};

Outcome<Parsed> parse(std::string_view text) {
    if (text.size() > largestRequest) {
        return tooLarge("The request has " + std::to_string(text.size()) + " bytes, more than the " +
                        std::to_string(largestRequest) + " allowed");
    }
    // The lexer would take a zero byte for the end of the text and pass over what follows.
    if (const std::size_t zero = text.find('\0'); zero != std::string_view::npos) {
        return notJson(text, zero + 1, "a zero byte");
    }
    DocumentBuilder builder{text};
    const bool whole = nlohmann::json::sax_parse(text.begin(), text.end(), &builder);
    if (builder.fault()) {
        return *builder.fault();
    }
    if (!whole) {
        return notJson(text, text.size(), "");
    }
    return builder.take();
}

Json::Kind Json::kind() const {
    return document_->cells_[index_].kind;
}

std::string_view Json::kindInWords() const {
    switch (kind()) {
    case Kind::null:
        return "null";
    case Kind::boolean:
        return "true or false";
    case Kind::number:
        return "a number";
    case Kind::text:
        return "text";
    case Kind::list:
        return "a list";
    case Kind::object:
        break;
    }
    return "an object";
}

bool Json::boolean() const {
    return document_->cells_[index_].number != 0.0;
}

double Json::number() const {
    return document_->cells_[index_].number;
}

std::string_view Json::text() const {
    const auto& extent = document_->cells_[index_].extent;
    return std::string_view{document_->text_}.substr(extent.begin, extent.size);
}

std::size_t Json::size() const {
    return document_->cells_[index_].extent.size;
}

Json::Items Json::items() const {
    return {Items::Iterator{*document_, index_ + 1},
            Items::Iterator{*document_, document_->cells_[index_].next}};
}

std::optional<Json> Json::find(std::string_view name) const {
    for (auto item = items().begin(); item != items().end(); ++item) {
        const Json key = *item;
        ++item;
        if (key.text() == name) {
            return *item;
        }
    }
    return std::nullopt;
}

Json::Items::Iterator& Json::Items::Iterator::operator++() {
    index_ = document_->cells_[index_].next;
    return *this;
}

} // namespace forwright::contract
