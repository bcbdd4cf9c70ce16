#include "forward/sensitivities.hpp"

#include "dates/date.hpp"
#include "discounting/curves.hpp"

namespace forwright::forward {
namespace {

constexpr double basisPoint = 1e-4;

/// ∂F/∂ ln P at one date.
struct Weight {
    Date date;
    double onLogFactor = 0.0;
};

/// How F hangs on each factor of the funding curve: the whole of the curve's part in the price.
std::vector<Weight> fundingWeights(const Market& market, const Schedule& schedule, const Price& price) {
    std::vector<Weight> weights{{schedule.spot, price.costOfUnits / price.settlementFactor},
                                {schedule.settlement, -price.forward}};
    for (const CashInPrice& cash : price.cash) {
        weights.push_back({market.income.cash[cash.row].pay, -cash.atSettlement});
    }
    return weights;
}

std::vector<Weight> baseWeights(const Schedule& schedule, const Price& price) {
    const double grown = price.costOfUnits / price.settlementFactor;
    return {{schedule.spot, -grown}, {schedule.settlement, grown}};
}

/// The units n(u) hang on P_y(T)/P_y(u).
std::vector<Weight> yieldWeights(const Market& market, const Schedule& schedule, const Price& price) {
    const double grown = price.costOfUnits / price.settlementFactor;
    std::vector<Weight> weights{{schedule.holdFrom, -grown}, {schedule.maturity, grown}};
    for (const CashInPrice& cash : price.cash) {
        weights.push_back({market.income.cash[cash.row].ex, cash.atSettlement});
        weights.push_back({schedule.maturity, -cash.atSettlement});
    }
    return weights;
}

CurveSensitivity toCurve(const discounting::Curve& curve, const std::vector<Weight>& weights,
                         const std::string& at) {
    CurveSensitivity result;
    for (discounting::Parameter& parameter : curve.parameters()) {
        parameter.at = at + parameter.at;
        result.parameters.push_back({std::move(parameter), 0.0});
    }
    for (const Weight& weight : weights) {
        result.parallel -= basisPoint * weight.onLogFactor * dates::years(curve.asOf(), weight.date);
        const std::vector<double> gradient = curve.logFactorGradient(weight.date);
        for (std::size_t i = 0; i < gradient.size(); ++i) {
            result.parameters[i].change += basisPoint * weight.onLogFactor * gradient[i];
        }
    }
    return result;
}

/// ∂F per basis point of a rate that n(u) is made with, `slope(u)` being ∂ ln n(u)/∂ rate.
template <class Slope>
double toUnits(const Market& market, const Schedule& schedule, const Price& price, Slope slope) {
    double change = price.costOfUnits / price.settlementFactor * slope(schedule.holdFrom);
    for (const CashInPrice& cash : price.cash) {
        change -= cash.atSettlement * slope(market.income.cash[cash.row].ex);
    }
    return basisPoint * change;
}

std::vector<CashSensitivity> toCash(const Market& market, const SideInputs& fair, const Price& price) {
    std::vector<CashSensitivity> result;
    for (const income::CashDistribution& row : market.income.cash) {
        result.push_back({row.at, 0.0});
    }
    for (const CashInPrice& cash : price.cash) {
        result[cash.row].change = -market.income.passThroughOn(fair.side, market.income.cash[cash.row]) *
                                  cash.units * cash.factor / price.settlementFactor;
    }
    return result;
}

/// The change of F when a business day passes and nothing else happens.
std::optional<double> toDay(const Market& market, const Schedule& schedule, const Price& today) {
    Market tomorrow = market;
    tomorrow.asOf = market.asset.calendar.advance(market.asOf, 1);
    tomorrow.funding.curve = discounting::heldByTime(market.funding.curve, tomorrow.asOf);
    if (market.base) {
        tomorrow.base->curve = discounting::heldByTime(market.base->curve, tomorrow.asOf);
    }
    if (market.income.yieldCurves) {
        tomorrow.income.yieldCurves->fair =
            discounting::heldByTime(market.income.yieldCurves->fair, tomorrow.asOf);
    }
    const outcome::Outcome<Schedule> then =
        forward::schedule(tomorrow, {schedule.maturity, std::nullopt}, "");
    if (!then || !review(tomorrow, then.value()).faults.empty()) {
        return std::nullopt;
    }
    return price(tomorrow, then.value(), Side::fair).forward - today.forward;
}

} // namespace

Sensitivities sensitivities(const Market& market, const Schedule& schedule, const SideInputs& fair,
                            const Price& price) {
    Sensitivities result;
    result.spot = price.spotFactor * price.units / price.settlementFactor;
    result.funding =
        toCurve(*fair.funding, fundingWeights(market, schedule, price), market.at + "/funding/curve");
    if (fair.base != nullptr) {
        result.base = toCurve(*fair.base, baseWeights(schedule, price), market.at + "/base/curve");
    } else {
        result.fee = toUnits(market, schedule, price, [&fair](Date u) { return fair.units.feeSlope(u); });
        result.yield = toUnits(market, schedule, price, [&fair](Date u) { return fair.units.yieldSlope(u); });
        if (market.income.yieldCurves) {
            result.yieldCurve = toCurve(*market.income.yieldCurves->fair,
                                        yieldWeights(market, schedule, price), market.at + "/income/yield");
        }
        result.cash = toCash(market, fair, price);
    }
    result.day = toDay(market, schedule, price);
    return result;
}

} // namespace forwright::forward
