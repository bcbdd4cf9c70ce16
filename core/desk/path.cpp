#include "desk/path.hpp"

#include <algorithm>
#include <set>

namespace forwright::desk {
namespace {

using forward::Market;
using forward::Schedule;
using forward::Side;

/// The maturity from which on a distribution of `ex` counts.
Date firstCounting(const Market& market, Date ex) {
    return market.asset.calendar.following(ex);
}

std::set<Date> daysOfDistributions(const Market& market, const Schedule& schedule) {
    std::set<Date> days;
    const auto add = [&](Date ex) {
        if (income::counts(ex, schedule.holdFrom, schedule.maturity)) {
            days.insert(std::min(firstCounting(market, ex), schedule.maturity));
        }
    };
    for (const income::CashDistribution& row : market.income.cash) {
        add(row.ex);
    }
    for (const income::ProportionalDistribution& row : market.income.proportional) {
        add(row.ex);
    }
    return days;
}

/// The dates the path is drawn through.
std::set<Date> datesOf(const Market& market, const Schedule& schedule, const std::set<Date>& distributions) {
    const dates::BusinessCalendar& calendar = market.asset.calendar;
    const Date first = calendar.following(schedule.holdFrom);
    std::set<Date> all{std::min(first, schedule.maturity), schedule.maturity};
    if (2 * static_cast<int>(distributions.size()) <= mostPathPoints / 2) {
        for (const Date day : distributions) {
            all.insert(day);
            all.insert(std::max(calendar.advance(day, -1), first));
        }
    }
    const int room = mostPathPoints - static_cast<int>(all.size());
    const int span = dates::daysBetween(first, schedule.maturity);
    const int stride = std::max(1, (span + room - 1) / room);
    for (Date day = first; day < schedule.maturity; day += std::chrono::days{stride}) {
        all.insert(std::min(calendar.following(day), schedule.maturity));
    }
    return all;
}

} // namespace

outcome::Outcome<Path> path(const Market& market, const forward::Inquiry& inquiry) {
    const forward::Places places;
    const outcome::Outcome<forward::Quote> whole = forward::quote(market, inquiry, false, places);
    if (!whole) {
        return whole.faults();
    }
    const Schedule& schedule = whole.value().schedule;
    const std::set<Date> distributions = daysOfDistributions(market, schedule);

    Path result;
    result.notices = whole.value().notices;
    outcome::Faults faults;
    for (const Date date : datesOf(market, schedule, distributions)) {
        const outcome::Outcome<Schedule> until =
            forward::schedule(market, {date, std::nullopt}, places.maturity);
        if (!until) {
            return until.faults();
        }
        PathPoint point{date};
        const auto put = [&](double& into, Side side) {
            const outcome::Outcome<forward::Price> price =
                forward::checked(market, forward::price(market, until.value(), side), side);
            if (price) {
                into = price.value().forward;
            } else {
                outcome::append(faults, "", price.faults());
            }
        };
        put(point.fair, Side::fair);
        put(point.bid, Side::bid);
        put(point.offer, Side::offer);
        if (!faults.empty()) {
            return faults;
        }
        result.points.push_back(point);
        if (distributions.count(date) == 0) {
            continue;
        }
        const forward::SideInputs fair = forward::inputsOf(market, until.value(), Side::fair);
        for (const forward::IncomeLine& line :
             forward::incomeLines(market, until.value(), fair, forward::price(market, until.value(), fair))) {
            if (line.counted && std::min(firstCounting(market, line.ex), schedule.maturity) == date) {
                result.steps.push_back({line.at, date, -line.atSettlement});
            }
        }
    }
    return result;
}

} // namespace forwright::desk
