#include "forward/carry.hpp"

namespace forwright::forward {
namespace {

/// The fair forward of an asset that brings nothing: spot grown at the funding curve.
double grownSpot(const Price& price) {
    return price.spot * price.spotFactor / price.settlementFactor;
}

double takenOffByCash(const Price& price) {
    double sum = 0.0;
    for (const CashInPrice& cash : price.cash) {
        sum += cash.atSettlement;
    }
    return sum;
}

const char* reasonOf(Date ex, const Schedule& schedule) {
    if (ex <= schedule.holdFrom) {
        return "before-hold";
    }
    return ex > schedule.maturity ? "after-maturity" : "counted";
}

IncomeLine lineOf(const income::CashDistribution& row, std::size_t index, const Schedule& schedule,
                  const Price& price) {
    IncomeLine line;
    line.at = row.at;
    line.ex = row.ex;
    line.pay = row.pay;
    line.amount = row.amount.amount;
    line.reason = reasonOf(row.ex, schedule);
    for (const CashInPrice& cash : price.cash) {
        if (cash.row == index) {
            line.counted = true;
            line.units = cash.units;
            line.factor = cash.factor;
            line.atSettlement = cash.atSettlement;
        }
    }
    return line;
}

IncomeLine lineOf(const income::ProportionalDistribution& row, const Schedule& schedule,
                  const SideInputs& fair, double grown) {
    IncomeLine line;
    line.at = row.at;
    line.ex = row.ex;
    line.fraction = row.fraction.amount;
    line.reason = reasonOf(row.ex, schedule);
    // The distributions are taken off one after the other, by date.
    double level =
        grown * fair.units.feeFactor(schedule.holdFrom) * fair.units.yieldFactor(schedule.holdFrom);
    for (const income::UnitsToHold::Reinvestment& step : fair.units.reinvestments()) {
        if (step.at == row.at) {
            line.counted = true;
            line.units = fair.units.after(row.ex);
            line.atSettlement = level * (1.0 - step.kept);
            break;
        }
        level *= step.kept;
    }
    return line;
}

} // namespace

Carry carry(const Market& market, const Schedule& schedule, const SideInputs& fair, const Price& price) {
    Carry carry;
    carry.spot = price.spot;
    const double grown = grownSpot(price);
    carry.funding = grown - price.spot;
    carry.points = price.forward - price.spot;
    if (market.base) {
        carry.base = price.forward - grown;
        return carry;
    }
    const Date from = schedule.holdFrom;
    const double afterFee = grown * fair.units.feeFactor(from);
    const double afterYield = afterFee * fair.units.yieldFactor(from);
    carry.fee = afterFee - grown;
    carry.yield = afterYield - afterFee;
    carry.proportional = afterYield * (fair.units.proportionalAfter(from) - 1.0);
    carry.cash = -takenOffByCash(price);
    return carry;
}

std::vector<IncomeLine> incomeLines(const Market& market, const Schedule& schedule, const SideInputs& fair,
                                    const Price& price) {
    std::vector<IncomeLine> lines;
    const income::Income& income = market.income;
    lines.reserve(income.cash.size() + income.proportional.size());
    for (std::size_t index = 0; index < income.cash.size(); ++index) {
        lines.push_back(lineOf(income.cash[index], index, schedule, price));
    }
    for (const income::ProportionalDistribution& row : income.proportional) {
        lines.push_back(lineOf(row, schedule, fair, grownSpot(price)));
    }
    return lines;
}

std::vector<BridgeStep> bridge(const Carry& carry, double fair, double breakEven, double withMargin,
                               double quoted) {
    std::vector<BridgeStep> steps{{"spot", true, 0.0, carry.spot}};
    double level = carry.spot;
    const auto change = [&steps, &level](const char* code, double by) {
        if (by != 0.0) {
            level += by;
            steps.push_back({code, false, by, level});
        }
    };
    change("funding", carry.funding);
    change("fee", carry.fee);
    change("yield", carry.yield);
    change("proportional", carry.proportional);
    change("cash", carry.cash);
    change("base", carry.base);
    steps.push_back({"fair", true, 0.0, fair});
    level = fair;
    change("side", breakEven - fair);
    change("margin", withMargin - breakEven);
    change("rounding", quoted - withMargin);
    steps.push_back({"quote", true, 0.0, quoted});
    return steps;
}

} // namespace forwright::forward
