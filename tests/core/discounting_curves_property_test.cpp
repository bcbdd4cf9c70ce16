#ifndef __EMSCRIPTEN__

#include "discounting_fixtures.hpp"
#include "numeric/elementary.hpp"

#include <rapidcheck.h>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;

// RapidCheck prints its seed, which main.cpp fixes, and takes another through RC_PARAMS.

namespace {

constexpr std::array interpolations{Interpolation::logLinear, Interpolation::linearZero,
                                    Interpolation::monotoneCubic};

/// A curve of factors: gaps in days and forward rates between `low` and `high` in basis points.
Pillars arbitraryFactors(Interpolation interpolation, int low, int high) {
    Pillars points;
    points.quote = PillarQuote::factor;
    points.interpolation = interpolation;
    const auto gaps = *rc::gen::nonEmpty(rc::gen::container<std::vector<int>>(rc::gen::inRange(1, 1500)));
    int days = 0;
    double y = 0;
    for (const int gap : gaps) {
        if (days + gap > 30000) {
            break;
        }
        days += gap;
        y += *rc::gen::inRange(low, high) * 1e-4 * gap / 365;
        points.pillars.push_back({afterDays(days), forwright::numeric::exp(-y)});
    }
    return points;
}

} // namespace

TEST_SUITE("discounting: properties of curves") {
    TEST_CASE("every curve gives its pillars back, is 1 today and has no jump") {
        for (const Interpolation interpolation : interpolations) {
            CHECK(rc::check("pillars come back", [interpolation] {
                const Pillars points = arbitraryFactors(interpolation, -500, 2000);
                const CurvePtr curve = pillars(asOf, points).value();
                RC_ASSERT(curve->factor(asOf) == 1.0);
                for (const Pillar& pillar : points.pillars) {
                    RC_ASSERT(std::fabs(curve->factor(pillar.at) / pillar.value - 1) < 1e-14);
                }
                // The steepest a monotone cubic gets is 3 times the steepest secant; a zero rate's own move
                // is of that order over a day.
                for (int days = 0; days < 3000; days += 13) {
                    const double move =
                        curve->logFactor(afterDays(days + 1)) - curve->logFactor(afterDays(days));
                    if (interpolation != Interpolation::linearZero) {
                        RC_ASSERT(std::fabs(move) <= 3 * 0.2 / 365 * (1 + 1e-9));
                    }
                }
            }));
        }
    }

    TEST_CASE("monotone-cubic: forward rates are never negative where the factors never rise, past the end "
              "as well") {
        CHECK(rc::check("no negative forward", [] {
            const Pillars points = arbitraryFactors(Interpolation::monotoneCubic, 0, 2000);
            const CurvePtr curve = pillars(asOf, points).value();
            const int last = static_cast<int>((points.pillars.back().at - asOf).count()) + 100;
            // A level stretch is level but for the last places of the cubic's terms, none of which exceeds
            // the end.
            const double slack = 4e-15 * std::fabs(curve->logFactor(afterDays(last)));
            for (int days = 0; days < last; ++days) {
                RC_ASSERT(curve->logFactor(afterDays(days + 1)) <= curve->logFactor(afterDays(days)) + slack);
            }
        }));
    }

    TEST_CASE(
        "the parts of a gradient move the whole: all zero rates up by a little moves ln P by −t times that") {
        for (const Interpolation interpolation : interpolations) {
            CHECK(rc::check("parallel move", [interpolation] {
                // Homogeneous of degree one in the zero rates: ln P is the sum of parameter times derivative.
                const CurvePtr curve = pillars(asOf, arbitraryFactors(interpolation, -500, 2000)).value();
                const Date u = afterDays(*rc::gen::inRange(1, 20000));
                const auto parameters = curve->parameters();
                const auto gradient = curve->logFactorGradient(u);
                double sum = 0, size = 0;
                for (std::size_t i = 0; i < parameters.size(); ++i) {
                    sum += parameters[i].value * gradient[i];
                    size += std::fabs(parameters[i].value * gradient[i]);
                }
                RC_ASSERT(std::fabs(sum - curve->logFactor(u)) <= 1e-12 * (1 + size));
            }));
        }
    }

    TEST_CASE("a mean of curves lies between them, and moves the way its parts do") {
        CHECK(rc::check("mixture", [] {
            const double low = *rc::gen::inRange(-500, 3000) * 1e-4;
            const double high = low + *rc::gen::inRange(1, 3000) * 1e-4;
            const double weight = *rc::gen::inRange(1, 100) * 0.01;
            const CurvePtr curve =
                scenarios(asOf, {{weight, flatAt(low)}, {1 - weight, flatAt(high)}}).value();
            const Date u = afterDays(*rc::gen::inRange(1, 36500));
            RC_ASSERT(curve->logFactor(u) < flatAt(low)->logFactor(u));
            RC_ASSERT(curve->logFactor(u) > flatAt(high)->logFactor(u));
            // Jensen: never below the mean of the logarithms.
            RC_ASSERT(curve->logFactor(u) >= curve->random()->meanLog(u) - 1e-12);
        }));
    }

    TEST_CASE("randomness makes money later worth more: P ≥ e^(E[ln D]), more so with more volatility") {
        CHECK(rc::check("Jensen", [] {
            const double r0 = *rc::gen::inRange(0, 2000) * 1e-4;
            const double kappa = *rc::gen::inRange(0, 3000) * 1e-3;
            const double theta = *rc::gen::inRange(0, 2000) * 1e-4;
            const double sigma = *rc::gen::inRange(1, 500) * 1e-3;
            const Date u = afterDays(*rc::gen::inRange(1, 10000));
            const double certain = vasicek(asOf, {r0, kappa, theta, 0}).value()->logFactor(u);
            const double square = coxIngersollRoss(asOf, {r0, kappa, theta, sigma}).value()->logFactor(u);
            const double more = coxIngersollRoss(asOf, {r0, kappa, theta, 1.5 * sigma}).value()->logFactor(u);
            const double normal = vasicek(asOf, {r0, kappa, theta, sigma}).value()->logFactor(u);
            RC_ASSERT(normal >= certain);
            RC_ASSERT(square >= certain - 1e-13 * std::fabs(certain));
            RC_ASSERT(more >= square - 1e-13 * std::fabs(certain));
            RC_ASSERT(square <= 0.0);
        }));
    }
}

#endif
