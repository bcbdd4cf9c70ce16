#pragma once

#include "discounting/curve.hpp"
#include "forward/price.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <vector>

namespace forwright::forward {

/// What random discounting changes in a fair forward, and what it does not. Spreads are not in it.
struct RandomView {
    double expectedFactor = 1.0;                    ///< E[D(T_s)]
    double meanLog = 0.0;                           ///< E[ln D(T_s)]
    std::optional<double> varianceLog;              ///< Var[ln D(T_s)] where known in closed form
    double averageRateFactor = 1.0;                 ///< e^(E[ln D(T_s)]): the factor at the average rate
    double factorGap = 0.0;                         ///< expectedFactor − averageRateFactor, never negative
    std::optional<double> deviationLog;             ///< √ of `varianceLog`
    double averageRateForward = 0.0;                ///< F with P(u) replaced by e^(E[ln D(u)]) at every date
    double gap = 0.0;                               ///< F − averageRateForward
    std::vector<discounting::Quantile> quantiles;   ///< of D(T_s) at 1, 5, 25, 50, 75, 95, 99 %
    double quantileError = 0.0;                     ///< relative bound
    long paths = 0;                                 ///< of samples
    std::optional<double> standardError;            ///< of the mean of D(T_s), samples only
    std::optional<TwoWay<double>> interval95;       ///< of F, by the delta method, samples only
    std::vector<discounting::RateLevels> tree;      ///< of the overnight rate, where it moves at meetings
    std::vector<discounting::SampleColumn> against; ///< samples beside the curve given for it
    outcome::Notices notices;                       ///< why quantiles are missing
};
/// Nothing where the funding curve is not random.
[[nodiscard]] std::optional<RandomView> randomView(const Market& market, const Schedule& schedule,
                                                   const Price& fair);

} // namespace forwright::forward
