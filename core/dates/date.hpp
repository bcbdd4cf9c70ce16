#pragma once

#include <chrono>
#include <optional>
#include <string>
#include <string_view>

/// Dates, day counts, business calendars and tenors: everything about a forward's days that knows no price.
namespace forwright::dates {

/// A day of the proleptic Gregorian calendar.
using Date = std::chrono::sys_days;

/// The first and the last date that a request may name. Calculations may step a little outside: every
/// function of this folder is defined for the years 0 to 9999 unless it says otherwise.
inline constexpr Date earliest{std::chrono::year{1900} / std::chrono::January / 1};
inline constexpr Date latest{std::chrono::year{2199} / std::chrono::December / 31};

/// The date written `YYYY-MM-DD` (ISO 8601, extended form, four digits of year); nothing where the text is
/// anything else, names no day that exists or lies outside [earliest, latest].
[[nodiscard]] std::optional<Date> parseIso(std::string_view text);

/// `YYYY-MM-DD`.
[[nodiscard]] std::string toIso(Date date);

/// Days from `from` to `to`; negative where `to` is earlier. The start is included, the end is not.
[[nodiscard]] constexpr int daysBetween(Date from, Date to) {
    return static_cast<int>((to - from).count());
}

/// ACT/365.FIXED years, the time in which curves and models are written.
[[nodiscard]] constexpr double years(Date from, Date to) {
    return daysBetween(from, to) / 365.0;
}

/// Monday to Friday.
[[nodiscard]] constexpr bool isWeekday(Date date) {
    const unsigned weekday = std::chrono::weekday{date}.iso_encoding();
    return weekday <= 5;
}

/// The last day of its month.
[[nodiscard]] constexpr bool isLastOfMonth(Date date) {
    const std::chrono::year_month_day day{date};
    return day.day() == std::chrono::year_month_day_last{day.year() / day.month() / std::chrono::last}.day();
}

/// The same day of the month `months` later (earlier where negative); the month's last day where it has no
/// such day. |months| up to 12,000.
[[nodiscard]] constexpr Date addMonths(Date date, int months) {
    const std::chrono::year_month_day day{date};
    const std::chrono::year_month month = day.year() / day.month() + std::chrono::months{months};
    const std::chrono::year_month_day same = month / day.day();
    return same.ok() ? Date{same} : Date{month / std::chrono::last};
}

} // namespace forwright::dates
