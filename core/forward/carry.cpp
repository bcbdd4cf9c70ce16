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

const char* effectOf(const IncomeLine& line) {
    if (line.reason == "counted") {
        return "It is taken off the price that is agreed.";
    }
    if (line.reason == "passed-through") {
        return "It is paid on to the client when it is paid, so the price does not have it in.";
    }
    if (line.reason == "adjusts-contract") {
        return "The contract's terms are changed on its ex date, so the price does not have it in.";
    }
    return line.reason == "before-hold" ? "It falls before the hedge is held: the price does not have it in."
                                        : "It falls after the maturity: the price does not have it in.";
}

/// What the row takes off the fair forward, or would.
double takenOff(const income::CashDistribution& row, const Market& market, const SideInputs& fair,
                const Price& price) {
    return market.income.passThroughOn(fair.side, row) * row.amount.on(fair.side) * fair.units.after(row.ex) *
           fair.funding->factor(row.pay) / price.settlementFactor;
}

const char* reasonOf(Date ex, const Schedule& schedule) {
    if (ex <= schedule.holdFrom) {
        return "before-hold";
    }
    return ex > schedule.maturity ? "after-maturity" : "counted";
}

/// Where it falls into the time of the hedge its treatment decides.
const char* reasonOf(const income::CashDistribution& row, const Schedule& schedule) {
    if (!income::counts(row.ex, schedule.holdFrom, schedule.maturity)) {
        return reasonOf(row.ex, schedule);
    }
    switch (row.treatment) {
    case income::Treatment::passedThrough:
        return "passed-through";
    case income::Treatment::adjustsContract:
        return "adjusts-contract";
    case income::Treatment::inPrice:
        break;
    }
    return "counted";
}

IncomeLine lineOf(const income::CashDistribution& row, std::size_t index, const Market& market,
                  const Schedule& schedule, const SideInputs& fair, const Price& price) {
    IncomeLine line;
    line.at = row.at;
    line.ex = row.ex;
    line.pay = row.pay;
    line.amount = row.amount.amount;
    line.reason = reasonOf(row, schedule);
    line.effect = effectOf(line);
    if (income::counts(row.ex, schedule.holdFrom, schedule.maturity)) {
        line.wouldTake = takenOff(row, market, fair, price);
    }
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
    line.effect = effectOf(line);
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
        lines.push_back(lineOf(income.cash[index], index, market, schedule, fair, price));
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
