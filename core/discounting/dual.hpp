#pragma once

#include "numeric/elementary.hpp"

#include <array>
#include <cmath>
#include <cstddef>

/// Internal to the folder: a number that carries its derivatives along, so that a formula written once gives
/// both.
namespace forwright::discounting::detail {

/// A value and its derivatives by N parameters (forward-mode differentiation: exact but for rounding).
template <std::size_t N> struct Dual {
    double value = 0.0;
    std::array<double, N> slope{};

    constexpr Dual(double constant = 0.0)
        : value(constant) {} // NOLINT(google-explicit-constructor): constants mix in formulas

    /// The i-th parameter itself.
    static constexpr Dual parameter(double at, std::size_t i) {
        Dual result(at);
        result.slope[i] = 1.0;
        return result;
    }
};

/// f(a) where f has the value `value` and the derivative `slope` at a.
template <std::size_t N> constexpr Dual<N> chain(const Dual<N>& a, double value, double slope) {
    Dual<N> result(value);
    for (std::size_t i = 0; i < N; ++i) {
        result.slope[i] = slope * a.slope[i];
    }
    return result;
}

/// f(a, b) likewise.
template <std::size_t N>
constexpr Dual<N> chain(const Dual<N>& a, const Dual<N>& b, double value, double byA, double byB) {
    Dual<N> result(value);
    for (std::size_t i = 0; i < N; ++i) {
        result.slope[i] = byA * a.slope[i] + byB * b.slope[i];
    }
    return result;
}

template <std::size_t N> constexpr Dual<N> operator-(const Dual<N>& a) {
    return chain(a, -a.value, -1.0);
}
template <std::size_t N> constexpr Dual<N> operator+(const Dual<N>& a, const Dual<N>& b) {
    return chain(a, b, a.value + b.value, 1.0, 1.0);
}
template <std::size_t N> constexpr Dual<N> operator-(const Dual<N>& a, const Dual<N>& b) {
    return chain(a, b, a.value - b.value, 1.0, -1.0);
}
template <std::size_t N> constexpr Dual<N> operator*(const Dual<N>& a, const Dual<N>& b) {
    return chain(a, b, a.value * b.value, b.value, a.value);
}
template <std::size_t N> constexpr Dual<N> operator/(const Dual<N>& a, const Dual<N>& b) {
    const double ratio = a.value / b.value;
    return chain(a, b, ratio, 1.0 / b.value, -ratio / b.value);
}
template <std::size_t N> constexpr Dual<N> operator+(const Dual<N>& a, double b) {
    return a + Dual<N>(b);
}
template <std::size_t N> constexpr Dual<N> operator+(double a, const Dual<N>& b) {
    return Dual<N>(a) + b;
}
template <std::size_t N> constexpr Dual<N> operator-(const Dual<N>& a, double b) {
    return a - Dual<N>(b);
}
template <std::size_t N> constexpr Dual<N> operator-(double a, const Dual<N>& b) {
    return Dual<N>(a) - b;
}
template <std::size_t N> constexpr Dual<N> operator*(const Dual<N>& a, double b) {
    return chain(a, a.value * b, b);
}
template <std::size_t N> constexpr Dual<N> operator*(double a, const Dual<N>& b) {
    return b * a;
}
template <std::size_t N> constexpr Dual<N> operator/(const Dual<N>& a, double b) {
    return chain(a, a.value / b, 1.0 / b);
}
template <std::size_t N> constexpr Dual<N> operator/(double a, const Dual<N>& b) {
    return Dual<N>(a) / b;
}

// The functions of formulas that are written for plain numbers, duals and complex numbers alike.

/// How far from 0: what decides between a series and a closed form.
inline double magnitude(double x) {
    return std::fabs(x);
}
inline double exponential(double x) {
    return numeric::exp(x);
}
inline double logarithm(double x) {
    return numeric::log(x);
}
inline double squareRoot(double x) {
    return std::sqrt(x);
}

template <std::size_t N> double magnitude(const Dual<N>& x) {
    return std::fabs(x.value);
}
template <std::size_t N> Dual<N> exponential(const Dual<N>& x) {
    const double value = numeric::exp(x.value);
    return chain(x, value, value);
}
template <std::size_t N> Dual<N> logarithm(const Dual<N>& x) {
    return chain(x, numeric::log(x.value), 1.0 / x.value);
}
template <std::size_t N> Dual<N> squareRoot(const Dual<N>& x) {
    const double root = std::sqrt(x.value);
    return chain(x, root, 0.5 / root);
}

} // namespace forwright::discounting::detail
