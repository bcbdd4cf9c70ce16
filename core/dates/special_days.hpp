#pragma once

#include "dates/date.hpp"

#include <optional>
#include <string_view>

namespace forwright::dates {

/// The `nth` (1 to 5) such weekday of a month. The fifth may fall into the next month.
[[nodiscard]] constexpr Date nthWeekday(std::chrono::year_month month, std::chrono::weekday weekday,
                                        unsigned nth) {
    return Date{month / weekday[1]} + std::chrono::weeks{static_cast<int>(nth) - 1};
}

/// The day on which currency and interest-rate futures commonly mature (in March, June, September, December).
[[nodiscard]] constexpr Date thirdWednesday(std::chrono::year_month month) {
    return nthWeekday(month, std::chrono::Wednesday, 3);
}

/// The day on which share and index options and futures commonly mature.
[[nodiscard]] constexpr Date thirdFriday(std::chrono::year_month month) {
    return nthWeekday(month, std::chrono::Friday, 3);
}

/// A month's third Wednesday or third Friday, as a maturity (common practice of the trade).
struct ThirdDay {
    std::chrono::year_month month;
    bool friday = false;
    [[nodiscard]] constexpr Date date() const { return friday ? thirdFriday(month) : thirdWednesday(month); }
};
/// `third-wednesday 2027-03`, `third-friday 2027-03`; years 1900 to 2199.
[[nodiscard]] std::optional<ThirdDay> parseThirdDay(std::string_view text);

/// Easter Sunday of the Gregorian calendar, years 1583 and later. From the definition (the Sunday after the
/// full moon that the church's tables put on or after 21 March), with the epact as Clavius set it out in
/// 1603; the arithmetic is Knuth's, The Art of Computer Programming, vol. 1, section 1.3.2, exercise 14 (from
/// memory, checked against published Good Fridays).
[[nodiscard]] Date easterSunday(std::chrono::year year);

} // namespace forwright::dates
