#pragma once

/// What mean reversion does to a short rate dr = κ(…)dt + σ dW over t years, for every κ ≥ 0 and t ≥ 0 with
/// no loss near 0: relative error below 1e-14. (Vasicek, J. Financial Economics 5 (1977); the same in Ho–Lee
/// and Hull–White.)
namespace forwright::discounting {

/// B = (1 − e^(−κt))/κ, years; t where κ = 0: by how much ∫r moves per unit of r0.
[[nodiscard]] double reversionTime(double meanReversion, double years);

/// (t − B)/κ, years²; t²/2 where κ = 0: ρ·s·σ times this is the covariance of ∫r with the logarithm of an
/// asset of volatility s.
[[nodiscard]] double reversionGap(double meanReversion, double years);

/// V = Var[∫r] = σ²/κ²·(t − 2B + (1 − e^(−2κt))/(2κ)); σ²t³/3 where κ = 0.
[[nodiscard]] double integralVariance(double meanReversion, double volatility, double years);

} // namespace forwright::discounting
