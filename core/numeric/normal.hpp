#pragma once

/// The standard normal law, from the core's own elementary functions.
namespace forwright::numeric {

/// Φ(z). Absolute error below 1e-15; relative error below 2e-13 wherever the value is no subnormal number.
/// Below |z| = 3 the power series of Φ − ½ (Abramowitz and Stegun 26.2.11), beyond it the continued fraction
/// of the tail (26.2.14).
[[nodiscard]] double normalProbability(double z);

/// The z with Φ(z) = probability, which lies inside (0, 1). Relative error about 1e-15: algorithm AS 241,
/// PPND16 (Wichura, Applied Statistics 37 (1988) 477–484).
[[nodiscard]] double normalQuantile(double probability);

} // namespace forwright::numeric
