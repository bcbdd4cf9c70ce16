#pragma once

#include "outcome/outcome.hpp"

#include <cstddef>
#include <cstdint>
#include <iterator>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace forwright::contract {

/// Limits of a request, beyond those of its members.
inline constexpr std::size_t largestRequest = std::size_t{64} * 1024 * 1024; ///< bytes
inline constexpr std::size_t deepestNesting = 32;    ///< objects and lists within each other
inline constexpr std::size_t mostValues = 5'000'000; ///< values and member names in all

class Document;

/// A value in a document: a handle, cheap to copy, that lives no longer than its document.
class Json {
  public:
    enum class Kind : std::uint8_t { null, boolean, number, text, list, object };

    [[nodiscard]] Kind kind() const;
    /// "an object", "a list", "text", … for sentences.
    [[nodiscard]] std::string_view kindInWords() const;
    [[nodiscard]] bool isNumber() const { return kind() == Kind::number; }
    [[nodiscard]] bool isText() const { return kind() == Kind::text; }
    [[nodiscard]] bool isList() const { return kind() == Kind::list; }
    [[nodiscard]] bool isObject() const { return kind() == Kind::object; }

    [[nodiscard]] bool boolean() const;          ///< of a boolean
    [[nodiscard]] double number() const;         ///< of a number; finite
    [[nodiscard]] std::string_view text() const; ///< of text; well-formed UTF-8

    /// Items of a list, members of an object.
    [[nodiscard]] std::size_t size() const;
    /// The member of that name (the first, where a document was not well made); nothing where there is none.
    [[nodiscard]] std::optional<Json> find(std::string_view name) const;

    class Items;
    /// The items of a list in order, or the members' names and values of an object in turn.
    [[nodiscard]] Items items() const;

  private:
    friend class Document;
    Json(const Document& document, std::uint32_t index) : document_(&document), index_(index) {}
    const Document* document_;
    std::uint32_t index_;
};

/// A parsed text. Its values lie one after another in one block, each with the place where the next begins,
/// so that a list of a million numbers is a million small cells and nothing else.
class Document {
  public:
    [[nodiscard]] Json root() const { return {*this, 0}; }

  private:
    friend class Json;
    friend class DocumentBuilder;
    struct Extent {
        std::uint32_t begin; ///< of text, in `text_`
        std::uint32_t size;  ///< of text, in bytes; of lists and objects, in items and members
    };
    struct Cell {
        Json::Kind kind = Json::Kind::null;
        std::uint32_t next = 0; ///< the cell after this value and all that is in it
        union {
            double number = 0.0;
            Extent extent;
        };
    };
    std::vector<Cell> cells_;
    std::string text_;
};

class Json::Items {
  public:
    class Iterator {
      public:
        using value_type = Json;
        using difference_type = std::ptrdiff_t;
        Iterator(const Document& document, std::uint32_t index) : document_(&document), index_(index) {}
        Json operator*() const { return {*document_, index_}; }
        Iterator& operator++();
        bool operator==(const Iterator& other) const { return index_ == other.index_; }

      private:
        const Document* document_;
        std::uint32_t index_;
    };
    Items(Iterator begin, Iterator end) : begin_(begin), end_(end) {}
    [[nodiscard]] Iterator begin() const { return begin_; }
    [[nodiscard]] Iterator end() const { return end_; }

  private:
    Iterator begin_;
    Iterator end_;
};

/// A document and what stands against it although it could be read: every `duplicate-member`.
struct Parsed {
    Document document;
    outcome::Faults duplicates;
};

/// Reads one JSON text (RFC 8259). Refused at "": `too-large`, `not-json` (which says where and near what;
/// also bytes that are not UTF-8, half of a surrogate pair, a number beyond a double's range, anything after
/// the value); with their pointer: `too-deep`. Never throws.
[[nodiscard]] outcome::Outcome<Parsed> parse(std::string_view text);

} // namespace forwright::contract
