#pragma once

#include "discounting/curves.hpp"
#include "discounting/mean_reversion.hpp"
#include "discounting/path_makers.hpp"
#include "discounting/simulation.hpp"
#include "numeric/lanes.hpp"
#include "numeric/philox.hpp"

#include <chrono>
#include <cmath>
#include <random>
#include <vector>

/// Loops that the native and the module's benchmark both time. Each works out `values` discount factors and
/// gives their sum.
namespace forwright::bench {

using namespace discounting;

inline constexpr long values = 65'536;
inline const Date asOf{std::chrono::year{2026} / std::chrono::December / 1};
inline constexpr int spotDays = 2;
inline constexpr int endDays = 3650;
inline constexpr Vasicek model{0.05, 0.1, 0.08, 0.015};

inline double yearsOf(int days) {
    return days / 365.0;
}

/// What it takes to go from date to date: the same numbers for both.
struct PlainStep {
    double kept, carried, own, shared, rest;

    explicit PlainStep(double years) {
        const double square = model.volatility * model.volatility;
        kept = std::exp(-model.meanReversion * years);
        carried = reversionTime(model.meanReversion, years);
        own = std::sqrt(integralVariance(model.meanReversion, model.volatility, years));
        shared = square * carried * carried / 2.0 / own;
        rest = std::sqrt(square * reversionTime(2.0 * model.meanReversion, years) - shared * shared);
    }
};

/// The kernel as anybody would write it: of each path two normal numbers, the short rate and its integral,
/// and the factor.
inline double pathKernelPlain() {
    static const PlainStep step(yearsOf(endDays));
    static const double mean =
        vasicek(asOf, model).value()->random()->meanLog(asOf + std::chrono::days{endDays});
    std::mt19937_64 engine(1);
    std::normal_distribution<double> normal;
    double factors = 0.0;
    double rates = 0.0;
    for (long path = 0; path < values; ++path) {
        const double first = normal(engine);
        const double second = normal(engine);
        rates += step.shared * first + step.rest * second;
        factors += std::exp(mean - step.own * first);
    }
    return factors + rates;
}

/// The same by the core's own random words, normal numbers and exp, four paths side by side.
template <bool Antithetic> double kernel() {
    static const PlainStep step(yearsOf(endDays));
    static const double mean =
        vasicek(asOf, model).value()->random()->meanLog(asOf + std::chrono::days{endDays});
    namespace lanes = numeric::lanes;
    const numeric::PhiloxKey key = numeric::philoxKey(1);
    std::vector<std::uint32_t> words(2 * tilePaths);
    std::vector<double> normals(2 * tilePaths);
    lanes::Lanes factors = lanes::all(0.0);
    lanes::Lanes rates = lanes::all(0.0);
    constexpr long perTile = static_cast<long>(tilePaths) * (Antithetic ? 2 : 1);
    for (long tile = 0; tile < values / perTile; ++tile) {
        const auto group = static_cast<std::uint32_t>(tile * static_cast<long>(tilePaths / 4));
        numeric::philoxWords({group, 0, 0, 0}, key, tilePaths / 4, words.data());
        numeric::philoxWords({group, 1, 0, 0}, key, tilePaths / 4, words.data() + tilePaths);
        discounting::detail::normalsOf(words.data(), 2, tilePaths, normals.data());
        for (std::size_t path = 0; path < tilePaths; path += lanes::count) {
            const lanes::Lanes first = lanes::load(&normals[path]);
            rates += step.shared * first + step.rest * lanes::load(&normals[tilePaths + path]);
            const lanes::Lanes integral = step.own * first;
            factors += lanes::exp(mean - integral);
            if constexpr (Antithetic) {
                factors += lanes::exp(mean + integral);
            }
        }
    }
    return factors[0] + factors[1] + factors[2] + factors[3] + rates[0] + rates[1] + rates[2] + rates[3];
}
inline double pathKernel() {
    return kernel<false>();
}
inline double antitheticKernel() {
    return kernel<true>();
}

/// A forward with a spot date: of each path three normal numbers and two factors, and the sums that tell mean
/// and error.
inline double simulationPlain() {
    static const PlainStep first(yearsOf(spotDays));
    static const PlainStep second(yearsOf(endDays - spotDays));
    static const CurvePtr curve = vasicek(asOf, model).value();
    static const double meanSpot = curve->random()->meanLog(asOf + std::chrono::days{spotDays});
    static const double meanEnd = curve->random()->meanLog(asOf + std::chrono::days{endDays});
    std::mt19937_64 engine(1);
    std::normal_distribution<double> normal;
    double factors = 0.0;
    double spots = 0.0;
    double squares = 0.0;
    double products = 0.0;
    for (long path = 0; path < values; ++path) {
        const double z = normal(engine);
        const double rate = first.shared * z + first.rest * normal(engine);
        const double atSpot = first.own * z;
        const double atEnd = atSpot + second.carried * rate + second.own * normal(engine);
        const double spot = std::exp(meanSpot - atSpot);
        const double end = std::exp(meanEnd - atEnd);
        spots += spot;
        factors += end;
        squares += end * end;
        products += spot * end;
    }
    return factors + spots + squares + products;
}

/// The same by the core, with its histogram.
inline double simulation(SimulationMethod method) {
    static const CurvePtr curve = vasicek(asOf, model).value();
    static const Payments payments{
        {asOf + std::chrono::days{spotDays}, asOf + std::chrono::days{endDays}}, {100.0, 0.0}, 1, 0.0};
    const SimulationPlan plan{method, values, 1};
    const auto made = Simulation::make(*curve, payments, plan, {});
    BinCounts counts(Bins{}.count + 2, 0);
    double sum = 0.0;
    for (long block = 0; block < plan.blocks(); ++block) {
        sum += made.value().block(block, counts).factor;
    }
    return sum;
}
inline double pseudoSimulation() {
    return simulation(SimulationMethod::pseudo);
}
inline double quasiSimulation() {
    return simulation(SimulationMethod::quasi);
}

} // namespace forwright::bench
