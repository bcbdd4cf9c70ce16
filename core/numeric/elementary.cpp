#include "numeric/elementary.hpp"

#include "numeric/elementary_kernels.hpp"

#include <cmath>
#include <limits>

namespace forwright::numeric {

namespace {

using kernels::Scalar;

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double notANumber = std::numeric_limits<double>::quiet_NaN();

std::uint64_t bitsOf(double x) {
    return __builtin_bit_cast(std::uint64_t, x);
}
double fromBits(std::uint64_t bits) {
    return __builtin_bit_cast(double, bits);
}

/// 2^n for the n whose bits stand in the place of the exponent field; −1022 ≤ n ≤ 1023.
double powerOfTwo(std::uint64_t exponent) {
    return fromBits(kernels::bitsOfOne + exponent);
}

/// a + b = sum + loss, exactly, whichever is greater.
struct ExactSum {
    double sum;
    double loss;
};
ExactSum exactSum(double a, double b) {
    const double sum = a + b;
    const double shareOfB = sum - a;
    return {.sum = sum, .loss = (a - (sum - shareOfB)) + (b - shareOfB)};
}

/// Where eˣ or a part of it leaves the range of the normal numbers. The power of two is applied in two steps:
/// the first is exact, and the second rounds once more only where the result is subnormal; there it costs
/// half a unit of the last place beside the half that the rounding before it, now finer by a bit or more, may
/// have cost.
[[gnu::noinline]] double expOutside(double x) {
    if (std::isnan(x)) {
        return notANumber;
    }
    if (x > 710.0) {
        return infinity;
    }
    if (x < -746.0) {
        return 0.0;
    }
    const auto parts = kernels::exponential<Scalar>(x);
    const double upTo = x > 0.0 ? 0x1p1000 : 0x1p-1000;
    const std::uint64_t remaining = parts.exponent - (bitsOf(upTo) - kernels::bitsOfOne);
    return (parts.root + parts.rest) * powerOfTwo(remaining) * upTo;
}

[[gnu::noinline]] double logOutside(double x) {
    if (x == 0.0) {
        return -infinity;
    }
    if (!(x > 0.0)) {
        return notANumber;
    }
    if (x == infinity) {
        return infinity;
    }
    auto parts = kernels::scaled<Scalar>(bitsOf(x * 0x1p52)); // subnormal
    parts.exponent -= 52.0;
    return kernels::logarithm(parts);
}

} // namespace

double exp(double x) {
    if (std::fabs(x) < 708.0) {
        return kernels::exp<Scalar>(x);
    }
    return expOutside(x);
}

double log(double x) {
    constexpr double smallestNormal = std::numeric_limits<double>::min();
    if (x >= smallestNormal && x < infinity) {
        return kernels::logarithm(kernels::scaled<Scalar>(bitsOf(x)));
    }
    return logOutside(x);
}

// Up to 1/8 in size the series itself, the error being that of its second term (1/16 of the first) and of the
// last sum. Beyond, 1 is taken from the root of the table with its loss kept, and what is rounded before the
// last sum is at most a tenth of the result.
double expm1(double x) {
    if (std::fabs(x) <= 0.125) {
        if (x == 0.0) {
            return x; // keeps the sign
        }
        const auto& c = tables::exponentialTailWide;
        const double square = x * x;
        const double lower = (c[0] + c[1] * x) + square * (c[2] + c[3] * x);
        const double upper = (c[4] + c[5] * x) + square * ((c[6] + c[7] * x) + square * c[8]);
        return x + square * (lower + square * square * upper);
    }
    if (x < -40.0) {
        return -1.0; // e^-40 is less than a quarter of an ulp of 1
    }
    if (!(x < 40.0)) {
        return exp(x); // 1 is less than 2^-57 of it
    }
    const auto parts = kernels::exponential<Scalar>(x);
    const double scale = powerOfTwo(parts.exponent);
    const ExactSum whole = exactSum(parts.root * scale, -1.0);
    return whole.sum + (whole.loss + parts.rest * scale);
}

// Next to 0 the kernel of the logarithm with r = x. Beyond, the logarithm of the rounded 1 + x with what the
// rounding lost added to the low part of the significand.
double log1p(double x) {
    if (x >= -0x1p-8 && x < 0x1p-7) {
        return x + x * x * kernels::polynomial(tables::logarithmTail, x);
    }
    if (!(x > -1.0)) {
        return x == -1.0 ? -infinity : notANumber;
    }
    if (x > 0x1p54) {
        return log(x); // 1 / x is less than 2^-59 of it
    }
    const ExactSum whole = exactSum(1.0, x);
    auto parts = kernels::scaled<Scalar>(bitsOf(whole.sum));
    parts.low += whole.loss * powerOfTwo(kernels::bitsOfOne - parts.biased);
    return kernels::logarithm(parts);
}

// x = k · π/2 + r + rest, |r| ≤ π/4: k has at most 20 bits, so its products with the first two parts of π/2
// are exact, and so is the first difference; what the others lose is kept in the rest.
SineCosine sineCosine(double x) {
    if (!(std::fabs(x) <= 0x1p20)) {
        return {.sine = notANumber, .cosine = notANumber};
    }
    if (x == 0.0) {
        return {.sine = x, .cosine = 1.0}; // keeps the sign
    }
    const double shifted = x * tables::quartersPerRadian + kernels::shifter;
    const double quarters = shifted - kernels::shifter;
    const ExactSum coarse =
        exactSum(x - quarters * tables::quarterFirst, -(quarters * tables::quarterSecond));
    const ExactSum fine = exactSum(coarse.sum, -(quarters * tables::quarterThird));
    const double r = fine.sum;
    const double rest = fine.loss + coarse.loss;

    const double square = r * r;
    const double half = 0.5 * square;
    const double most = 1.0 - half;
    const double sine = r + (r * square * kernels::polynomial(tables::sineTail, square) + rest * most);
    const double cosine =
        most + (((1.0 - most) - half) +
                (square * square * kernels::polynomial(tables::cosineTail, square) - r * rest));

    switch (bitsOf(shifted) & 3U) {
    case 0:
        return {.sine = sine, .cosine = cosine};
    case 1:
        return {.sine = cosine, .cosine = -sine};
    case 2:
        return {.sine = -sine, .cosine = -cosine};
    default:
        return {.sine = -cosine, .cosine = sine};
    }
}

// The angle between the nearer half axis and the point has a tangent t ≤ 1. With c, the nearest multiple of
// 1/32, atan t = atan c + atan d, d = (t − c) / (1 + t c) ≤ 1/64. d is taken as t − c, which is exact, less a
// small part of it. The whole is added to, or taken from, the angle of the half axis, in two parts. The
// rounding of the quotient t is the greatest error: up to 1 ulp where t is just above a power of two and its
// angle just below.
double argument(double y, double x) {
    if (std::isnan(x) || std::isnan(y)) {
        return notANumber;
    }
    double along = std::fabs(x);
    double across = std::fabs(y);
    if (along == infinity ||
        across == infinity) { // the limit along the ray, on which only infinite parts count
        along = along == infinity ? 1.0 : 0.0;
        across = across == infinity ? 1.0 : 0.0;
    }
    const bool left = x < 0.0;
    if (along == 0.0 && across == 0.0) {
        return 0.0;
    }
    const bool steep = across > along;
    const double tangent = steep ? along / across : across / along;
    const double steps = (tangent * 32.0 + kernels::shifter) - kernels::shifter;
    const tables::Angle angle = tables::angles[static_cast<std::size_t>(steps)];
    const double c = steps / 32.0;
    const double beyond = tangent - c;
    const double product = tangent * c;
    const double shortfall = beyond * (product / (1.0 + product));
    const double d = beyond - shortfall;
    const double square = d * d;
    const double tail = d * square * kernels::polynomial(tables::arcTangentTail, square);
    const double low = beyond + ((tail - shortfall) + angle.low);

    const tables::Angle axis = steep  ? tables::quarterTurn
                               : left ? tables::halfTurn
                                      : tables::Angle{0.0, 0.0};
    const double sign = steep != left ? -1.0 : 1.0; // steep: away from the upright axis on the left
    const ExactSum whole = exactSum(axis.high, sign * angle.high);
    const double upper = whole.sum + (whole.loss + (axis.low + sign * low));
    return y < 0.0 ? -upper : upper;
}

} // namespace forwright::numeric
