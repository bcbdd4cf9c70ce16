#pragma once

#include "discounting/simulation.hpp"
#include "forward/quote.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <string>
#include <vector>

namespace forwright::desk {

using dates::Date;

/// A run of blocks: `from` and those after it, `to` itself not among them.
struct BlockRange {
    long from = 0;
    long to = 0;
};

/// What a run of blocks came to: the sums of each, and the outcomes of all by bin.
struct SimulatedPart {
    long from = 0;
    std::vector<discounting::BlockSums> sums;
    discounting::BinCounts counts;
};

struct SimulationAsked {
    forward::Maturity maturity;
    double quantity = 1.0;
    discounting::SimulationPlan plan;
    bool fan = true; ///< whether the rates over time are asked for
};

/// One number got in two ways.
struct FactorAndForward {
    double factor = 0.0;  ///< E[D(T_s)]
    double forward = 0.0; ///< F
};

/// The fair forward by one way of reckoning.
struct ForwardReckoned {
    std::string code; ///< `closed-form`, `simulated`, `average-rate`, `path-by-path`
    std::optional<double> forward;
    std::optional<double> difference;      ///< from the closed form, a unit
    std::optional<double> onQuantity;      ///< the difference times the quantity
    std::optional<double> errorOnQuantity; ///< the standard error times the quantity, where simulated
};

/// How far the estimate lies from the closed form, in standard errors; none where there is no error to
/// measure by.
struct ErrorsApart {
    std::optional<double> factor;
    std::optional<double> forward;
};

/// The average short rate over a step of time, as it spreads over the paths.
struct RateStep {
    Date from;
    Date to;
    std::vector<double> quantiles; ///< at the fan's probabilities
};
struct RateFan {
    bool closedForm = false; ///< exact; else from the first `paths` paths
    long paths = 0;
    std::vector<double> probabilities;
    std::vector<RateStep> steps;
    std::vector<std::vector<double>> drawn; ///< some single paths' rates, one a step, to be looked at
};

/// What random discounting comes to by simulation, beside the closed form.
struct Simulated {
    forward::Schedule schedule;
    discounting::SimulationEstimate estimate;
    std::optional<income::TwoWay<double>> interval95; ///< of the forward, around the estimate: low, high
    FactorAndForward closedForm;
    ErrorsApart apart;
    double averageRateFactor = 0.0; ///< e^(E[ln D(T_s)]), beside the closed form
    double pathBias =
        0.0; ///< relative bound of how far the mean factor can be off however many paths there are
    long blocksDone = 0;
    long blocks = 0;
    discounting::Bins bins;
    /// Outcomes below the bins, in each, above them: whole paths, which add up to all; where paths weigh
    /// unalike, as many as their weights come to.
    discounting::BinCounts counts;
    std::vector<double> edges;     ///< of the bins, one more than there are
    std::vector<double> lawCounts; ///< how many of so many paths the law puts into each bin, where it is
                                   ///< known and has no single points
    std::vector<ForwardReckoned> forwards;
    std::optional<RateFan> fan;
    outcome::Notices notices;
};

/// How long one request may take, about a nanosecond each; more is refused (`too-much-work`): ask for fewer
/// blocks at a time.
inline constexpr double mostSimulationWork = 1e10;
/// How many outcomes of D(T_s) are told apart.
inline constexpr std::size_t simulationBins = 40;
/// How many single paths a fan draws: a power of two.
inline constexpr long drawnPaths = 8;

/// Simulates the fair forward: spot and every distribution that counts are discounted along the same paths.
/// All blocks, or the parts handed in that together hold each block at most once (`overlap`, `out-of-range`).
[[nodiscard]] outcome::Outcome<Simulated> simulate(const forward::Market& market,
                                                   const SimulationAsked& asked);
[[nodiscard]] outcome::Outcome<Simulated> combine(const forward::Market& market, const SimulationAsked& asked,
                                                  std::vector<SimulatedPart> parts);
/// The sums of some blocks only, to be combined: whoever works them out, and in whatever order, the result is
/// the same to the last bit.
[[nodiscard]] outcome::Outcome<SimulatedPart>
simulateBlocks(const forward::Market& market, const SimulationAsked& asked, const BlockRange& blocks);

} // namespace forwright::desk
