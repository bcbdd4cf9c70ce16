#pragma once

#include "dates/business_calendar.hpp"
#include "dates/date.hpp"

#include <optional>
#include <string>
#include <string_view>

namespace forwright::dates {

enum class TenorUnit { day, week, month, year };

/// A length of time as the trade writes it: `2D`, `1W`, `3M`, `5Y`. `count` is from 0 to the limit of
/// `parseTenor`.
struct Tenor {
    int count = 0;
    TenorUnit unit = TenorUnit::day;

    friend bool operator==(const Tenor&, const Tenor&) = default;
};

/// The tenor written `<n>D|W|M|Y`, capital letters, n from 0 to 36500 D, 5200 W, 1200 M, 100 Y, no sign and
/// no leading zero; nothing where it is anything else.
[[nodiscard]] std::optional<Tenor> parseTenor(std::string_view text);
/// As `parseTenor` reads it.
[[nodiscard]] std::string toText(const Tenor& tenor);

/// `tenor` after `from` on the calendar alone; a month or year that has no such day gives the month's last.
/// The answer may lie after `latest` (by up to 100 years): who asks says so to the person.
[[nodiscard]] Date addTenor(Date from, const Tenor& tenor);

/// What becomes of a date on which no business is done.
enum class Roll { following, modifiedFollowing, preceding };
[[nodiscard]] std::optional<Roll>
parseRoll(std::string_view name); ///< `following`, `modified-following`, `preceding`
[[nodiscard]] std::string_view nameOf(Roll roll);
[[nodiscard]] Date adjust(Date date, Roll roll, const BusinessCalendar& calendar);

/// The roll by which a tenor of that unit ends: D and W `following`, M and Y `modifiedFollowing`.
[[nodiscard]] Roll rollOf(TenorUnit unit);

/// The business day `tenor` after `from`: D counts calendar days and, like W, rolls `following`; M and Y roll
/// `modified-following`. With `endToEnd`, where `from` is its month's last business day, M and Y end on the
/// last business day of their month.
[[nodiscard]] Date advanceTenor(Date from, const Tenor& tenor, const BusinessCalendar& calendar,
                                bool endToEnd);

/// The day on which a deal of `from` settles: the `lag`-th business day of `lagCalendar` after it, and where
/// that is no business day of `calendar`, the next that is. A lag of 0 on no business day is the next one.
/// Two calendars, because a holiday of the dollar's own delays a currency pair only when it falls on the last
/// of these days.
[[nodiscard]] Date settlementDate(Date from, int lag, const BusinessCalendar& lagCalendar,
                                  const BusinessCalendar& calendar);

/// The periods shorter than a week that money and currency markets name rather than count (common practice of
/// the trade).
enum class ShortPeriod {
    overnight,    ///< `ON`: from today to the next business day
    tomorrowNext, ///< `TN`: from that day to the one after
    spotNext,     ///< `SN`: from the spot date to the next business day
};
[[nodiscard]] std::optional<ShortPeriod> parseShortPeriod(std::string_view name); ///< `ON`, `TN`, `SN`
[[nodiscard]] std::string_view nameOf(ShortPeriod period);

/// Two dates, `start` before `end`.
struct Period {
    Date start;
    Date end;
};
/// The days between which a short period runs, dealt on `today` with that `spot` date; a `today` on which no
/// business is done counts as the next business day.
[[nodiscard]] Period datesOf(ShortPeriod period, Date today, Date spot, const BusinessCalendar& calendar);

} // namespace forwright::dates
