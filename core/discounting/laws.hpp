#pragma once

#include "discounting/curve.hpp"

#include <string>
#include <vector>

/// Internal to the folder: the laws that several random curves share.
namespace forwright::discounting::detail {

/// ln D normal with this mean and variance; a single point where the variance is 0. Quantiles exact but for
/// rounding.
[[nodiscard]] LogLawPtr normalLaw(double mean, double variance);

/// A single point.
[[nodiscard]] LogLawPtr pointLaw(double at);

/// Points and the odds of each; odds need not be sorted, points of no odds are left out.
struct Outcomes {
    std::vector<double> values;
    std::vector<double> odds;
};

/// The law of the sum of two independent discrete numbers, without ever listing all sums: n + m steps for a
/// probability, and a quantile that is one of the sums exactly.
[[nodiscard]] LogLawPtr sumLaw(Outcomes one, Outcomes other);

/// The law that is `parts[i]` with the odds `weights[i]`. Refused with `too-many-outcomes` where one
/// probability would take too long.
[[nodiscard]] outcome::Outcome<LogLawPtr> mixtureLaw(std::vector<double> weights,
                                                     std::vector<LogLawPtr> parts);

/// More work than this for one probability is refused: some milliseconds.
inline constexpr double mostWork = 16384.0;

/// The points sorted, equal ones made one, those without odds left out.
[[nodiscard]] Outcomes sorted(Outcomes outcomes);

} // namespace forwright::discounting::detail
