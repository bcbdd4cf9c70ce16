#pragma once

#include "dates/business_calendar.hpp"
#include "dates/date.hpp"

#include <optional>
#include <span>
#include <string_view>

namespace forwright::dates {

/// Day count conventions by their FpML names. Rules: 2006 ISDA Definitions §4.16; ICMA Rule 251. Everywhere
/// the start is included and the end is not; d₁/m₁/y₁ and d₂/m₂/y₂ are the start and the end, and the three
/// 30/360 conventions are [360(y₂−y₁) + 30(m₂−m₁) + (d₂−d₁)]/360 after their own changes to d₁ and d₂.
enum class DayCount {
    act360,         ///< `ACT/360`: days / 360
    act365Fixed,    ///< `ACT/365.FIXED`: days / 365
    actActIsda,     ///< `ACT/ACT.ISDA`: days in leap years / 366 + days in other years / 365
    actActIcma,     ///< `ACT/ACT.ICMA`: days / (frequency × days of the regular period), odd periods split
    thirty360,      ///< `30/360`: d₁ 31 → 30; d₂ 31 → 30 if d₁ is then 30; no rule for February
    thirtyE360,     ///< `30E/360`: d₁ and d₂ 31 → 30
    thirtyE360Isda, ///< `30E/360.ISDA`: the last of a month → 30, but not the end where it is the last of
                    ///< February and the termination date
    act365L,        ///< `ACT/365L`, annual: days / 366 if a 29 February lies in (start, end], else days / 365
    one,            ///< `1/1`: 1, whatever the dates
    bus252,         ///< `BUS/252`: business days / 252
};

/// A day count with what some of them need beside the two dates.
struct DayCountRule {
    DayCount kind = DayCount::act365Fixed;
    BusinessCalendar calendar{}; ///< BUS/252 counts on it
    int frequency = 1;           ///< ACT/ACT.ICMA: coupons a year, one of `isCouponFrequency`
    std::optional<Date>
        termination{}; ///< 30E/360.ISDA: the end that, as last of February, is not moved to the 30th
    /// ACT/ACT.ICMA: a date of the regular schedule, from which the regular periods are counted both ways,
    /// every 12/frequency months, on the last of each month where the date is the last of its own. For an odd
    /// first period it is the period's end, for an odd last one its start. With it, fractions of adjoining
    /// periods add up. Left out, it is the end of the period in question, and a period that is a whole number
    /// of regular ones by the calendar, counted from either end, is that number.
    std::optional<Date> regularDate{};
};

/// The convention of that FpML name (`ACT/360`, …), or nothing.
[[nodiscard]] std::optional<DayCount> parseDayCount(std::string_view name);
[[nodiscard]] std::string_view nameOf(DayCount kind);
/// All names, in the order of the enumeration.
[[nodiscard]] std::span<const std::string_view> dayCountNames();
/// 1, 2, 3, 4, 6 or 12: the coupons a year whose periods are whole months.
[[nodiscard]] bool isCouponFrequency(int frequency);

/// The year fraction from `from` to `to`; where `to` is earlier, minus the fraction from `to` to `from`. 0
/// where they are one day, but 1 for `1/1`. It never falls as `to` moves on, with two exceptions that lie in
/// the conventions: `ACT/365L` where the end passes a 29 February, and `ACT/ACT.ICMA` without a regular date.
[[nodiscard]] double yearFraction(const DayCountRule& rule, Date from, Date to);

} // namespace forwright::dates
