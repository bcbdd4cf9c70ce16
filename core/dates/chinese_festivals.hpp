#pragma once

#include "dates/date.hpp"

#include <cstdint>
#include <optional>

namespace forwright::dates {

/// The days of the Chinese calendar on which Hong Kong keeps holidays.
enum class Festival : std::uint8_t {
    newYear,    ///< first day of the first month
    chingMing,  ///< the sun at longitude 15°
    buddha,     ///< eighth day of the fourth month
    tuenNg,     ///< fifth day of the fifth month
    midAutumn,  ///< fifteenth day of the eighth month
    chungYeung, ///< ninth day of the ninth month
};

/// The years of the table.
inline constexpr int firstFestivalYear = 1999;
inline constexpr int lastFestivalYear = 2100;

/// The day of `festival` in that year by China's time; nothing outside the table's years. From 2057 on a new
/// moon near midnight (28 September 2057, 4 September 2089, 7 August 2097) makes a day uncertain.
[[nodiscard]] std::optional<Date> festivalDay(Festival festival, int year);

} // namespace forwright::dates
