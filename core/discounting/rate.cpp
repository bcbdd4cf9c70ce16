#include "discounting/rate.hpp"

#include "dates/date.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

namespace forwright::discounting {

namespace {

constexpr std::array<std::string_view, 6> names{"continuous", "simple",    "annual",
                                                "semiannual", "quarterly", "monthly"};

/// How often interest is added in a year; for the periodic compoundings only.
double timesAYear(Compounding compounding) {
    switch (compounding) {
    case Compounding::semiannual:
        return 2.0;
    case Compounding::quarterly:
        return 4.0;
    case Compounding::monthly:
        return 12.0;
    default:
        return 1.0;
    }
}

double timeBetween(const Rate& rate, Date from, Date to) {
    return from == to ? 0.0 : dates::yearFraction(rate.dayCount, from, to);
}

/// The longest year fraction from `from` to a day up to `to`. ACT/365L alone shrinks on the way, on a 29
/// February, as its denominator becomes 366.
double longestTime(const Rate& rate, Date from, Date to) {
    double longest = timeBetween(rate, from, to);
    if (rate.dayCount.kind != dates::DayCount::act365L) {
        return longest;
    }
    using namespace std::chrono;
    for (year y = year_month_day{from}.year(); y <= year_month_day{to}.year(); ++y) {
        const Date before = y / February / 28;
        if (y.is_leap() && before > from && before < to) {
            longest = std::max(longest, timeBetween(rate, from, before));
        }
    }
    return longest;
}

bool sameCalendar(const dates::BusinessCalendar& one, const dates::BusinessCalendar& other) {
    return one.centres() == other.centres();
}

} // namespace

std::optional<Compounding> parseCompounding(std::string_view name) {
    for (std::size_t i = 0; i < names.size(); ++i) {
        if (names[i] == name) {
            return static_cast<Compounding>(i);
        }
    }
    return std::nullopt;
}

std::string_view nameOf(Compounding compounding) {
    return names[static_cast<std::size_t>(compounding)];
}

std::span<const std::string_view> compoundingNames() {
    return names;
}

double logFactor(const Rate& rate, Date from, Date to) {
    const double time = timeBetween(rate, from, to);
    switch (rate.compounding) {
    case Compounding::continuous:
        return -rate.value * time;
    case Compounding::simple: {
        const double interest = rate.value * time;
        return interest > -1.0 ? -numeric::log1p(interest) : std::numeric_limits<double>::infinity();
    }
    default: {
        const double times = timesAYear(rate.compounding);
        const double interest = rate.value / times;
        return interest > -1.0 ? -times * time * numeric::log1p(interest)
                               : std::numeric_limits<double>::infinity();
    }
    }
}

double logFactorSlope(const Rate& rate, Date from, Date to) {
    const double time = timeBetween(rate, from, to);
    switch (rate.compounding) {
    case Compounding::continuous:
        return -time;
    case Compounding::simple:
        return -time / (1.0 + rate.value * time);
    default:
        return -time / (1.0 + rate.value / timesAYear(rate.compounding));
    }
}

double valueFromLogFactor(const Rate& convention, Date from, Date to, double logFactor) {
    const double time = timeBetween(convention, from, to);
    if (time == 0.0) {
        return 0.0;
    }
    switch (convention.compounding) {
    case Compounding::continuous:
        return -logFactor / time;
    case Compounding::simple:
        return numeric::expm1(-logFactor) / time;
    default: {
        const double times = timesAYear(convention.compounding);
        return times * numeric::expm1(-logFactor / (times * time));
    }
    }
}

std::optional<outcome::Fault> refusal(const Rate& rate, Date from, Date to) {
    if (!std::isfinite(rate.value)) {
        return outcome::Fault{"", "not-finite", "A rate has to be a finite number."};
    }
    if (rate.compounding == Compounding::continuous) {
        return std::nullopt;
    }
    if (rate.compounding == Compounding::simple) {
        if (1.0 + rate.value * longestTime(rate, from, to) > 0.0) {
            return std::nullopt;
        }
        return outcome::Fault{"", "rate-too-low",
                              "At this simple rate one unit at " + dates::toIso(from) +
                                  " would be worth nothing by " + dates::toIso(to) +
                                  ": 1 + rate × years has to be positive."};
    }
    if (1.0 + rate.value / timesAYear(rate.compounding) > 0.0) {
        return std::nullopt;
    }
    return outcome::Fault{
        "", "rate-too-low",
        "At this rate one unit would be worth nothing after one period: 1 + rate / (times a year) has "
        "to be positive."};
}

std::string conventionOf(const Rate& rate) {
    return std::string(nameOf(rate.compounding)) + " " + std::string(dates::nameOf(rate.dayCount.kind));
}

bool sameConvention(const Rate& one, const Rate& other) {
    if (one.compounding != other.compounding || one.dayCount.kind != other.dayCount.kind) {
        return false;
    }
    switch (one.dayCount.kind) {
    case dates::DayCount::actActIcma:
        return one.dayCount.frequency == other.dayCount.frequency;
    case dates::DayCount::thirtyE360Isda:
        return one.dayCount.termination == other.dayCount.termination;
    case dates::DayCount::bus252:
        return sameCalendar(one.dayCount.calendar, other.dayCount.calendar);
    default:
        return true;
    }
}

} // namespace forwright::discounting
