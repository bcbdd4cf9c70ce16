#include "dates/holiday_rules.hpp"

#include "dates/special_days.hpp"

#include <algorithm>
#include <cassert>

namespace forwright::dates::holidays {
namespace {

using std::chrono::days;
using std::chrono::month;
using std::chrono::Saturday;
using std::chrono::Sunday;
using std::chrono::weekday;
using std::chrono::year;

/// The day of March or September on which Japan's calendar puts an equinox, by the formula of the
/// Hydrographic Department's almanac handbook (Shin-koyomi benricho), made for 1980 to 2099 and, with the
/// second constant, to 2150. The law leaves the day to the observatory, which announces it each February for
/// the year after. (From memory; the tests hold it against an astronomical library.)
days equinox(int inYear, double at1980, double from2100) {
    const int since = inYear - 1980;
    const double moment = (inYear < 2100 ? at1980 : from2100) + 0.242194 * since;
    return days{static_cast<int>(moment) - since / 4};
}

std::optional<Date> dayOf(const Place& place, int inYear) {
    const year y{inYear};
    const month m{place.month};
    switch (place.kind) {
    case Place::Kind::fixed:
        return Date{y / m / place.number};
    case Place::Kind::nthWeekday:
        return nthWeekday(y / m, place.weekday, static_cast<unsigned>(place.number));
    case Place::Kind::lastWeekday:
        return Date{y / m / place.weekday[std::chrono::last]};
    case Place::Kind::weekdayUntil: {
        const Date end{y / m / place.number};
        return end - (weekday{end} - place.weekday);
    }
    case Place::Kind::easter:
        return easterSunday(y) + days{place.number};
    case Place::Kind::vernalEquinox:
        return Date{y / std::chrono::March / 1} + equinox(inYear, 20.8431, 21.8510) - days{1};
    case Place::Kind::autumnalEquinox:
        return Date{y / std::chrono::September / 1} + equinox(inYear, 23.2488, 24.2488) - days{1};
    case Place::Kind::chinese:
        if (const auto festival = festivalDay(place.festival, inYear)) {
            return *festival + days{place.number};
        }
        break;
    }
    return std::nullopt;
}

bool isSunday(Date date) {
    return weekday{date} == Sunday;
}

/// Whether the holiday waits until the others have their days.
bool waits(Moves moves, Date date, const Closings& closings) {
    switch (moves) {
    case Moves::weekendToNextFree:
        return !isWeekday(date);
    case Moves::sundayToNextFree:
        return isSunday(date);
    case Moves::sundayOrTwiceToNextFree:
        return isSunday(date) || closings.holds(date);
    case Moves::never:
    case Moves::sundayToMonday:
    case Moves::toNearestWeekday:
        break;
    }
    return false;
}

days moveOf(Moves moves, Date date) {
    const bool moving = moves == Moves::sundayToMonday || moves == Moves::toNearestWeekday;
    if (moving && isSunday(date)) {
        return days{1};
    }
    return days{moves == Moves::toNearestWeekday && weekday{date} == Saturday ? -1 : 0};
}

Date nextFree(Date date, const Closings& closings) {
    do {
        date += days{1};
    } while (!isWeekday(date) || closings.holds(date));
    return date;
}

/// Makes holidays of the days that lie between two.
void addBetween(Closings& closings) {
    const Closings own = closings;
    for (const Closing& before : own.all()) {
        for (const Closing& after : own.all()) {
            const Date between = before.date + days{1};
            if (after.date - before.date == days{2} && !closings.holds(between) && !isSunday(between)) {
                closings.add({between, "Day between two holidays"});
            }
        }
    }
}

Closings closingsOf(const RuleSet& set, int inYear) {
    Closings closings;
    Closings waiting;
    for (const SingleDay& single : set.singleDays) {
        if (single.date.year() == year{inYear}) {
            closings.add({Date{single.date}, single.name});
        }
    }
    for (const Rule& rule : set.rules) {
        if (inYear < rule.firstYear || inYear > rule.lastYear) {
            continue;
        }
        const auto date = dayOf(rule.place, inYear);
        if (!date || std::find(set.dropped.begin(), set.dropped.end(), *date) != set.dropped.end()) {
            continue;
        }
        const bool wait = waits(rule.moves, *date, closings);
        (wait ? waiting : closings).add({*date + moveOf(rule.moves, *date), rule.name});
    }
    for (const Closing& closing : waiting.all()) {
        closings.add({nextFree(closing.date, closings), closing.name});
    }
    if (inYear >= set.betweenFrom) {
        addBetween(closings);
    }
    return closings;
}

} // namespace

void Closings::add(const Closing& closing) {
    assert(count_ < closings_.size());
    closings_[count_++] = closing;
}

bool Closings::holds(Date date) const {
    const auto closings = all();
    return std::any_of(closings.begin(), closings.end(),
                       [date](const Closing& closing) { return closing.date == date; });
}

Closings closingsOf(std::span<const RuleSet> sets, int inYear) {
    Closings closings;
    for (const RuleSet& set : sets) {
        const Closings more = closingsOf(set, inYear);
        for (const Closing& closing : more.all()) {
            closings.add(closing);
        }
    }
    return closings;
}

} // namespace forwright::dates::holidays
