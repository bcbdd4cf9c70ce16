#pragma once

#include "dates/date.hpp"

#include <concepts>
#include <optional>
#include <string>
#include <string_view>

namespace forwright::contract {

/// A number as JSON, read back to the same bits: few digits where few do, the same text in every build. Zero
/// has no sign.
[[nodiscard]] std::string numberText(double value);
/// Text as JSON, in quotes.
[[nodiscard]] std::string quotedText(std::string_view text);

/// Writes one JSON text from left to right; commas come by themselves. Names of members are the program's own
/// and are not escaped.
class Writer {
  public:
    void beginObject();
    void endObject();
    void beginList();
    void endList();
    /// The name of the member whose value comes next.
    Writer& key(std::string_view name);

    void value(double number);
    void value(std::integral auto number) { integer(static_cast<long long>(number)); }
    void value(bool truth);
    void value(std::string_view text);
    void value(const char* text) { value(std::string_view{text}); }
    void value(const std::string& text) { value(std::string_view{text}); }
    void value(dates::Date date);
    /// Null where there is none.
    template <class T> void value(const std::optional<T>& maybe) {
        if (maybe) {
            value(*maybe);
        } else {
            raw("null");
        }
    }
    /// A value that is JSON already.
    void raw(std::string_view json);

    template <class T> void member(std::string_view name, const T& what) {
        key(name);
        value(what);
    }
    /// The member where there is a value, else nothing.
    template <class T> void memberIfAny(std::string_view name, const std::optional<T>& maybe) {
        if (maybe) {
            member(name, *maybe);
        }
    }

    /// The first member that was to hold a number that is not finite, in whose place stands null. Nothing is
    /// amiss where it is empty.
    [[nodiscard]] const std::string& notFinite() const { return notFinite_; }
    /// What was written.
    [[nodiscard]] std::string take() { return std::move(out_); }

  private:
    void integer(long long number);
    void separate();

    std::string out_;
    std::string_view key_;
    std::string notFinite_;
    bool separated_ = true; ///< nothing stands before the next value that a comma has to part it from
};

} // namespace forwright::contract
