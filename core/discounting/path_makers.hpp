#pragma once

#include "discounting/curves.hpp"
#include "discounting/paths.hpp"

#include <vector>

/// Internal to the folder: what makers of paths share.
namespace forwright::discounting::detail {

/// The probability in (0, 1) that a word stands for.
[[nodiscard]] constexpr double evenly(std::uint32_t word) {
    return (static_cast<double>(word) + 0.5) * 0x1p-32;
}

/// What every path is, where nothing is random: no word is taken.
[[nodiscard]] PathMakerPtr certainPaths(std::vector<double> logFactors);

/// The years from the curve's `asOf` to each date.
[[nodiscard]] std::vector<double> yearsTo(const Curve& curve, std::span<const Date> dates);

/// The same from what it is made of: `years` rise and are above 0.
[[nodiscard]] PathMakerPtr normalPaths(const NormalRate& rate, const std::vector<double>& years,
                                       std::vector<double> meanLogs, std::size_t target);

/// Exact paths of a curve (Vasicek, Ho–Lee, Hull–White) that has a `normalRate`. From date to date the pair
/// of short rate and its integral is drawn from its joint normal law, two words a step and one at the last
/// date. All words together are turned about so that the first one alone moves ln D at `dates[target]`: which
/// changes no law, and lets points that are even in their first coordinate be even in what matters.
template <class NormalCurve>
[[nodiscard]] PathMakerPtr normalPaths(const NormalCurve& curve, std::span<const Date> dates,
                                       std::size_t target) {
    std::vector<double> meanLogs;
    for (const Date date : dates) {
        meanLogs.push_back(curve.meanLog(date));
    }
    return normalPaths(*curve.normalRate(), yearsTo(curve, dates), std::move(meanLogs), target);
}

/// Paths of Cox, Ingersoll and Ross's short rate, in steps of at most `coxIngersollRossStep` years; how, and
/// how far from exact, stands with the definition. Two words a step.
[[nodiscard]] PathMakerPtr coxIngersollRossPaths(const CoxIngersollRoss& model,
                                                 const std::vector<double>& years, std::size_t target);
inline constexpr double coxIngersollRossStep = 1.0 / 16.0;
/// How far the mean factor can be off, relative: 5e-5 where 2κθ ≥ σ², so that the rate never reaches 0 (seen:
/// 2e-6 ± 7e-6), else 1e-3 (seen: 3e-4 ± 1.4e-4 at κ = 0.3, σ = 1 over 10 years).
/// This is of the mean. How paths spread about it is matched in two moments a step: near the law where the
/// rate never reaches 0, else no more than near it (a quarter of all paths may lie where the law puts half,
/// at σ = 10).
[[nodiscard]] constexpr double coxIngersollRossPathBias(const CoxIngersollRoss& model) {
    const double drift = 2.0 * model.meanReversion * model.longRun;
    return drift >= model.volatility * model.volatility ? 5e-5 : 1e-3;
}

/// Standard normal numbers turned about: the reflection that takes the first axis to `direction`.
class Reflection {
  public:
    /// `direction` of any length; where it is 0, or the first axis itself, nothing is turned.
    explicit Reflection(std::vector<double> direction);
    /// Of `count` paths of a tile.
    void turn(double* numbers, std::size_t count) const;

  private:
    std::vector<double> across_; ///< the normal of the mirror, its square 2; empty where nothing is turned
};

/// The words of a tile as normal numbers.
void normalsOf(const std::uint32_t* words, std::size_t numbers, std::size_t count, double* to);

/// Up to the next whole four: lanes may reckon with paths that nobody asked for.
[[nodiscard]] constexpr std::size_t wholeLanes(std::size_t count) {
    return (count + 3) / 4 * 4;
}

} // namespace forwright::discounting::detail
