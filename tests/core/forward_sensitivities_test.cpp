#include "forward/random.hpp"
#include "forward/sensitivities.hpp"
#include "forward_fixtures.hpp"

#include <cmath>
#include <functional>

using namespace forwright;
using namespace forwright::fixtures;
using doctest::Approx;
using forward::Side;

namespace {

constexpr double basisPoint = 1e-4;

double fair(const forward::Market& market, const std::string& maturity) {
    return forward::price(market, scheduled(market, on(maturity)), Side::fair).forward;
}

/// The derivative at 0 by the five-point rule: error of order h⁴, far below the bound that is tested.
double slope(const std::function<double(double)>& f, double h) {
    return (8.0 * (f(h) - f(-h)) - (f(2.0 * h) - f(-2.0 * h))) / (12.0 * h);
}

forward::Sensitivities of(const forward::Market& market, const std::string& maturity) {
    const forward::Schedule schedule = scheduled(market, on(maturity));
    const forward::SideInputs inputs = forward::inputsOf(market, schedule, Side::fair);
    return forward::sensitivities(market, schedule, inputs, forward::price(market, schedule, inputs));
}

} // namespace

TEST_CASE("sensitivities agree with finite differences to 1e-8 of the forward") {
    for (const forward::Market& market : {fullShare(), pair(), commodity()}) {
        const std::string maturity = "2027-12-15";
        const double tolerance = 1e-8 * fair(market, maturity);
        const forward::Sensitivities exact = of(market, maturity);
        CHECK(std::fabs(exact.spot - slope(
                                         [&](double h) {
                                             forward::Market moved = market;
                                             moved.spot = {market.spot.bid + h, market.spot.offer + h};
                                             return fair(moved, maturity);
                                         },
                                         1e-2)) < tolerance);
        CHECK(std::fabs(exact.funding.parallel - basisPoint * slope(
                                                                  [&](double h) {
                                                                      forward::Market moved = market;
                                                                      moved.funding.curve =
                                                                          discounting::withSpread(
                                                                              market.funding.curve, h);
                                                                      return fair(moved, maturity);
                                                                  },
                                                                  1e-3)) < tolerance);
        if (market.base) {
            REQUIRE(exact.base);
            CHECK(std::fabs(exact.base->parallel - basisPoint * slope(
                                                                    [&](double h) {
                                                                        forward::Market moved = market;
                                                                        moved.base->curve =
                                                                            discounting::withSpread(
                                                                                market.base->curve, h);
                                                                        return fair(moved, maturity);
                                                                    },
                                                                    1e-3)) < tolerance);
            continue;
        }
        CHECK(std::fabs(exact.yield - basisPoint * slope(
                                                       [&](double h) {
                                                           forward::Market moved = market;
                                                           moved.income.yield.value += h;
                                                           return fair(moved, maturity);
                                                       },
                                                       1e-3)) < tolerance);
        CHECK(std::fabs(exact.fee - basisPoint * slope(
                                                     [&](double h) {
                                                         forward::Market moved = market;
                                                         moved.lendingFee.bid.value += h;
                                                         moved.lendingFee.offer.value += h;
                                                         return fair(moved, maturity);
                                                     },
                                                     1e-3)) < tolerance);
        REQUIRE(exact.cash.size() == market.income.cash.size());
        for (std::size_t row = 0; row < exact.cash.size(); ++row) {
            CHECK(std::fabs(exact.cash[row].change - slope(
                                                         [&](double h) {
                                                             forward::Market moved = market;
                                                             moved.income.cash[row].amount.amount += h;
                                                             return fair(moved, maturity);
                                                         },
                                                         1e-2)) < tolerance);
        }
    }
}

TEST_CASE("one basis point on each pillar, in every interpolation, agrees with moving that pillar") {
    using discounting::Interpolation;
    for (const Interpolation interpolation :
         {Interpolation::logLinear, Interpolation::linearZero, Interpolation::monotoneCubic}) {
        forward::Market market = fullShare();
        discounting::Pillars points;
        points.interpolation = interpolation;
        points.convention.compounding = discounting::Compounding::semiannual;
        points.pillars = {{day("2027-01-04"), 0.0212},
                          {day("2027-05-31"), 0.0231},
                          {day("2027-10-29"), 0.0262},
                          {day("2029-12-03"), 0.0297}};
        const auto with = [&](const discounting::Pillars& changed) {
            forward::Market moved = market;
            const auto curve = discounting::pillars(market.asOf, changed);
            REQUIRE(curve.ok());
            moved.funding.curve = curve.value();
            return moved;
        };
        const forward::Market base = with(points);
        const double tolerance = 1e-8 * fair(base, "2027-12-15");
        const forward::Sensitivities exact = of(base, "2027-12-15");
        REQUIRE(exact.funding.parameters.size() == 4);
        for (std::size_t i = 0; i < 4; ++i) {
            CHECK(exact.funding.parameters[i].parameter.at ==
                  "/market/funding/curve/pillars/" + std::to_string(i) + "/value");
            const double numeric = basisPoint * slope(
                                                    [&](double h) {
                                                        discounting::Pillars moved = points;
                                                        moved.pillars[i].value += h;
                                                        return fair(with(moved), "2027-12-15");
                                                    },
                                                    1e-5);
            CHECK(std::fabs(exact.funding.parameters[i].change - numeric) < tolerance);
        }
    }
}

TEST_CASE("one basis point on each parameter of a random model agrees with moving it") {
    forward::Market market = fullShare();
    const auto with = [&](const discounting::Vasicek& model) {
        forward::Market moved = market;
        const auto curve = discounting::vasicek(market.asOf, model);
        REQUIRE(curve.ok());
        moved.funding.curve = curve.value();
        return moved;
    };
    const discounting::Vasicek model{0.02, 0.3, 0.035, 0.012};
    const double tolerance = 1e-8 * fair(with(model), "2027-12-15");
    const forward::Sensitivities exact = of(with(model), "2027-12-15");
    const std::vector<std::pair<std::string, double discounting::Vasicek::*>> members{
        {"/r0", &discounting::Vasicek::r0},
        {"/meanReversion", &discounting::Vasicek::meanReversion},
        {"/longRun", &discounting::Vasicek::longRun},
        {"/volatility", &discounting::Vasicek::volatility}};
    REQUIRE(exact.funding.parameters.size() == members.size());
    for (const auto& entry : members) {
        const std::string& name = entry.first;
        bool found = false;
        for (const forward::ParameterSensitivity& parameter : exact.funding.parameters) {
            if (parameter.parameter.at != "/market/funding/curve" + name) {
                continue;
            }
            found = true;
            const double numeric = basisPoint * slope(
                                                    [&, member = entry.second](double h) {
                                                        discounting::Vasicek moved = model;
                                                        moved.*member += h;
                                                        return fair(with(moved), "2027-12-15");
                                                    },
                                                    1e-3);
            CHECK(std::fabs(parameter.change - numeric) < tolerance);
        }
        CHECK_MESSAGE(found, name);
    }
}

TEST_CASE("a day on, everything but the calendar held") {
    // A flat rate and no income: the forward loses one day's growth of what is left between spot and
    // settlement.
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.05);
    const forward::Sensitivities exact = of(market, "2027-12-01");
    REQUIRE(exact.day);
    CHECK(*exact.day == Approx(100.0 * (std::exp(0.05 * 364 / 365.0) - std::exp(0.05))).epsilon(1e-12));
    // Over a distribution's ex date it is no longer taken off.
    market.income.cash = {cash("2026-12-02", "2026-12-02", 1.0, 1.0, 1.0)};
    CHECK(*of(market, "2027-12-01").day > 0.9);
    // On the last day there is no next one.
    CHECK_FALSE(of(market, "2026-12-01").day);
}

TEST_CASE("random discounting: the gap is what the spread of the factor is worth") {
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.03);
    market.asset.settlementLag = {{dates::earliest, 2}};
    CHECK_FALSE(forward::randomView(market, scheduled(market, on("2031-12-01")),
                                    forward::price(market, scheduled(market, on("2031-12-01")), Side::fair)));

    const auto curve = discounting::vasicek(market.asOf, {0.03, 0.2, 0.03, 0.02});
    REQUIRE(curve.ok());
    market.funding.curve = curve.value();
    const forward::Schedule schedule = scheduled(market, on("2031-12-01"));
    const forward::Price price = forward::price(market, schedule, Side::fair);
    const auto view = forward::randomView(market, schedule, price);
    REQUIRE(view);
    REQUIRE(view->varianceLog);
    CHECK(view->expectedFactor == price.settlementFactor);
    CHECK(std::log(view->expectedFactor) == Approx(view->meanLog + 0.5 * *view->varianceLog).epsilon(1e-13));
    // r0 = θ: the average rate is 3 % throughout.
    CHECK(view->averageRateForward ==
          Approx(100.0 * std::exp(0.03 * dates::years(schedule.spot, schedule.settlement))).epsilon(1e-12));
    CHECK(view->gap < 0.0);
    CHECK(view->gap == price.forward - view->averageRateForward);
    REQUIRE(view->quantiles.size() == 7);
    CHECK(std::log(view->quantiles[3].factor) == Approx(view->meanLog).epsilon(1e-12));
    for (std::size_t i = 1; i < 7; ++i) {
        CHECK(view->quantiles[i - 1].factor < view->quantiles[i].factor);
    }
}

TEST_CASE("samples: the interval of the forward is the delta method's") {
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
    discounting::SamplePaths paths;
    paths.dates = {day("2027-12-01")};
    paths.factors = {0.95, 0.96, 0.97, 0.98};
    const auto curve = discounting::samples(market.asOf, paths);
    REQUIRE(curve.ok());
    market.funding.curve = curve.value();
    const forward::Schedule schedule = scheduled(market, on("2027-12-01"));
    const forward::Price price = forward::price(market, schedule, Side::fair);
    const auto view = forward::randomView(market, schedule, price);
    REQUIRE(view);
    CHECK(view->paths == 4);
    const double error = std::sqrt((0.015 * 0.015 + 0.005 * 0.005) * 2.0 / 3.0 / 4.0);
    REQUIRE(view->standardError);
    CHECK(*view->standardError == Approx(error).epsilon(1e-12));
    REQUIRE(view->interval95);
    CHECK(view->interval95->offer - price.forward ==
          Approx(1.959963984540054 * price.forward / 0.965 * error).epsilon(1e-10));
}
