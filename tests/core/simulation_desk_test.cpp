#include "desk/compare.hpp"
#include "desk/futures.hpp"
#include "desk/hedge_cover.hpp"
#include "desk/simulate.hpp"
#include "discounting/mean_reversion.hpp"
#include "forward_fixtures.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

using namespace forwright;
using namespace forwright::fixtures;
using doctest::Approx;

namespace {

discounting::CurvePtr vasicekOf(const forward::Market& market, double volatility = 0.015) {
    return discounting::vasicek(market.asOf, {0.02, 0.1, 0.035, volatility}).value();
}

forward::Market withFunding(forward::Market market, discounting::CurvePtr curve) {
    market.funding.curve = std::move(curve);
    return market;
}

desk::SimulationAsked askedFor(const std::string& maturity, const discounting::SimulationPlan& plan) {
    desk::SimulationAsked asked;
    asked.maturity = on(maturity);
    asked.plan = plan;
    return asked;
}

template <class T> T valueOf(const outcome::Outcome<T>& outcome) {
    REQUIRE_MESSAGE(outcome.ok(), (outcome.ok() ? "" : outcome.faults().front().message));
    return outcome.value();
}

template <class T> std::string codeOf(const outcome::Outcome<T>& outcome) {
    REQUIRE_FALSE(outcome.ok());
    return outcome.faults().front().at + " " + outcome.faults().front().code;
}

/// ∫ f over [from, to], Simpson's rule on 2,000 intervals.
template <class Function> double integral(Function f, double from, double to) {
    constexpr int intervals = 2000;
    const double step = (to - from) / intervals;
    double sum = f(from) + f(to);
    for (int i = 1; i < intervals; ++i) {
        sum += (i % 2 == 1 ? 4.0 : 2.0) * f(from + step * i);
    }
    return sum * step / 3.0;
}

double density(double z) {
    return std::exp(-z * z / 2.0) / std::sqrt(2.0 * 3.14159265358979324);
}

} // namespace

TEST_SUITE("simulation: desk") {
    TEST_CASE("a share with every kind of income: the simulated forward is the fair one, and parts make the "
              "same whole") {
        const forward::Market share = fullShare();
        for (const auto& curve :
             {vasicekOf(share), discounting::hullWhite(share.asOf, 0.2, 0.01, share.funding.curve).value(),
              discounting::coxIngersollRoss(share.asOf, {0.02, 0.4, 0.03, 0.1}).value()}) {
            const forward::Market market = withFunding(share, curve);
            const auto asked = askedFor("2028-12-15", {discounting::SimulationMethod::quasi, 1L << 17U, 6});
            const desk::Simulated whole = valueOf(desk::simulate(market, asked));
            const forward::Quote quote = quoted(market, {forward::Client::twoWay, 1.0, on("2028-12-15"), {}});
            CHECK(whole.closedForm.forward == quote.fair.forward);
            CHECK(std::fabs(whole.estimate.price - quote.fair.forward) <=
                  5.0 * *whole.estimate.priceError + 2.0 * whole.pathBias * quote.fair.forward);
            CHECK(*whole.estimate.priceError < 1e-3 * quote.fair.forward);

            std::vector<desk::SimulatedPart> parts;
            for (const desk::BlockRange& range :
                 {desk::BlockRange{7, 32}, desk::BlockRange{0, 1}, desk::BlockRange{1, 7}}) {
                parts.push_back(valueOf(desk::simulateBlocks(market, asked, range)));
            }
            const desk::Simulated combined = valueOf(desk::combine(market, asked, parts));
            CHECK(combined.estimate.price == whole.estimate.price);
            CHECK(combined.estimate.priceError == whole.estimate.priceError);
            CHECK(combined.estimate.factor == whole.estimate.factor);
            CHECK(combined.counts == whole.counts);
            CHECK(combined.blocksDone == 32);
            CHECK(std::accumulate(whole.counts.begin(), whole.counts.end(), std::int64_t{0}) ==
                  whole.estimate.paths);
            parts.pop_back();
            const desk::Simulated begun = valueOf(desk::combine(market, asked, parts));
            CHECK(begun.blocksDone == 26);
            CHECK(std::fabs(begun.estimate.price - quote.fair.forward) <=
                  5.0 * *begun.estimate.priceError + 2.0 * whole.pathBias * quote.fair.forward);
        }
    }

    TEST_CASE("a pair whose base curve is certain: the simulated forward is the fair one") {
        const forward::Market market = withFunding(pair(), vasicekOf(pair()));
        const desk::Simulated whole = valueOf(desk::simulate(
            market, askedFor("2029-12-03", {discounting::SimulationMethod::pseudo, 1L << 15U, 6})));
        CHECK(std::fabs(whole.estimate.price - whole.closedForm.forward) <= 4.0 * *whole.estimate.priceError);
        CHECK(*whole.estimate.priceError > 0.0);
    }

    TEST_CASE("the forward by each way of reckoning, on the quantity") {
        const forward::Market market =
            withFunding(plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0),
                        vasicekOf(plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0), 0.03));
        auto asked = askedFor("2031-12-01", {discounting::SimulationMethod::quasi, 1L << 16U, 1});
        asked.quantity = 1000.0;
        const desk::Simulated result = valueOf(desk::simulate(market, asked));
        REQUIRE(result.forwards.size() == 4);
        const discounting::RandomDiscount& random = *market.funding.curve->random();
        const double mean = random.meanLog(day("2031-12-01"));
        const double variance = *random.varianceLog(day("2031-12-01"));
        CHECK(*result.forwards[0].forward == Approx(100.0 * std::exp(-mean - variance / 2.0)).epsilon(1e-14));
        CHECK(*result.forwards[1].forward == result.estimate.price);
        CHECK(*result.forwards[2].forward == Approx(100.0 * std::exp(-mean)).epsilon(1e-14));
        // E[1/D] of a lognormal factor: as far above the average-rate forward as the fair one is below.
        CHECK(*result.forwards[3].forward == Approx(100.0 * std::exp(-mean + variance / 2.0)).epsilon(1e-5));
        CHECK(*result.forwards[0].difference == 0.0);
        CHECK(*result.forwards[2].onQuantity ==
              Approx(1000.0 * (*result.forwards[2].forward - *result.forwards[0].forward)).epsilon(1e-15));
    }

    TEST_CASE(
        "beside the estimate: how far apart in errors, the edges of the bins and what the law puts there") {
        const forward::Market base = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
        const auto coxIngersollRoss =
            discounting::coxIngersollRoss(base.asOf, {0.02, 0.4, 0.03, 0.1}).value();
        const auto mixture =
            discounting::scenarios(base.asOf, {{0.5, vasicekOf(base)}, {0.5, vasicekOf(base, 0.01)}}).value();
        for (const auto& curve : {vasicekOf(base), coxIngersollRoss, mixture}) {
            auto asked = askedFor("2029-12-03", {discounting::SimulationMethod::pseudo, 1L << 15U, 11});
            asked.quantity = 250.0;
            const desk::Simulated result = valueOf(desk::simulate(withFunding(base, curve), asked));
            CHECK(*result.apart.forward ==
                  (result.estimate.price - result.closedForm.forward) / *result.estimate.priceError);
            CHECK(*result.apart.factor ==
                  (result.estimate.factor - result.closedForm.factor) / *result.estimate.factorError);
            CHECK(std::fabs(*result.apart.factor) < 4.5);
            CHECK(*result.forwards[1].errorOnQuantity == 250.0 * *result.estimate.priceError);
            CHECK_FALSE(result.forwards[0].errorOnQuantity.has_value());
            CHECK(result.averageRateFactor ==
                  Approx(std::exp(curve->random()->meanLog(result.schedule.settlement))).epsilon(1e-15));
            CHECK(result.averageRateFactor < result.closedForm.factor);

            REQUIRE(result.edges.size() == desk::simulationBins + 1);
            CHECK(result.edges.front() == result.bins.low);
            CHECK(result.edges.back() == result.bins.high);
            CHECK(std::is_sorted(result.edges.begin(), result.edges.end()));
            // The bins hold all but one in a thousand; χ² over them below its 1 in 100,000 quantile (86.6
            // with 40 degrees of freedom: Wilson and Hilferty's approximation).
            REQUIRE(result.lawCounts.size() == desk::simulationBins);
            CHECK(std::accumulate(result.lawCounts.begin(), result.lawCounts.end(), 0.0) ==
                  Approx(0.999 * static_cast<double>(result.estimate.paths)).epsilon(1e-6));
            double chiSquared = 0.0;
            for (std::size_t bin = 0; bin < desk::simulationBins; ++bin) {
                const double expected = result.lawCounts[bin];
                const double apart = static_cast<double>(result.counts[bin + 1]) - expected;
                chiSquared += apart * apart / expected;
            }
            CHECK(chiSquared < 86.6);
        }
    }

    TEST_CASE("outcomes with odds of their own have no law by bin; a certain rate no errors apart") {
        const forward::Market base = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
        const discounting::SimulationPlan plan{discounting::SimulationMethod::quasi, 64, 1};
        const auto halfCertain =
            discounting::scenarios(base.asOf, {{0.5, vasicekOf(base)},
                                               {0.5, discounting::flat(base.asOf, continuous(0.02), "")}})
                .value();
        CHECK(valueOf(desk::simulate(withFunding(base, halfCertain), askedFor("2028-12-01", plan)))
                  .lawCounts.empty());
        const desk::Simulated certain =
            valueOf(desk::simulate(withFunding(base, vasicekOf(base, 0.0)), askedFor("2028-12-01", plan)));
        CHECK(certain.lawCounts.empty());
        CHECK_FALSE(certain.apart.factor.has_value());
        CHECK(certain.fan->drawn.size() == static_cast<std::size_t>(desk::drawnPaths));
        for (const std::vector<double>& path : certain.fan->drawn) {
            REQUIRE(path.size() == certain.fan->steps.size());
            for (std::size_t step = 0; step < path.size(); ++step) {
                CHECK(path[step] == Approx(certain.fan->steps[step].quantiles[3]).epsilon(1e-9));
            }
        }
    }

    TEST_CASE("the fan in closed form is that of simulated paths, and begins at the rate today") {
        const forward::Market market =
            withFunding(plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0),
                        vasicekOf(plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0)));
        const discounting::SimulationPlan plan{discounting::SimulationMethod::quasi, 32, 3};
        const desk::RateFan exact = *valueOf(desk::simulate(market, askedFor("2030-12-02", plan))).fan;
        CHECK(exact.closedForm);
        REQUIRE(exact.steps.size() == 24);
        CHECK(exact.steps.front().from == market.asOf);
        CHECK(exact.steps.back().to == day("2030-12-02"));
        // The same curve as a single scenario is simulated: 4,096 paths tell a median to 0.02 and a 5 % point
        // to 0.035 deviations.
        const forward::Market wrapped =
            withFunding(market, discounting::scenarios(market.asOf, {{1.0, market.funding.curve}}).value());
        const desk::RateFan simulated = *valueOf(desk::simulate(wrapped, askedFor("2030-12-02", plan))).fan;
        CHECK_FALSE(simulated.closedForm);
        CHECK(simulated.paths == 4096);
        for (std::size_t i = 0; i < exact.steps.size(); ++i) {
            CHECK(simulated.steps[i].to == exact.steps[i].to);
            const double deviation =
                (exact.steps[i].quantiles[5] - exact.steps[i].quantiles[1]) / (2.0 * 1.6448536269514722);
            CHECK(std::fabs(simulated.steps[i].quantiles[3] - exact.steps[i].quantiles[3]) <
                  0.09 * deviation);
            CHECK(std::fabs(simulated.steps[i].quantiles[1] - exact.steps[i].quantiles[1]) <
                  0.15 * deviation);
            CHECK(std::is_sorted(simulated.steps[i].quantiles.begin(), simulated.steps[i].quantiles.end()));
        }
        // After long the spread is the stationary law's, σ/√(2κ), and the middle the average over the step.
        CHECK(exact.steps.front().quantiles[3] == Approx(0.02).epsilon(0.02));
    }

    TEST_CASE("what a simulation is refused for, at its place") {
        const forward::Market market =
            withFunding(plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0),
                        vasicekOf(plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0)));
        const discounting::SimulationPlan plan{discounting::SimulationMethod::quasi, 64, 1};
        const auto asked = askedFor("2027-12-01", plan);
        CHECK(codeOf(desk::simulate(withFunding(market, discounting::flat(market.asOf, continuous(0.02), "")),
                                    asked)) == "/market/funding/curve not-random");
        CHECK(codeOf(desk::simulate(market, askedFor("2026-12-01", plan))) ==
              "/maturity nothing-to-discount");
        CHECK(codeOf(desk::simulateBlocks(market, asked, {0, 17})) == "/blocks out-of-range");
        CHECK(codeOf(desk::simulateBlocks(market, asked, {3, 3})) == "/blocks out-of-range");
        const desk::SimulatedPart part = valueOf(desk::simulateBlocks(market, asked, {2, 5}));
        CHECK(codeOf(desk::combine(market, asked, {part, part})) == "/parts/1 overlap");
        desk::SimulatedPart moved = part;
        moved.from = 14;
        CHECK(codeOf(desk::combine(market, asked, {moved})) == "/parts/0 out-of-range");
        moved = part;
        moved.counts.pop_back();
        CHECK(codeOf(desk::combine(market, asked, {moved})) == "/parts/0/counts row-length");
        const forward::Market slow =
            withFunding(market, discounting::coxIngersollRoss(market.asOf, {0.02, 0.4, 0.03, 0.1}).value());
        const auto endless = askedFor("2126-11-29", {discounting::SimulationMethod::quasi, 1L << 24U, 1});
        CHECK(codeOf(desk::simulate(slow, endless)) == " too-much-work");
        CHECK(valueOf(desk::simulateBlocks(slow, askedFor("2026-12-31", endless.plan), {4095, 4096}))
                  .sums.size() == 1);
    }

    TEST_CASE(
        "closed form, quantiles and simulation agree over a grid with its extremes, or what is refused says "
        "why (seeds 1, 2)") {
        const forward::Market base = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
        std::vector<discounting::CurvePtr> curves;
        for (const double meanReversion : {0.0, 0.1, 100.0}) {
            for (const double volatility : {0.0, 0.01, 0.2, 10.0}) {
                for (const double rate : {-0.3, 0.04}) {
                    curves.push_back(
                        discounting::vasicek(base.asOf, {rate, meanReversion, -0.01, volatility}).value());
                    curves.push_back(
                        discounting::hullWhite(base.asOf, meanReversion, volatility,
                                               discounting::flat(base.asOf, continuous(rate), ""))
                            .value());
                }
                for (const double rate : {0.0, 0.04}) {
                    curves.push_back(
                        discounting::coxIngersollRoss(base.asOf, {rate, meanReversion, 0.05, volatility})
                            .value());
                }
            }
        }
        constexpr std::size_t paths = 4096;
        std::size_t answered = 0;
        std::size_t refused = 0;
        for (const auto& curve : curves) {
            for (const char* maturity : {"2026-12-02", "2031-12-01", "2076-12-01"}) {
                CAPTURE(curve->convention());
                const std::vector<discounting::Parameter> parameters = curve->parameters();
                CAPTURE(parameters[0].value);
                CAPTURE(parameters[1].value);
                CAPTURE(parameters.back().value);
                CAPTURE(std::string(maturity));
                const forward::Market market = withFunding(base, curve);
                const auto outcome = desk::simulate(
                    market, askedFor(maturity, {discounting::SimulationMethod::quasi, paths, 1}));
                if (!outcome) {
                    ++refused;
                    const outcome::Fault fault = outcome.faults().front();
                    CHECK(fault.at == "/market/funding/curve");
                    CHECK(fault.code == "not-finite");
                    CHECK(fault.message.size() > 20);
                    continue;
                }
                ++answered;
                const desk::Simulated& result = outcome.value();
                const double closed = result.closedForm.factor;
                REQUIRE(std::isfinite(result.closedForm.forward));
                const bool few =
                    discounting::isCarriedByFew(*curve->random(), result.schedule.settlement, paths);
                CHECK(few == std::any_of(result.notices.begin(), result.notices.end(),
                                         [](const auto& notice) { return notice.code == "rare-paths"; }));
                if (!few) {
                    CHECK(std::fabs(result.estimate.factor - closed) <=
                          5.0 * *result.estimate.factorError + (result.pathBias + 1e-12) * closed);
                }
                // Where the short rate of Cox, Ingersoll and Ross can reach 0 the paths are near their law in
                // its moments only.
                if (result.pathBias >= 1e-3) {
                    continue;
                }
                // As many of independent paths lie at or below each quantile as it says, to five deviations.
                const auto simulation = discounting::Simulation::make(
                    *curve, {{result.schedule.settlement}, {0.0}, 0, 0.0},
                    {discounting::SimulationMethod::pseudo, 2 * static_cast<long>(paths), 2}, {});
                const std::vector<double> logs = simulation.value().firstPaths(paths)[0];
                const std::vector<double> probabilities{0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99};
                const auto quantiles = curve->random()->quantiles(result.schedule.settlement, probabilities);
                if (!quantiles) {
                    CHECK(quantiles.faults().front().code == "not-finite");
                    continue;
                }
                const bool certain =
                    std::all_of(logs.begin(), logs.end(), [&](double log) { return log == logs.front(); });
                for (const discounting::Quantile& quantile : quantiles.value()) {
                    const double log = std::log(quantile.factor);
                    const double at = log + 1e-11 * (1.0 + std::fabs(log));
                    const auto below =
                        std::count_if(logs.begin(), logs.end(), [&](double other) { return other <= at; });
                    const double share = static_cast<double>(below) / static_cast<double>(paths);
                    const double deviation = std::sqrt(quantile.probability * (1.0 - quantile.probability) /
                                                       static_cast<double>(paths));
                    // One outcome is every quantile.
                    const double wanted = certain ? 1.0 : quantile.probability;
                    CHECK(std::fabs(share - wanted) <= 5.0 * deviation + 20.0 * result.pathBias);
                }
            }
        }
        MESSAGE(answered << " answered, " << refused << " refused");
        CHECK(answered > 100);
        CHECK(refused >= 10);
    }

    TEST_CASE("rare paths that carry the mean are told of") {
        const forward::Market base = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
        const forward::Market market =
            withFunding(base, discounting::vasicek(base.asOf, {0.05, 0.0, 0.03, 0.02}).value());
        const discounting::SimulationPlan plan{discounting::SimulationMethod::quasi, 64, 1};
        const desk::Simulated wild = valueOf(desk::simulate(market, askedFor("2071-12-01", plan)));
        REQUIRE(wild.notices.size() == 1);
        CHECK(wild.notices.front().code == "rare-paths");
        CHECK(valueOf(desk::simulate(market, askedFor("2028-12-01", plan))).notices.empty());
    }

    TEST_CASE("futures over forward: figures computed from Cox, Ingersoll and Ross's formula for a normal "
              "rate, apart from the core") {
        struct Row {
            double volatility, correlation, rateVolatility, meanReversion;
            int years;
            double ratio;
        };
        for (const Row& row :
             {Row{0.2, 0.5, 0.01, 0.0, 1, 1.000533475581}, Row{0.2, 0.5, 0.01, 0.0, 5, 1.016806330386},
              Row{0.2, -0.5, 0.01, 0.1, 5, 0.992288977568}}) {
            const forward::Market base = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
            const forward::Market market =
                withFunding(base, discounting::hullWhite(base.asOf, row.meanReversion, row.rateVolatility,
                                                         discounting::flat(base.asOf, continuous(0.03), ""))
                                      .value());
            desk::FuturesAsked asked;
            asked.maturities = {{market.asOf + std::chrono::days{365 * row.years}, dates::Roll::following}};
            asked.places = {"/maturity"};
            asked.volatility = row.volatility;
            asked.correlation = row.correlation;
            asked.quantity = 40.0;
            const desk::FuturesRow made = valueOf(desk::futures(market, asked)).rows.front();
            const double years = dates::years(market.asOf, made.schedule.settlement);
            REQUIRE(years == doctest::Approx(row.years).epsilon(0.006));
            // Where the day falls on a weekend the formula is moved with it; the table is for whole years.
            const double covariance =
                row.correlation * row.volatility * row.rateVolatility *
                integral(
                    [&](double u) {
                        const double left = years - u;
                        return row.meanReversion > 0.0
                                   ? (1.0 - std::exp(-row.meanReversion * left)) / row.meanReversion
                                   : left;
                    },
                    0.0, years);
            const double convexity =
                row.rateVolatility * row.rateVolatility *
                integral(
                    [&](double u) {
                        const double left = years - u;
                        const double b = row.meanReversion > 0.0
                                             ? (1.0 - std::exp(-row.meanReversion * left)) / row.meanReversion
                                             : left;
                        return b * b;
                    },
                    0.0, years);
            CHECK(made.covariance == Approx(covariance).epsilon(1e-11));
            CHECK(made.convexity == Approx(convexity).epsilon(1e-11));
            CHECK(made.futures == Approx(made.forward * std::exp(covariance + convexity)).epsilon(1e-13));
            CHECK(made.difference == Approx(made.futures - made.forward).epsilon(1e-9));
            CHECK(made.covarianceInPrice == Approx(made.forward * std::expm1(covariance)).epsilon(1e-10));
            CHECK(made.covarianceInPrice + made.convexityInPrice == Approx(made.difference).epsilon(1e-13));
            CHECK(made.onQuantity == 40.0 * made.difference);
            if (years == row.years) {
                CHECK(made.ratio == Approx(row.ratio).epsilon(1e-12));
            }
            CHECK(std::log(row.ratio) ==
                  Approx(row.correlation * row.volatility * row.rateVolatility *
                             discounting::reversionGap(row.meanReversion, row.years) +
                         discounting::integralVariance(row.meanReversion, row.rateVolatility, row.years))
                      .epsilon(1e-9));
        }
    }

    TEST_CASE("futures and forward are one where nothing is random, whatever the volatility") {
        desk::FuturesAsked asked;
        asked.maturities = {on("2027-12-15"), on("2028-12-15")};
        asked.places = {"/maturity", "/maturities/0"};
        asked.volatility = 0.4;
        asked.correlation = 1.0;
        const desk::Futures futures = valueOf(desk::futures(fullShare(), asked));
        CHECK(futures.rows.size() == 2);
        for (const desk::FuturesRow& row : futures.rows) {
            CHECK(row.futures == row.forward);
        }
        REQUIRE(futures.notices.size() == 1);
        CHECK(futures.notices.front().code == "cash-income");
    }

    TEST_CASE("futures with a rate that is not normal are refused, once") {
        const forward::Market market = withFunding(
            fullShare(), discounting::coxIngersollRoss(fullShare().asOf, {0.02, 0.4, 0.03, 0.1}).value());
        desk::FuturesAsked asked;
        asked.maturities = {on("2027-12-15")};
        asked.places = {"/maturity"};
        CHECK(codeOf(desk::futures(market, asked)) == "/market/funding/curve no-closed-form");
    }

    TEST_CASE("correlation of the asset with the rate matters to the future, and not to the forward") {
        // Under the pricing measure S(T) = S·e^(∫r + s·W − s²T/2). The discounted asset S(T)·D(T) has no rate
        // left in it: so the forward is S over E[D] for any correlation. The future, E[S(T)], has. Both by
        // summing over a grid of the two normal numbers that make W and ∫r.
        const double years = 5.0;
        const double s = 0.2;
        const double rateVolatility = 0.02;
        const double variance = discounting::integralVariance(0.1, rateVolatility, years);
        const double meanIntegral = 0.15;
        for (const double correlation : {-0.8, 0.0, 0.5}) {
            const double covariance =
                correlation * s * rateVolatility * discounting::reversionGap(0.1, years);
            const double loading = covariance / (s * std::sqrt(years)); // of ∫r on W's own number
            const double rest = std::sqrt(variance - loading * loading);
            const auto expectation = [&](auto payoff) {
                return integral(
                    [&](double first) {
                        return density(first) *
                               integral(
                                   [&](double second) {
                                       const double rates = meanIntegral + loading * first + rest * second;
                                       const double price =
                                           100.0 * std::exp(rates + s * std::sqrt(years) * first -
                                                            s * s * years / 2.0);
                                       return density(second) * payoff(price, std::exp(-rates));
                                   },
                                   -9.0, 9.0);
                    },
                    -9.0, 9.0);
            };
            const double factor = std::exp(-meanIntegral + variance / 2.0);
            CHECK(expectation([](double, double d) { return d; }) == Approx(factor).epsilon(1e-9));
            CHECK(expectation([](double price, double d) { return price * d; }) / factor ==
                  Approx(100.0 / factor).epsilon(1e-9));
            CHECK(expectation([](double price, double) { return price; }) ==
                  Approx(100.0 / factor * std::exp(covariance + variance)).epsilon(1e-9));
        }
    }

    TEST_CASE("hedge cover: fully hedged the price is the forward whatever the growth; unhedged it is an "
              "insurer's") {
        const forward::Market market = fullShare();
        for (const double growth : {-0.5, 0.0, 0.08, 2.0}) {
            desk::HedgeCoverAsked asked{on("2027-12-15"), growth, 0.3, 1.0, 0.25, {0.0, 0.25, 1.0}};
            const desk::HedgeCover cover = valueOf(desk::hedgeCover(market, asked));
            CHECK(cover.asked.sell == cover.fair);
            CHECK(*cover.asked.buy == cover.fair);
            CHECK(cover.asked.deviation == 0.0);
            for (const desk::ResultQuantile& quantile : cover.asked.quantiles) {
                CHECK(quantile.result == 0.0);
            }
            const double years = dates::years(market.asOf, day("2027-12-15"));
            const double expected = 48.64 * std::exp(growth * years);
            CHECK(cover.expected == Approx(expected).epsilon(1e-14));
            const desk::CoverAt& insurer = cover.shares[0];
            const double deviation = expected * std::sqrt(std::expm1(0.09 * years));
            CHECK(insurer.deviation == Approx(deviation).epsilon(1e-13));
            CHECK(insurer.sell == Approx(expected + 0.25 * deviation).epsilon(1e-13));
            CHECK(*insurer.buy == Approx(expected - 0.25 * deviation).epsilon(1e-13));
            CHECK(cover.shares[1].sell == Approx(0.25 * cover.fair + 0.75 * insurer.sell).epsilon(1e-13));
            CHECK(cover.shares[2].sell == cover.fair);
        }
    }

    TEST_CASE("hedge cover: mean, deviation and quantiles of the result are those of its law, by numerical "
              "integration") {
        const forward::Market market = fullShare();
        const desk::HedgeCover cover =
            valueOf(desk::hedgeCover(market, {on("2028-12-15"), 0.06, 0.35, 0.4, 0.2, {}}));
        const double deviationOfLog = 0.35 * std::sqrt(dates::years(market.asOf, day("2028-12-15")));
        const auto result = [&](double z) {
            const double price =
                cover.expected * std::exp(deviationOfLog * z - deviationOfLog * deviationOfLog / 2.0);
            return (cover.asked.sell - cover.fair) + 0.6 * (cover.fair - price);
        };
        const double mean = integral([&](double z) { return density(z) * result(z); }, -10.0, 10.0);
        const double square = integral(
            [&](double z) { return density(z) * (result(z) - mean) * (result(z) - mean); }, -10.0, 10.0);
        CHECK(mean == Approx(0.2 * cover.asked.deviation).epsilon(1e-9));
        CHECK(std::sqrt(square) == Approx(cover.asked.deviation).epsilon(1e-9));
        for (const desk::ResultQuantile& quantile : cover.asked.quantiles) {
            // The price at which the result is the quantile, and how likely one above it is.
            const double price = cover.fair - (quantile.result - (cover.asked.sell - cover.fair)) / 0.6;
            const double z =
                (std::log(price / cover.expected) + deviationOfLog * deviationOfLog / 2.0) / deviationOfLog;
            CHECK(0.5 * std::erfc(z / std::sqrt(2.0)) == Approx(quantile.probability).epsilon(1e-10));
        }
        // Bought, the dealer gains where the price rises.
        const auto bought = [&](double z) {
            const double price =
                cover.expected * std::exp(deviationOfLog * z - deviationOfLog * deviationOfLog / 2.0);
            return (cover.fair - *cover.asked.buy) + 0.6 * (price - cover.fair);
        };
        CHECK(integral([&](double z) { return density(z) * bought(z); }, -10.0, 10.0) ==
              Approx(0.2 * cover.asked.deviation).epsilon(1e-9));
        for (const desk::ResultQuantile& quantile : cover.asked.buyQuantiles) {
            const double price = cover.fair + (quantile.result - (cover.fair - *cover.asked.buy)) / 0.6;
            const double z =
                (std::log(price / cover.expected) + deviationOfLog * deviationOfLog / 2.0) / deviationOfLog;
            CHECK(0.5 * std::erfc(-z / std::sqrt(2.0)) == Approx(quantile.probability).epsilon(1e-10));
        }
        // The odds of a loss: where the result, halved towards, changes its sign.
        const auto zeroOf = [](auto f) {
            double low = -10.0;
            double high = 10.0;
            for (int halvings = 0; halvings < 80; ++halvings) {
                const double middle = (low + high) / 2.0;
                ((f(middle) < 0.0) == (f(low) < 0.0) ? low : high) = middle;
            }
            return low;
        };
        CHECK(cover.asked.lossProbability ==
              Approx(0.5 * std::erfc(zeroOf(result) / std::sqrt(2.0))).epsilon(1e-10));
        CHECK(*cover.asked.buyLossProbability ==
              Approx(0.5 * std::erfc(-zeroOf(bought) / std::sqrt(2.0))).epsilon(1e-10));
    }

    TEST_CASE("hedge cover on the quantity; odds of a loss where nothing is open, or the price is certain") {
        const forward::Market market = fullShare();
        const desk::HedgeCover cover =
            valueOf(desk::hedgeCover(market, {on("2028-12-15"), 0.06, 0.35, 0.4, 0.2, {1.0}, 300.0}));
        CHECK(cover.onQuantity.sell == 300.0 * (cover.asked.sell - cover.fair));
        CHECK(*cover.onQuantity.buy == 300.0 * (cover.fair - *cover.asked.buy));
        CHECK(cover.onQuantity.deviation == 300.0 * cover.asked.deviation);
        CHECK(cover.shares[0].lossProbability == 0.0);
        CHECK(*cover.shares[0].buyLossProbability == 0.0);
        // Without volatility and loading the result is zero for certain, which is no loss.
        const desk::HedgeCover certain =
            valueOf(desk::hedgeCover(market, {on("2028-12-15"), 0.06, 0.0, 0.4, 0.0, {}}));
        CHECK(certain.asked.quantiles.front().result == Approx(0.0).epsilon(1e-12));
        CHECK(certain.asked.lossProbability == 0.0);
        CHECK(*certain.asked.buyLossProbability == 0.0);
        // So large a loading that the result can hardly fall below zero.
        const desk::HedgeCover dear =
            valueOf(desk::hedgeCover(market, {on("2027-12-15"), 0.0, 0.3, 0.9, 8.0, {}}));
        CHECK(dear.asked.lossProbability < 1e-4);
        CHECK(*dear.asked.buyLossProbability == 0.0);
    }

    TEST_CASE("hedge cover: what gives no price is refused or left out") {
        const forward::Market market = fullShare();
        CHECK(codeOf(desk::hedgeCover(market, {on("2027-12-15"), 0.0, 0.3, 0.0, 100.0, {}})) ==
              "/loading not-a-price");
        CHECK(codeOf(desk::hedgeCover(market, {on("2126-11-29"), 10.0, 10.0, 0.5, 0.0, {}})) ==
              " not-finite");
        const desk::HedgeCover cover =
            valueOf(desk::hedgeCover(market, {on("2027-12-15"), 0.0, 0.3, 1.0, 100.0, {0.0, 1.0}}));
        CHECK_FALSE(cover.shares[0].buy.has_value());
        CHECK(cover.shares[1].buy.has_value());
        const desk::HedgeCover today =
            valueOf(desk::hedgeCover(market, {on("2026-12-01"), 0.5, 0.3, 0.0, 1.0, {}}));
        CHECK(today.asked.sell == Approx(48.64).epsilon(1e-14));
        CHECK(today.asked.deviation == 0.0);
    }

    TEST_CASE("comparing fundings: a fitted model gives its curve's forward, another its own; each is the "
              "quote under it") {
        const forward::Market market = fullShare();
        desk::ComparisonAsked asked;
        asked.inquiry = {forward::Client::twoWay, 500.0, on("2028-12-15"), {}};
        asked.fundings = {
            {"curve", market.funding.curve},
            {"Hull–White", discounting::hullWhite(market.asOf, 0.1, 0.012, market.funding.curve).value()},
            {"Ho–Lee", discounting::hoLee(market.asOf, 0.05, market.funding.curve).value()},
            {"Vasicek", vasicekOf(market)}};
        const desk::Comparison comparison = valueOf(desk::compare(market, asked));
        REQUIRE(comparison.rows.size() == 4);
        for (std::size_t i = 0; i < 4; ++i) {
            const desk::ComparisonRow& row = comparison.rows[i];
            const forward::Quote quote = quoted(withFunding(market, asked.fundings[i].curve), asked.inquiry);
            CHECK(row.fair == quote.fair.forward);
            CHECK(row.fitted == (i == 1 || i == 2));
            CHECK(row.random == (i > 0));
            CHECK(row.change == row.fair - comparison.rows[0].fair);
            CHECK(row.onQuantity == 500.0 * row.change);
            CHECK((row.gap == 0.0) == (i == 0));
        }
        CHECK(comparison.rows[1].fair == comparison.rows[0].fair);
        CHECK(comparison.rows[2].fair == comparison.rows[0].fair);
        CHECK(comparison.rows[3].fair != comparison.rows[0].fair);

        asked.fundings[2].curve = discounting::vasicek(market.asOf, {9.0, 0.0, 9.0, 10.0}).value();
        asked.inquiry.maturity = on("2126-11-29");
        CHECK(codeOf(desk::compare(market, asked)) == "/fundings/2/curve not-finite");
    }
}
