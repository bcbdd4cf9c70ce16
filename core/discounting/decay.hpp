#pragma once

#include "discounting/dual.hpp"

#include <array>
#include <cstddef>

/// Internal to the folder: the functions of x = κt by which mean reversion enters the models. Each is entire,
/// and is taken from its series where |x| ≤ 1, where the closed form loses its digits by cancellation (all of
/// them near κ = 1e-7), and from its closed form beyond. For T a plain number ≥ 0, a dual, or a complex
/// number of positive real part. Relative error below 1e-14 for plain numbers.
namespace forwright::discounting::detail {

/// The coefficients of x⁰, x¹, … of a series: (−1)ⁿ·factor(n)/n! at xⁿ⁻ᶠⁱʳˢᵗ, n from `first`.
template <std::size_t Terms, class Factor>
constexpr std::array<double, Terms> decayCoefficients(std::size_t first, Factor factor) {
    std::array<double, Terms> result{};
    double inverseFactorial = 1.0;
    for (std::size_t n = 1; n < first + Terms; ++n) {
        inverseFactorial /= static_cast<double>(n);
        if (n >= first) {
            result[n - first] = (n % 2 == 0 ? 1.0 : -1.0) * inverseFactorial * factor(n);
        }
    }
    return result;
}

constexpr double powerOfTwo(std::size_t n) {
    return static_cast<double>(1UL << n);
}

inline constexpr auto meanSeries = decayCoefficients<18>(1, [](std::size_t) { return -1.0; });
inline constexpr auto gapSeries = decayCoefficients<18>(2, [](std::size_t) { return 1.0; });
inline constexpr auto varianceSeries =
    decayCoefficients<23>(3, [](std::size_t n) { return 2.0 - powerOfTwo(n - 1); });
inline constexpr auto startVarianceSeries =
    decayCoefficients<23>(3, [](std::size_t n) { return 2.0 * static_cast<double>(n) - powerOfTwo(n); });
inline constexpr auto longRunVarianceSeries = decayCoefficients<23>(
    3, [](std::size_t n) { return powerOfTwo(n - 1) + 2.0 - 2.0 * static_cast<double>(n); });

template <class T, std::size_t Terms>
T polynomial(const std::array<double, Terms>& coefficients, const T& x) {
    T sum = coefficients[Terms - 1];
    for (std::size_t i = Terms - 1; i-- > 0;) {
        sum = sum * x + coefficients[i];
    }
    return sum;
}

template <class T> bool nearZero(const T& x) {
    return magnitude(x) <= 1.0;
}

/// (1 − e^(−x))/x, 1 at 0: the mean of e^(−s) over [0, x]. B = t·decayMean(κt).
template <class T> T decayMean(const T& x) {
    return nearZero(x) ? polynomial(meanSeries, x) : (1.0 - exponential(-x)) / x;
}

/// (1 − decayMean(x))/x = (x − 1 + e^(−x))/x², ½ at 0. t − B = κt²·decayGap(κt).
template <class T> T decayGap(const T& x) {
    return nearZero(x) ? polynomial(gapSeries, x) : (1.0 - decayMean(x)) / x;
}

/// (x − 2(1 − e^(−x)) + (1 − e^(−2x))/2)/x³, ⅓ at 0: V = σ²t³·decayVariance(κt) of Vasicek's ∫r.
template <class T> T decayVariance(const T& x) {
    if (nearZero(x)) {
        return polynomial(varianceSeries, x);
    }
    const T e = exponential(-x);
    return (x - 1.5 + 2.0 * e - 0.5 * e * e) / (x * x * x);
}

/// (1 − e^(−2x) − 2x·e^(−x))/x³, ⅓ at 0: the variance of Cox–Ingersoll–Ross's ∫r is σ²t³ times r0 times this
/// …
template <class T> T decayStartVariance(const T& x) {
    if (nearZero(x)) {
        return polynomial(startVarianceSeries, x);
    }
    const T e = exponential(-x);
    return (1.0 - e * e - 2.0 * x * e) / (x * x * x);
}

/// (x − 5/2 + 2e^(−x) + 2x·e^(−x) + e^(−2x)/2)/x³, x/12 near 0: … plus θ times this.
template <class T> T decayLongRunVariance(const T& x) {
    if (nearZero(x)) {
        return polynomial(longRunVarianceSeries, x);
    }
    const T e = exponential(-x);
    return (x - 2.5 + 2.0 * e + 2.0 * x * e + 0.5 * e * e) / (x * x * x);
}

} // namespace forwright::discounting::detail
