#pragma once

/// The elementary functions of the core. One source for the native program and the module: only + − × ÷,
/// comparisons and bit patterns of IEEE 754 binary64, no fused operations, so that the same argument gives
/// the same bits with every compiler and machine. The C library's own functions differ between platforms by a
/// unit of the last place.
///
/// An ulp is the distance between neighbouring doubles of the size of the true value (2⁻¹⁰⁷⁴ where it is
/// subnormal). The promised bounds are tested against Boost.Multiprecision with 50 digits; beside each stands
/// the worst error seen in 60,000 arguments for each of four to six ranges, chosen where it is hard.
/// `lanes.hpp` has exp and log of four numbers at once, with the same bits.
namespace forwright::numeric {

/// eˣ. At most 1 ulp over the whole range (seen: 0.55, and 0.76 where the result is subnormal); exp(±0) is 1
/// exactly; +∞ from 709.7827128933841 on, gradual underflow to 0 below −745.13; NaN for NaN.
[[nodiscard]] double exp(double x);

/// Natural logarithm. At most 1 ulp over the whole range, subnormal arguments and the neighbourhood of 1
/// included (seen: 0.52); log(1) is 0 exactly; −∞ at ±0, +∞ at +∞, NaN below 0 and for NaN.
[[nodiscard]] double log(double x);

/// eˣ − 1 without loss near 0. At most 2 ulp (seen: 0.71); expm1(±0) is ±0; −1 below −40, +∞ where exp is;
/// NaN for NaN.
[[nodiscard]] double expm1(double x);

/// ln(1 + x) without loss near 0. At most 2 ulp (seen: 0.52); log1p(±0) is ±0; −∞ at −1, +∞ at +∞, NaN below
/// −1 and for NaN.
[[nodiscard]] double log1p(double x);

struct SineCosine {
    double sine;
    double cosine;
};

/// Sine and cosine of x radians at once, for the inversion of transforms. Absolute error at most 1.2e-16 for
/// |x| ≤ 2²⁰ (seen: 9.3e-17), the sine of ±0 is ±0; both NaN beyond and for NaN.
[[nodiscard]] SineCosine sineCosine(double x);

/// Argument of the complex number x + iy in (−π, π]: the signs of zeros do not matter, so that it is π on the
/// negative real axis, and 0 at the origin. At most 2 ulp (seen: 1.4). Where a part is infinite, the
/// direction of the infinite parts alone; NaN where a part is NaN.
[[nodiscard]] double argument(double y, double x);

} // namespace forwright::numeric
