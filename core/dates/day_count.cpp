#include "dates/day_count.hpp"

#include <algorithm>
#include <array>
#include <cassert>

namespace forwright::dates {
namespace {

constexpr std::array<std::string_view, 10> names{"ACT/360", "ACT/365.FIXED", "ACT/ACT.ISDA", "ACT/ACT.ICMA",
                                                 "30/360",  "30E/360",       "30E/360.ISDA", "ACT/365L",
                                                 "1/1",     "BUS/252"};

int yearOf(Date date) {
    return static_cast<int>(std::chrono::year_month_day{date}.year());
}

bool isLastOfFebruary(Date date) {
    return std::chrono::year_month_day{date}.month() == std::chrono::February && isLastOfMonth(date);
}

double actActIsda(Date from, Date to) {
    int leapDays = 0;
    for (int year = yearOf(from); year <= yearOf(to); ++year) {
        if (std::chrono::year{year}.is_leap()) {
            const Date start{std::chrono::year{year} / std::chrono::January / 1};
            const Date end{std::chrono::year{year + 1} / std::chrono::January / 1};
            leapDays += std::max(0, daysBetween(std::max(from, start), std::min(to, end)));
        }
    }
    return leapDays / 366.0 + (daysBetween(from, to) - leapDays) / 365.0;
}

/// The regular dates of ICMA Rule 251, numbered from 0 at the anchor.
class RegularSchedule {
  public:
    RegularSchedule(Date anchor, int frequency)
        : anchor_{anchor}, months_{12 / frequency}, monthEnd_{isLastOfMonth(anchor)} {}

    [[nodiscard]] Date date(int number) const {
        const Date same = addMonths(anchor_, number * months_);
        const std::chrono::year_month_day day{same};
        return monthEnd_ ? Date{day.year() / day.month() / std::chrono::last} : same;
    }

    /// The number of the last regular date that is not after `date`.
    [[nodiscard]] int numberAt(Date date) const {
        const std::chrono::year_month_day here{date};
        const std::chrono::year_month_day start{anchor_};
        const auto monthsOn = (here.year() / here.month() - start.year() / start.month()).count();
        int number = static_cast<int>(monthsOn) / months_ + 1;
        while (this->date(number) > date) {
            --number;
        }
        return number;
    }

    /// How far `date` has come in its regular period, as a part of it.
    [[nodiscard]] double partAt(Date date, int number) const {
        const Date start = this->date(number);
        return static_cast<double>(daysBetween(start, date)) / daysBetween(start, this->date(number + 1));
    }

  private:
    Date anchor_;
    int months_;
    bool monthEnd_;
};

/// The regular periods between the two dates where they are a whole number by the calendar, else nothing.
std::optional<int> wholePeriods(Date from, Date to, int months) {
    const std::chrono::year_month_day start{from};
    const std::chrono::year_month_day end{to};
    const int apart = static_cast<int>((end.year() / end.month() - start.year() / start.month()).count());
    const bool whole = apart % months == 0 && (addMonths(from, apart) == to || addMonths(to, -apart) == from);
    return whole ? std::optional{apart / months} : std::nullopt;
}

double actActIcma(const DayCountRule& rule, Date from, Date to) {
    assert(isCouponFrequency(rule.frequency));
    if (!rule.regularDate) {
        if (const auto periods = wholePeriods(from, to, 12 / rule.frequency)) {
            return static_cast<double>(*periods) / rule.frequency;
        }
    }
    const RegularSchedule schedule{rule.regularDate.value_or(to), rule.frequency};
    const int first = schedule.numberAt(from);
    const int last = schedule.numberAt(to);
    // Whole periods apart from the parts, so that a whole number of them comes out exact.
    return (last - first + (schedule.partAt(to, last) - schedule.partAt(from, first))) / rule.frequency;
}

/// The days of the 30/360 family, given the days of the month to count from and to.
int thirtyDayMonths(Date from, unsigned fromDay, Date to, unsigned toDay) {
    const std::chrono::year_month_day start{from};
    const std::chrono::year_month_day end{to};
    const auto months = (end.year() / end.month() - start.year() / start.month()).count();
    return 30 * static_cast<int>(months) + static_cast<int>(toDay) - static_cast<int>(fromDay);
}

unsigned dayOf(Date date) {
    return static_cast<unsigned>(std::chrono::year_month_day{date}.day());
}

int thirty360(Date from, Date to) {
    const unsigned fromDay = std::min(dayOf(from), 30U);
    const unsigned toDay = fromDay == 30 ? std::min(dayOf(to), 30U) : dayOf(to);
    return thirtyDayMonths(from, fromDay, to, toDay);
}

int thirtyE360(Date from, Date to) {
    return thirtyDayMonths(from, std::min(dayOf(from), 30U), to, std::min(dayOf(to), 30U));
}

int thirtyE360Isda(Date from, Date to, std::optional<Date> termination) {
    const unsigned fromDay = isLastOfMonth(from) ? 30 : dayOf(from);
    const bool kept = isLastOfFebruary(to) && to == termination;
    const unsigned toDay = isLastOfMonth(to) && !kept ? 30 : dayOf(to);
    return thirtyDayMonths(from, fromDay, to, toDay);
}

bool holdsLeapDay(Date from, Date to) {
    for (int year = yearOf(from); year <= yearOf(to); ++year) {
        const auto leapDay = std::chrono::year{year} / std::chrono::February / 29;
        if (leapDay.ok() && Date{leapDay} > from && Date{leapDay} <= to) {
            return true;
        }
    }
    return false;
}

double forward(const DayCountRule& rule, Date from, Date to) {
    const int days = daysBetween(from, to);
    switch (rule.kind) {
    case DayCount::act360:
        return days / 360.0;
    case DayCount::act365Fixed:
        return days / 365.0;
    case DayCount::actActIsda:
        return actActIsda(from, to);
    case DayCount::actActIcma:
        return actActIcma(rule, from, to);
    case DayCount::thirty360:
        return thirty360(from, to) / 360.0;
    case DayCount::thirtyE360:
        return thirtyE360(from, to) / 360.0;
    case DayCount::thirtyE360Isda:
        return thirtyE360Isda(from, to, rule.termination) / 360.0;
    case DayCount::act365L:
        return days / (holdsLeapDay(from, to) ? 366.0 : 365.0);
    case DayCount::one:
        return 1;
    case DayCount::bus252:
        return rule.calendar.businessDaysBetween(from, to) / 252.0;
    }
    return 0;
}

} // namespace

std::optional<DayCount> parseDayCount(std::string_view name) {
    const auto place = std::find(names.begin(), names.end(), name);
    return place == names.end() ? std::nullopt : std::optional{static_cast<DayCount>(place - names.begin())};
}

std::string_view nameOf(DayCount kind) {
    return names[static_cast<std::size_t>(kind)];
}

std::span<const std::string_view> dayCountNames() {
    return names;
}

bool isCouponFrequency(int frequency) {
    return frequency == 1 || frequency == 2 || frequency == 3 || frequency == 4 || frequency == 6 ||
           frequency == 12;
}

double yearFraction(const DayCountRule& rule, Date from, Date to) {
    if (from == to) {
        return rule.kind == DayCount::one ? 1 : 0;
    }
    return from < to ? forward(rule, from, to) : -forward(rule, to, from);
}

} // namespace forwright::dates
