#pragma once

#include "numeric/elementary.hpp"

#include <cmath>

/// Internal to the folder: the little complex arithmetic that inverting a transform needs. Written out,
/// because the library's own division and functions differ between compilers by a bit.
namespace forwright::discounting::detail {

struct Complex {
    double re = 0.0;
    double im = 0.0;

    constexpr Complex(
        double real = 0.0,
        double imaginary = 0.0) // NOLINT(google-explicit-constructor): constants mix in formulas
        : re(real), im(imaginary) {}
};

constexpr Complex operator-(Complex a) {
    return {-a.re, -a.im};
}
constexpr Complex operator+(Complex a, Complex b) {
    return {a.re + b.re, a.im + b.im};
}
constexpr Complex operator-(Complex a, Complex b) {
    return {a.re - b.re, a.im - b.im};
}
constexpr Complex operator*(Complex a, Complex b) {
    return {a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re};
}
constexpr Complex operator*(double a, Complex b) {
    return {a * b.re, a * b.im};
}
constexpr Complex operator*(Complex a, double b) {
    return b * a;
}
constexpr Complex operator/(Complex a, double b) {
    return {a.re / b, a.im / b};
}

/// a/b for b not 0, by way of the larger part of b (R. L. Smith, Communications of the ACM 5 (1962)).
inline Complex operator/(Complex a, Complex b) {
    if (std::fabs(b.re) >= std::fabs(b.im)) {
        const double ratio = b.im / b.re;
        const double below = b.re + b.im * ratio;
        return {(a.re + a.im * ratio) / below, (a.im - a.re * ratio) / below};
    }
    const double ratio = b.re / b.im;
    const double below = b.re * ratio + b.im;
    return {(a.re * ratio + a.im) / below, (a.im * ratio - a.re) / below};
}

inline double magnitude(Complex x) {
    return std::fabs(x.re) + std::fabs(x.im);
}

/// |x|, without overflow.
inline double modulus(Complex x) {
    const double large = std::fmax(std::fabs(x.re), std::fabs(x.im));
    if (large == 0.0) {
        return 0.0;
    }
    const double re = x.re / large;
    const double im = x.im / large;
    return large * std::sqrt(re * re + im * im);
}

/// e^x; 0 below the smallest number, whatever the angle.
inline Complex exponential(Complex x) {
    const double size = numeric::exp(x.re);
    if (size == 0.0) {
        return {};
    }
    const numeric::SineCosine angle = numeric::sineCosine(x.im);
    return {size * angle.cosine, size * angle.sine};
}

/// The logarithm with its imaginary part in (−π, π]; x not 0.
inline Complex logarithm(Complex x) {
    return {numeric::log(modulus(x)), numeric::argument(x.im, x.re)};
}

/// The square root with a real part that is not negative.
inline Complex squareRoot(Complex x) {
    const double size = modulus(x);
    if (size == 0.0) {
        return {};
    }
    const double larger = std::sqrt((size + std::fabs(x.re)) / 2.0);
    const double smaller = x.im / (2.0 * larger);
    if (x.re >= 0.0) {
        return {larger, smaller};
    }
    return {std::fabs(smaller), x.im < 0.0 ? -larger : larger};
}

} // namespace forwright::discounting::detail
