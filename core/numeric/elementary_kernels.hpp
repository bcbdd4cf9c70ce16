#pragma once

#include "numeric/elementary_tables.hpp"

#include <array>
#include <cstddef>
#include <cstdint>

/// The arithmetic of exp and log, written once for one number and for several side by side: elementary.cpp
/// and lanes.hpp instantiate it, and since it has no branch both do the same operations and give the same
/// bits.
///
/// `Width` says how wide: its `Real` is a binary64 number or a vector of them, `Bits` the unsigned integers
/// of the same shape, and `root` and `inverse` look a row of a table up for each of them.
namespace forwright::numeric::kernels {

inline constexpr std::uint64_t bitsOfOne = 0x3FF0'0000'0000'0000;
inline constexpr std::uint64_t exponentField = 0xFFF0'0000'0000'0000; // and the sign, 0 where this is used
inline constexpr unsigned fractionBits = 52;

/// Added to a number below 2⁵¹ in size it leaves the nearest integer in the lowest bits, ties to even.
inline constexpr double shifter = 0x1.8p52;

/// One number.
struct Scalar {
    using Real = double;
    using Bits = std::uint64_t;
    using Root = tables::Root;
    using Inverse = tables::Inverse;

    static Root root(Bits index) { return tables::roots[static_cast<std::size_t>(index)]; }
    static Inverse inverse(Bits index) { return tables::inverses[static_cast<std::size_t>(index)]; }
};

/// c₀ + c₁ x + c₂ x² + c₃ x³, in pairs so that the steps overlap.
template <class Real> [[gnu::always_inline]] inline Real polynomial(const std::array<double, 4>& c, Real x) {
    return (c[0] + c[1] * x) + x * x * (c[2] + c[3] * x);
}

/// The same to the fifth power.
template <class Real> [[gnu::always_inline]] inline Real polynomial(const std::array<double, 6>& c, Real x) {
    const Real square = x * x;
    return (c[0] + c[1] * x) + square * ((c[2] + c[3] * x) + square * (c[4] + c[5] * x));
}

/// eˣ = 2^exponent · (root + rest), the root being 2^(i/64), i = 0 … 63, and the rest at most 1.1 % of it.
template <class Width> struct Exponential {
    typename Width::Bits exponent; ///< in the place of the exponent field, in two's complement
    typename Width::Real root;
    typename Width::Real rest;
};

/// x = n · ln 2 / 64 + r with |r| ≤ ln 2 / 128 (and a trifle), for |x| < 2¹⁰.
///
/// n has at most 17 bits, so n · stepHigh and x − n · stepHigh are exact; r then carries one rounding, 2⁻⁶¹
/// at most. The truncation of the tail costs 2⁻⁵⁷·⁶ and the rounding of (root · (eʳ − 1)) 2⁻⁶⁰: with the last
/// sum eˣ is within 0.55 ulp.
template <class Width> [[gnu::always_inline]] inline Exponential<Width> exponential(typename Width::Real x) {
    using Real = typename Width::Real;
    using Bits = typename Width::Bits;
    const Real shifted = x * tables::stepsPerUnit + shifter;
    const Real steps = shifted - shifter;
    const Bits count = __builtin_bit_cast(Bits, shifted);
    const Real r = (x - steps * tables::stepHigh) - steps * tables::stepLow;
    const auto root = Width::root(count & 63U);
    const Real growth = r + r * r * polynomial(tables::exponentialTail, r);
    return {
        .exponent = (count >> 6U) << fractionBits, .root = root.high, .rest = root.low + root.high * growth};
}

/// eˣ where it is a normal number: |x| < 708.
template <class Width> [[gnu::always_inline]] inline typename Width::Real exp(typename Width::Real x) {
    const Exponential<Width> parts = exponential<Width>(x);
    const auto bits = __builtin_bit_cast(typename Width::Bits, parts.root + parts.rest);
    return __builtin_bit_cast(typename Width::Real, bits + parts.exponent);
}

/// A positive normal number as 2^exponent · (high + low), high + low in [11/16, 11/8), high a multiple of
/// 2⁻³³, low at most 2⁻³³ in size.
template <class Width> struct Scaled {
    typename Width::Bits biased; ///< exponent + 1023 in the place of the exponent field
    typename Width::Real exponent;
    typename Width::Real high;
    typename Width::Real low;
    typename Width::Inverse step; ///< the row of the table for this significand
};

template <class Width> [[gnu::always_inline]] inline Scaled<Width> scaled(typename Width::Bits bits) {
    using Real = typename Width::Real;
    using Bits = typename Width::Bits;
    constexpr std::uint64_t lowest = 0x3FE6'0000'0000'0000; // 11/16
    constexpr double integerOffset = 0x1p52; // its bits | n, for n below 2⁵², are those of 2⁵² + n
    constexpr std::uint64_t integerBits = 0x4330'0000'0000'0000;
    constexpr std::uint64_t half = std::uint64_t{1} << 19U; // of the lowest bit that `high` keeps

    const Bits shifted = bits + (bitsOfOne - lowest);
    const Bits biased = shifted & exponentField;
    const Bits significand = bits - biased + bitsOfOne;
    const Bits high = (significand + half) & ~(2 * half - 1);
    const Real highPart = __builtin_bit_cast(Real, high);
    return {.biased = biased,
            .exponent =
                __builtin_bit_cast(Real, (shifted >> fractionBits) | integerBits) - (integerOffset + 1023.0),
            .high = highPart,
            .low = __builtin_bit_cast(Real, significand) - highPart,
            .step = Width::inverse((shifted >> (fractionBits - 7U)) & 127U)};
}

/// ln x = exponent · ln 2 − ln(inverse) + ln(1 + r), r = x · inverse / 2^exponent − 1.
///
/// Everything of first order is exact but for one rounding whose loss is kept: the inverse has 10 bits, so
/// that its products with high and low are exact, and the three terms of the leading sum are multiples of
/// 2⁻⁴² below 2¹¹. The term r² · tail, at most 2⁻¹⁵ and at most 2⁻⁸ of the result, is rounded a few times:
/// with the last sum the logarithm is within 0.52 ulp. Next to 1 the inverse is 1 and the leading sum is
/// x − 1 itself.
template <class Width> [[gnu::always_inline]] inline typename Width::Real logarithm(const Scaled<Width>& x) {
    using Real = typename Width::Real;
    const Real rHigh = x.high * x.step.inverse - 1.0;
    const Real rLow = x.low * x.step.inverse;
    const Real leading = (x.exponent * tables::ln2High + x.step.logHigh) + rHigh;
    const Real sum = leading + rLow; // leading is 0 or greater than rLow
    const Real rest = ((leading - sum) + rLow) + (x.exponent * tables::ln2Low + x.step.logLow);
    const Real r = rHigh + rLow;
    return sum + (rest + r * r * polynomial(tables::logarithmTail, r));
}

} // namespace forwright::numeric::kernels
