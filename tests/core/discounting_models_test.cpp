#include "discounting/mean_reversion.hpp"
#include "discounting_fixtures.hpp"
#include "numeric/elementary.hpp"
#include "numeric/normal.hpp"

#include <array>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
namespace numeric = forwright::numeric;

namespace {

CurvePtr vasicekOf(double r0, double meanReversion, double longRun, double volatility) {
    return made(vasicek(asOf, {r0, meanReversion, longRun, volatility}));
}
CurvePtr coxIngersollRossOf(double r0, double meanReversion, double longRun, double volatility) {
    return made(coxIngersollRoss(asOf, {r0, meanReversion, longRun, volatility}));
}

constexpr std::array<double, 7> levels{0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99};

std::vector<Quantile> quantilesOf(const CurvePtr& curve, Date u,
                                  std::span<const double> probabilities = levels) {
    REQUIRE(curve->random() != nullptr);
    const auto result = curve->random()->quantiles(u, probabilities);
    REQUIRE(result.ok());
    return result.value();
}

} // namespace

TEST_SUITE("discounting: short-rate models") {
    TEST_CASE("Vasicek as printed (Hull, Options, Futures and Other Derivatives; from memory, reproduced by "
              "independent arithmetic)") {
        checkNear(vasicekOf(0.10, 0.1, 0.1, 0.02)->factor(afterYears(10)), 0.38046, 5e-6);
        const CurvePtr curve = vasicekOf(0.05, 0.1, 0.08, 0.015);
        checkNear(curve->factor(afterYears(1)), 0.94988, 5e-6);
        checkNear(curve->factor(afterYears(3)), 0.85092, 5e-6);
    }

    TEST_CASE("the same curve further out (computed from the closed form with 30 digits)") {
        const CurvePtr curve = vasicekOf(0.05, 0.1, 0.08, 0.015);
        checkNear(curve->factor(afterYears(5)), 0.7567797507, 5e-11);
        checkNear(curve->factor(afterYears(10)), 0.5535221178, 5e-11);
        checkNear(curve->factor(afterYears(30)), 0.1444064393, 5e-11);
    }

    TEST_CASE("Cox–Ingersoll–Ross as printed (Hull; from memory, reproduced by independent arithmetic)") {
        // The book's 0.0632 is 0.02/√0.1 rounded: from it comes the figure printed; 0.0632 itself gives
        // 0.37984.
        checkNear(coxIngersollRossOf(0.10, 0.1, 0.1, 0.02 / std::sqrt(0.1))->factor(afterYears(10)), 0.37986,
                  5e-6);
        checkNear(coxIngersollRossOf(0.10, 0.1, 0.1, 0.0632)->factor(afterYears(10)), 0.379839484134608,
                  1e-14);
    }

    TEST_CASE("Cox–Ingersoll–Ross with the volatility matched at r0 (computed from the closed form)") {
        const CurvePtr curve = coxIngersollRossOf(0.05, 0.1, 0.08, 0.015 / std::sqrt(0.05));
        checkNear(curve->factor(afterYears(5)), 0.7569151173, 5e-11);
        checkNear(curve->factor(afterYears(10)), 0.5543800400, 5e-11);
        checkNear(curve->factor(afterYears(30)), 0.1473544690, 5e-11);
    }

    TEST_CASE("Ho–Lee over a flat 5 % with no drift correction is Vasicek without mean reversion (computed: "
              "e^(−rT + σ²T³/6))") {
        checkNear(vasicekOf(0.05, 0, 0, 0.01)->factor(afterYears(10)), 0.6167242144, 5e-11);
    }

    TEST_CASE(
        "futures over forward from the gap and the variance of ∫r (Cox, Ingersoll and Ross 1981; computed)") {
        const auto ratio = [](double assetVolatility, double correlation, double volatility,
                              double meanReversion, double years) {
            return numeric::exp(correlation * assetVolatility * volatility *
                                    reversionGap(meanReversion, years) +
                                integralVariance(meanReversion, volatility, years));
        };
        checkNear(ratio(0.2, 0.5, 0.01, 0, 1), 1.000533475581, 5e-13);
        checkNear(ratio(0.2, 0.5, 0.01, 0, 5), 1.016806330386, 5e-13);
        checkNear(ratio(0.2, -0.5, 0.01, 0.1, 5), 0.992288977568, 5e-13);
    }

    TEST_CASE("Ho–Lee and Hull–White give their fit back and know the law about it") {
        const CurvePtr fit = flatAt(0.05);
        const CurvePtr plain = made(hoLee(asOf, 0.01, fit));
        const CurvePtr reverting = made(hullWhite(asOf, 0.1, 0.01, fit));
        const Date to = afterYears(10);
        CHECK(plain->logFactor(to) == fit->logFactor(to));
        CHECK(reverting->logFactor(to) == fit->logFactor(to));
        checkRelative(*plain->random()->varianceLog(to), 1e-4 * 1000 / 3, 1e-14);
        checkRelative(plain->random()->meanLog(to), -0.5 - 1e-4 * 1000 / 6, 1e-14);
        // Hull–White fitted to Vasicek's own curve is that model.
        const CurvePtr model = vasicekOf(0.05, 0.1, 0.08, 0.01);
        checkRelative(*reverting->random()->varianceLog(to), *model->random()->varianceLog(to), 1e-15);
        CHECK(made(hullWhite(asOf, 0, 0.01, fit))->random()->varianceLog(to) ==
              plain->random()->varianceLog(to));
    }

    TEST_CASE("P = e^(mean + variance/2) and the quantiles are the normal law's") {
        const CurvePtr curve = vasicekOf(0.02, 0.3, 0.04, 0.012);
        const Date to = afterYears(7);
        const double mean = curve->random()->meanLog(to);
        const double variance = *curve->random()->varianceLog(to);
        checkRelative(curve->logFactor(to), mean + variance / 2, 1e-15);
        for (const Quantile& quantile : quantilesOf(curve, to)) {
            checkNear((numeric::log(quantile.factor) - mean) / std::sqrt(variance),
                      numeric::normalQuantile(quantile.probability), 1e-13);
        }
        CHECK(curve->random()->quantileError() == 0);
        CHECK(curve->random()->paths() == 0);
        CHECK_FALSE(curve->random()->standardError(std::array{to}, std::array{1.0}).has_value());
    }

    TEST_CASE("no volatility: both models are the same certain curve, and D is one number") {
        for (const double meanReversion : {0.0, 1e-12, 1e-7, 1e-3, 0.1, 5.0, 100.0}) {
            CAPTURE(meanReversion);
            const CurvePtr normal = vasicekOf(0.03, meanReversion, 0.06, 0);
            const CurvePtr square = coxIngersollRossOf(0.03, meanReversion, 0.06, 0);
            const Date to = afterYears(20);
            checkRelative(square->logFactor(to), normal->logFactor(to), 1e-14);
            checkRelative(normal->logFactor(to), normal->random()->meanLog(to), 1e-15);
            for (const CurvePtr& curve : {normal, square}) {
                CHECK(*curve->random()->varianceLog(to) == 0);
                for (const Quantile& quantile : quantilesOf(curve, to)) {
                    checkRelative(quantile.factor, curve->factor(to), 1e-14);
                }
            }
        }
    }

    TEST_CASE("tiny parameters run into their limits without a jump") {
        const Date to = afterYears(30);
        for (const double tiny : {1e-3, 1e-5, 1e-7, 1e-9, 1e-12, 1e-100, 1e-150, 1e-300, 5e-324}) {
            CAPTURE(tiny);
            checkNear(vasicekOf(0.03, tiny, 0.06, 0.01)->logFactor(to),
                      vasicekOf(0.03, 0, 0.06, 0.01)->logFactor(to), 30 * tiny + 1e-15);
            checkNear(coxIngersollRossOf(0.03, tiny, 0.06, 0.1)->logFactor(to),
                      coxIngersollRossOf(0.03, 0, 0.06, 0.1)->logFactor(to), 30 * tiny + 1e-15);
            checkNear(coxIngersollRossOf(0.03, 0.1, 0.06, tiny)->logFactor(to),
                      coxIngersollRossOf(0.03, 0.1, 0.06, 0)->logFactor(to), 500 * tiny * tiny + 1e-15);
            checkNear(coxIngersollRossOf(0.03, 0, 0.06, tiny)->logFactor(to), -0.9,
                      500 * tiny * tiny + 1e-15);
            checkNear(coxIngersollRossOf(0.03, tiny, 0.06, tiny)->logFactor(to), -0.9,
                      30 * tiny + 500 * tiny * tiny + 1e-15);
        }
    }

    TEST_CASE("at its own date every curve is 1, and its law a point") {
        for (const CurvePtr& curve :
             {vasicekOf(0.03, 0.1, 0.06, 0.01), coxIngersollRossOf(0.03, 0.1, 0.06, 0.1),
              coxIngersollRossOf(0, 0, 0, 0), made(hoLee(asOf, 0.01, flatAt(0.02)))}) {
            CHECK(curve->logFactor(asOf) == 0);
            CHECK(curve->random()->meanLog(asOf) == 0);
            CHECK(curve->random()->varianceLog(asOf) == 0);
            CHECK(quantilesOf(curve, asOf).front().factor == 1);
        }
    }

    TEST_CASE("whatever the parameters, ln P is a number, and review refuses what is not a factor") {
        const std::array<double, 5> rates{-0.99, -0.01, 0.0, 0.05, 10.0};
        const std::array<double, 6> reversions{0.0, 1e-300, 1e-8, 0.1, 3.0, 100.0};
        const std::array<double, 6> volatilities{0.0, 1e-300, 1e-8, 0.01, 1.0, 10.0};
        for (const double r0 : rates) {
            for (const double longRun : rates) {
                for (const double meanReversion : reversions) {
                    for (const double volatility : volatilities) {
                        for (const int days : {0, 1, 365, 36500}) {
                            std::vector<CurvePtr> curves{vasicekOf(r0, meanReversion, longRun, volatility)};
                            if (r0 >= 0 && longRun >= 0) {
                                curves.push_back(coxIngersollRossOf(r0, meanReversion, longRun, volatility));
                            }
                            for (const CurvePtr& curve : curves) {
                                const double log = curve->logFactor(afterDays(days));
                                REQUIRE(std::isfinite(log));
                                const auto faults = curve->review(afterDays(days)).faults;
                                REQUIRE(
                                    (std::fabs(log) <= largestLogFactor || codes(faults) == " not-finite"));
                                for (const double slope : curve->logFactorGradient(afterDays(days))) {
                                    REQUIRE(std::isfinite(slope));
                                }
                            }
                        }
                    }
                }
            }
        }
    }

    TEST_CASE("review looks at every day, not the last alone") {
        // At 10 for 75 years, e^-750; from then on at -10, so that the end is e^-500 again.
        const CurvePtr curve = made(
            policyMeetings(asOf, 10, {{afterYears(75), {{-10, 1}}}, {afterDays(365 * 75 + 1), {{-10, 1}}}}));
        checkNear(curve->logFactor(afterYears(100)), -500, 0.1);
        CHECK(codes(curve->review(afterYears(100)).faults) == " not-finite");
        CHECK(curve->review(afterYears(70)).faults.empty());
    }

    TEST_CASE("Cox–Ingersoll–Ross probabilities against another inversion of the transform, and quantiles "
              "undo them") {
        // Computed with mpmath 1.3 at 40 digits: adaptive quadrature of the published transform on a straight
        // vertical line.
        struct Row {
            CoxIngersollRoss model;
            int years;
            double logFactor;
            double probability; ///< P(ln D ≤ logFactor)
        };
        const std::array rows{
            Row{{0.05, 0.1, 0.08, 0.0670820393}, 10, -1.2, 0.010546975919635761605},
            Row{{0.05, 0.1, 0.08, 0.0670820393}, 10, -0.6, 0.46759159576880099654},
            Row{{0.05, 0.1, 0.08, 0.0670820393}, 10, -0.3, 0.966246228846270431},
            Row{{0, 0.1, 0.05, 0.1}, 1, -0.009, 0.01261520652596858053},
            Row{{0, 0.1, 0.05, 0.1}, 1, -0.002, 0.46000049663350326701},
            Row{{0, 0.1, 0.05, 0.1}, 1, -0.0004, 0.97405956715891091241},
            Row{{0.01, 0.5, 0.04, 0.3}, 5, -0.5, 0.0333689320660669095},
            Row{{0.01, 0.5, 0.04, 0.3}, 5, -0.1, 0.48575262793099314097},
            Row{{0.01, 0.5, 0.04, 0.3}, 5, -0.02, 0.97739376201748949523},
        };
        for (const Row& row : rows) {
            const CurvePtr curve = made(coxIngersollRoss(asOf, row.model));
            CHECK(curve->random()->quantileError() == 1e-9);
            checkNear(curve->random()->law(afterYears(row.years)).value()->probabilityAtMost(row.logFactor),
                      row.probability, 2e-12);
            const std::array at{row.probability};
            checkRelative(quantilesOf(curve, afterYears(row.years), at).front().factor,
                          numeric::exp(row.logFactor), 1e-9);
        }
    }

    TEST_CASE("Cox–Ingersoll–Ross at its limits: where volatility fades the law is normal, and quantiles "
              "never cross") {
        const Date to = afterYears(5);
        for (const double volatility : {1e-3, 1e-4, 1e-5, 2e-6, 1e-6, 1e-8, 1e-12}) {
            const CurvePtr curve = coxIngersollRossOf(0.05, 0.3, 0.05, volatility);
            const double deviation = std::sqrt(*curve->random()->varianceLog(to));
            // A law that leans to high rates: its median is off its mean, until no double can show it.
            const double median = numeric::log(quantilesOf(curve, to)[3].factor);
            CHECK((volatility < 1e-5 ||
                   median > curve->random()->meanLog(to) + 0.1 * deviation * deviation / 0.25));
            for (const Quantile& quantile : quantilesOf(curve, to)) {
                const double normal =
                    curve->random()->meanLog(to) + deviation * numeric::normalQuantile(quantile.probability);
                // What the law's skewness, about 4 deviations over the mean, moves a quantile by.
                checkNear(numeric::log(quantile.factor), normal, 20 * deviation * deviation / 0.25 + 1e-15);
            }
        }
        for (const CoxIngersollRoss& model :
             {CoxIngersollRoss{0, 0.1, 0.05, 0.1}, CoxIngersollRoss{0.03, 0, 0, 10},
              CoxIngersollRoss{1e-8, 0, 0, 1}, CoxIngersollRoss{10, 100, 10, 10},
              CoxIngersollRoss{1e-300, 0, 0, 10}}) {
            for (const int days : {1, 30, 3650}) {
                const CurvePtr curve = made(coxIngersollRoss(asOf, model));
                if (curve->review(afterDays(days)).faults.empty()) {
                    const auto law = curve->random()->law(afterDays(days));
                    double before = -1;
                    for (const Quantile& quantile : quantilesOf(curve, afterDays(days))) {
                        CHECK(quantile.factor >= before);
                        before = quantile.factor;
                        const double log = law.value()->quantile(quantile.probability);
                        if (log < -1e-15 && log > -1e-17) {
                            checkNear(law.value()->probabilityAtMost(log), quantile.probability, 1e-10);
                        }
                    }
                    CHECK(law.value()->probabilityAtMost(0.0) == 1);
                }
            }
        }
    }
}
