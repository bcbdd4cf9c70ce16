#pragma once

#include "discounting/curves.hpp"
#include "discounting/decay.hpp"

/// Internal to the folder: the transform of Cox–Ingersoll–Ross's ∫r, and the law that it gives.
namespace forwright::discounting::detail {

/// (−ln(1 − q) − q)/q, q/2 near 0, for |q| ≤ ½ or q complex: what the logarithm adds to its first term.
inline constexpr auto logarithmSeries = [] {
    std::array<double, 30> result{};
    for (std::size_t n = 1; n < result.size(); ++n) {
        result[n] = 1.0 / static_cast<double>(n + 1);
    }
    return result;
}();

template <class T> T logarithmExcess(const T& q, const T& oneLessQ) {
    return magnitude(q) <= 0.25 ? polynomial(logarithmSeries, q) : (-logarithm(oneLessQ) - q) / q;
}

/// ln E[e^(−λ∫r)] over `years`, for r0, κ, θ and σ ≥ 0 (λ = 1 gives ln P). With γ = √(κ² + 2λσ²), x = γt and
/// q = λσ²t·decayMean(x)/(γ + κ):
///     −2κθλ/(γ + κ)·t·(x·decayGap(x) − logarithmExcess(q)·decayMean(x)) − r0·λ·t·decayMean(x)/(1 − q),
/// which is the published formula with e^(γt) divided out and γ − κ = 2λσ²/(γ + κ) put in, so that nothing
/// overflows, nothing is divided by σ², and σ → 0, κ → 0 and t → 0 need no case of their own but γ + κ = 0.
/// For complex λ off the negative real axis the real part of γ is positive and no branch of the logarithm is
/// crossed: 1 − q = ½(1 + κ/γ)·(1 + (γ − κ)/(γ + κ)·e^(−x)) is a product of two numbers whose real parts are
/// positive.
template <class T>
T coxIngersollRossTransform(const T& lambda, const T& r0, const T& meanReversion, const T& longRun,
                            const T& volatility, double years) {
    const T scaled = lambda * volatility * volatility;
    const T gamma = squareRoot(meanReversion * meanReversion + 2.0 * scaled);
    const T sum = gamma + meanReversion;
    const T x = gamma * years;
    const T mean = decayMean(x);
    const T q = scaled * years * mean / sum;
    const T oneLessQ = 1.0 - q;
    const T average = x * decayGap(x) - logarithmExcess(q, oneLessQ) * mean;
    return -(2.0 * lambda * longRun * (meanReversion / sum) * average + r0 * lambda * mean / oneLessQ) *
           years;
}

/// The law of ln D = −∫r, which see coxIngersollRoss in curves.hpp. `mean` and `variance` are those of ∫r.
[[nodiscard]] LogLawPtr coxIngersollRossLaw(const CoxIngersollRoss& model, double years, double mean,
                                            double variance);

} // namespace forwright::discounting::detail
