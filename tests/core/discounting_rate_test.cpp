#include "discounting_fixtures.hpp"
#include "numeric/elementary.hpp"

using namespace forwright;
using namespace forwright::discounting;
using namespace forwright::discounting::testing;

TEST_SUITE("discounting: rates") {
    TEST_CASE("names go in and come out") {
        for (const std::string_view name : compoundingNames()) {
            REQUIRE(parseCompounding(name));
            CHECK(nameOf(*parseCompounding(name)) == name);
        }
        CHECK(compoundingNames().size() == 6);
        CHECK_FALSE(parseCompounding("Continuous"));
        CHECK_FALSE(parseCompounding(""));
        CHECK(conventionOf(rateOf(0.03, Compounding::simple, dates::DayCount::act360)) == "simple ACT/360");
    }

    TEST_CASE(
        "the factor of one unit a year ahead, each compounding (computed: e^-0.06, 1/1.06, 1.03^-2 …)") {
        const Date to = afterYears(1);
        const auto factor = [&](Compounding compounding) {
            return numeric::exp(logFactor(rateOf(0.06, compounding), asOf, to));
        };
        checkRelative(factor(Compounding::continuous), 0.9417645335842487, 1e-15);
        checkRelative(factor(Compounding::simple), 1 / 1.06, 1e-15);
        checkRelative(factor(Compounding::annual), 1 / 1.06, 1e-15);
        checkRelative(factor(Compounding::semiannual), 1 / (1.03 * 1.03), 1e-15);
        checkRelative(factor(Compounding::quarterly), 1 / (1.015 * 1.015 * 1.015 * 1.015), 1e-15);
        checkRelative(factor(Compounding::monthly), std::pow(1.005, -12), 1e-14);
    }

    TEST_CASE("simple interest, 272 days at 4 %: 2.9808 % on ACT/365.FIXED, 3.0222 % on ACT/360 (printed in "
              "a treasurers' handbook)") {
        const Date to = afterDays(272);
        const auto interest = [&](dates::DayCount dayCount) {
            return numeric::exp(-logFactor(rateOf(0.04, Compounding::simple, dayCount), asOf, to)) - 1;
        };
        checkNear(interest(dates::DayCount::act365Fixed), 0.029808, 5e-7);
        checkNear(interest(dates::DayCount::act360), 0.030222, 5e-7);
    }

    TEST_CASE("BUS/252 daily factor of 16.62 % a year: 0.00061031 (printed)") {
        const Date monday = day("2026-06-01");
        const double log = logFactor(rateOf(0.1662, Compounding::annual, dates::DayCount::bus252), monday,
                                     day("2026-06-02"));
        checkNear(numeric::exp(-log) - 1, 0.00061031, 5e-9);
    }

    TEST_CASE("the slope is the derivative, and the value comes back from the factor") {
        for (const std::string_view name : compoundingNames()) {
            for (const double value : {-0.5, -0.01, 0.0, 1e-9, 0.03, 2.0, 10.0}) {
                CAPTURE(name);
                CAPTURE(value);
                const Rate rate = rateOf(value, *parseCompounding(name), dates::DayCount::act360);
                const Date to = afterDays(500);
                const auto logAt = [&](double at) {
                    Rate moved = rate;
                    moved.value = at;
                    return logFactor(moved, asOf, to);
                };
                checkNear(logFactorSlope(rate, asOf, to), centralDifference(logAt, value, 1e-2), 1e-8);
                checkNear(valueFromLogFactor(rate, asOf, to, logFactor(rate, asOf, to)), value,
                          1e-14 * (1 + std::fabs(value)));
            }
        }
    }

    TEST_CASE("between a day and itself, and where the convention counts no time, the factor is 1") {
        CHECK(logFactor(rateOf(10, Compounding::simple), asOf, asOf) == 0);
        const Rate bond = rateOf(0.05, Compounding::annual, dates::DayCount::thirty360);
        CHECK(logFactor(bond, day("2026-10-30"), day("2026-10-31")) == 0);
        CHECK(valueFromLogFactor(bond, day("2026-10-30"), day("2026-10-31"), 0) == 0);
    }

    TEST_CASE("a rate that gives no factor is refused, on the very day from which it does not") {
        const Rate rate = rateOf(-0.5, Compounding::simple);
        CHECK_FALSE(refusal(rate, asOf, afterDays(729)));
        REQUIRE(refusal(rate, asOf, afterDays(730)));
        CHECK(refusal(rate, asOf, afterDays(730))->code == "rate-too-low");
        CHECK(std::isinf(logFactor(rate, asOf, afterDays(730))));
        CHECK(refusal(rateOf(-1, Compounding::annual), asOf, afterDays(1))->code == "rate-too-low");
        CHECK_FALSE(refusal(rateOf(-1, Compounding::semiannual), asOf, afterDays(1)));
        CHECK_FALSE(refusal(rateOf(-5), asOf, afterYears(100)));
        CHECK(refusal(rateOf(std::nan("")), asOf, afterDays(1))->code == "not-finite");
    }

    TEST_CASE("ACT/365L shrinks on a 29 February: what is refused the day before stays refused after it") {
        // From 2027-03-01, 365/365 of a year has passed on 2028-02-29 − 1 day, and 365/366 on 2028-02-29
        // itself is less.
        const Date from = day("2027-02-28");
        const Rate rate = rateOf(-1.0, Compounding::simple, dates::DayCount::act365L);
        CHECK_FALSE(refusal(rate, from, day("2028-02-27")));
        CHECK(refusal(rate, from, day("2028-02-28")));
        CHECK(refusal(rate, from, day("2028-02-29")));
    }

    TEST_CASE("two conventions are the same only with everything that they need") {
        CHECK(sameConvention(rateOf(1), rateOf(2)));
        CHECK_FALSE(sameConvention(rateOf(1), rateOf(1, Compounding::annual)));
        CHECK_FALSE(sameConvention(rateOf(1), rateOf(1, Compounding::continuous, dates::DayCount::act360)));
        Rate yearly = rateOf(1, Compounding::annual, dates::DayCount::actActIcma);
        Rate halfYearly = yearly;
        halfYearly.dayCount.frequency = 2;
        CHECK_FALSE(sameConvention(yearly, halfYearly));
        Rate ending = rateOf(1, Compounding::annual, dates::DayCount::thirtyE360Isda);
        Rate open = ending;
        ending.dayCount.termination = afterYears(1);
        CHECK_FALSE(sameConvention(ending, open));
        Rate here = rateOf(1, Compounding::annual, dates::DayCount::bus252);
        Rate there = here;
        const std::vector<std::string> centres{"GBLO"};
        there.dayCount.calendar = dates::BusinessCalendar(centres);
        CHECK_FALSE(sameConvention(here, there));
        CHECK(sameConvention(there, there));
    }
}
