#include "desk/compare.hpp"

#include <cmath>

namespace forwright::desk {
namespace {

using forward::Market;

/// What was said of the market's funding curve is said of the assumption in its place.
outcome::Faults atAssumption(const Market& market, std::size_t index, outcome::Faults remarks) {
    const std::string from = market.at + "/funding/curve";
    for (outcome::Remark& remark : remarks) {
        if (remark.at.rfind(from, 0) == 0) {
            remark.at = "/fundings/" + std::to_string(index) + "/curve" + remark.at.substr(from.size());
        }
    }
    return remarks;
}

outcome::Outcome<ComparisonRow> rowOf(const Market& market, const forward::Schedule& schedule,
                                      std::size_t index, const FundingAssumption& assumption,
                                      outcome::Notices& notices) {
    outcome::Review found = forward::review(market, schedule);
    outcome::append(notices, "", atAssumption(market, index, std::move(found.notices)));
    if (!found.faults.empty()) {
        return atAssumption(market, index, std::move(found.faults));
    }
    const auto price =
        forward::checked(market, forward::price(market, schedule, forward::Side::fair), forward::Side::fair);
    if (!price) {
        return atAssumption(market, index, price.faults());
    }
    ComparisonRow row;
    row.name = assumption.name;
    row.fair = price.value().forward;
    row.expectedFactor = price.value().settlementFactor;
    row.averageRateForward = row.fair;
    row.deviationLog = 0.0;
    if (const discounting::RandomDiscount* random = assumption.curve->random(); random != nullptr) {
        row.random = true;
        const auto rate = random->normalRate();
        row.fitted = rate && rate->fitted;
        const auto view = forward::randomView(market, schedule, price.value());
        row.averageRateForward = view->averageRateForward;
        row.gap = view->gap;
        row.deviationLog = view->varianceLog ? std::optional(std::sqrt(*view->varianceLog)) : std::nullopt;
    }
    return row;
}

} // namespace

outcome::Outcome<Comparison> compare(const Market& market, const ComparisonAsked& asked) {
    const auto schedule = forward::schedule(market, asked.inquiry.maturity, "/inquiry/maturity");
    if (!schedule) {
        return schedule.faults();
    }
    Comparison result;
    result.schedule = schedule.value();
    outcome::Faults faults;
    for (std::size_t i = 0; i < asked.fundings.size(); ++i) {
        Market assumed = market;
        assumed.funding.curve = asked.fundings[i].curve;
        outcome::Outcome<ComparisonRow> row =
            rowOf(assumed, result.schedule, i, asked.fundings[i], result.notices);
        if (!row) {
            outcome::append(faults, "", row.faults());
            continue;
        }
        result.rows.push_back(std::move(row).value());
        ComparisonRow& last = result.rows.back();
        last.change = last.fair - result.rows.front().fair;
        last.onQuantity = asked.inquiry.quantity * last.change;
    }
    if (!faults.empty()) {
        return faults;
    }
    return result;
}

} // namespace forwright::desk
