#include "discounting/mean_reversion.hpp"
#include "discounting/path_makers.hpp"
#include "discounting/simulation.hpp"
#include "discounting_fixtures.hpp"
#include "numeric/normal_words.hpp"
#include "numeric/philox.hpp"

#include <algorithm>
#include <numeric>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;

namespace {

constexpr std::size_t binCount = 40;

Simulation madeFrom(const Curve& curve, const Payments& payments, const SimulationPlan& plan,
                    const Bins& bins = {}) {
    const auto simulation = Simulation::make(curve, payments, plan, bins);
    REQUIRE_MESSAGE(simulation.ok(), (simulation.ok() ? "" : simulation.faults().front().message));
    return simulation.value();
}

struct Run {
    SimulationEstimate estimate;
    BinCounts counts;
};

Run run(const Curve& curve, const Payments& payments, const SimulationPlan& plan, const Bins& bins = {}) {
    const Simulation simulation = madeFrom(curve, payments, plan, bins);
    Run result{{}, BinCounts(bins.count + 2, 0)};
    std::vector<long> indices(static_cast<std::size_t>(plan.blocks()));
    std::iota(indices.begin(), indices.end(), 0L);
    std::vector<BlockSums> sums;
    for (const long block : indices) {
        sums.push_back(simulation.block(block, result.counts));
    }
    result.estimate = simulation.estimate(indices, sums);
    return result;
}

double valueOf(const Curve& curve, const Payments& payments) {
    double value = payments.today;
    for (std::size_t i = 0; i < payments.dates.size(); ++i) {
        value += payments.weights[i] * curve.factor(payments.dates[i]);
    }
    return value;
}

/// Spot in two days, two distributions, one of them paid after the settlement in `years`.
Payments dealOver(int years) {
    const int days = 365 * years;
    return {{afterDays(2), afterDays(days / 2), afterDays(days), afterDays(days + 20)},
            {100.0, -2.0, 0.0, -2.5},
            2,
            0.0};
}

/// Four standard errors (five where these rest on 16 numbers only), what the paths themselves are off by, and
/// rounding.
void checkAgainstClosedForm(const Curve& curve, const Payments& payments, const SimulationPlan& plan) {
    const SimulationEstimate estimate = run(curve, payments, plan).estimate;
    const double factor = curve.factor(payments.dates[payments.target]);
    const double price = valueOf(curve, payments) / factor;
    const double bias = curve.random()->pathBias();
    const double reach = plan.method == SimulationMethod::pseudo ? 4.0 : 5.0;
    CAPTURE(nameOf(plan.method));
    CAPTURE(plan.seed);
    REQUIRE(estimate.factorError.has_value());
    checkNear(estimate.factor, factor, reach * *estimate.factorError + (bias + 1e-13) * factor);
    checkNear(estimate.price, price, reach * *estimate.priceError + 2.0 * (bias + 1e-13) * std::fabs(price));
}

CurvePtr meetingsCurve() {
    return made(policyMeetings(asOf, 0.02,
                               {{afterDays(2), {{0.0, 0.5}, {0.01, 0.5}}},
                                {afterDays(45), {{-0.0025, 0.3}, {0.0, 0.6}, {0.005, 0.1}}},
                                {afterDays(400), {{-0.01, 0.25}, {0.0, 0.0}, {0.01, 0.75}}}}));
}

CurvePtr samplesCurve() {
    SamplePaths paths;
    paths.dates = {afterDays(100), afterDays(500), afterDays(900)};
    for (int path = 0; path < 37; ++path) {
        const double rate = 0.01 + 0.002 * (path % 19);
        for (const double years : {0.3, 1.4, 2.5}) {
            paths.factors.push_back(std::exp(-rate * years - 0.0005 * (path % 5)));
        }
    }
    return made(samples(asOf, std::move(paths)));
}

CurvePtr nestedCurve() {
    const CurvePtr inner =
        made(scenarios(asOf, {{0.25, flatAt(0.01)}, {0.75, made(vasicek(asOf, {0.03, 0.4, 0.04, 0.02}))}}));
    return made(
        scenarios(asOf, {{0.5, meetingsCurve()}, {0.2, flatAt(-0.01)}, {0.3, inner}, {0.0, flatAt(5.0)}}));
}

SimulationPlan pseudo(long paths, std::uint64_t seed) {
    return {SimulationMethod::pseudo, paths, seed};
}
SimulationPlan quasi(long paths, std::uint64_t seed) {
    return {SimulationMethod::quasi, paths, seed};
}

} // namespace

TEST_SUITE("simulation") {
    TEST_CASE("normal short rates: simulation and closed form agree over a grid of parameters (seeds 1, 2)") {
        for (const int years : {1, 10, 50}) {
            for (const double meanReversion : {0.0, 1e-7, 0.1, 5.0}) {
                for (const double volatility : {0.0, 0.001, years == 1 ? 1.0 : years == 10 ? 0.06 : 0.006}) {
                    for (const double r0 : {-0.02, 0.05}) {
                        CAPTURE(years);
                        CAPTURE(meanReversion);
                        CAPTURE(volatility);
                        CAPTURE(r0);
                        const CurvePtr curve = made(vasicek(asOf, {r0, meanReversion, 0.03, volatility}));
                        checkAgainstClosedForm(*curve, dealOver(years), pseudo(8192, 1));
                        checkAgainstClosedForm(*curve, dealOver(years), quasi(4096, 2));
                    }
                }
            }
        }
    }

    TEST_CASE("where a few paths carry the mean it is said") {
        // A logarithm of variance V makes a factor whose fourth moment is e^(4V) times its square's: more
        // than there are paths.
        const CurvePtr wild = made(vasicek(asOf, {0.05, 0.0, 0.03, 0.02}));
        CHECK(isCarriedByFew(*wild->random(), afterYears(50), 8192));
        CHECK_FALSE(isCarriedByFew(*wild->random(), afterYears(5), 8192));
        CHECK_FALSE(isCarriedByFew(*samplesCurve()->random(), afterYears(5), 8192));
    }

    TEST_CASE("fitted models give back the curve they were fitted to, whatever their parameters (seed 3)") {
        Pillars points;
        points.pillars = {{afterYears(1), 0.02}, {afterYears(4), -0.01}, {afterYears(9), 0.05}};
        const CurvePtr fit = made(pillars(asOf, points));
        checkAgainstClosedForm(*made(hoLee(asOf, 0.015, fit)), dealOver(8), quasi(16384, 3));
        checkAgainstClosedForm(*made(hullWhite(asOf, 0.3, 0.02, fit)), dealOver(8), quasi(16384, 3));
        checkAgainstClosedForm(*made(hullWhite(asOf, 0.3, 0.02, fit)), dealOver(8), pseudo(16384, 3));
    }

    TEST_CASE("a normal short rate without volatility has one path") {
        const CurvePtr curve = made(vasicek(asOf, {0.02, 0.2, 0.05, 0.0}));
        const SimulationEstimate estimate = run(*curve, dealOver(7), pseudo(1000, 5)).estimate;
        checkRelative(estimate.factor, curve->factor(afterYears(7)), 1e-14);
        checkNear(*estimate.factorError, 0.0, 1e-15);
    }

    TEST_CASE(
        "the pair of short rate and integral: covariances of ln D between dates are those of the model") {
        // Cov[I(s), I(t)] = V(s) + B(t − s)·σ²B(s)²/2, which an Ornstein–Uhlenbeck process's covariance
        // function integrates to; here against paths through further dates between, which must change
        // nothing. Seed 11.
        const double meanReversion = 0.35;
        const double volatility = 0.02;
        const CurvePtr curve = made(vasicek(asOf, {0.01, meanReversion, 0.04, volatility}));
        Payments payments{
            {afterYears(1), afterDays(500), afterYears(2), afterYears(6)}, {0, 0, 0, 0}, 3, 0.0};
        constexpr std::size_t count = 1 << 17;
        const auto logs = madeFrom(*curve, payments, pseudo(2 * count, 11)).firstPaths(count);
        const auto covariance = [&](std::size_t one, std::size_t other) {
            double sum = 0.0;
            for (std::size_t path = 0; path < count; ++path) {
                sum += (logs[one][path] - curve->random()->meanLog(payments.dates[one])) *
                       (logs[other][path] - curve->random()->meanLog(payments.dates[other]));
            }
            return sum / count;
        };
        for (std::size_t one = 0; one < 4; ++one) {
            for (std::size_t other = one; other < 4; ++other) {
                const double s = forwright::dates::years(asOf, payments.dates[one]);
                const double t = forwright::dates::years(asOf, payments.dates[other]);
                const double b = reversionTime(meanReversion, s);
                const double variance = integralVariance(meanReversion, volatility, s);
                const double exact =
                    variance + reversionTime(meanReversion, t - s) * volatility * volatility * b * b / 2.0;
                const double bound =
                    std::sqrt(variance * integralVariance(meanReversion, volatility, t) * 2.0 / count);
                CAPTURE(one);
                CAPTURE(other);
                checkNear(covariance(one, other), exact, 4.5 * bound);
            }
        }
    }

    TEST_CASE("Cox–Ingersoll–Ross: within four standard errors and the stated bias (seeds 1, 2)") {
        struct Row {
            double r0, meanReversion, longRun, volatility;
            int years;
        };
        for (const Row& row :
             {Row{0.05, 0.1, 0.08, 0.067, 10}, Row{0.02, 0.5, 0.03, 0.2, 5}, Row{0.01, 0.0, 0.0, 0.3, 10},
              Row{0.0, 1.0, 0.05, 1.0, 3}, Row{0.05, 0.2, 0.05, 3.0, 5}, Row{0.5, 5.0, 0.5, 10.0, 2},
              Row{0.05, 50.0, 0.05, 1.0, 10}, Row{0.02, 0.1, 0.03, 0.05, 50}, Row{0.0, 0.0, 0.3, 0.2, 5},
              Row{0.05, 0.3, 0.02, 0.0, 20}}) {
            CAPTURE(row.meanReversion);
            CAPTURE(row.volatility);
            const CurvePtr curve =
                made(coxIngersollRoss(asOf, {row.r0, row.meanReversion, row.longRun, row.volatility}));
            const Payments payments{{afterDays(2), afterYears(row.years)}, {100.0, 0.0}, 1, 0.0};
            checkAgainstClosedForm(*curve, payments, quasi(8192, 2));
            checkAgainstClosedForm(*curve, payments, pseudo(4096, 1));
        }
    }

    TEST_CASE(
        "normal paths: the first word alone moves ln D at the target date, up where the word goes down") {
        const auto maker =
            detail::normalPaths({0.2, 0.015, false}, {0.1, 1.0, 4.0, 5.0}, {0.0, 0.0, 0.0, 0.0}, 2);
        REQUIRE(maker->numbers() == 7);
        std::vector<std::uint32_t> words(7 * tilePaths);
        forwright::numeric::philoxWords({0, 0, 0, 0}, {1, 2}, 7 * tilePaths / 4, words.data());
        const double deviation = std::sqrt(integralVariance(0.2, 0.015, 4.0));
        std::vector<double> logs(4 * tilePaths);
        maker->make(words.data(), tilePaths, logs.data());
        for (std::size_t path = 0; path < tilePaths; ++path) {
            checkNear(logs[2 * tilePaths + path], -deviation * forwright::numeric::normalWords()(words[path]),
                      1e-14);
        }
    }

    TEST_CASE("Cox–Ingersoll–Ross: the covariance of the integrals over two steps is the model's, by "
              "numerical integration (seed 21)") {
        // Cov[I₁, I₂] = B·Cov[I₁, r₁] and Cov[I₁, r₁] = ∫ e^(−κ(Δ−s))·Var[r_s] ds, with Var[r_s] =
        // r₀σ²(e^(−κs) − e^(−2κs))/κ + θσ²(1 − e^(−κs))²/(2κ) (Cox, Ingersoll and Ross 1985, equation 19;
        // from memory, and by Itô's isometry).
        for (const CoxIngersollRoss& model :
             {CoxIngersollRoss{0.0, 20.0, 0.05, 0.5}, CoxIngersollRoss{0.08, 4.0, 0.02, 0.1}}) {
            const CurvePtr curve = made(coxIngersollRoss(asOf, model));
            const Payments payments{{afterDays(22), afterDays(44)}, {0.0, 0.0}, 1, 0.0};
            const double step = 22.0 / 365;
            constexpr std::size_t count = 1 << 17;
            const auto logs = madeFrom(*curve, payments, pseudo(2 * count, 21)).firstPaths(count);
            double covariance = 0.0;
            double fourth = 0.0;
            const double firstMean = curve->random()->meanLog(payments.dates[0]);
            const double secondMean = curve->random()->meanLog(payments.dates[1]) - firstMean;
            for (std::size_t path = 0; path < count; ++path) {
                const double product =
                    (logs[0][path] - firstMean) * (logs[1][path] - logs[0][path] - secondMean);
                covariance += product / count;
                fourth += product * product / count;
            }
            const double k = model.meanReversion;
            const double square = model.volatility * model.volatility;
            double exact = 0.0;
            constexpr int intervals = 20'000; // midpoints
            for (int i = 0; i < intervals; ++i) {
                const double s = step * (i + 0.5) / intervals;
                const double kept = std::exp(-k * s);
                const double variance = model.r0 * square * (kept - kept * kept) / k +
                                        model.longRun * square * (1 - kept) * (1 - kept) / (2 * k);
                exact += std::exp(-k * (step - s)) * variance * step / intervals;
            }
            exact *= (1 - std::exp(-k * step)) / k;
            const double error = std::sqrt((fourth - covariance * covariance) / count);
            CHECK(error < 0.02 * exact);
            checkNear(covariance, exact, 4.5 * error);
        }
    }

    TEST_CASE("the stated bias of Cox–Ingersoll–Ross depends on whether the rate can reach 0") {
        CHECK(made(coxIngersollRoss(asOf, {0.05, 0.1, 0.08, 0.067}))->random()->pathBias() == 5e-5);
        CHECK(made(coxIngersollRoss(asOf, {0.05, 0.1, 0.08, 1.0}))->random()->pathBias() == 1e-3);
        CHECK(made(vasicek(asOf, {0.05, 0.1, 0.08, 1.0}))->random()->pathBias() == 0.0);
        CHECK(made(scenarios(asOf, {{1.0, made(coxIngersollRoss(asOf, {0.05, 0.1, 0.08, 1.0}))}}))
                  ->random()
                  ->pathBias() == 1e-3);
    }

    TEST_CASE(
        "meetings, scenarios within scenarios and samples: simulation and closed form agree (seeds 4 to 7)") {
        const Payments payments = dealOver(2);
        for (const CurvePtr& curve : {meetingsCurve(), nestedCurve(), samplesCurve()}) {
            CAPTURE(curve->convention());
            for (const std::uint64_t seed : std::initializer_list<std::uint64_t>{4, 5, 6, 7}) {
                checkAgainstClosedForm(*curve, payments, pseudo(16384, seed));
                checkAgainstClosedForm(*curve, payments, quasi(16384, seed));
            }
        }
    }

    TEST_CASE("a path through meetings is one of the outcomes, whole (by hand)") {
        const CurvePtr curve = meetingsCurve();
        const Payments payments{
            {afterDays(2), afterDays(10), afterDays(45), afterDays(100)}, {0, 0, 0, 0}, 3, 0.0};
        const auto logs = madeFrom(*curve, payments, pseudo(512, 1)).firstPaths(256);
        for (std::size_t path = 0; path < 256; ++path) {
            checkRelative(logs[0][path], -0.02 * 2 / 365, 1e-14);
            // From the second day the rate has moved by 0 or 1 %, from the 45th by one of three more.
            const double first = (logs[0][path] - logs[1][path]) * 365 / 8;
            CHECK((std::fabs(first - 0.02) < 1e-12 || std::fabs(first - 0.03) < 1e-12));
            checkNear((logs[1][path] - logs[2][path]) * 365 / 35, first, 1e-12);
            const double move = (logs[2][path] - logs[3][path]) * 365 / 55 - first;
            CHECK((std::fabs(move + 0.0025) < 1e-12 || std::fabs(move) < 1e-12 ||
                   std::fabs(move - 0.005) < 1e-12));
        }
    }

    TEST_CASE("outcomes fall into bins as often as the law says: χ² over 20 bins, below its 1 in 100,000 "
              "quantile") {
        for (const CurvePtr& curve : {made(vasicek(asOf, {0.02, 0.1, 0.03, 0.012})),
                                      made(coxIngersollRoss(asOf, {0.04, 0.3, 0.05, 0.1})), nestedCurve()}) {
            CAPTURE(curve->convention());
            const Date end = afterYears(5);
            const auto law = curve->random()->law(end).value();
            Bins bins;
            bins.count = 20;
            bins.low = std::exp(law->quantile(0.02)) - 1e-9; // an outcome of its own may lie there
            bins.high = std::exp(law->quantile(0.98)) + 1e-9;
            const long paths = 32768;
            // Independent paths, so no mirror images: those of quasi-random points are too even for this
            // test.
            const auto logs =
                madeFrom(*curve, {{end}, {0.0}, 0, 0.0}, pseudo(2 * paths, 9)).firstPaths(paths);
            std::vector<double> counts(bins.count + 2, 0.0);
            const double width = (bins.high - bins.low) / 20.0;
            for (const double log : logs[0]) {
                const double position = std::floor((std::exp(log) - bins.low) / width) + 1.0;
                counts[static_cast<std::size_t>(std::clamp(position, 0.0, 21.0))] += 1.0;
            }
            double chiSquare = 0.0;
            double below = 0.0;
            for (std::size_t bin = 0; bin < counts.size(); ++bin) {
                const double upTo =
                    bin == 21 ? 1.0
                              : law->probabilityAtMost(std::log(bins.low + width * static_cast<double>(bin)));
                const double expected = paths * (upTo - below);
                below = upTo;
                if (expected > 5.0) {
                    chiSquare += (counts[bin] - expected) * (counts[bin] - expected) / expected;
                }
            }
            CHECK(chiSquare < 66.0); // 21 degrees of freedom: 1e-5 is exceeded at 62.9, plus the bins' edges
        }
    }

    TEST_CASE(
        "the same request gives the same bits however its blocks are shared out, and in whatever order") {
        const CurvePtr curve = nestedCurve();
        for (const SimulationPlan& plan :
             {pseudo(20'000, 12), quasi(131'072, 12), quasi(64, 3), pseudo(4, 3)}) {
            const Payments payments = dealOver(3);
            const Run whole = run(*curve, payments, plan);
            const Simulation other = madeFrom(*curve, payments, plan);
            BinCounts counts(binCount + 2, 0);
            std::vector<long> indices(static_cast<std::size_t>(plan.blocks()));
            std::iota(indices.begin(), indices.end(), 0L);
            std::vector<BlockSums> sums(indices.size());
            for (std::size_t i = indices.size(); i-- > 0;) {
                sums[i] = madeFrom(*curve, payments, plan).block(indices[i], counts);
            }
            const SimulationEstimate again = other.estimate(indices, sums);
            CHECK(again.factor == whole.estimate.factor);
            CHECK(again.price == whole.estimate.price);
            CHECK(again.factorError == whole.estimate.factorError);
            CHECK(again.priceError == whole.estimate.priceError);
            CHECK(again.meanRatio == whole.estimate.meanRatio);
            CHECK(counts == whole.counts);
            CHECK(again.paths == plan.paths);
            CHECK(std::accumulate(counts.begin(), counts.end(), std::int64_t{0}) == countsAPath * plan.paths);
        }
    }

    TEST_CASE("antithetic pairs: mirror images add nothing where D's logarithm is all there is") {
        const CurvePtr curve = made(vasicek(asOf, {0.02, 0.1, 0.03, 0.012}));
        // ln D of a path and of its image average to the mean: their factors' product is the mean's square.
        const Payments payments{{afterYears(3)}, {0.0}, 0, 0.0};
        const auto logs = madeFrom(*curve, payments, pseudo(512, 8)).firstPaths(256);
        double mean = 0.0;
        for (const double log : logs[0]) {
            const double image = 2.0 * curve->random()->meanLog(afterYears(3)) - log;
            mean += 0.5 * (std::exp(log) + std::exp(image)) / 256;
        }
        checkRelative(run(*curve, payments, pseudo(512, 8)).estimate.factor, mean, 1e-13);
    }

    TEST_CASE("standard errors are honest: over 64 seeds the deviations are as large as they say") {
        const CurvePtr curve = made(vasicek(asOf, {0.05, 0.1, 0.08, 0.015}));
        const Payments payments = dealOver(5);
        const double factor = curve->factor(afterYears(5));
        const double price = valueOf(*curve, payments) / factor;
        for (const SimulationMethod method : {SimulationMethod::pseudo, SimulationMethod::quasi}) {
            double factors = 0.0;
            double prices = 0.0;
            for (std::uint64_t seed = 1; seed <= 64; ++seed) {
                const SimulationEstimate estimate = run(*curve, payments, {method, 2048, seed}).estimate;
                factors += std::pow((estimate.factor - factor) / *estimate.factorError, 2) / 64;
                prices += std::pow((estimate.price - price) / *estimate.priceError, 2) / 64;
            }
            // The mean of 64 squares is 1 ± 0.18 (a little more with 15 degrees of freedom).
            MESSAGE(nameOf(method) << ": mean squared deviation in standard errors " << factors << ", "
                                   << prices);
            CHECK(factors > 0.4);
            CHECK(factors < 2.0);
            CHECK(prices > 0.4);
            CHECK(prices < 2.0);
        }
    }

    TEST_CASE(
        "quasi-random points beat plain simulation by more than 40 at 16,384 paths, in root mean square") {
        const CurvePtr curve = made(vasicek(asOf, {0.05, 0.1, 0.08, 0.015}));
        const Payments payments = dealOver(5);
        const Date end = afterYears(5);
        const double factor = curve->factor(end);
        double square = 0.0;
        for (std::uint64_t seed = 1; seed <= 16; ++seed) {
            square += std::pow(run(*curve, payments, quasi(16384, seed)).estimate.factor - factor, 2) / 16;
        }
        const double plain = factor * std::sqrt(std::expm1(*curve->random()->varianceLog(end)) / 16384);
        MESSAGE("plain / quasi: " << plain / std::sqrt(square));
        CHECK(plain / std::sqrt(square) > 40.0);
    }

    TEST_CASE("evenly spread points meet the mean of a factor ten years out within 1e-6 of it, in root mean "
              "square, from 65,536 paths; 1 in 350 of plain simulation's error from 16,384") {
        const CurvePtr curve = made(vasicek(asOf, {0.05, 0.1, 0.08, 0.015}));
        const Date end = afterYears(10);
        const Payments payments{{end}, {0.0}, 0, 100.0};
        const double factor = curve->factor(end);
        const auto rootMeanSquare = [&](long paths) {
            double square = 0.0;
            for (std::uint64_t seed = 1; seed <= 16; ++seed) {
                const double error = run(*curve, payments, quasi(paths, seed)).estimate.factor / factor - 1.0;
                square += error * error / 16.0;
            }
            return std::sqrt(square);
        };
        const double many = rootMeanSquare(65536);
        const double plain = std::sqrt(std::expm1(*curve->random()->varianceLog(end)) / 16384);
        const double gain = plain / rootMeanSquare(16384);
        MESSAGE("relative error from 65,536 paths " << many << ", plain / quasi at 16,384: " << gain);
        CHECK(many < 1e-6);
        CHECK(gain > 350.0);
    }

    TEST_CASE("stretched points keep the law: by their weights they fall into bins as often as it says") {
        const CurvePtr curve = made(vasicek(asOf, {0.02, 0.1, 0.03, 0.012}));
        const Date end = afterYears(5);
        const auto law = curve->random()->law(end).value();
        Bins bins;
        bins.count = 20;
        bins.low = std::exp(law->quantile(0.02));
        bins.high = std::exp(law->quantile(0.98));
        const long paths = 65536;
        const BinCounts counts = run(*curve, {{end}, {0.0}, 0, 0.0}, quasi(paths, 3), bins).counts;
        double below = 0.0;
        double all = 0.0;
        for (std::size_t bin = 0; bin < counts.size(); ++bin) {
            const double edge = bins.low + (bins.high - bins.low) / 20.0 * static_cast<double>(bin);
            const double upTo = bin == 21 ? 1.0 : law->probabilityAtMost(std::log(edge));
            const double count = static_cast<double>(counts[bin]) / static_cast<double>(countsAPath);
            all += count;
            // At each edge each of 16 scramblings misses by its own cell of 1 in 2,048, weighing up to 1.5.
            CHECK(std::fabs(count / static_cast<double>(paths) - (upTo - below)) < 1.5 * 2.0 / 2048.0);
            below = upTo;
        }
        CHECK(std::fabs(all / static_cast<double>(paths) - 1.0) < 1e-4);
    }

    TEST_CASE("part of the blocks is an estimate with its own error, once there is something to compare") {
        const CurvePtr curve = made(vasicek(asOf, {0.05, 0.1, 0.08, 0.015}));
        const Simulation simulation = madeFrom(*curve, dealOver(5), quasi(1L << 17U, 1));
        BinCounts counts(binCount + 2, 0);
        std::vector<long> indices;
        std::vector<BlockSums> sums;
        for (long block = 0; block < 5; ++block) {
            indices.push_back(block);
            sums.push_back(simulation.block(block, counts));
            const SimulationEstimate estimate = simulation.estimate(indices, sums);
            CHECK(estimate.paths == 4096 * (block + 1));
            CHECK(estimate.factorError.has_value() == (block > 0));
        }
        const SimulationEstimate estimate = simulation.estimate(indices, sums);
        checkNear(estimate.factor, curve->factor(afterYears(5)), 5.0 * *estimate.factorError);
    }

    TEST_CASE("what is refused, and what would be right") {
        const CurvePtr curve = made(vasicek(asOf, {0.05, 0.1, 0.08, 0.015}));
        const auto refused = [&](const SimulationPlan& plan) {
            return codes(Simulation::make(*curve, dealOver(5), plan, {}));
        };
        CHECK(refused(pseudo(3, 1)) == "/paths out-of-range");
        CHECK(refused(pseudo(101, 1)) == "/paths not-even");
        CHECK(refused(quasi(16, 1)) == "/paths out-of-range");
        CHECK(refused(quasi(1000, 1)) == "/paths not-a-power-of-two");
        CHECK(refused(quasi(48, 1)) == "/paths not-a-power-of-two");
        CHECK(refused(quasi(1L << 25U, 1)) == "/paths out-of-range");
        CHECK(codes(Simulation::make(*flatAt(0.02), dealOver(5), quasi(32, 1), {})) == " not-random");
    }
}
