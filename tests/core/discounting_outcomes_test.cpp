#include "discounting_fixtures.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>
#include <random>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
namespace numeric = forwright::numeric;

namespace {

/// The quantile by listing every outcome: the smallest whose probability reaches it.
double listed(std::vector<std::pair<double, double>> outcomes, double probability) {
    std::sort(outcomes.begin(), outcomes.end());
    double sum = 0;
    for (const auto& [value, odds] : outcomes) {
        sum += odds;
        if (sum >= probability - 1e-12) {
            return value;
        }
    }
    return outcomes.back().first;
}

/// Every path of the meetings before u: ln D and its odds.
std::vector<std::pair<double, double>> everyPath(double overnight, const std::vector<PolicyMeeting>& meetings,
                                                 Date u) {
    std::vector<std::pair<double, double>> paths{{-overnight * forwright::dates::years(asOf, u), 1.0}};
    for (const PolicyMeeting& meeting : meetings) {
        if (meeting.date >= u) {
            continue;
        }
        std::vector<std::pair<double, double>> next;
        for (const auto& [log, odds] : paths) {
            for (const RateMove& move : meeting.moves) {
                next.emplace_back(log - move.by * forwright::dates::years(meeting.date, u),
                                  odds * move.probability);
            }
        }
        paths = next;
    }
    return paths;
}

std::vector<PolicyMeeting> meetingsOf(int count, int everyDays) {
    std::vector<PolicyMeeting> meetings;
    for (int k = 1; k <= count; ++k) {
        const double cut = 0.1 + 0.4 * k / count;
        meetings.push_back({afterDays(k * everyDays), {{-0.0025, cut}, {0.0, 0.7 - cut}, {0.0025, 0.3}}});
    }
    return meetings;
}

constexpr std::array<double, 7> levels{0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99};

double quantileOf(const CurvePtr& curve, Date u, double probability) {
    const auto quantiles = curve->random()->quantiles(u, std::array{probability});
    REQUIRE(quantiles.ok());
    return numeric::log(quantiles.value()[0].factor);
}

} // namespace

TEST_SUITE("discounting: policy meetings") {
    TEST_CASE("one meeting by hand: a half-year in force") {
        const CurvePtr curve =
            made(policyMeetings(asOf, 0.03, {{afterDays(365), {{-0.01, 0.25}, {0.02, 0.75}}}}));
        CHECK(curve->factor(asOf) == 1);
        checkRelative(curve->logFactor(afterDays(365)), -0.03, 1e-15);
        checkRelative(curve->factor(afterDays(730)),
                      std::exp(-0.06) * (0.25 * std::exp(0.01) + 0.75 * std::exp(-0.02)), 1e-15);
        checkRelative(curve->random()->meanLog(afterDays(730)), -0.06 - 0.0125, 1e-15);
        checkRelative(*curve->random()->varianceLog(afterDays(730)), 0.25 * 0.75 * 0.03 * 0.03, 1e-14);
        CHECK(curve->convention() ==
              "overnight rate continuous ACT/365.FIXED with 1 policy meeting, expected discount factor");
    }

    TEST_CASE("P, mean, variance and quantiles against the list of every path") {
        const std::vector<PolicyMeeting> meetings = meetingsOf(8, 45);
        const CurvePtr curve = made(policyMeetings(asOf, 0.03, meetings));
        for (const int days : {1, 45, 46, 200, 361, 700}) {
            const Date u = afterDays(days);
            const auto paths = everyPath(0.03, meetings, u);
            double factor = 0, mean = 0, square = 0;
            for (const auto& [log, odds] : paths) {
                factor += odds * std::exp(log);
                mean += odds * log;
            }
            for (const auto& [log, odds] : paths) {
                square += odds * (log - mean) * (log - mean);
            }
            checkRelative(curve->factor(u), factor, 1e-14);
            checkRelative(curve->random()->meanLog(u), mean, 1e-13);
            checkNear(*curve->random()->varianceLog(u), square, 1e-17);
            for (const double probability : levels) {
                checkNear(quantileOf(curve, u, probability), listed(paths, probability), 3e-16);
            }
            const auto law = curve->random()->law(u).value();
            double odds = 0;
            for (const auto& path : paths) {
                odds += path.first <= mean ? path.second : 0;
            }
            checkNear(law->probabilityAtMost(mean), odds, 1e-14);
        }
    }

    TEST_CASE("a probability that is just reached is reached: 0.3 + 0.35 + 0.1 is 0.75, though the sum "
              "rounds below it") {
        const CurvePtr curve = made(policyMeetings(
            asOf, 0.0, {{afterDays(1), {{-0.01, 0.25}, {0.0, 0.1}, {0.01, 0.35}, {0.02, 0.3}}}}));
        CHECK(0.3 + 0.35 + 0.1 < 0.75);
        checkNear(quantileOf(curve, afterDays(366), 0.75), 0, 3e-16);
        checkNear(quantileOf(curve, afterDays(366), 0.750001), 0.01, 3e-16);
        checkNear(quantileOf(curve, afterDays(366), 0.3), -0.02, 3e-16);
        checkNear(quantileOf(curve, afterDays(366), 0.300001), -0.01, 3e-16);
    }

    TEST_CASE("24 meetings of 3 moves have their quantiles, as a simulation with a printed seed sees them; "
              "too many have none") {
        const std::vector<PolicyMeeting> meetings = meetingsOf(24, 40);
        const CurvePtr curve = made(policyMeetings(asOf, 0.03, meetings));
        const Date u = afterDays(1000);
        std::mt19937_64 generator(20261201);
        MESSAGE("seed 20261201");
        std::vector<double> simulated(200000);
        for (double& log : simulated) {
            log = -0.03 * 1000 / 365;
            for (const PolicyMeeting& meeting : meetings) {
                double draw = static_cast<double>(generator() >> 11U) * 0x1p-53;
                std::size_t m = 0;
                while (m + 1 < meeting.moves.size() && draw >= meeting.moves[m].probability) {
                    draw -= meeting.moves[m++].probability;
                }
                log -= meeting.moves[m].by * forwright::dates::years(meeting.date, u);
            }
        }
        const auto law = curve->random()->law(u).value();
        for (const double probability : levels) {
            const double quantile = law->quantile(probability);
            const auto below = std::count_if(simulated.begin(), simulated.end(),
                                             [&](double log) { return log <= quantile; });
            checkNear(static_cast<double>(below) / 200000.0, probability,
                      5 * std::sqrt(probability * (1 - probability) / 200000));
            // It is the smallest that reaches the probability.
            CHECK(law->probabilityAtMost(quantile) >= probability - 1e-12);
            CHECK(law->probabilityAtMost(quantile - 1e-12) < probability);
        }
        std::vector<PolicyMeeting> many;
        for (int k = 1; k <= 60; ++k) {
            many.push_back({afterDays(10 * k), {{-0.0025 - 1e-5 * k, 0.3}, {0.0, 0.4}, {0.0025, 0.3}}});
        }
        const CurvePtr large = made(policyMeetings(asOf, 0.03, many));
        CHECK(std::isfinite(large->logFactor(u)));
        CHECK(codes(large->random()->quantiles(u, levels)) == "/meetings too-many-outcomes");
        CHECK(large->random()->quantiles(afterDays(200), levels).ok());
    }

    TEST_CASE("the tree of rates: ways that lead to one level meet, and odds multiply (by hand)") {
        const CurvePtr curve = made(policyMeetings(
            asOf, 0.02,
            {{afterDays(10), {{-0.0025, 0.3}, {0, 0.7}}}, {afterDays(50), {{-0.0025, 0.4}, {0, 0.6}}}}));
        const std::vector<RateLevels> tree = curve->random()->rateTree();
        REQUIRE(tree.size() == 3);
        CHECK(tree[0].from == asOf);
        CHECK(tree[1].from == afterDays(10));
        REQUIRE(tree[0].levels.size() == 1);
        CHECK(tree[0].levels[0].rate == 0.02);
        CHECK(tree[0].branches.empty());
        REQUIRE(tree[2].levels.size() == 3);
        const double rates[] = {0.015, 0.0175, 0.02};
        const double odds[] = {0.12, 0.46, 0.42};
        for (std::size_t i = 0; i < 3; ++i) {
            checkRelative(tree[2].levels[i].rate, rates[i], 1e-14);
            checkRelative(tree[2].levels[i].probability, odds[i], 1e-14);
        }
        REQUIRE(tree[2].branches.size() == 4);
        CHECK(tree[2].branches[0].from == 0);
        CHECK(tree[2].branches[0].to == 0);
        CHECK(tree[2].branches[1].to == 1);
        CHECK(tree[2].branches[2].from == 1);
        CHECK(tree[2].branches[2].to == 1);
        CHECK(tree[2].branches[2].by == -0.0025);
        CHECK(tree[2].branches[2].probability == 0.4);
    }

    TEST_CASE("a tree with more levels than anybody looks at is left out; every level's odds sum to 1") {
        std::vector<PolicyMeeting> meetings;
        for (int k = 1; k <= 8; ++k) { // no two moves add up to a third
            const double by = 0.001 * std::sqrt(k + 0.37);
            meetings.push_back({afterDays(30 * k), {{-by, 0.25}, {0, 0.5}, {by / 3, 0.25}}});
        }
        CHECK(made(policyMeetings(asOf, 0.02, meetings))->random()->rateTree().empty());
        meetings.resize(4);
        const auto tree = made(policyMeetings(asOf, 0.02, meetings))->random()->rateTree();
        REQUIRE(tree.size() == 5);
        for (const RateLevels& stage : tree) {
            CHECK(stage.levels.size() <= mostRateLevels);
            double sum = 0.0;
            for (const RateLevel& level : stage.levels) {
                sum += level.probability;
            }
            checkRelative(sum, 1.0, 1e-14);
        }
        CHECK(made(vasicek(asOf, {0.02, 0.1, 0.03, 0.01}))->random()->rateTree().empty());
    }

    TEST_CASE("a move that can't happen changes nothing, however large; equal moves are one") {
        const CurvePtr plain = made(policyMeetings(asOf, 0.03, {{afterDays(100), {{0.01, 1.0}}}}));
        const CurvePtr odd =
            made(policyMeetings(asOf, 0.03, {{afterDays(100), {{-10, 0.0}, {0.01, 0.5}, {0.01, 0.5}}}}));
        for (const int days : {50, 100, 101, 36500}) {
            checkNear(odd->logFactor(afterDays(days)), plain->logFactor(afterDays(days)),
                      1e-16 + 1e-15 * days / 365);
            checkNear(quantileOf(odd, afterDays(days), 0.5), plain->logFactor(afterDays(days)),
                      1e-16 + 1e-15 * days / 365);
        }
    }

    TEST_CASE("faults") {
        CHECK(codes(policyMeetings(asOf, 11,
                                   {{asOf, {}},
                                    {afterDays(5), {{-11, 0.5}, {0, 1.5}}},
                                    {afterDays(5), {{0, 0.5}, {0.01, 0.4}}},
                                    {afterDays(4), {{0, 1 + 2e-9}}}})) ==
              "/overnight out-of-range /meetings/0/date not-after-as-of /meetings/0/moves empty-list "
              "/meetings/1/moves/0/by out-of-range "
              "/meetings/1/moves/1/probability out-of-range /meetings/2/date not-rising /meetings/2/moves "
              "sum-not-one /meetings/3/date not-rising "
              "/meetings/3/moves/0/probability out-of-range");
        CHECK(made(policyMeetings(asOf, 0.01, {}))->logFactor(afterYears(1)) == -0.01);
        CHECK(
            codes(
                made(policyMeetings(asOf, 10, {{afterDays(1), {{10, 1}}}}))->review(afterYears(50)).faults) ==
            " not-finite");
    }
}

TEST_SUITE("discounting: scenarios") {
    TEST_CASE("two by hand") {
        const CurvePtr curve = made(scenarios(asOf, {{0.25, flatAt(0.02)}, {0.75, flatAt(0.06)}}));
        const Date u = afterYears(2);
        checkRelative(curve->factor(u), 0.25 * std::exp(-0.04) + 0.75 * std::exp(-0.12), 1e-15);
        checkRelative(curve->random()->meanLog(u), -0.25 * 0.04 - 0.75 * 0.12, 1e-15);
        checkRelative(*curve->random()->varianceLog(u), 0.25 * 0.75 * 0.08 * 0.08, 1e-14);
        checkRelative(quantileOf(curve, u, 0.75), -0.12, 1e-15);
        checkRelative(quantileOf(curve, u, 0.7501), -0.04, 1e-15);
        CHECK(curve->random()->quantileError() == 0);
        CHECK(curve->parameters()[1].at == "/scenarios/1/curve/rate");
        CHECK(curve->convention() == "2 weighted scenarios, expected discount factor");
    }

    TEST_CASE("equal curves are that curve, also far out where the plain mean would lose it") {
        const CurvePtr same = made(vasicek(asOf, {0.03, 0.1, 0.05, 0.01}));
        const CurvePtr curve = made(scenarios(asOf, {{0.1, same}, {0.2, same}, {0.7, same}}));
        for (const int days : {0, 1, 365, 10000, 36500}) {
            const Date u = afterDays(days);
            checkRelative(curve->logFactor(u), same->logFactor(u), 1e-15);
            checkRelative(curve->random()->meanLog(u), same->random()->meanLog(u), 1e-15);
            checkRelative(*curve->random()->varianceLog(u), *same->random()->varianceLog(u), 1e-12);
            for (const double probability : levels) {
                checkRelative(quantileOf(curve, u, probability), quantileOf(same, u, probability), 1e-10);
            }
        }
        const CurvePtr far = made(scenarios(asOf, {{0.5, flatAt(6.9)}, {0.5, flatAt(6.9)}}));
        checkRelative(far->logFactor(afterYears(100)), -690, 1e-15);
    }

    TEST_CASE("random scenarios: the quantile is where the mixed probabilities reach it") {
        const CurvePtr curve =
            made(scenarios(asOf, {{0.3, made(vasicek(asOf, {0.03, 0.1, 0.05, 0.02}))},
                                  {0.4, made(coxIngersollRoss(asOf, {0.05, 0.3, 0.02, 0.1}))},
                                  {0.1, made(policyMeetings(asOf, 0.02, meetingsOf(6, 50)))},
                                  {0.2, made(scenarios(asOf, {{0.5, flatAt(0.01)}, {0.5, flatAt(0.10)}}))}}));
        const Date u = afterYears(4);
        const auto law = curve->random()->law(u).value();
        for (const double probability : levels) {
            const double quantile = law->quantile(probability);
            CHECK(law->probabilityAtMost(quantile) >= probability - 1e-11);
            CHECK(law->probabilityAtMost(quantile - 1e-9) <= probability + 1e-11);
        }
        CHECK(curve->random()->quantileError() == 1e-9);
        CHECK(curve->random()->varianceLog(u).has_value());
        CHECK(curve->parameters().back().at == "/scenarios/3/curve/scenarios/1/curve/rate");
    }

    TEST_CASE("a scenario without weight has no say, however wild") {
        const CurvePtr curve = made(scenarios(asOf, {{0.0, flatAt(-0.99)}, {1.0, flatAt(0.05)}}));
        checkRelative(curve->logFactor(afterYears(60)), -3, 1e-15);
        checkRelative(quantileOf(curve, afterYears(60), 0.99), -3, 1e-15);
    }

    TEST_CASE("weights that miss 1 by the little allowed leave P(asOf) = 1") {
        const CurvePtr curve = made(scenarios(asOf, {{0.5, flatAt(0.05)}, {0.5 + 9e-10, flatAt(0.05)}}));
        CHECK(curve->factor(asOf) == 1);
        checkRelative(curve->logFactor(afterYears(10)), -0.5, 1e-15);
        checkRelative(quantileOf(curve, afterYears(10), 0.99), -0.5, 1e-15);
    }

    TEST_CASE("faults and notices come from below with their place") {
        CHECK(codes(scenarios(asOf, {})) == "/scenarios empty-list");
        CHECK(codes(scenarios(asOf, {{-0.1, flatAt(0)}, {0.5, flatAt(0)}})) ==
              "/scenarios/0/weight out-of-range");
        CHECK(codes(scenarios(asOf, {{0.6, flatAt(0)}, {0.5, flatAt(0)}})) == "/scenarios sum-not-one");
        Pillars points;
        points.quote = PillarQuote::factor;
        points.pillars = {{afterDays(10), 0.99}};
        const CurvePtr curve = made(scenarios(asOf, {{0.5, made(pillars(asOf, points))}, {0.5, flatAt(10)}}));
        CHECK(codes(curve->review(afterDays(11)).notices) ==
              "/scenarios/0/curve/pillars/0/at beyond-last-pillar");
        CHECK(codes(curve->review(afterYears(90)).faults) == "/scenarios/1/curve/rate not-finite");
        std::vector<Scenario> many(200, {1.0 / 200, made(coxIngersollRoss(asOf, {0.05, 0.3, 0.02, 0.1}))});
        const auto refused = made(scenarios(asOf, many))->random()->quantiles(afterYears(1), levels);
        CHECK(codes(refused) == "/scenarios too-many-outcomes");
        std::vector<PolicyMeeting> meetings;
        for (int k = 1; k <= 60; ++k) {
            meetings.push_back({afterDays(10 * k), {{-0.0025 - 1e-5 * k, 0.3}, {0.0, 0.4}, {0.0025, 0.3}}});
        }
        const CurvePtr nested = made(scenarios(asOf, {{1.0, made(policyMeetings(asOf, 0.03, meetings))}}));
        CHECK(codes(nested->random()->quantiles(afterYears(3), levels)) ==
              "/scenarios/0/curve/meetings too-many-outcomes");
        CHECK(
            codes(made(hullWhite(asOf, 0, 10, flatAt(0.05)))->random()->quantiles(afterYears(50), levels)) ==
            " not-finite");
        CHECK(codes(hullWhite(asOf, -1, 11, nested)) ==
              "/meanReversion out-of-range /volatility out-of-range /fit random-fit");
        CHECK(codes(hoLee(asOf, std::nan(""), flatAt(0))) == "/volatility out-of-range");
        CHECK(codes(made(hoLee(asOf, 0.01, made(pillars(asOf, points))))->review(afterDays(11)).notices) ==
              "/fit/pillars/0/at beyond-last-pillar");
        CHECK(codes(vasicek(asOf, {-1, -1, 11, 11})) ==
              "/r0 out-of-range /meanReversion out-of-range /longRun out-of-range /volatility out-of-range");
        CHECK(codes(coxIngersollRoss(asOf, {-0.01, 101, -0.01, std::nan("")})) ==
              "/r0 out-of-range /meanReversion out-of-range /longRun out-of-range /volatility out-of-range");
    }
}

TEST_SUITE("discounting: samples") {
    TEST_CASE("by hand: means at the dates, log-linear between, the last forward after") {
        const CurvePtr curve =
            made(samples(asOf, {{afterDays(100), afterDays(200)}, {0.99, 0.97, 0.97, 0.93}}));
        checkRelative(curve->factor(afterDays(100)), 0.98, 1e-15);
        checkRelative(curve->factor(afterDays(200)), 0.95, 1e-15);
        checkRelative(curve->factor(afterDays(50)), std::sqrt(0.98), 1e-15);
        checkRelative(curve->factor(afterDays(150)), std::sqrt(0.98 * 0.95), 1e-15);
        checkRelative(curve->factor(afterDays(300)), 0.95 * 0.95 / 0.98, 1e-15);
        checkRelative(curve->random()->meanLog(afterDays(200)), (std::log(0.97) + std::log(0.93)) / 2, 1e-15);
        CHECK(curve->random()->paths() == 2);
        CHECK_FALSE(curve->random()->varianceLog(afterDays(200)).has_value());
        CHECK(curve->parameters().empty());
        CHECK(curve->logFactorGradient(afterDays(1)).empty());
        CHECK(curve->review(afterDays(200)).notices.empty());
        CHECK(codes(curve->review(afterDays(201)).notices) == "/dates/1 beyond-last-date");
        CHECK(curve->convention() == "mean of 2 simulated paths, log-linear");
        // Linear in D between the order statistics 0.93 and 0.97.
        checkRelative(quantileOf(curve, afterDays(200), 0.25), std::log(0.94), 1e-14);
        checkNear(curve->random()->law(afterDays(200)).value()->probabilityAtMost(std::log(0.94)), 0.25,
                  1e-14);
    }

    TEST_CASE("quantiles of five values: positions p·(n − 1), as spreadsheets and R's default take them") {
        const CurvePtr curve = made(samples(asOf, {{afterDays(365)}, {0.95, 0.91, 0.99, 0.90, 0.97}}));
        const auto law = curve->random()->law(afterDays(365)).value();
        const auto factorAt = [&](double probability) {
            return numeric::exp(law->quantile(probability));
        };
        checkRelative(factorAt(0.5), 0.95, 1e-15);
        checkRelative(factorAt(0.25), 0.91, 1e-15);
        checkRelative(factorAt(0.9), 0.97 + 0.6 * 0.02, 1e-14);
        CHECK(law->probabilityAtMost(std::log(0.89)) == 0);
        CHECK(law->probabilityAtMost(0.0) == 1);
    }

    TEST_CASE("standard error of the mean and of a sum over whole paths") {
        // Two dates that move together: the sum of both has twice the deviation, the difference none.
        const CurvePtr curve = made(samples(
            asOf, {{afterDays(100), afterDays(200)}, {0.98, 0.97, 0.96, 0.95, 0.97, 0.96, 0.97, 0.96}}));
        const auto& random = *curve->random();
        const double deviation =
            std::sqrt((0.01 * 0.01 + 0.01 * 0.01) / 3); // mean 0.97 of 0.98, 0.96, 0.97, 0.97
        const auto error = [&](double first, double second) {
            return *random.standardError(std::array{afterDays(100), afterDays(200)},
                                         std::array{first, second});
        };
        checkRelative(error(1, 0), deviation / 2, 1e-12);
        checkRelative(error(1, 1), 2 * deviation / 2, 1e-12);
        checkNear(error(1, -1), 0, 3e-16);
        checkRelative(*random.standardError(std::array{afterDays(50)}, std::array{1.0}),
                      curve->factor(afterDays(50)) * 0.5 / 0.97 * deviation / 2, 1e-12);
        CHECK_FALSE(made(samples(asOf, {{afterDays(1)}, {0.9}}))
                        ->random()
                        ->standardError(std::array{afterDays(1)}, std::array{1.0})
                        .has_value());
        checkRelative(quantileOf(made(samples(asOf, {{afterDays(1)}, {0.9}})), afterDays(1), 0.3),
                      std::log(0.9), 1e-15);
    }

    TEST_CASE("held against a curve: the distance in standard errors, by hand, and a notice from three on") {
        // Factors 0.94, 0.95, 0.96: mean 0.95, deviation 0.01, standard error 0.01/√3.
        const auto heldAgainst = [](double rate) {
            return made(samples(asOf, {{afterDays(365)}, {0.94, 0.95, 0.96}, flatAt(rate)}));
        };
        const CurvePtr near = heldAgainst(0.05);
        const std::vector<SampleColumn> columns = near->random()->againstCurve();
        REQUIRE(columns.size() == 1);
        checkRelative(columns[0].mean, 0.95, 1e-15);
        checkRelative(*columns[0].standardError, 0.01 / std::sqrt(3.0), 1e-12);
        checkRelative(columns[0].factor, std::exp(-0.05), 1e-15);
        checkRelative(*columns[0].errors, (0.95 - std::exp(-0.05)) * std::sqrt(3.0) / 0.01, 1e-11);
        CHECK(near->review(afterDays(365)).notices.empty());
        const auto far = heldAgainst(0.08)->review(afterDays(365)).notices;
        REQUIRE(far.size() == 1);
        CHECK(far[0].code == "samples-disagree");
        CHECK(far[0].at == "/factors");
        // It is compared, never priced with.
        CHECK(near->factor(afterDays(200)) == heldAgainst(0.08)->factor(afterDays(200)));
        CHECK(
            made(samples(asOf, {{afterDays(1)}, {0.9}, flatAt(0.01)}))->random()->againstCurve()[0].errors ==
            std::nullopt);
    }

    TEST_CASE("the standard error is the spread of the mean over many simulations (printed seed, 400 of 500 "
              "paths)") {
        std::mt19937_64 generator(7);
        MESSAGE("seed 7");
        const auto uniform = [&] {
            return static_cast<double>(generator() >> 11U) * 0x1p-53;
        };
        double sum = 0, square = 0, claimed = 0;
        for (int run = 0; run < 400; ++run) {
            SamplePaths paths{{afterDays(365), afterDays(730)}, {}};
            for (int path = 0; path < 500; ++path) {
                const double first = 0.95 + 0.04 * uniform();
                paths.factors.push_back(first);
                paths.factors.push_back(first * (0.93 + 0.06 * uniform()));
            }
            const CurvePtr curve = made(samples(asOf, paths));
            const std::array<Date, 2> dates{afterDays(500), afterDays(900)};
            const std::array weights{1.5, -0.5};
            const double value = weights[0] * curve->factor(dates[0]) + weights[1] * curve->factor(dates[1]);
            sum += value;
            square += value * value;
            claimed += *curve->random()->standardError(dates, weights) / 400;
        }
        const double seen = std::sqrt((square - sum * sum / 400) / 399);
        checkRelative(claimed, seen, 0.15); // four standard errors of a deviation seen 400 times
    }

    TEST_CASE("faults") {
        CHECK(codes(samples(asOf, {{afterDays(1)}, {0.9}, made(vasicek(asOf, {0.02, 0.1, 0.03, 0.01}))})) ==
              "/against random-fit");
        CHECK(codes(samples(asOf, {})) == "/dates empty-list /factors empty-list");
        CHECK(codes(samples(asOf, {{asOf, afterDays(5), afterDays(5)}, {1, 0, -1, std::nan("")}})) ==
              "/dates/0 not-after-as-of /dates/2 not-rising /factors row-length /factors/0/1 not-positive "
              "/factors/0/2 not-positive /factors/1/0 not-positive");
        const auto all = samples(asOf, {{afterDays(1)}, std::vector<double>(150, -1.0)}).faults();
        CHECK(all.size() == 101);
        CHECK(all.back().at == "/factors");
        CHECK(codes(samples(asOf, {{afterDays(1)}, std::vector<double>(2000001, 1.0)})) ==
              "/factors too-many");
        CHECK(codes(made(samples(asOf, {{afterDays(1), afterDays(2)}, {1, 1e-10}}))
                        ->review(afterYears(1))
                        .faults) == " not-finite");
    }
}
