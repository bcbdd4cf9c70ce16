#include "discounting_fixtures.hpp"
#include "numeric/elementary.hpp"

#include <array>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
namespace dates = forwright::dates;
namespace numeric = forwright::numeric;

namespace {

constexpr std::array interpolations{Interpolation::logLinear, Interpolation::linearZero,
                                    Interpolation::monotoneCubic};

Pillars factorsAt(Interpolation interpolation, const std::vector<std::pair<int, double>>& daysAndFactors) {
    Pillars points;
    points.quote = PillarQuote::factor;
    points.interpolation = interpolation;
    for (const auto& [days, factor] : daysAndFactors) {
        points.pillars.push_back({afterDays(days), factor});
    }
    return points;
}

Pillars zerosAt(Interpolation interpolation, const Rate& convention,
                const std::vector<std::pair<int, double>>& daysAndRates) {
    Pillars points = factorsAt(interpolation, daysAndRates);
    points.quote = PillarQuote::zero;
    points.convention = convention;
    return points;
}

} // namespace

TEST_SUITE("discounting: flat and pillars") {
    TEST_CASE("a flat curve is its rate's own factor") {
        for (const std::string_view name : compoundingNames()) {
            const Rate rate = rateOf(0.04, *parseCompounding(name), dates::DayCount::thirtyE360);
            const CurvePtr curve = flat(asOf, rate);
            for (const int days : {0, 1, 30, 365, 20000}) {
                CHECK(curve->logFactor(afterDays(days)) == logFactor(rate, asOf, afterDays(days)));
            }
            CHECK(curve->factor(asOf) == 1);
            CHECK(curve->random() == nullptr);
            REQUIRE(curve->parameters().size() == 1);
            CHECK(curve->parameters()[0].at == "/rate");
            CHECK(curve->parameters()[0].value == 0.04);
        }
        CHECK(flat(asOf, rateOf(0.04), "")->parameters()[0].at.empty());
        CHECK(flat(asOf, rateOf(0.04), "")->convention() == "one rate, continuous ACT/365.FIXED");
    }

    TEST_CASE("names go in and come out") {
        for (const Interpolation interpolation : interpolations) {
            CHECK(parseInterpolation(nameOf(interpolation)) == interpolation);
        }
        CHECK_FALSE(parseInterpolation("cubic").has_value());
    }

    TEST_CASE("log-linear by hand: halfway between two pillars the factor is their geometric mean, past the "
              "end the last forward goes on") {
        const CurvePtr curve =
            made(pillars(asOf, factorsAt(Interpolation::logLinear, {{100, 0.99}, {300, 0.96}})));
        checkRelative(curve->factor(afterDays(50)), std::sqrt(0.99), 1e-15);
        checkRelative(curve->factor(afterDays(200)), std::sqrt(0.99 * 0.96), 1e-15);
        checkRelative(curve->factor(afterDays(500)), 0.96 * 0.96 / 0.99, 1e-15);
        const CurvePtr single = made(pillars(asOf, factorsAt(Interpolation::logLinear, {{100, 0.99}})));
        checkRelative(single->factor(afterDays(200)), 0.99 * 0.99, 1e-15);
    }

    TEST_CASE("linear-zero by hand: flat before the first pillar and past the last, the mean rate halfway") {
        const Rate continuous = rateOf(0);
        const CurvePtr curve =
            made(pillars(asOf, zerosAt(Interpolation::linearZero, continuous, {{365, 0.02}, {1095, 0.04}})));
        checkRelative(curve->logFactor(afterDays(73)), -0.02 * 0.2, 1e-15);
        checkRelative(curve->logFactor(afterYears(2)), -0.03 * 2, 1e-15);
        checkRelative(curve->logFactor(afterYears(10)), -0.04 * 10, 1e-15);
    }

    TEST_CASE("zero quotes are read in their own convention") {
        const Rate yearly = rateOf(0, Compounding::annual, dates::DayCount::act360);
        for (const Interpolation interpolation : interpolations) {
            const CurvePtr curve = made(
                pillars(asOf, zerosAt(interpolation, yearly, {{360, 0.05}, {720, 0.06}, {1800, -0.01}})));
            checkRelative(curve->factor(afterDays(360)), 1 / 1.05, 1e-15);
            checkRelative(curve->factor(afterDays(720)), 1 / (1.06 * 1.06), 1e-15);
            checkRelative(curve->factor(afterDays(1800)), std::pow(0.99, -5), 1e-14);
            CHECK(curve->parameters()[1].at == "/pillars/1/value");
            CHECK(curve->parameters()[1].value == 0.06);
            CHECK(curve->parameters()[1].kind == Parameter::Kind::pillar);
            CHECK(curve->convention() ==
                  "3 pillars, zero rates annual ACT/360, " + std::string(nameOf(interpolation)));
        }
    }

    TEST_CASE("a factor's parameter is the continuous zero rate that it makes") {
        const CurvePtr curve = made(pillars(asOf, factorsAt(Interpolation::logLinear, {{730, 0.9}})));
        checkRelative(curve->parameters()[0].value, -std::log(0.9) / 2, 1e-15);
        CHECK(curve->convention() == "1 pillar, discount factors, log-linear");
    }

    TEST_CASE("monotone-cubic: two knots are a straight line, and past the last pillar the last forward rate "
              "is held") {
        const CurvePtr one = made(pillars(asOf, factorsAt(Interpolation::monotoneCubic, {{365, 0.97}})));
        checkRelative(one->logFactor(afterDays(73)), std::log(0.97) / 5, 1e-14);
        checkRelative(one->logFactor(afterYears(3)), std::log(0.97) * 3, 1e-14);
        const CurvePtr curve = made(
            pillars(asOf, factorsAt(Interpolation::monotoneCubic, {{365, 0.98}, {730, 0.95}, {1460, 0.85}})));
        const double daily = curve->logFactor(afterDays(1461)) - curve->logFactor(afterDays(1460));
        checkRelative(curve->logFactor(afterDays(2460)) - curve->logFactor(afterDays(1460)), 1000 * daily,
                      1e-10);
        // The end slope by the three-point formula: h = 2 and 1 years, secants d = ln(.95/.85)/2 and
        // ln(.98/.95): ((2·2 + 1)d₁ − 2d₂)/3.
        const double slope = (5 * std::log(0.95 / 0.85) / 2 - 2 * std::log(0.98 / 0.95)) / 3;
        checkRelative(-daily * 365, slope, 1e-12);
    }

    TEST_CASE("monotone-cubic: where factors stay the same, forwards are 0, and an end slope is limited to "
              "three secants") {
        const CurvePtr curve = made(
            pillars(asOf, factorsAt(Interpolation::monotoneCubic, {{365, 0.9}, {730, 0.9}, {1095, 0.8}})));
        for (int days = 365; days < 730; days += 5) {
            checkRelative(curve->factor(afterDays(days)), 0.9, 1e-15);
        }
        // y = 0, 0.01, -0.09: three-point (3·0.01 + 0.10)/2 = 0.065 a year, more than 3·0.01.
        const CurvePtr steep = made(pillars(
            asOf, factorsAt(Interpolation::monotoneCubic, {{365, std::exp(-0.01)}, {730, std::exp(0.09)}})));
        const double s = 1 / 365.0;
        const double hermite = 0.01 * s * s * (3 - 2 * s) + 0.03 * s * (1 - s) * (1 - s);
        checkRelative(-steep->logFactor(afterDays(1)), hermite, 1e-12);
    }

    TEST_CASE("past the end: a notice that names the last pillar, and none on it") {
        for (const Interpolation interpolation : interpolations) {
            const CurvePtr curve = made(pillars(asOf, factorsAt(interpolation, {{100, 0.99}, {300, 0.96}})));
            CHECK(curve->review(afterDays(300)).notices.empty());
            CHECK(codes(curve->review(afterDays(301)).notices) == "/pillars/1/at beyond-last-pillar");
            CHECK(curve->review(afterDays(301)).faults.empty());
        }
    }

    TEST_CASE("pillars so steep that a factor is none are refused where they are asked for, not before") {
        for (const Interpolation interpolation : interpolations) {
            const CurvePtr curve = made(pillars(asOf, factorsAt(interpolation, {{1, 1.0}, {2, 1e-10}})));
            CHECK(curve->review(afterDays(2)).faults.empty());
            CHECK(codes(curve->review(afterYears(1)).faults) == "/pillars not-finite");
            CHECK(std::isfinite(curve->logFactor(afterYears(100))));
        }
        CHECK(codes(flatAt(10)->review(afterYears(71)).faults) == "/rate not-finite");
        CHECK(flatAt(10)->review(afterYears(70)).faults.empty());
        CHECK(codes(flat(asOf, rateOf(-0.5, Compounding::simple), "")->review(afterYears(2)).faults) ==
              " rate-too-low");
    }

    TEST_CASE("every wrong pillar is named at once") {
        CHECK(codes(pillars(asOf, {})) == "/pillars empty-list");
        Pillars points = factorsAt(Interpolation::logLinear,
                                   {{0, 0.99}, {10, 0}, {10, -1}, {9, std::nan("")}, {20, INFINITY}});
        CHECK(codes(pillars(asOf, points)) ==
              "/pillars/0/at not-after-as-of /pillars/1/value not-positive /pillars/2/at not-rising "
              "/pillars/2/value not-positive "
              "/pillars/3/at not-rising /pillars/3/value not-positive /pillars/4/value not-positive");
        points = zerosAt(Interpolation::logLinear, rateOf(0, Compounding::simple),
                         {{10, -1}, {20, 10.5}, {800, -0.5}, {900, std::nan("")}});
        CHECK(codes(pillars(asOf, points)) == "/pillars/0/value out-of-range /pillars/1/value out-of-range "
                                              "/pillars/2/value rate-too-low /pillars/3/value out-of-range");
    }
}
