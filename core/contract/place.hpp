#pragma once

#include <cstddef>
#include <string>
#include <string_view>

namespace forwright::contract {

/// Where something stands in a request: a member of, or a row in, the place around it. Costs nothing until
/// its pointer is asked for, so the places around it (and the names) have to live as long as it does.
class Place {
  public:
    /// The whole request.
    Place() = default;

    [[nodiscard]] Place member(std::string_view name) const { return {this, name, 0, Kind::member}; }
    [[nodiscard]] Place row(std::size_t index) const { return {this, {}, index, Kind::row}; }

    /// Its RFC 6901 pointer.
    [[nodiscard]] std::string pointer() const;

  private:
    enum class Kind { whole, member, row };
    Place(const Place* around, std::string_view name, std::size_t index, Kind kind)
        : around_(around), name_(name), index_(index), kind_(kind) {}

    const Place* around_ = nullptr;
    std::string_view name_;
    std::size_t index_ = 0;
    Kind kind_ = Kind::whole;
};

/// `/` and the name, `~` and `/` in it escaped (RFC 6901, section 3).
void appendToPointer(std::string& pointer, std::string_view name);

} // namespace forwright::contract
