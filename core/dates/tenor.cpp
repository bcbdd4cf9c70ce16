#include "dates/tenor.hpp"

#include <array>

namespace forwright::dates {
namespace {

struct UnitRow {
    TenorUnit unit;
    char letter;
    int most; ///< a hundred years
};
constexpr std::array<UnitRow, 4> units{{{TenorUnit::day, 'D', 36500},
                                        {TenorUnit::week, 'W', 5200},
                                        {TenorUnit::month, 'M', 1200},
                                        {TenorUnit::year, 'Y', 100}}};

constexpr std::array<std::string_view, 3> rollNames{"following", "modified-following", "preceding"};
constexpr std::array<std::string_view, 3> shortPeriodNames{"ON", "TN", "SN"};

/// The enumerator whose name stands at its place in `names`.
template <class Enum, std::size_t size>
std::optional<Enum> named(const std::array<std::string_view, size>& names, std::string_view name) {
    for (std::size_t i = 0; i < size; ++i) {
        if (names[i] == name) {
            return static_cast<Enum>(i);
        }
    }
    return std::nullopt;
}

bool countsMonths(TenorUnit unit) {
    return unit == TenorUnit::month || unit == TenorUnit::year;
}

} // namespace

std::optional<Tenor> parseTenor(std::string_view text) {
    constexpr std::size_t longest = 6; // 36500D
    if (text.size() < 2 || text.size() > longest || (text[0] == '0' && text.size() > 2)) {
        return std::nullopt;
    }
    int count = 0;
    for (const char c : text.substr(0, text.size() - 1)) {
        if (c < '0' || c > '9') {
            return std::nullopt;
        }
        count = 10 * count + (c - '0');
    }
    for (const UnitRow& row : units) {
        if (row.letter == text.back() && count <= row.most) {
            return Tenor{count, row.unit};
        }
    }
    return std::nullopt;
}

std::string toText(const Tenor& tenor) {
    return std::to_string(tenor.count) + units[static_cast<std::size_t>(tenor.unit)].letter;
}

Date addTenor(Date from, const Tenor& tenor) {
    switch (tenor.unit) {
    case TenorUnit::day:
        return from + std::chrono::days{tenor.count};
    case TenorUnit::week:
        return from + std::chrono::weeks{tenor.count};
    case TenorUnit::month:
        return addMonths(from, tenor.count);
    case TenorUnit::year:
        return addMonths(from, 12 * tenor.count);
    }
    return from;
}

std::optional<Roll> parseRoll(std::string_view name) {
    return named<Roll>(rollNames, name);
}

std::string_view nameOf(Roll roll) {
    return rollNames[static_cast<std::size_t>(roll)];
}

Date adjust(Date date, Roll roll, const BusinessCalendar& calendar) {
    switch (roll) {
    case Roll::following:
        return calendar.following(date);
    case Roll::modifiedFollowing:
        return calendar.modifiedFollowing(date);
    case Roll::preceding:
        return calendar.preceding(date);
    }
    return date;
}

Roll rollOf(TenorUnit unit) {
    return countsMonths(unit) ? Roll::modifiedFollowing : Roll::following;
}

Date advanceTenor(Date from, const Tenor& tenor, const BusinessCalendar& calendar, bool endToEnd) {
    const Date unadjusted = addTenor(from, tenor);
    if (endToEnd && countsMonths(tenor.unit) && calendar.isLastOfMonth(from)) {
        const std::chrono::year_month_day day{unadjusted};
        return calendar.preceding(Date{day.year() / day.month() / std::chrono::last});
    }
    return adjust(unadjusted, rollOf(tenor.unit), calendar);
}

Date settlementDate(Date from, int lag, const BusinessCalendar& lagCalendar,
                    const BusinessCalendar& calendar) {
    return calendar.following(lagCalendar.advance(from, lag));
}

std::optional<ShortPeriod> parseShortPeriod(std::string_view name) {
    return named<ShortPeriod>(shortPeriodNames, name);
}

std::string_view nameOf(ShortPeriod period) {
    return shortPeriodNames[static_cast<std::size_t>(period)];
}

Period datesOf(ShortPeriod period, Date today, Date spot, const BusinessCalendar& calendar) {
    const Date dealt = calendar.following(today);
    const Date tomorrow = calendar.advance(dealt, 1);
    switch (period) {
    case ShortPeriod::overnight:
        return {dealt, tomorrow};
    case ShortPeriod::tomorrowNext:
        return {tomorrow, calendar.advance(tomorrow, 1)};
    case ShortPeriod::spotNext:
        break;
    }
    return {spot, calendar.advance(spot, 1)};
}

} // namespace forwright::dates
