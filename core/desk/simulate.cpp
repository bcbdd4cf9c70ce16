#include "desk/simulate.hpp"

#include "discounting/mean_reversion.hpp"
#include "numeric/elementary.hpp"
#include "numeric/normal.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <map>

namespace forwright::desk {
namespace {

using discounting::BinCounts;
using discounting::Bins;
using discounting::BlockSums;
using discounting::Payments;
using discounting::Simulation;
using forward::Market;
using forward::Price;
using forward::Schedule;
using forward::Side;

constexpr const char* curvePlace = "/funding/curve";

/// A simulation of one deal, and what it is held against.
struct Deal {
    Schedule schedule;
    Price fair;
    Simulation simulation;
    Bins bins;
    outcome::Notices notices;
};

/// The dates on which the deal's cash flows, each with what flows: what the fair price is the ratio of.
Payments flowsOf(const Market& market, const Schedule& schedule, const Price& fair) {
    std::map<Date, double> byDate{{schedule.settlement, 0.0}};
    byDate[schedule.spot] += fair.spot * fair.units;
    for (const forward::CashInPrice& cash : fair.cash) {
        byDate[market.income.cash[cash.row].pay] -= cash.passed * cash.units;
    }
    Payments flows;
    for (const auto& [date, amount] : byDate) {
        if (date <= market.asOf) {
            flows.today += amount;
            continue;
        }
        if (date == schedule.settlement) {
            flows.target = flows.dates.size();
        }
        flows.dates.push_back(date);
        flows.weights.push_back(amount);
    }
    return flows;
}

/// Bins over all but one in a thousand of the outcomes, or four deviations of ln D each way where the law
/// can't be had.
Bins binsFor(const discounting::RandomDiscount& random, Date settlement) {
    constexpr double left = 0.0005;
    Bins bins;
    bins.count = simulationBins;
    const auto quantiles = random.quantiles(settlement, std::array{left, 1.0 - left});
    if (quantiles) {
        bins.low = quantiles.value()[0].factor;
        bins.high = quantiles.value()[1].factor;
        return bins;
    }
    const double mean = random.meanLog(settlement);
    const double reach = 4.0 * std::sqrt(random.varianceLog(settlement).value_or(1.0));
    bins.low = numeric::exp(std::max(mean - reach, -discounting::largestLogFactor));
    bins.high = numeric::exp(std::min(mean + reach, discounting::largestLogFactor));
    return bins;
}

outcome::Outcome<Deal> dealOf(const Market& market, const SimulationAsked& asked) {
    outcome::Faults faults;
    if (auto fault = asked.plan.refusal()) {
        faults.push_back(std::move(*fault));
    }
    const discounting::RandomDiscount* random = market.funding.curve->random();
    if (random == nullptr) {
        faults.push_back(
            {market.at + curvePlace, "not-random",
             "Nothing is random about this curve: give a random model, scenarios or samples to simulate."});
    }
    const outcome::Outcome<Schedule> schedule = forward::schedule(market, asked.maturity, "/maturity");
    outcome::append(faults, "", schedule.faults());
    if (!faults.empty()) {
        return faults;
    }
    if (schedule.value().settlement <= market.asOf) {
        return outcome::Fault{
            "/maturity", "nothing-to-discount",
            "The forward settles on the market's own date, where nothing is discounted: give a later "
            "maturity."};
    }
    outcome::Review found = forward::review(market, schedule.value());
    if (!found.faults.empty()) {
        return found.faults;
    }
    outcome::Outcome<Price> fair =
        forward::checked(market, forward::price(market, schedule.value(), Side::fair), Side::fair);
    if (!fair) {
        return fair.faults();
    }
    const Payments flows = flowsOf(market, schedule.value(), fair.value());
    const Bins bins = binsFor(*random, schedule.value().settlement);
    outcome::Outcome<Simulation> simulation =
        Simulation::make(*market.funding.curve, flows, asked.plan, bins);
    if (!simulation) {
        outcome::append(faults, market.at + curvePlace, simulation.faults());
        return faults;
    }
    return Deal{schedule.value(), fair.value(), std::move(simulation).value(), bins,
                std::move(found.notices)};
}

/// Whether working these blocks out at once would take too long.
std::optional<outcome::Fault> tooMuch(const Simulation& simulation, const BlockRange& range) {
    const double work = static_cast<double>(range.to - range.from) * simulation.workOf(range.from);
    if (work <= mostSimulationWork) {
        return std::nullopt;
    }
    return outcome::Fault{
        "", "too-much-work",
        "So many paths through so many dates and steps take too long at once: ask for fewer paths, or for "
        "a few blocks at a time."};
}

outcome::Outcome<SimulatedPart> partOf(const Market& market, const Deal& deal, const BlockRange& range) {
    if (auto fault = tooMuch(deal.simulation, range)) {
        return std::move(*fault);
    }
    SimulatedPart part;
    part.from = range.from;
    part.counts.assign(deal.bins.count + 2, 0);
    for (long block = range.from; block < range.to; ++block) {
        const BlockSums sums = deal.simulation.block(block, part.counts);
        if (!std::isfinite(sums.factorSquared) || !std::isfinite(sums.valueSquared) ||
            !std::isfinite(sums.product)) {
            return outcome::Fault{
                market.at + curvePlace, "not-finite",
                "Some paths' discount factors are beyond what a number holds: use smaller rates, a smaller "
                "volatility or a nearer maturity."};
        }
        part.sums.push_back(sums);
    }
    return part;
}

/// The ends of the bins, one more than there are.
std::vector<double> edgesOf(const Bins& bins) {
    std::vector<double> edges;
    for (std::size_t i = 0; i < bins.count; ++i) {
        edges.push_back(bins.low +
                        (bins.high - bins.low) * static_cast<double>(i) / static_cast<double>(bins.count));
    }
    edges.push_back(bins.high);
    return edges;
}

/// How many of `paths` outcomes the law of D(settlement) puts between neighbouring edges; nothing where it is
/// not known or where single outcomes have odds of their own, which a bin holds whole or not at all.
std::vector<double> lawCountsOf(const discounting::RandomDiscount& random, Date settlement,
                                const std::vector<double>& edges, long paths) {
    const auto law = random.law(settlement);
    if (!law || !law.value()->isContinuous()) {
        return {};
    }
    std::vector<double> counts;
    double below = law.value()->probabilityAtMost(numeric::log(edges.front()));
    for (std::size_t i = 1; i < edges.size(); ++i) {
        const double upTo = law.value()->probabilityAtMost(numeric::log(edges[i]));
        counts.push_back(static_cast<double>(paths) * std::max(0.0, upTo - below));
        below = upTo;
    }
    return counts;
}

/// Counts in parts of a path as whole paths, `paths` in all: what stands up to each bin's end is rounded, so
/// that no bin is off by more than one. Counts that come to nothing stay so.
BinCounts wholePaths(const BinCounts& counts, long paths) {
    double total = 0.0;
    for (const std::int64_t count : counts) {
        total += static_cast<double>(count);
    }
    BinCounts whole;
    double upTo = 0.0;
    std::int64_t before = 0;
    for (const std::int64_t count : counts) {
        upTo += static_cast<double>(count);
        const std::int64_t rounded =
            total > 0.0 ? std::llround(static_cast<double>(paths) * (upTo / total)) : 0;
        whole.push_back(rounded - before);
        before = rounded;
    }
    return whole;
}

/// Nothing where there is no error to measure by.
std::optional<double> errorsApart(double estimate, double closedForm, const std::optional<double>& error) {
    if (!error || !(*error > 0.0)) {
        return std::nullopt;
    }
    const double apart = (estimate - closedForm) / *error;
    return std::isfinite(apart) ? std::optional(apart) : std::nullopt;
}

// ---- the fan
// ---------------------------------------------------------------------------------------------------

constexpr std::array fanProbabilities{0.01, 0.05, 0.25, 0.50, 0.75, 0.95, 0.99};
constexpr int mostFanSteps = 24;
constexpr std::size_t fanPaths = 4096;

/// Dates from the market's to settlement, evenly spread.
std::vector<Date> fanDates(Date asOf, Date settlement) {
    const int days = dates::daysBetween(asOf, settlement);
    const int steps = std::min(days, mostFanSteps);
    std::vector<Date> all;
    for (int i = 1; i <= steps; ++i) {
        all.push_back(asOf + std::chrono::days{static_cast<int>(static_cast<long long>(days) * i / steps)});
    }
    return all;
}

/// The average rate over a step is normal: (∫r over it)/Δ, its variance what the step itself adds and what
/// the rate brings along.
RateFan exactFan(const discounting::RandomDiscount& random, const discounting::NormalRate& rate, Date asOf,
                 const std::vector<Date>& ends) {
    RateFan fan;
    fan.closedForm = true;
    Date from = asOf;
    for (const Date to : ends) {
        const double before = dates::years(asOf, from);
        const double over = dates::years(from, to);
        const double mean = (random.meanLog(from) - random.meanLog(to)) / over;
        // Var[r] = σ²(1 − e^(−2κt))/(2κ)
        const double varianceOfRate =
            rate.volatility * rate.volatility * discounting::reversionTime(2.0 * rate.meanReversion, before);
        const double carried = discounting::reversionTime(rate.meanReversion, over);
        const double deviation =
            std::sqrt(discounting::integralVariance(rate.meanReversion, rate.volatility, over) +
                      carried * carried * varianceOfRate) /
            over;
        RateStep step{from, to, {}};
        for (const double probability : fanProbabilities) {
            step.quantiles.push_back(mean + deviation * numeric::normalQuantile(probability));
        }
        fan.steps.push_back(std::move(step));
        from = to;
    }
    return fan;
}

/// Paths that are looked at: through the fan's dates.
outcome::Outcome<Simulation> fanSimulation(const discounting::Curve& curve,
                                           const discounting::SimulationPlan& plan,
                                           const std::vector<Date>& ends) {
    const Payments payments{ends, std::vector<double>(ends.size(), 0.0), ends.size() - 1, 0.0};
    return Simulation::make(curve, payments, plan, {});
}

/// So few paths show how far they spread where their first number is evenly spread.
discounting::SimulationPlan drawnPlan(std::uint64_t seed) {
    return {discounting::SimulationMethod::quasi, 2 * discounting::scramblings * drawnPaths, seed};
}

/// The average rate of each step of one path, from its ln D at the ends of the steps.
std::vector<double> ratesOf(const std::vector<std::vector<double>>& logs, std::size_t path, Date asOf,
                            const std::vector<Date>& ends) {
    std::vector<double> rates;
    Date from = asOf;
    double before = 0.0;
    for (std::size_t i = 0; i < ends.size(); ++i) {
        rates.push_back((before - logs[i][path]) / dates::years(from, ends[i]));
        before = logs[i][path];
        from = ends[i];
    }
    return rates;
}

/// From the first paths of the plan's own random numbers: the order statistic of each probability.
outcome::Outcome<RateFan> simulatedFan(const discounting::Curve& curve, std::uint64_t seed,
                                       const std::vector<Date>& ends) {
    const auto simulation = fanSimulation(
        curve, {discounting::SimulationMethod::pseudo, 2 * static_cast<long>(fanPaths), seed}, ends);
    if (!simulation) {
        return simulation.faults();
    }
    if (auto fault = tooMuch(simulation.value(), {0, 1})) {
        return std::move(*fault);
    }
    const std::vector<std::vector<double>> logs = simulation.value().firstPaths(fanPaths);
    RateFan fan;
    fan.paths = static_cast<long>(fanPaths);
    Date from = curve.asOf();
    std::vector<double> rates(fanPaths);
    for (std::size_t i = 0; i < ends.size(); ++i) {
        const double over = dates::years(from, ends[i]);
        for (std::size_t path = 0; path < fanPaths; ++path) {
            rates[path] = ((i == 0 ? 0.0 : logs[i - 1][path]) - logs[i][path]) / over;
        }
        std::sort(rates.begin(), rates.end());
        RateStep step{from, ends[i], {}};
        for (const double probability : fanProbabilities) {
            step.quantiles.push_back(
                rates[static_cast<std::size_t>(probability * static_cast<double>(fanPaths))]);
        }
        fan.steps.push_back(std::move(step));
        from = ends[i];
    }
    return fan;
}

outcome::Outcome<RateFan> fanOf(const discounting::Curve& curve, Date settlement, std::uint64_t seed) {
    const discounting::RandomDiscount& random = *curve.random();
    const std::vector<Date> ends = fanDates(curve.asOf(), settlement);
    const auto rate = random.normalRate();
    outcome::Outcome<RateFan> fan =
        rate ? outcome::Outcome<RateFan>(exactFan(random, *rate, curve.asOf(), ends))
             : simulatedFan(curve, seed, ends);
    if (!fan) {
        return fan;
    }
    RateFan whole = std::move(fan).value();
    whole.probabilities.assign(fanProbabilities.begin(), fanProbabilities.end());
    if (const auto simulation = fanSimulation(curve, drawnPlan(seed), ends)) {
        const std::vector<std::vector<double>> logs =
            simulation.value().firstPaths(static_cast<std::size_t>(drawnPaths));
        for (std::size_t path = 0; path < static_cast<std::size_t>(drawnPaths); ++path) {
            whole.drawn.push_back(ratesOf(logs, path, curve.asOf(), ends));
        }
    }
    return whole;
}

// ---- the whole
// -------------------------------------------------------------------------------------------------

std::vector<ForwardReckoned> reckonings(const Deal& deal, const forward::RandomView& view,
                                        const discounting::SimulationEstimate& estimate, double quantity) {
    const double fair = deal.fair.forward;
    const auto row = [&](const char* code, double forward) {
        ForwardReckoned reckoned{code, std::nullopt, std::nullopt, std::nullopt, std::nullopt};
        if (std::isfinite(forward)) {
            reckoned.forward = forward;
            reckoned.difference = forward - fair;
            reckoned.onQuantity = quantity * (forward - fair);
        }
        return reckoned;
    };
    ForwardReckoned simulated = row("simulated", estimate.price);
    if (estimate.priceError) {
        simulated.errorOnQuantity = quantity * *estimate.priceError;
    }
    return {row("closed-form", fair), std::move(simulated), row("average-rate", view.averageRateForward),
            row("path-by-path", estimate.meanRatio)};
}

/// What stands against the parts as they were handed in; their places are `/parts/…`.
outcome::Faults refusalOf(const Deal& deal, const std::vector<SimulatedPart>& parts) {
    const long blocks = deal.simulation.plan().blocks();
    outcome::Faults faults;
    std::vector<bool> taken(static_cast<std::size_t>(blocks), false);
    for (std::size_t i = 0; i < parts.size(); ++i) {
        const SimulatedPart& part = parts[i];
        const std::string at = "/parts/" + std::to_string(i);
        const long size = static_cast<long>(part.sums.size());
        if (part.from < 0 || size == 0 || size > blocks || part.from > blocks - size) {
            faults.push_back({at, "out-of-range",
                              "A part holds at least one of the " + std::to_string(blocks) +
                                  " blocks that this plan has."});
            continue;
        }
        bool again = false;
        for (long block = part.from; block < part.from + size; ++block) {
            again = again || taken[static_cast<std::size_t>(block)];
            taken[static_cast<std::size_t>(block)] = true;
        }
        if (again) {
            faults.push_back(
                {at, "overlap", "This part holds a block that one before it holds: hand each in once."});
        }
        if (part.counts.size() != deal.bins.count + 2) {
            faults.push_back(
                {at + "/counts", "row-length",
                 "There are " + std::to_string(deal.bins.count + 2) + " counts: below, in each bin, above."});
        }
    }
    return faults;
}

outcome::Outcome<Simulated> wholeOf(const Market& market, const SimulationAsked& asked, Deal deal,
                                    std::vector<SimulatedPart> parts) {
    std::sort(parts.begin(), parts.end(),
              [](const SimulatedPart& one, const SimulatedPart& other) { return one.from < other.from; });
    Simulated result;
    BinCounts counts(deal.bins.count + 2, 0);
    std::vector<long> indices;
    std::vector<BlockSums> sums;
    for (const SimulatedPart& part : parts) {
        long block = part.from;
        for (const BlockSums& one : part.sums) {
            indices.push_back(block++);
            sums.push_back(one);
        }
        for (std::size_t bin = 0; bin < counts.size(); ++bin) {
            counts[bin] += part.counts[bin];
        }
    }
    result.estimate = deal.simulation.estimate(indices, sums);
    result.counts = wholePaths(counts, result.estimate.paths);
    if (result.estimate.priceError) {
        const double reach = result.estimate.reach95 * *result.estimate.priceError;
        result.interval95 = {result.estimate.price - reach, result.estimate.price + reach};
    }
    result.closedForm = {deal.fair.settlementFactor, deal.fair.forward};
    result.apart = {
        errorsApart(result.estimate.factor, result.closedForm.factor, result.estimate.factorError),
        errorsApart(result.estimate.price, result.closedForm.forward, result.estimate.priceError)};
    result.pathBias = market.funding.curve->random()->pathBias();
    result.blocksDone = static_cast<long>(sums.size());
    result.blocks = deal.simulation.plan().blocks();
    result.bins = deal.bins;
    result.edges = edgesOf(deal.bins);
    result.lawCounts = lawCountsOf(*market.funding.curve->random(), deal.schedule.settlement, result.edges,
                                   result.estimate.paths);
    const auto view = forward::randomView(market, deal.schedule, deal.fair);
    result.averageRateFactor = view->averageRateFactor;
    result.forwards = reckonings(deal, *view, result.estimate, asked.quantity);
    result.notices = std::move(deal.notices);
    if (discounting::isCarriedByFew(*market.funding.curve->random(), deal.schedule.settlement,
                                    asked.plan.paths)) {
        result.notices.push_back(
            {market.at + curvePlace, "rare-paths",
             "Discount factors spread so widely that their mean hangs on paths rarer than are simulated: "
             "the estimate is likely off by more than its standard error; trust the closed form."});
    }
    if (asked.fan) {
        outcome::Outcome<RateFan> fan =
            fanOf(*market.funding.curve, deal.schedule.settlement, asked.plan.seed);
        if (fan) {
            result.fan = std::move(fan).value();
        } else {
            outcome::append(result.notices, market.at + curvePlace, fan.faults());
        }
    }
    result.schedule = std::move(deal.schedule);
    return result;
}

} // namespace

outcome::Outcome<Simulated> simulate(const Market& market, const SimulationAsked& asked) {
    outcome::Outcome<Deal> deal = dealOf(market, asked);
    if (!deal) {
        return deal.faults();
    }
    outcome::Outcome<SimulatedPart> all = partOf(market, deal.value(), {0, asked.plan.blocks()});
    if (!all) {
        return all.faults();
    }
    return wholeOf(market, asked, std::move(deal).value(), {std::move(all).value()});
}

outcome::Outcome<Simulated> combine(const Market& market, const SimulationAsked& asked,
                                    std::vector<SimulatedPart> parts) {
    outcome::Outcome<Deal> deal = dealOf(market, asked);
    if (!deal) {
        return deal.faults();
    }
    if (outcome::Faults faults = refusalOf(deal.value(), parts); !faults.empty()) {
        return faults;
    }
    return wholeOf(market, asked, std::move(deal).value(), std::move(parts));
}

outcome::Outcome<SimulatedPart> simulateBlocks(const Market& market, const SimulationAsked& asked,
                                               const BlockRange& range) {
    outcome::Outcome<Deal> deal = dealOf(market, asked);
    if (!deal) {
        return deal.faults();
    }
    const long blocks = asked.plan.blocks();
    if (range.from < 0 || range.from >= range.to || range.to > blocks) {
        return outcome::Fault{"/blocks", "out-of-range",
                              "This plan has the blocks 0 to " + std::to_string(blocks) +
                                  ", the last itself not among them: give from below to, both within."};
    }
    return partOf(market, deal.value(), range);
}

} // namespace forwright::desk
