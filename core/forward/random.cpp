#include "forward/random.hpp"

#include "discounting/curves.hpp"
#include "numeric/elementary.hpp"

#include <array>
#include <cmath>

namespace forwright::forward {
namespace {

constexpr std::array quantileProbabilities{0.01, 0.05, 0.25, 0.50, 0.75, 0.95, 0.99};

/// The 97.5 % quantile of the standard normal law: an interval of 95 % reaches so many standard errors to
/// each side.
constexpr double interval95Reach = 1.959963984540054;

/// The standard error of F, its dependence on the factors at all its dates taken as linear.
std::optional<double> standardErrorOfForward(const discounting::RandomDiscount& random, const Market& market,
                                             const Schedule& schedule, const Price& fair) {
    const double settled = fair.settlementFactor;
    std::vector<Date> dates{schedule.spot, schedule.settlement};
    std::vector<double> weights{fair.costOfUnits / fair.spotFactor / settled, -fair.forward / settled};
    for (const CashInPrice& cash : fair.cash) {
        dates.push_back(market.income.cash[cash.row].pay);
        weights.push_back(-cash.passed * cash.units / settled);
    }
    return random.standardError(dates, weights);
}

} // namespace

std::optional<RandomView> randomView(const Market& market, const Schedule& schedule, const Price& fair) {
    const discounting::RandomDiscount* random = market.funding.curve->random();
    if (random == nullptr) {
        return std::nullopt;
    }
    const Date settlement = schedule.settlement;
    RandomView view;
    view.expectedFactor = fair.settlementFactor;
    view.meanLog = random->meanLog(settlement);
    view.varianceLog = random->varianceLog(settlement);
    if (view.varianceLog) {
        view.deviationLog = std::sqrt(*view.varianceLog);
    }
    view.averageRateFactor = numeric::exp(view.meanLog);
    view.factorGap = view.expectedFactor - view.averageRateFactor;
    view.tree = random->rateTree();
    view.against = random->againstCurve();

    Market averaged = market;
    averaged.funding.curve = discounting::atAverageRate(market.funding.curve);
    view.averageRateForward = price(averaged, schedule, Side::fair).forward;
    view.gap = fair.forward - view.averageRateForward;

    outcome::Outcome<std::vector<discounting::Quantile>> quantiles =
        random->quantiles(settlement, quantileProbabilities);
    if (quantiles) {
        view.quantiles = std::move(quantiles).value();
        view.quantileError = random->quantileError();
    } else {
        outcome::append(view.notices, market.at + "/funding/curve", quantiles.faults());
    }

    view.paths = random->paths();
    view.standardError = random->standardError(std::array{settlement}, std::array{1.0});
    if (const auto error = standardErrorOfForward(*random, market, schedule, fair)) {
        const double reach = interval95Reach * *error;
        view.interval95 = TwoWay<double>{fair.forward - reach, fair.forward + reach};
    }
    return view;
}

} // namespace forwright::forward
