#include "desk/path.hpp"

#include "forward/carry_table.hpp"

#include <algorithm>
#include <optional>
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

/// One side's forward by maturity: from a table where the market allows one, else each price by itself.
class SidePrices {
  public:
    SidePrices(const Market& market, const Schedule& longest, Side side) : market_(market), side_(side) {
        if (forward::CarryTable::separates(market)) {
            table_.emplace(market, longest, side);
        }
    }
    [[nodiscard]] outcome::Outcome<double> forward(const Schedule& schedule) const {
        forward::Price price;
        if (table_) {
            price.forward = table_->forward(schedule.maturity, schedule.settlement);
        } else {
            price = forward::price(market_, schedule, side_);
        }
        const outcome::Outcome<forward::Price> checked = forward::checked(market_, std::move(price), side_);
        if (!checked) {
            return checked.faults();
        }
        return checked.value().forward;
    }

  private:
    const Market& market_;
    Side side_;
    std::optional<forward::CarryTable> table_;
};

/// What each distribution of `date` does to the fair forward.
std::vector<PathStep> stepsOn(const Market& market, const Schedule& until, Date last) {
    std::vector<PathStep> steps;
    const forward::SideInputs fair = forward::inputsOf(market, until, Side::fair);
    for (const forward::IncomeLine& line :
         forward::incomeLines(market, until, fair, forward::price(market, until, fair))) {
        if (line.counted && std::min(firstCounting(market, line.ex), last) == until.maturity) {
            steps.push_back({line.at, until.maturity, -line.atSettlement});
        }
    }
    return steps;
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
    const SidePrices fair(market, schedule, Side::fair);
    const SidePrices bid(market, schedule, Side::bid);
    const SidePrices offer(market, schedule, Side::offer);

    Path result;
    result.notices = whole.value().notices;
    for (const Date date : datesOf(market, schedule, distributions)) {
        if (date == schedule.maturity) {
            // The end is the quote itself, to the last digit.
            result.points.push_back(
                {date, whole.value().fair.forward, whole.value().bid.forward, whole.value().offer.forward});
        }
        const outcome::Outcome<Schedule> until =
            forward::schedule(market, {date, std::nullopt}, places.maturity);
        if (!until) {
            return until.faults();
        }
        if (date != schedule.maturity) {
            const auto fairHere = fair.forward(until.value());
            const auto bidHere = bid.forward(until.value());
            const auto offerHere = offer.forward(until.value());
            for (const auto* price : {&fairHere, &bidHere, &offerHere}) {
                if (!*price) {
                    return price->faults();
                }
            }
            result.points.push_back({date, fairHere.value(), bidHere.value(), offerHere.value()});
        }
        if (distributions.count(date) != 0) {
            std::vector<PathStep> steps = stepsOn(market, until.value(), schedule.maturity);
            result.steps.insert(result.steps.end(), steps.begin(), steps.end());
        }
    }
    return result;
}

} // namespace forwright::desk
