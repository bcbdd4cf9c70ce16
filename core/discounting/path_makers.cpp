#include "discounting/path_makers.hpp"

#include "dates/date.hpp"
#include "discounting/decay.hpp"
#include "discounting/mean_reversion.hpp"
#include "numeric/lanes.hpp"
#include "numeric/normal_words.hpp"

#include <algorithm>
#include <cmath>

namespace forwright::discounting {

namespace lanes = numeric::lanes;
using lanes::Lanes;

void PathMaker::mirror(const std::uint32_t* words, std::size_t count, double* logFactors) const {
    std::vector<std::uint32_t> complements(words, words + numbers() * tilePaths);
    for (std::uint32_t& word : complements) {
        word = ~word;
    }
    make(complements.data(), count, logFactors);
}

namespace detail {
namespace {

class CertainPaths final : public PathMaker {
  public:
    explicit CertainPaths(std::vector<double> logFactors) : logFactors_(std::move(logFactors)) {}

    [[nodiscard]] std::size_t numbers() const override { return 0; }
    [[nodiscard]] double work() const override { return static_cast<double>(logFactors_.size()); }
    void make(const std::uint32_t* /*words*/, std::size_t count, double* logFactors) const override {
        for (std::size_t date = 0; date < logFactors_.size(); ++date) {
            std::fill_n(logFactors + date * tilePaths, count, logFactors_[date]);
        }
    }
    void mirror(const std::uint32_t* /*words*/, std::size_t /*count*/,
                double* /*logFactors*/) const override {}

  private:
    std::vector<double> logFactors_;
};

/// From one date to the next, x being how far the short rate is from its mean and J how far its integral is,
/// with two standard normal numbers: J += B·x + own·z₁, then x = e^(−κΔ)·x + shared·z₁ + rest·z₂.
struct Step {
    double kept = 1.0;    ///< e^(−κΔ)
    double carried = 0.0; ///< B
    double own = 0.0;     ///< the integral's own deviation
    double shared = 0.0;  ///< what of the short rate's moves with it
    double rest = 0.0;    ///< and what does not
};

Step stepOver(double meanReversion, double volatility, double years) {
    const double x = meanReversion * years;
    Step step;
    step.kept = numeric::exp(-x);
    step.carried = reversionTime(meanReversion, years);
    step.own = std::sqrt(integralVariance(meanReversion, volatility, years));
    // Var[r] = σ²(1 − e^(−2κΔ))/(2κ), Cov[r, ∫r] = σ²B²/2; the square of their correlation is at most ¾.
    const double variance = volatility * volatility * years * decayMean(2.0 * x);
    const double covariance = volatility * volatility * step.carried * step.carried / 2.0;
    step.shared = step.own > 0.0 ? covariance / step.own : 0.0;
    step.rest = std::sqrt(std::max(variance - step.shared * step.shared, 0.0));
    return step;
}

class NormalPaths final : public PathMaker {
  public:
    NormalPaths(double meanReversion, double volatility, const std::vector<double>& years,
                std::vector<double> meanLogs, std::size_t target)
        : steps_(stepsThrough(meanReversion, volatility, years)), meanLogs_(std::move(meanLogs)),
          reflection_(directionOf(meanReversion, years, target)) {}

    [[nodiscard]] std::size_t numbers() const override { return 2 * steps_.size() - 1; }
    [[nodiscard]] bool firstIsUnbounded() const override { return true; }
    [[nodiscard]] double work() const override { return 2.0 * static_cast<double>(steps_.size()); }

    void make(const std::uint32_t* words, std::size_t count, double* logFactors) const override {
        std::vector<double> normals(numbers() * tilePaths);
        normalsOf(words, numbers(), count, normals.data());
        reflection_.turn(normals.data(), count);
        for (std::size_t path = 0; path < count; path += lanes::count) {
            Lanes rate = lanes::all(0.0);
            Lanes integral = lanes::all(0.0);
            const double* number = &normals[path];
            double* to = logFactors + path;
            for (std::size_t date = 0; date < steps_.size(); ++date) {
                const Step& step = steps_[date];
                const Lanes first = lanes::load(number);
                integral += step.carried * rate + step.own * first;
                lanes::store(meanLogs_[date] - integral, to);
                if (date + 1 < steps_.size()) {
                    rate = step.kept * rate +
                           (step.shared * first + step.rest * lanes::load(number + tilePaths));
                }
                number += 2 * tilePaths;
                to += tilePaths;
            }
        }
    }

    void mirror(const std::uint32_t* /*words*/, std::size_t count, double* logFactors) const override {
        for (std::size_t date = 0; date < steps_.size(); ++date) {
            const double twice = 2.0 * meanLogs_[date];
            double* const row = logFactors + date * tilePaths;
            for (std::size_t path = 0; path < count; ++path) {
                row[path] = twice - row[path];
            }
        }
    }

  private:
    static std::vector<Step> stepsThrough(double meanReversion, double volatility,
                                          const std::vector<double>& years) {
        std::vector<Step> steps;
        steps.reserve(years.size());
        double from = 0.0;
        for (const double to : years) {
            steps.push_back(stepOver(meanReversion, volatility, to - from));
            from = to;
        }
        return steps;
    }

    /// What each number moves the integral to `years[target]` by.
    [[nodiscard]] std::vector<double> directionOf(double meanReversion, const std::vector<double>& years,
                                                  std::size_t target) const {
        std::vector<double> direction(numbers(), 0.0);
        for (std::size_t date = 0; date <= target; ++date) {
            const double later = reversionTime(meanReversion, years[target] - years[date]);
            direction[2 * date] = steps_[date].own + steps_[date].shared * later;
            if (date < target) {
                direction[2 * date + 1] = steps_[date].rest * later;
            }
        }
        return direction;
    }

    std::vector<Step> steps_;
    std::vector<double> meanLogs_;
    Reflection reflection_;
};

} // namespace

PathMakerPtr certainPaths(std::vector<double> logFactors) {
    return std::make_shared<const CertainPaths>(std::move(logFactors));
}

PathMakerPtr normalPaths(const NormalRate& rate, const std::vector<double>& years,
                         std::vector<double> meanLogs, std::size_t target) {
    return std::make_shared<const NormalPaths>(rate.meanReversion, rate.volatility, years,
                                               std::move(meanLogs), target);
}

std::vector<double> yearsTo(const Curve& curve, std::span<const Date> dates) {
    std::vector<double> years;
    years.reserve(dates.size());
    for (const Date date : dates) {
        years.push_back(dates::years(curve.asOf(), date));
    }
    return years;
}

Reflection::Reflection(std::vector<double> direction) {
    double largest = 0.0;
    for (const double part : direction) {
        largest = std::fmax(largest, std::fabs(part));
    }
    if (!(largest > 0.0)) {
        return;
    }
    double tail = 0.0; // scaled by the largest, so that nothing underflows
    for (std::size_t i = 0; i < direction.size(); ++i) {
        direction[i] /= largest;
        tail += i == 0 ? 0.0 : direction[i] * direction[i];
    }
    if (tail <= 0.0 && direction[0] > 0.0) {
        return;
    }
    // With a the direction of length 1 the mirror's normal is a − e₁, its square 2(1 − a₁). Where a₁ > 0,
    // 1 − a₁ = tail/(length·(length + first)) without cancellation.
    const double length = std::sqrt(direction[0] * direction[0] + tail);
    const double short1 =
        direction[0] > 0.0 ? tail / (length * (length + direction[0])) : 1.0 - direction[0] / length;
    const double root = std::sqrt(short1);
    across_ = std::move(direction);
    for (double& part : across_) {
        part /= length * root;
    }
    across_[0] = -root;
}

void Reflection::turn(double* numbers, std::size_t count) const {
    if (across_.empty()) {
        return;
    }
    for (std::size_t path = 0; path < count; path += lanes::count) {
        Lanes along = lanes::all(0.0);
        for (std::size_t i = 0; i < across_.size(); ++i) {
            along += across_[i] * lanes::load(numbers + i * tilePaths + path);
        }
        for (std::size_t i = 0; i < across_.size(); ++i) {
            double* const number = numbers + i * tilePaths + path;
            lanes::store(lanes::load(number) - across_[i] * along, number);
        }
    }
}

void normalsOf(const std::uint32_t* words, std::size_t numbers, std::size_t count, double* to) {
    const numeric::NormalWords& normal = numeric::normalWords();
    for (std::size_t number = 0; number < numbers; ++number) {
        for (std::size_t path = 0; path < count; path += lanes::count) {
            const std::size_t at = number * tilePaths + path;
            lanes::store(normal.four(words + at), to + at);
        }
    }
}

} // namespace detail
} // namespace forwright::discounting
