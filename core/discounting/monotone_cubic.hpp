#pragma once

#include <array>
#include <cstddef>
#include <span>
#include <vector>

/// Internal to the folder: the monotone piecewise cubic of Fritsch and Carlson.
namespace forwright::discounting::detail {

/// The slope at a knot, and its derivatives by the values at three consecutive knots, `first` the first of
/// them.
struct KnotSlope {
    double slope = 0.0;
    std::size_t first = 0;
    std::array<double, 3> byValue{};
};

/// Slopes of the cubic Hermite interpolant through (x, y), x rising, at least two knots, that is monotone
/// wherever the data are (Fritsch and Carlson, "Monotone piecewise cubic interpolation", SIAM J. Numer. Anal.
/// 17 (1980)):
/// - inside, the weighted harmonic mean of the two secants, 0 where they differ in sign (the formula of
/// Fritsch and Butland, SIAM J.
///   Sci. Stat. Comput. 5 (1984), which stays in Fritsch and Carlson's region and so needs no second pass);
/// - at the ends, the three-point formula, 0 where its sign is not that of the end's secant, and no steeper
/// than three times that
///   secant where the secants differ in sign;
/// - with two knots, the secant.
/// At a kink (a secant of 0, or a limit just reached) the derivatives are one-sided.
[[nodiscard]] std::vector<KnotSlope> monotoneSlopes(std::span<const double> x, std::span<const double> y);

} // namespace forwright::discounting::detail
