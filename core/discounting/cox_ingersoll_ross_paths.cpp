#include "discounting/decay.hpp"
#include "discounting/mean_reversion.hpp"
#include "discounting/path_makers.hpp"
#include "numeric/elementary.hpp"
#include "numeric/normal.hpp"

#include <algorithm>
#include <cmath>

namespace forwright::discounting::detail {

namespace {

/// Mean and variance, in both of which the short rate at the start of a step enters linearly.
struct Linear {
    double atZero = 0.0;
    double slope = 0.0;
    [[nodiscard]] double operator()(double rate) const { return atZero + slope * rate; }
};

/// The moments of the short rate at the end of a step and of its integral over it.
struct Moments {
    Linear rate, rateVariance;
    Linear integral, integralVariance;
    Linear covariance;

    Moments(const CoxIngersollRoss& model, double years) {
        const double x = model.meanReversion * years;
        const double kept = numeric::exp(-x);
        const double carried = reversionTime(model.meanReversion, years);
        const double square = model.volatility * model.volatility;
        const double cube = square * years * years * years;
        rate = {model.longRun * model.meanReversion * carried, kept};
        rateVariance = {square * model.longRun * model.meanReversion * carried * carried / 2.0,
                        square * kept * carried};
        integral = {model.longRun * x * years * decayGap(x), carried};
        integralVariance = {cube * model.longRun * decayLongRunVariance(x), cube * decayStartVariance(x)};
        covariance = {cube * model.longRun * model.meanReversion * decayStartVariance(x) / 2.0,
                      square * kept * reversionGap(model.meanReversion, years)};
    }
};

/// A number that is not negative with this mean and variance (Andersen, J. Computational Finance 11 (2008),
/// the quadratic-exponential scheme): a displaced square of a normal number where the variance is small, else
/// 0 or an exponential number.
double notNegative(double mean, double variance, double normal) {
    if (!(mean > 0.0)) {
        return 0.0;
    }
    const double relative = variance / (mean * mean);
    if (relative <= 1.5) {
        // With q = 2/relative ≥ 4/3 and b² = q − 1 + √(q(q − 1)) it is mean·(b + z)²/(1 + b²), here with all
        // divided by b², so that no variance at all is fit too.
        const double inverse = relative / 2.0;
        const double oneByB = std::sqrt(inverse / (1.0 - inverse + std::sqrt(1.0 - inverse)));
        const double root = 1.0 + oneByB * normal;
        return mean * root * root / (1.0 + oneByB * oneByB);
    }
    const double ofNothing = (relative - 1.0) / (relative + 1.0);
    const double above = numeric::normalProbability(-normal);
    return above >= 1.0 - ofNothing ? 0.0
                                    : mean / (1.0 - ofNothing) * numeric::log((1.0 - ofNothing) / above);
}

/// A positive number with this mean and variance: normal where it can be, else lognormal.
double positive(double mean, double variance, double normal) {
    constexpr double farthest = 6.5; // no normal number made from a word is farther out
    if (!(mean > 0.0) || !(variance > 0.0)) {
        return std::fmax(mean, 0.0);
    }
    if (variance * (farthest * farthest) <= mean * mean) {
        return mean + std::sqrt(variance) * normal;
    }
    const double logVariance = numeric::log1p(variance / (mean * mean));
    return mean * numeric::exp(std::sqrt(logVariance) * normal - logVariance / 2.0);
}

struct Step {
    Moments moments;
    double years;
    bool ends; ///< at one of the dates
};

class CoxIngersollRossPaths final : public PathMaker {
  public:
    CoxIngersollRossPaths(const CoxIngersollRoss& model, const std::vector<double>& years, std::size_t target)
        : start_(model.r0), steps_(stepsThrough(model, years)),
          reflection_(directionOf(model, years[target])) {}

    [[nodiscard]] std::size_t numbers() const override { return 2 * steps_.size(); }
    [[nodiscard]] double work() const override { return 10.0 * static_cast<double>(steps_.size()); }

    void make(const std::uint32_t* words, std::size_t count, double* logFactors) const override {
        std::vector<double> normals(numbers() * tilePaths);
        normalsOf(words, numbers(), count, normals.data());
        reflection_.turn(normals.data(), count);
        std::vector<double> rates(count, start_);
        std::vector<double> integrals(count, 0.0);
        const double* normal = normals.data();
        double* to = logFactors;
        for (const Step& step : steps_) {
            for (std::size_t path = 0; path < count; ++path) {
                integrals[path] += moved(step.moments, rates[path], normal[path], normal[tilePaths + path]);
            }
            normal += 2 * tilePaths;
            if (step.ends) {
                for (std::size_t path = 0; path < count; ++path) {
                    to[path] = -integrals[path];
                }
                to += tilePaths;
            }
        }
    }

  private:
    /// Takes the short rate over a step; its integral. What the integral owes to where the rate ends is
    /// linear in it, as if both were normal; the rest is drawn. Means, variances and covariance of the pair
    /// are exact.
    static double moved(const Moments& moments, double& rate, double first, double second) {
        const double mean = moments.rate(rate);
        const double variance = moments.rateVariance(rate);
        const double covariance = moments.covariance(rate);
        const double slope = variance > 0.0 ? covariance / variance : 0.0;
        const double integral = moments.integral(rate);
        const double rest = std::fmax(moments.integralVariance(rate) - slope * covariance, 0.0);
        rate = notNegative(mean, variance, first);
        return positive(integral + slope * (rate - mean), rest, second);
    }

    static std::vector<Step> stepsThrough(const CoxIngersollRoss& model, const std::vector<double>& ends) {
        std::vector<Step> steps;
        double from = 0.0;
        for (const double to : ends) {
            const double count = std::ceil((to - from) / coxIngersollRossStep);
            const double years = (to - from) / count;
            steps.insert(steps.end(), static_cast<std::size_t>(count), {Moments(model, years), years, false});
            steps.back().ends = true;
            from = to;
        }
        return steps;
    }

    /// What each number moves the integral to `years` by, as if the short rate stayed at its mean.
    [[nodiscard]] std::vector<double> directionOf(const CoxIngersollRoss& model, double years) const {
        std::vector<double> direction(numbers(), 0.0);
        double mean = start_;
        double left = years;
        for (std::size_t i = 0; i < steps_.size() && left > steps_[i].years / 2.0; ++i) {
            const Moments& moments = steps_[i].moments;
            left -= steps_[i].years;
            const double deviation = std::sqrt(moments.rateVariance(mean));
            const double slope = deviation > 0.0 ? moments.covariance(mean) / deviation : 0.0;
            direction[2 * i] = slope + deviation * reversionTime(model.meanReversion, std::fmax(left, 0.0));
            direction[2 * i + 1] = std::sqrt(std::fmax(moments.integralVariance(mean) - slope * slope, 0.0));
            mean = moments.rate(mean);
        }
        return direction;
    }

    double start_;
    std::vector<Step> steps_;
    Reflection reflection_;
};

} // namespace

PathMakerPtr coxIngersollRossPaths(const CoxIngersollRoss& model, const std::vector<double>& years,
                                   std::size_t target) {
    return std::make_shared<const CoxIngersollRossPaths>(model, years, target);
}

} // namespace forwright::discounting::detail
