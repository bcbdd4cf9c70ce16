#ifndef __EMSCRIPTEN__

#include "discounting/decay.hpp"
#include "discounting/mean_reversion.hpp"
#include "discounting_fixtures.hpp"
#include "numeric/elementary.hpp"

#include <boost/math/quadrature/gauss_kronrod.hpp>
#include <boost/math/quadrature/tanh_sinh.hpp>
#include <boost/multiprecision/cpp_dec_float.hpp>
#include <boost/numeric/odeint.hpp>

#include <array>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
namespace numeric = forwright::numeric;

namespace {

using Wide = boost::multiprecision::cpp_dec_float_100;
using Quadrature = boost::math::quadrature::gauss_kronrod<double, 61>;

/// ln P of Cox–Ingersoll–Ross by integrating its Riccati equations (Cox, Ingersoll and Ross 1985): B' = 1 −
/// κB − σ²B²/2, (ln A)' = −κθB.
double logFactorByEquations(const CoxIngersollRoss& model, double years) {
    using State = std::array<double, 2>;
    namespace odeint = boost::numeric::odeint;
    State state{0.0, 0.0};
    const auto equations = [&](const State& at, State& slope, double) {
        slope[0] =
            1.0 - model.meanReversion * at[0] - 0.5 * model.volatility * model.volatility * at[0] * at[0];
        slope[1] = -model.meanReversion * model.longRun * at[0];
    };
    odeint::integrate_adaptive(odeint::make_controlled<odeint::runge_kutta_fehlberg78<State>>(1e-15, 1e-14),
                               equations, state, 0.0, years, 1e-3);
    return state[1] - model.r0 * state[0];
}

} // namespace

TEST_SUITE("discounting: models against Boost") {
    TEST_CASE("the decay functions against the plain formulas with 100 digits, for every κt: relative error "
              "below 1e-14") {
        for (double x = 1e-20; x < 1e5; x *= 1.37) {
            CAPTURE(x);
            const Wide w = x;
            const Wide e = exp(-w);
            checkRelative(detail::decayMean(x), static_cast<double>((1 - e) / w), 1e-14);
            checkRelative(detail::decayGap(x), static_cast<double>((w - 1 + e) / (w * w)), 1e-14);
            checkRelative(detail::decayVariance(x),
                          static_cast<double>((w - 2 * (1 - e) + (1 - e * e) / 2) / (w * w * w)), 1e-14);
            checkRelative(detail::decayStartVariance(x),
                          static_cast<double>((1 - e * e - 2 * w * e) / (w * w * w)), 1e-14);
            checkRelative(
                detail::decayLongRunVariance(x),
                static_cast<double>((w - Wide(5) / 2 + 2 * e + 2 * w * e + e * e / 2) / (w * w * w)), 1e-14);
        }
    }

    TEST_CASE("the trap: at κ = 1e-7 the plain formulas in double lose everything, these nothing") {
        const Wide kappa = 1e-7;
        const Wide t = 10;
        const Wide e = exp(-kappa * t);
        const Wide b = (1 - e) / kappa;
        const Wide variance =
            Wide(0.3) * Wide(0.3) / (kappa * kappa) * (t - 2 * b + (1 - e * e) / (2 * kappa));
        checkRelative(integralVariance(1e-7, 0.3, 10), static_cast<double>(variance), 1e-14);
        checkRelative(reversionTime(1e-7, 10), static_cast<double>(b), 1e-14);
        checkRelative(reversionGap(1e-7, 10), static_cast<double>((t - b) / kappa), 1e-14);
    }

    TEST_CASE("Vasicek's variance is σ²∫B², and E[∫r] the integral of E[r]") {
        for (const double kappa : {1e-7, 0.05, 0.8, 12.0}) {
            for (const int years : {1, 10, 60}) {
                const CurvePtr curve = made(vasicek(asOf, {0.02, kappa, 0.05, 0.013}));
                const auto b = [&](double s) {
                    return -std::expm1(-kappa * s) / kappa;
                };
                const double variance = Quadrature::integrate(
                    [&](double s) { return 0.013 * 0.013 * b(s) * b(s); }, 0.0, double(years), 15, 1e-14);
                const double mean =
                    Quadrature::integrate([&](double s) { return 0.05 - 0.03 * std::exp(-kappa * s); }, 0.0,
                                          double(years), 15, 1e-14);
                checkRelative(*curve->random()->varianceLog(afterYears(years)), variance, 1e-12);
                checkRelative(curve->random()->meanLog(afterYears(years)), -mean, 1e-12);
            }
        }
    }

    TEST_CASE("Cox–Ingersoll–Ross against its Riccati equations, integrated by Boost.Odeint") {
        for (const double kappa : {0.0, 1e-7, 0.1, 2.0}) {
            for (const double sigma : {0.0, 1e-6, 0.05, 0.3, 2.0}) {
                for (const int years : {1, 10, 50}) {
                    CAPTURE(kappa);
                    CAPTURE(sigma);
                    CAPTURE(years);
                    const CoxIngersollRoss model{0.03, kappa, 0.06, sigma};
                    checkRelative(made(coxIngersollRoss(asOf, model))->logFactor(afterYears(years)),
                                  logFactorByEquations(model, years), 1e-11);
                }
            }
        }
    }

    TEST_CASE(
        "Cox–Ingersoll–Ross's variance of ∫r is 2∫Var[r(s)]·B(t − s), with Var[r] as printed in the paper") {
        for (const double kappa : {1e-3, 0.1, 2.0}) {
            for (const int years : {1, 10, 40}) {
                const double r0 = 0.03, theta = 0.06, sigma = 0.1;
                const CurvePtr curve = made(coxIngersollRoss(asOf, {r0, kappa, theta, sigma}));
                const auto integrand = [&](double s) {
                    const double e = std::exp(-kappa * s);
                    const double variance = r0 * sigma * sigma / kappa * (e - e * e) +
                                            theta * sigma * sigma / (2 * kappa) * (1 - e) * (1 - e);
                    return 2 * variance * -std::expm1(-kappa * (years - s)) / kappa;
                };
                checkRelative(*curve->random()->varianceLog(afterYears(years)),
                              Quadrature::integrate(integrand, 0.0, double(years), 15, 1e-13), 1e-11);
            }
        }
    }

    TEST_CASE("the law's own mean is P: ∫ P(D > d) over [0, 1], for Cox–Ingersoll–Ross") {
        boost::math::quadrature::tanh_sinh<double> quadrature(7);
        for (const CoxIngersollRoss& model :
             {CoxIngersollRoss{0.05, 0.1, 0.08, 0.07}, CoxIngersollRoss{0.02, 0.5, 0.04, 0.4},
              CoxIngersollRoss{0.0, 0.2, 0.1, 1.0}}) {
            const CurvePtr curve = made(coxIngersollRoss(asOf, model));
            const auto law = curve->random()->law(afterYears(8));
            const double mean = quadrature.integrate(
                [&](double d) { return 1 - law.value()->probabilityAtMost(numeric::log(d)); }, 0.0, 1.0,
                1e-9);
            checkRelative(mean, curve->factor(afterYears(8)), 1e-8);
        }
    }
}

#endif
