#include "discounting_fixtures.hpp"
#include "numeric/elementary.hpp"

#include <functional>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
namespace dates = forwright::dates;
namespace numeric = forwright::numeric;

namespace {

/// A curve made from its parameters alone.
using Maker = std::function<CurvePtr(const std::vector<double>&)>;

/// The gradient against differences; a parameter at the edge of what is accepted is moved up only.
void checkGradient(const Maker& make, const std::vector<double>& at, double step, double error = 1e-8) {
    const CurvePtr curve = make(at);
    const auto parameters = curve->parameters();
    REQUIRE(parameters.size() == at.size());
    for (const int days : {0, 1, 17, 90, 91, 200, 400, 365 * 5, 365 * 30}) {
        const std::vector<double> gradient = curve->logFactorGradient(afterDays(days));
        REQUIRE(gradient.size() == at.size());
        for (std::size_t i = 0; i < at.size(); ++i) {
            CAPTURE(days);
            CAPTURE(parameters[i].at);
            checkNear(parameters[i].value, at[i], 1e-15);
            const auto f = [&](double value) {
                std::vector<double> moved = at;
                moved[i] = value;
                return make(moved)->logFactor(afterDays(days));
            };
            const double difference =
                at[i] == 0.0 ? forwardDifference(f, 0.0, step)
                             : centralDifference(f, at[i], std::fmin(step, std::fabs(at[i]) / 8));
            checkNear(gradient[i], difference, error * std::fmax(1.0, std::fabs(difference)));
        }
    }
}

Maker pillarMaker(PillarQuote quote, Interpolation interpolation, const std::vector<int>& days,
                  const Rate& convention = {}) {
    return [=](const std::vector<double>& values) {
        Pillars points;
        points.quote = quote;
        points.convention = convention;
        points.interpolation = interpolation;
        for (std::size_t i = 0; i < days.size(); ++i) {
            // A factor's parameter is the continuous zero rate.
            const double value =
                quote == PillarQuote::zero ? values[i] : numeric::exp(-values[i] * days[i] / 365.0);
            points.pillars.push_back({afterDays(days[i]), value});
        }
        return made(pillars(asOf, points));
    };
}

} // namespace

TEST_SUITE("discounting: gradients against differences of high order") {
    TEST_CASE("flat, every compounding") {
        for (const std::string_view name : compoundingNames()) {
            const Maker make = [&](const std::vector<double>& p) {
                return flat(asOf, rateOf(p[0], *parseCompounding(name), dates::DayCount::act360));
            };
            checkGradient(make, {0.04}, 2e-4);
            checkGradient(make, {-0.02}, 2e-4);
        }
    }

    TEST_CASE("pillars, every interpolation and quote") {
        const std::vector<int> days{91, 182, 365, 730, 1825, 3650};
        const std::vector<double> values{0.021, 0.024, 0.03, 0.033, 0.036, 0.034};
        for (const Interpolation interpolation :
             {Interpolation::logLinear, Interpolation::linearZero, Interpolation::monotoneCubic}) {
            checkGradient(pillarMaker(PillarQuote::factor, interpolation, days), values, 1e-4);
            checkGradient(pillarMaker(PillarQuote::zero, interpolation, days,
                                      rateOf(0, Compounding::annual, dates::DayCount::act360)),
                          values, 1e-4);
            checkGradient(pillarMaker(PillarQuote::zero, interpolation, {91}), {0.02}, 1e-4);
            checkGradient(pillarMaker(PillarQuote::zero, interpolation, {91, 500}), {0.02, -0.01}, 1e-4);
        }
    }

    TEST_CASE(
        "monotone-cubic where forwards change sign, and where an end slope is cut to 0 or to three secants") {
        const std::vector<int> days{91, 182, 365, 730};
        const auto check = [&](const std::vector<double>& values) {
            checkGradient(pillarMaker(PillarQuote::zero, Interpolation::monotoneCubic, days), values, 2e-5);
        };
        check({0.021, 0.001, 0.03, 0.033});
        check({0.0205, -0.05, 0.03, -0.06});
        check({0.001, -0.09, -0.02, -0.002});
        check({0.01, 0.2, 0.21, 0.106});
    }

    TEST_CASE("Vasicek") {
        const Maker make = [](const std::vector<double>& p) {
            return made(vasicek(asOf, {p[0], p[1], p[2], p[3]}));
        };
        checkGradient(make, {0.03, 0.1, 0.06, 0.01}, 1e-3);
        checkGradient(make, {-0.02, 2.0, 0.01, 0.3}, 1e-3);
        checkGradient(make, {0.03, 0.0, 0.06, 0.01}, 1e-3);
        checkGradient(make, {0.03, 1e-3, 0.06, 0.0}, 1e-3);
    }

    TEST_CASE("Cox–Ingersoll–Ross") {
        const Maker make = [](const std::vector<double>& p) {
            return made(coxIngersollRoss(asOf, {p[0], p[1], p[2], p[3]}));
        };
        checkGradient(make, {0.03, 0.1, 0.06, 0.1}, 1e-3);
        checkGradient(make, {0.05, 3.0, 0.01, 1.5}, 1e-3);
        checkGradient(make, {0.03, 0.0, 0.06, 0.1}, 2e-4);
        checkGradient(make, {0.03, 0.1, 0.06, 0.0}, 2e-4);
        checkGradient(make, {0.03, 0.0, 0.06, 0.0}, 2e-4, 3e-8);
        checkGradient(make, {0.0, 0.2, 0.0, 0.1}, 1e-3);
    }

    TEST_CASE("Ho–Lee and Hull–White: the model's own parameters do not move P") {
        const Maker ho = [](const std::vector<double>& p) {
            return made(hoLee(asOf, p[0], flatAt(p[1])));
        };
        checkGradient(ho, {0.01, 0.03}, 1e-3);
        const Maker hull = [](const std::vector<double>& p) {
            return made(hullWhite(asOf, p[0], p[1], flatAt(p[2])));
        };
        checkGradient(hull, {0.1, 0.01, 0.03}, 1e-3);
        CHECK(hull({0.1, 0.01, 0.03})->parameters()[0].at == "/meanReversion");
        CHECK(hull({0.1, 0.01, 0.03})->parameters()[2].at == "/fit/rate");
    }

    TEST_CASE("policy meetings: the overnight rate and every move") {
        const Maker make = [](const std::vector<double>& p) {
            return made(policyMeetings(asOf, p[0],
                                       {{afterDays(50), {{p[1], 0.3}, {p[2], 0.7}}},
                                        {afterDays(100), {{p[3], 0.5}, {p[4], 0.5}, {p[5], 0.0}}}}));
        };
        checkGradient(make, {0.03, -0.0025, 0.0025, -0.05, 0.9, 0.1}, 1e-3);
        CHECK(make({0.03, 0, 0, 0, 0, 0})->parameters()[4].at == "/meetings/1/moves/1/by");
    }

    TEST_CASE("scenarios, nested") {
        const Maker make = [](const std::vector<double>& p) {
            return made(scenarios(
                asOf,
                {{0.3, flatAt(p[0])},
                 {0.7, made(scenarios(asOf, {{0.5, flatAt(p[1])},
                                             {0.5, made(vasicek(asOf, {p[2], p[3], p[4], p[5]}))}}))}}));
        };
        checkGradient(make, {0.02, 0.05, 0.03, 0.1, 0.06, 0.01}, 1e-3);
    }
}
