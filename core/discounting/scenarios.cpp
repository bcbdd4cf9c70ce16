#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "discounting/laws.hpp"
#include "discounting/path_makers.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>

namespace forwright::discounting {

namespace {

/// The first word says which scenario, the others make a path of it; scenarios share their words.
class ScenarioPaths final : public PathMaker {
  public:
    ScenarioPaths(std::vector<double> upTo, std::vector<PathMakerPtr> makers, std::size_t dates)
        : upTo_(std::move(upTo)), makers_(std::move(makers)), dates_(dates) {
        for (const PathMakerPtr& maker : makers_) {
            longest_ = std::max(longest_, maker->numbers());
            work_ = std::max(work_, maker->work());
        }
    }

    [[nodiscard]] std::size_t numbers() const override { return 1 + longest_; }
    [[nodiscard]] double work() const override {
        // Of each scenario whole lanes are made, however few paths it has in a tile.
        const double parts = static_cast<double>(std::min(makers_.size(), tilePaths));
        return 3.0 +
               (work_ + static_cast<double>(longest_)) * (1.0 + 4.0 * parts / static_cast<double>(tilePaths));
    }

    void make(const std::uint32_t* words, std::size_t count, double* logFactors) const override {
        std::vector<std::vector<std::size_t>> pathsOf(makers_.size());
        std::vector<std::size_t> met;
        for (std::size_t path = 0; path < count; ++path) {
            const auto found = std::lower_bound(upTo_.begin(), upTo_.end(), detail::evenly(words[path]));
            const auto scenario = static_cast<std::size_t>(found - upTo_.begin());
            if (pathsOf[scenario].empty()) {
                met.push_back(scenario);
            }
            pathsOf[scenario].push_back(path);
        }
        std::vector<std::uint32_t> own(longest_ * tilePaths);
        std::vector<double> made(dates_ * tilePaths);
        for (const std::size_t scenario : met) {
            const std::vector<std::size_t>& paths = pathsOf[scenario];
            const PathMaker& maker = *makers_[scenario];
            for (std::size_t number = 0; number < maker.numbers(); ++number) {
                for (std::size_t i = 0; i < paths.size(); ++i) {
                    own[number * tilePaths + i] = words[(1 + number) * tilePaths + paths[i]];
                }
            }
            maker.make(own.data(), paths.size(), made.data());
            for (std::size_t date = 0; date < dates_; ++date) {
                for (std::size_t i = 0; i < paths.size(); ++i) {
                    logFactors[date * tilePaths + paths[i]] = made[date * tilePaths + i];
                }
            }
        }
    }

  private:
    std::vector<double> upTo_; ///< the weight of each scenario and those before it
    std::vector<PathMakerPtr> makers_;
    std::size_t dates_;
    std::size_t longest_ = 0; ///< the most words that a scenario takes
    double work_ = 0.0;
};

class ScenarioCurve final : public Curve, public RandomDiscount {
  public:
    ScenarioCurve(Date asOf, const std::vector<Scenario>& all) : Curve(asOf) {
        double total = 0.0;
        for (const Scenario& scenario : all) {
            total += scenario.weight;
        }
        for (const Scenario& scenario : all) {
            weights_.push_back(scenario.weight / total);
            curves_.push_back(scenario.curve);
        }
    }

    [[nodiscard]] double logFactor(Date u) const override {
        return detail::logOfMean(weights_, logFactors(u));
    }

    [[nodiscard]] std::vector<Parameter> parameters() const override {
        std::vector<Parameter> all;
        for (std::size_t s = 0; s < curves_.size(); ++s) {
            for (Parameter& parameter : curves_[s]->parameters()) {
                parameter.at = placeOf(s) + parameter.at;
                all.push_back(std::move(parameter));
            }
        }
        return all;
    }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        const std::vector<double> logs = logFactors(u);
        const double log = detail::logOfMean(weights_, logs);
        std::vector<double> gradient;
        for (std::size_t s = 0; s < curves_.size(); ++s) {
            const double share = weights_[s] > 0.0 ? weights_[s] * numeric::exp(logs[s] - log) : 0.0;
            for (const double slope : curves_[s]->logFactorGradient(u)) {
                gradient.push_back(share * slope);
            }
        }
        return gradient;
    }

    /// The mean lies between the smallest and the largest of its parts: where they are fit, it is.
    [[nodiscard]] outcome::Review review(Date last) const override {
        outcome::Review review;
        for (std::size_t s = 0; s < curves_.size(); ++s) {
            outcome::Review below = curves_[s]->review(last);
            outcome::append(review.faults, placeOf(s), std::move(below.faults));
            outcome::append(review.notices, placeOf(s), std::move(below.notices));
        }
        return review;
    }

    [[nodiscard]] std::string convention() const override {
        return std::to_string(curves_.size()) + (curves_.size() == 1 ? " scenario" : " weighted scenarios") +
               ", expected discount factor";
    }

    [[nodiscard]] const RandomDiscount* random() const override { return this; }

    [[nodiscard]] double meanLog(Date u) const override {
        double sum = 0.0;
        for (std::size_t s = 0; s < curves_.size(); ++s) {
            sum += weights_[s] * meanLogOf(*curves_[s], u);
        }
        return sum;
    }

    /// The variance within the scenarios and the variance between them.
    [[nodiscard]] std::optional<double> varianceLog(Date u) const override {
        const double mean = meanLog(u);
        double sum = 0.0;
        for (std::size_t s = 0; s < curves_.size(); ++s) {
            const RandomDiscount* random = curves_[s]->random();
            const std::optional<double> within = random == nullptr ? 0.0 : random->varianceLog(u);
            if (!within) {
                return std::nullopt;
            }
            const double between = meanLogOf(*curves_[s], u) - mean;
            sum += weights_[s] * (*within + between * between);
        }
        return sum;
    }

    [[nodiscard]] outcome::Outcome<LogLawPtr> law(Date u) const override {
        detail::Outcomes points;
        std::vector<double> weights;
        std::vector<LogLawPtr> laws;
        double work = 0.0;
        for (std::size_t s = 0; s < curves_.size(); ++s) {
            if (weights_[s] <= 0.0) {
                continue;
            }
            const RandomDiscount* random = curves_[s]->random();
            if (random == nullptr) {
                points.values.push_back(curves_[s]->logFactor(u));
                points.odds.push_back(weights_[s]);
                continue;
            }
            outcome::Outcome<LogLawPtr> part = random->law(u);
            if (!part.ok()) {
                outcome::Faults faults;
                outcome::append(faults, placeOf(s), part.faults());
                return faults;
            }
            work += part.value()->work();
            if (work > detail::mostWork) {
                return outcome::Fault{
                    "/scenarios", "too-many-outcomes",
                    "The quantiles of so many random curves together would take too long; use fewer "
                    "of them."};
            }
            weights.push_back(weights_[s]);
            laws.push_back(std::move(part).value());
        }
        if (laws.empty()) {
            return detail::sumLaw(std::move(points), {{0.0}, {1.0}});
        }
        if (!points.values.empty()) {
            double total = 0.0;
            for (const double odds : points.odds) {
                total += odds;
            }
            for (double& odds : points.odds) {
                odds /= total;
            }
            weights.push_back(total);
            laws.push_back(detail::sumLaw(std::move(points), {{0.0}, {1.0}}));
        }
        return detail::mixtureLaw(std::move(weights), std::move(laws));
    }

    [[nodiscard]] outcome::Outcome<PathMakerPtr> pathMaker(std::span<const Date> dates,
                                                           std::size_t target) const override {
        std::vector<double> upTo;
        std::vector<PathMakerPtr> makers;
        double sum = 0.0;
        double kept = 0.0;
        for (std::size_t s = 0; s < curves_.size(); ++s) {
            outcome::Outcome<PathMakerPtr> maker = pathMakerOf(*curves_[s], dates, target);
            if (!maker.ok()) {
                outcome::Faults faults;
                outcome::append(faults, placeOf(s), maker.faults());
                return faults;
            }
            sum += weights_[s];
            kept += maker.value()->work();
            if (kept > mostKept) {
                return outcome::Fault{
                    "/scenarios", "too-much-work",
                    "So many scenarios over so many dates are too much to simulate; use fewer of them."};
            }
            upTo.push_back(sum);
            makers.push_back(std::move(maker).value());
        }
        upTo.back() = 1.0;
        return PathMakerPtr(
            std::make_shared<ScenarioPaths>(std::move(upTo), std::move(makers), dates.size()));
    }

    [[nodiscard]] double pathBias() const override {
        double largest = 0.0;
        for (const CurvePtr& curve : curves_) {
            if (curve->random() != nullptr) {
                largest = std::max(largest, curve->random()->pathBias());
            }
        }
        return largest;
    }

    [[nodiscard]] double quantileError() const override {
        double largest = 0.0;
        for (const CurvePtr& curve : curves_) {
            if (curve->random() != nullptr) {
                largest = std::max(largest, curve->random()->quantileError());
            }
        }
        return largest;
    }

  private:
    static std::string placeOf(std::size_t scenario) {
        return detail::place("/scenarios", scenario) + "/curve";
    }

    static constexpr double mostKept = 4e6; ///< numbers in all scenarios' makers, about

    static outcome::Outcome<PathMakerPtr> pathMakerOf(const Curve& curve, std::span<const Date> dates,
                                                      std::size_t target) {
        if (curve.random() != nullptr) {
            return curve.random()->pathMaker(dates, target);
        }
        std::vector<double> logs;
        for (const Date date : dates) {
            logs.push_back(curve.logFactor(date));
        }
        return detail::certainPaths(std::move(logs));
    }

    static double meanLogOf(const Curve& curve, Date u) {
        return curve.random() == nullptr ? curve.logFactor(u) : curve.random()->meanLog(u);
    }

    [[nodiscard]] std::vector<double> logFactors(Date u) const {
        std::vector<double> logs;
        logs.reserve(curves_.size());
        for (const CurvePtr& curve : curves_) {
            logs.push_back(curve->logFactor(u));
        }
        return logs;
    }

    std::vector<double> weights_; ///< divided by their sum, which differs from 1 by rounding only
    std::vector<CurvePtr> curves_;
};

} // namespace

Outcome<CurvePtr> scenarios(Date asOf, const std::vector<Scenario>& all) {
    if (all.empty()) {
        return outcome::Fault{"/scenarios", "empty-list", "At least one scenario is needed."};
    }
    outcome::Faults faults;
    double sum = 0.0;
    for (std::size_t s = 0; s < all.size(); ++s) {
        assert(all[s].curve->asOf() == asOf);
        detail::requireWithin(faults, detail::place("/scenarios", s) + "/weight", all[s].weight, 0.0,
                              1.0 + 1e-9, "A scenario's weight");
        sum += all[s].weight;
    }
    if (faults.empty()) {
        detail::requireSumOne(faults, "/scenarios", sum, "The weights of the scenarios");
    }
    if (!faults.empty()) {
        return faults;
    }
    return CurvePtr(std::make_shared<ScenarioCurve>(asOf, all));
}

} // namespace forwright::discounting
