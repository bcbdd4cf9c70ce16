#include "discounting_fixtures.hpp"

using namespace forwright::discounting;
using namespace forwright::discounting::testing;

TEST_SUITE("discounting: adaptors") {
    TEST_CASE("a spread multiplies P after the expectation, and leaves parameters and gradient") {
        const CurvePtr curve = made(vasicek(asOf, {0.03, 0.1, 0.05, 0.01}));
        const CurvePtr moved = withSpread(curve, 0.002);
        for (const int days : {0, 1, 500, 9000}) {
            checkNear(moved->logFactor(afterDays(days)),
                      curve->logFactor(afterDays(days)) - 0.002 * days / 365, 1e-15);
            CHECK(moved->logFactorGradient(afterDays(days)) == curve->logFactorGradient(afterDays(days)));
        }
        CHECK(moved->parameters().size() == 4);
        CHECK(moved->random() == nullptr);
        CHECK(moved->asOf() == asOf);
    }

    TEST_CASE("the average rate in place of the expected factor: e^(E[ln D]), below P by Jensen") {
        const CurvePtr curve = made(vasicek(asOf, {0.03, 0.1, 0.05, 0.02}));
        const CurvePtr average = atAverageRate(curve);
        const Date u = afterYears(10);
        CHECK(average->logFactor(u) == curve->random()->meanLog(u));
        CHECK(average->logFactor(u) < curve->logFactor(u));
        CHECK(average->random() == nullptr);
        CHECK(average->parameters().empty());
        const CurvePtr certain = flatAt(0.03);
        CHECK(atAverageRate(certain) == certain);
    }

    TEST_CASE("time passes: zero rates held, or forwards come true") {
        Pillars points;
        points.quote = PillarQuote::zero;
        points.pillars = {{afterDays(100), 0.02}, {afterDays(1000), 0.04}};
        const CurvePtr curve = made(pillars(asOf, points));
        const Date later = afterDays(30);
        const CurvePtr held = heldByTime(curve, later);
        const CurvePtr true_ = forwardsComeTrue(curve, later);
        CHECK(held->asOf() == later);
        CHECK(true_->asOf() == later);
        CHECK(held->logFactor(later) == 0);
        CHECK(true_->logFactor(later) == 0);
        CHECK(held->logFactor(afterDays(730)) == curve->logFactor(afterDays(700)));
        checkRelative(true_->factor(afterDays(730)), curve->factor(afterDays(730)) / curve->factor(later),
                      1e-15);
        CHECK(held->logFactorGradient(afterDays(730)) == curve->logFactorGradient(afterDays(700)));
        CHECK(held->review(afterDays(1030)).notices.empty());
        CHECK(held->review(afterDays(1031)).notices.size() == 1);
        CHECK(true_->review(afterDays(1001)).notices.size() == 1);
        for (std::size_t i = 0; i < 2; ++i) {
            checkNear(true_->logFactorGradient(afterDays(730))[i],
                      curve->logFactorGradient(afterDays(730))[i] - curve->logFactorGradient(later)[i],
                      1e-16);
        }
        CHECK(held->random() == nullptr);
        CHECK(true_->random() == nullptr);
    }

    TEST_CASE("an adaptor's own factor that is none is refused") {
        CHECK(codes(withSpread(flatAt(6.5), 1.0)->review(afterYears(100)).faults) == " not-finite");
        CHECK(withSpread(flatAt(6.5), -1.0)->review(afterYears(100)).faults.empty());
        CHECK(codes(withSpread(flatAt(8), -8)->review(afterYears(100)).faults) == "/rate not-finite");
        CHECK(codes(atAverageRate(made(vasicek(asOf, {10, 0, 0, 0.06})))->review(afterYears(100)).faults) ==
              " not-finite");
    }

    TEST_CASE("each says what it does") {
        const CurvePtr curve = flatAt(0.03);
        for (const CurvePtr& adapted : {withSpread(curve, 0.1), heldByTime(curve, afterDays(1)),
                                        forwardsComeTrue(curve, afterDays(1))}) {
            CHECK(adapted->convention().starts_with(curve->convention() + ", "));
        }
    }
}
