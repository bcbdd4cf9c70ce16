#include "discounting/simulation.hpp"

#include "numeric/elementary.hpp"
#include "numeric/lanes.hpp"
#include "numeric/philox.hpp"
#include "numeric/sobol.hpp"

#include <algorithm>
#include <array>
#include <bit>
#include <cassert>
#include <cmath>
#include <limits>

namespace forwright::discounting {

namespace lanes = numeric::lanes;
using lanes::Lanes;

namespace {

/// The sum of a block's terms, four running side by side.
class LaneSum {
  public:
    void add(Lanes terms) { sum_ += terms; }
    [[nodiscard]] double total() const { return (sum_[0] + sum_[1]) + (sum_[2] + sum_[3]); }

  private:
    Lanes sum_ = lanes::all(0.0);
};

bool isQuasi(const SimulationPlan& plan) {
    return plan.method == SimulationMethod::quasi;
}

/// Blocks of one scrambling.
long blocksEach(const SimulationPlan& plan) {
    return std::max(plan.paths / scramblings / blockPaths, 1L);
}

/// Blocks take turns among the scramblings, so that the first blocks tell something of the error already.
long scramblingOf(long block) {
    return block % scramblings;
}

/// A point that lies where the word says, set closer to the ends: u = 3v² − 2v³, worked out from the nearer
/// end, so that complements stay complements.
struct Stretched {
    std::uint32_t word = 0;
    double weight = 1.0; ///< du/dv
};
Stretched stretched(std::uint32_t word) {
    constexpr std::uint32_t middle = 1U << 31U;
    const std::uint32_t fromEnd = word < middle ? word : ~word;
    const double v = (static_cast<double>(fromEnd) + 0.5) * 0x1p-32;
    const auto moved = static_cast<std::uint32_t>(v * v * (3.0 - 2.0 * v) * 0x1p32);
    return {word < middle ? moved : ~moved, 6.0 * v * (1.0 - v)};
}

/// What a mean over pairs tells of itself.
struct Spread {
    double weight = 0.0;
    double factor = 0.0; ///< means
    double value = 0.0;
};

double squareOf(double x) {
    return x * x;
}

/// The 97.5 % quantiles of the normal law and of Student's with 1, 2, … degrees of freedom (tables of every
/// statistics textbook; tested against Boost.Math).
constexpr double normalReach95 = 1.959963984540054;
double studentReach95(std::size_t freedom) {
    constexpr std::array reach{12.706204736, 4.302652730, 3.182446305, 2.776445105, 2.570581836,
                               2.446911851,  2.364624252, 2.306004135, 2.262157163, 2.228138852,
                               2.200985160,  2.178812830, 2.160368656, 2.144786688, 2.131449546};
    static_assert(reach.size() == static_cast<std::size_t>(scramblings) - 1);
    return reach[freedom - 1];
}

} // namespace

std::string_view nameOf(SimulationMethod method) {
    return method == SimulationMethod::pseudo ? "pseudo" : "quasi";
}

std::optional<outcome::Fault> SimulationPlan::refusal() const {
    const long fewest = method == SimulationMethod::pseudo ? 4 : 2 * scramblings;
    if (paths < fewest || paths > mostPaths) {
        return outcome::Fault{"/paths", "out-of-range",
                              "The number of paths has to be from " + std::to_string(fewest) + " to " +
                                  std::to_string(mostPaths) + "."};
    }
    if (method == SimulationMethod::pseudo) {
        return paths % 2 == 0 ? std::nullopt
                              : std::optional(outcome::Fault{
                                    "/paths", "not-even",
                                    "Paths come in antithetic pairs: their number has to be even, as " +
                                        std::to_string(paths + 1) + " is."});
    }
    const auto each = static_cast<unsigned long>(paths / scramblings);
    if (paths % scramblings != 0 || !std::has_single_bit(each)) {
        const auto below = static_cast<long>(std::bit_floor(each)) * scramblings;
        return outcome::Fault{"/paths", "not-a-power-of-two",
                              "Quasi-random paths have to be a power of two, as " + std::to_string(below) +
                                  " and " + std::to_string(std::min(2 * below, mostPaths)) + " are."};
    }
    return std::nullopt;
}

long SimulationPlan::blocks() const {
    return isQuasi(*this) ? scramblings * blocksEach(*this) : (paths + blockPaths - 1) / blockPaths;
}

long SimulationPlan::pathsIn(long block) const {
    return isQuasi(*this) ? paths / blocks() : std::min(paths - block * blockPaths, blockPaths);
}

bool isCarriedByFew(const RandomDiscount& random, Date u, long paths) {
    return 4.0 * random.varianceLog(u).value_or(0.0) > numeric::log(static_cast<double>(paths));
}

/// What one tile is made of, and what is read off it.
struct Simulation::Tile {
    std::vector<std::uint32_t> words;
    std::vector<double> logFactors;
    std::vector<double> weight;               ///< by path; 0 beyond those that are asked for
    std::vector<double> factor, value, ratio; ///< by path, less what is expected
    BinCounts* counts = nullptr;
};

outcome::Outcome<Simulation> Simulation::make(const Curve& curve, const Payments& payments,
                                              const SimulationPlan& plan, const Bins& bins) {
    assert(!payments.dates.empty() && payments.dates.front() > curve.asOf());
    assert(payments.weights.size() == payments.dates.size() && payments.target < payments.dates.size());
    if (auto fault = plan.refusal()) {
        return std::move(*fault);
    }
    if (curve.random() == nullptr) {
        return outcome::Fault{"", "not-random", "This curve is not random: there is nothing to simulate."};
    }
    outcome::Outcome<PathMakerPtr> maker = curve.random()->pathMaker(payments.dates, payments.target);
    if (!maker) {
        return maker.faults();
    }
    Simulation simulation;
    simulation.plan_ = plan;
    simulation.payments_ = payments;
    simulation.bins_ = bins;
    simulation.maker_ = std::move(maker).value();
    simulation.expectedFactor_ = curve.factor(payments.dates[payments.target]);
    simulation.expectedValue_ = payments.today;
    for (std::size_t i = 0; i < payments.dates.size(); ++i) {
        simulation.expectedValue_ += payments.weights[i] * curve.factor(payments.dates[i]);
    }
    return simulation;
}

double Simulation::workOf(long index) const {
    const double word = isQuasi(plan_) ? 10.0 : 4.0;
    const double each = word * static_cast<double>(maker_->numbers()) + 4.0 * maker_->work() +
                        5.0 * static_cast<double>(payments_.dates.size());
    return each * static_cast<double>(plan_.pathsIn(index));
}

/// The words of the terms from `term` on, a whole tile of them: as in the counter {four terms, number,
/// stream, 0}.
void Simulation::fillWords(long block, long term, Tile& tile) const {
    const numeric::PhiloxKey key = numeric::philoxKey(plan_.seed);
    const auto first = static_cast<std::uint32_t>(term);
    const std::size_t evenNumbers =
        isQuasi(plan_) ? std::min(maker_->numbers(), numeric::sobolDimensions) : 0;
    const auto stream = isQuasi(plan_) ? static_cast<std::uint32_t>(1 + scramblingOf(block)) : 0U;
    for (std::size_t number = 0; number < maker_->numbers(); ++number) {
        std::uint32_t* const to = &tile.words[number * tilePaths];
        if (number < evenNumbers) {
            numeric::OwenScrambling(plan_.seed, number, stream).points(number, first, tilePaths, to);
        } else {
            numeric::philoxWords({first / 4, static_cast<std::uint32_t>(number), stream, 0}, key,
                                 tilePaths / 4, to);
        }
    }
}

/// The weights of a tile's paths, 1 each, or, where their first number is unbounded and evenly spread, its
/// points stretched.
void Simulation::weigh(Tile& tile, std::size_t count) const {
    std::fill(tile.weight.begin(), tile.weight.end(), 0.0);
    if (!isQuasi(plan_) || !maker_->firstIsUnbounded()) {
        std::fill_n(tile.weight.begin(), count, 1.0);
        return;
    }
    for (std::size_t path = 0; path < count; ++path) {
        const Stretched point = stretched(tile.words[path]);
        tile.words[path] = point.word;
        tile.weight[path] = point.weight;
    }
}

/// Factor, value and ratio of each path from its ln D; those beyond `count` are 0.
void Simulation::measure(Tile& tile, std::size_t count) const {
    const double expectedRatio = expectedValue_ / expectedFactor_;
    for (std::size_t path = 0; path < count; path += lanes::count) {
        Lanes value = lanes::all(payments_.today - expectedValue_);
        Lanes settled = lanes::all(0.0);
        for (std::size_t date = 0; date < payments_.dates.size(); ++date) {
            const Lanes factor = lanes::exp(lanes::load(&tile.logFactors[date * tilePaths + path]));
            value += payments_.weights[date] * factor;
            if (date == payments_.target) {
                settled = factor;
            }
        }
        lanes::store(settled, &tile.factor[path]);
        lanes::store(value, &tile.value[path]);
        lanes::store((value + expectedValue_) / settled - expectedRatio, &tile.ratio[path]);
    }
    const double binsPerUnit =
        bins_.high > bins_.low ? static_cast<double>(bins_.count) / (bins_.high - bins_.low) : 0.0;
    const auto last = static_cast<double>(bins_.count - 1);
    for (std::size_t path = 0; path < count; ++path) {
        const double factor = tile.factor[path];
        std::size_t bin = 0;
        if (factor > bins_.high) {
            bin = bins_.count + 1;
        } else if (factor >= bins_.low) {
            bin = 1 + static_cast<std::size_t>(std::min((factor - bins_.low) * binsPerUnit, last));
        }
        (*tile.counts)[bin] +=
            static_cast<std::int64_t>(tile.weight[path] * static_cast<double>(countsAPath) + 0.5);
        tile.factor[path] = factor - expectedFactor_;
    }
    for (std::size_t path = count; path < lanes::count * ((count + lanes::count - 1) / lanes::count);
         ++path) {
        tile.factor[path] = 0.0;
        tile.value[path] = 0.0;
        tile.ratio[path] = 0.0;
    }
}

BlockSums Simulation::block(long index, BinCounts& counts) const {
    assert(index >= 0 && index < plan_.blocks() && counts.size() == bins_.count + 2);
    const long terms = plan_.pathsIn(index) / 2;
    const long first = isQuasi(plan_) ? index / scramblings * terms : index * (blockPaths / 2);

    Tile tile;
    tile.words.resize(maker_->numbers() * tilePaths);
    tile.logFactors.resize(payments_.dates.size() * tilePaths);
    tile.weight.resize(tilePaths);
    tile.factor.resize(tilePaths);
    tile.value.resize(tilePaths);
    tile.ratio.resize(tilePaths);
    tile.counts = &counts;
    std::vector<double> factors(tilePaths, 0.0);
    std::vector<double> values(tilePaths, 0.0);

    LaneSum weight, factor, value, factorSquared, product, valueSquared, ratio;
    for (long done = 0; done < terms; done += static_cast<long>(tilePaths)) {
        const auto count = static_cast<std::size_t>(std::min(terms - done, static_cast<long>(tilePaths)));
        fillWords(index, first + done, tile);
        weigh(tile, count);
        maker_->make(tile.words.data(), count, tile.logFactors.data());
        measure(tile, count);
        factors.swap(tile.factor);
        values.swap(tile.value);
        for (std::size_t path = 0; path < count; path += lanes::count) {
            ratio.add(lanes::load(&tile.weight[path]) * lanes::load(&tile.ratio[path]));
        }
        maker_->mirror(tile.words.data(), count, tile.logFactors.data());
        measure(tile, count);
        for (std::size_t path = 0; path < count; path += lanes::count) {
            const Lanes w = lanes::load(&tile.weight[path]);
            const Lanes x = 0.5 * (lanes::load(&tile.factor[path]) + lanes::load(&factors[path]));
            const Lanes y = 0.5 * (lanes::load(&tile.value[path]) + lanes::load(&values[path]));
            const Lanes wx = w * x;
            const Lanes wy = w * y;
            weight.add(w);
            factor.add(wx);
            value.add(wy);
            factorSquared.add(wx * x);
            product.add(wx * y);
            valueSquared.add(wy * y);
            ratio.add(w * lanes::load(&tile.ratio[path]));
        }
    }
    return {weight.total(),  factor.total(),       value.total(), factorSquared.total(),
            product.total(), valueSquared.total(), ratio.total()};
}

SimulationEstimate Simulation::estimate(std::span<const long> indices,
                                        std::span<const BlockSums> sums) const {
    assert(indices.size() == sums.size() && !sums.empty());
    BlockSums all;
    SimulationEstimate estimate;
    std::vector<Spread> bySet(static_cast<std::size_t>(scramblings));
    for (std::size_t i = 0; i < sums.size(); ++i) {
        const BlockSums& block = sums[i];
        all.weight += block.weight;
        all.factor += block.factor;
        all.value += block.value;
        all.factorSquared += block.factorSquared;
        all.product += block.product;
        all.valueSquared += block.valueSquared;
        all.ratio += block.ratio;
        const long paths = plan_.pathsIn(indices[i]);
        estimate.paths += paths;
        Spread& set = bySet[static_cast<std::size_t>(scramblingOf(indices[i]))];
        set.weight += block.weight;
        set.factor += block.factor;
        set.value += block.value;
    }
    const double weight = all.weight;
    const double factorMean = all.factor / weight;
    const double valueMean = all.value / weight;
    estimate.factor = expectedFactor_ + factorMean;
    estimate.price = (expectedValue_ + valueMean) / estimate.factor;
    estimate.meanRatio = expectedValue_ / expectedFactor_ + all.ratio / (2.0 * weight);

    // The price moves with the means of factor and value by (dy − price·dx)/factor.
    double factorVariance = 0.0;
    double priceVariance = 0.0;
    double independent = 0.0;
    if (isQuasi(plan_)) {
        for (const Spread& set : bySet) {
            if (set.weight > 0.0) {
                const double share = set.weight / weight;
                const double x = set.factor / set.weight - factorMean;
                const double y = set.value / set.weight - valueMean;
                independent += 1.0;
                factorVariance += squareOf(share * x);
                priceVariance += squareOf(share * (y - estimate.price * x));
            }
        }
        factorVariance *= independent / (independent - 1.0);
        priceVariance *= independent / (independent - 1.0);
    } else {
        independent = weight;
        const double xx = all.factorSquared / weight - squareOf(factorMean);
        const double xy = all.product / weight - factorMean * valueMean;
        const double yy = all.valueSquared / weight - squareOf(valueMean);
        factorVariance = xx / (independent - 1.0);
        priceVariance =
            (yy - 2.0 * estimate.price * xy + squareOf(estimate.price) * xx) / (independent - 1.0);
    }
    if (independent > 1.0) {
        estimate.reach95 =
            isQuasi(plan_) ? studentReach95(static_cast<std::size_t>(independent) - 1) : normalReach95;
        estimate.factorError = std::sqrt(std::max(factorVariance, 0.0));
        estimate.priceError = std::sqrt(std::max(priceVariance, 0.0)) / estimate.factor;
    }
    return estimate;
}

std::vector<std::vector<double>> Simulation::firstPaths(std::size_t count) const {
    std::vector<std::vector<double>> byDate(payments_.dates.size());
    Tile tile;
    tile.words.resize(maker_->numbers() * tilePaths);
    tile.logFactors.resize(payments_.dates.size() * tilePaths);
    for (std::size_t done = 0; done < count; done += tilePaths) {
        const std::size_t here = std::min(count - done, tilePaths);
        fillWords(0, static_cast<long>(done), tile);
        maker_->make(tile.words.data(), here, tile.logFactors.data());
        for (std::size_t date = 0; date < byDate.size(); ++date) {
            const double* const row = &tile.logFactors[date * tilePaths];
            byDate[date].insert(byDate[date].end(), row, row + here);
        }
    }
    return byDate;
}

} // namespace forwright::discounting
