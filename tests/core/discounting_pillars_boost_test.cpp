#ifndef __EMSCRIPTEN__

#include "discounting_fixtures.hpp"

// The second wants isnan of the first, in the global namespace.
// clang-format off
#include <math.h>
#include <boost/math/interpolators/pchip.hpp>
// clang-format on

using namespace forwright::discounting;
using namespace forwright::discounting::testing;

namespace {

/// The end slope of a shape-preserving cubic as printed in Moler, Numerical Computing with MATLAB,
/// section 3.4 (from memory).
double endSlope(double h1, double h2, double d1, double d2) {
    const double slope = ((2 * h1 + h2) * d1 - h1 * d2) / (h1 + h2);
    if (slope * d1 <= 0) {
        return 0;
    }
    return d1 * d2 <= 0 && std::fabs(slope) > std::fabs(3 * d1) ? 3 * d1 : slope;
}

} // namespace

TEST_SUITE("discounting: pillars against Boost") {
    TEST_CASE("monotone-cubic is Boost.Math's monotone cubic, given the three-point end slopes") {
        const std::vector<double> days{0, 91, 365, 730, 1825, 3650};
        const std::vector<std::vector<double>> shapes{
            {0, 0.0075, 0.031, 0.0655, 0.18, 0.40},  {0, 0.004, 0.010, 0.009, 0.080, 0.081},
            {0, -0.002, -0.001, -0.001, 0.10, 0.02}, {0, 0.0001, 0.2, 0.21, 0.2101, 0.9},
            {0, 0.01, -0.3, -0.2, 0.2, -0.9},
        };
        for (const std::vector<double>& y : shapes) {
            Pillars points;
            points.quote = PillarQuote::factor;
            points.interpolation = Interpolation::monotoneCubic;
            std::vector<double> x{0};
            for (std::size_t i = 1; i < y.size(); ++i) {
                points.pillars.push_back({afterDays(static_cast<int>(days[i])), std::exp(-y[i])});
                x.push_back(days[i] / 365);
            }
            const auto secant = [&](std::size_t i) {
                return (y[i + 1] - y[i]) / (x[i + 1] - x[i]);
            };
            const double left = endSlope(x[1], x[2] - x[1], secant(0), secant(1));
            const double right = endSlope(x[5] - x[4], x[4] - x[3], secant(4), secant(3));
            const boost::math::interpolators::pchip<std::vector<double>> reference(
                std::vector<double>(x), std::vector<double>(y), left, right);
            const CurvePtr curve = made(pillars(asOf, points));
            for (int day = 0; day < 3650; day += 7) {
                checkNear(-curve->logFactor(afterDays(day)), reference(day / 365.0), 1e-14);
            }
        }
    }
}

#endif
