#include "discounting/monotone_cubic.hpp"

#include <cmath>

namespace forwright::discounting::detail {

namespace {

/// A slope with its derivatives by two neighbouring secants.
struct Blend {
    double slope = 0.0;
    double byNear = 0.0;
    double byFar = 0.0;
};

bool sameSign(double a, double b) {
    return (a > 0.0 && b > 0.0) || (a < 0.0 && b < 0.0);
}

/// (w₁ + w₂) / (w₁/a + w₂/b), written so that no product or reciprocal of a small secant is taken; |a| ≤ |b|.
Blend harmonicMeanOfOrdered(double a, double b, double weightA, double weightB) {
    const double ratio = a / b;
    const double total = weightA + weightB;
    const double below = weightA + weightB * ratio;
    return {total * a / below, total * weightA / (below * below),
            total * weightB * ratio * ratio / (below * below)};
}

Blend innerSlope(double left, double right, double leftWidth, double rightWidth) {
    if (!sameSign(left, right)) {
        return {};
    }
    const double weightLeft = 2.0 * rightWidth + leftWidth;
    const double weightRight = rightWidth + 2.0 * leftWidth;
    if (std::fabs(left) <= std::fabs(right)) {
        return harmonicMeanOfOrdered(left, right, weightLeft, weightRight);
    }
    const Blend swapped = harmonicMeanOfOrdered(right, left, weightRight, weightLeft);
    return {swapped.slope, swapped.byFar, swapped.byNear};
}

Blend endSlope(double near, double far, double nearWidth, double farWidth) {
    const double span = nearWidth + farWidth;
    const double byNear = (2.0 * nearWidth + farWidth) / span;
    const double byFar = -nearWidth / span;
    const double slope = byNear * near + byFar * far;
    if (!sameSign(slope, near)) {
        return {};
    }
    if (!sameSign(near, far) && std::fabs(slope) > 3.0 * std::fabs(near)) {
        return {3.0 * near, 3.0, 0.0};
    }
    return {slope, byNear, byFar};
}

} // namespace

std::vector<KnotSlope> monotoneSlopes(std::span<const double> x, std::span<const double> y) {
    const std::size_t knots = x.size();
    const auto width = [&](std::size_t i) {
        return x[i + 1] - x[i];
    };
    const auto secant = [&](std::size_t i) {
        return (y[i + 1] - y[i]) / width(i);
    };
    std::vector<KnotSlope> slopes(knots);
    if (knots == 2) {
        const KnotSlope straight{secant(0), 0, {-1.0 / width(0), 1.0 / width(0), 0.0}};
        slopes = {straight, straight};
        return slopes;
    }
    // The slope of a blend of the secants of [first, first+1] and [first+1, first+2].
    const auto from = [&](std::size_t first, double slope, double byLeft, double byRight) {
        const double left = byLeft / width(first);
        const double right = byRight / width(first + 1);
        return KnotSlope{slope, first, {-left, left - right, right}};
    };
    for (std::size_t i = 1; i + 1 < knots; ++i) {
        const Blend inner = innerSlope(secant(i - 1), secant(i), width(i - 1), width(i));
        slopes[i] = from(i - 1, inner.slope, inner.byNear, inner.byFar);
    }
    const Blend start = endSlope(secant(0), secant(1), width(0), width(1));
    slopes.front() = from(0, start.slope, start.byNear, start.byFar);
    const std::size_t n = knots - 1;
    const Blend end = endSlope(secant(n - 1), secant(n - 2), width(n - 1), width(n - 2));
    slopes.back() = from(n - 2, end.slope, end.byFar, end.byNear);
    return slopes;
}

} // namespace forwright::discounting::detail
