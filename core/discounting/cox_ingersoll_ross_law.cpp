#include "discounting/complex.hpp"
#include "discounting/cox_ingersoll_ross.hpp"
#include "discounting/laws.hpp"
#include "numeric/normal.hpp"

#include <algorithm>
#include <cmath>

namespace forwright::discounting::detail {

namespace {

/// Where ∫r is as good as 0: e^(−1e-18) is 1.
constexpr double nothing = 1e-18;

/// Below this ratio of deviation to mean the law is taken as normal: the quantile's error, of the order of
/// deviation² / mean, is then 1e-12 of the mean.
constexpr double normalBelow = 1e-6;

/// The law of I = ∫r over `years` from its transform φ(λ) = E[e^(−λI)]:
///     P(I ≤ y) = 1/(2πi) ∫ e^(λy) φ(λ)/λ dλ,    density 1/(2πi) ∫ e^(λy) φ(λ) dλ
/// over a line that crosses the real axis at the saddle point c > 0 of the integrand, where nothing is lost
/// by cancellation, and is bent a little to the left into the hyperbola λ(v) = c + s·(sin δ·(1 − cosh v) +
/// i·cos δ·sinh v), s the width of the saddle: φ has its singularities on the negative real axis only. In v
/// the integrand is analytic in a strip of half-width δ about the real axis and dies double-exponentially, so
/// that the trapezoidal rule with step h errs by about e^(−2πδ/h); it is cut where the integrand has fallen
/// by e^(−42).
class IntegratedRateLaw final : public LogLaw {
  public:
    IntegratedRateLaw(const CoxIngersollRoss& model, double years, double mean, double variance)
        : model_(model), years_(years), mean_(mean), variance_(variance) {}

    [[nodiscard]] double probabilityAtMost(double x) const override {
        return x >= 0.0 ? 1.0 : std::clamp(1.0 - at(std::fmax(-x, nothing)).probability, 0.0, 1.0);
    }

    [[nodiscard]] double quantile(double probability) const override {
        return -integralQuantile(1.0 - probability, probability);
    }

    [[nodiscard]] bool isContinuous() const override { return true; }
    [[nodiscard]] double work() const override { return 200.0; }

  private:
    static constexpr double step = 0.08;
    static constexpr double sineOfBend = 0.38268343236508977; // δ = π/8
    static constexpr double cosineOfBend = 0.92387953251128674;

    struct At {
        double probability = 0.0;
        double density = 0.0;
    };

    template <class T> [[nodiscard]] T logTransform(const T& lambda) const {
        return coxIngersollRossTransform(lambda, T(model_.r0), T(model_.meanReversion), T(model_.longRun),
                                         T(model_.volatility), years_);
    }

    /// The derivative of ln φ(λ) + λy − ln λ on the real axis; it rises from −∞ at 0 to y.
    [[nodiscard]] double saddleSlope(double lambda, double y) const {
        return logTransform(Dual<1>::parameter(lambda, 0)).slope[0] + y - 1.0 / lambda;
    }

    /// Where that derivative is 0, to a tenth: it only has to be near. Begun where it would be for a normal
    /// law.
    [[nodiscard]] double saddle(double y) const {
        const double above = y - mean_;
        const double root = std::sqrt(above * above + 4.0 * variance_);
        double low = above > 0.0 ? 2.0 / (above + root) : (root - above) / (2.0 * variance_);
        double high = low;
        if (saddleSlope(low, y) > 0.0) {
            while (low > 1e-290 && saddleSlope(low, y) > 0.0) {
                high = low;
                low /= 4.0;
            }
        } else {
            while (high < 1e290 && saddleSlope(high, y) <= 0.0) {
                low = high;
                high *= 4.0;
            }
        }
        while (high > 1.1 * low) {
            const double middle = std::sqrt(low) * std::sqrt(high);
            (saddleSlope(middle, y) > 0.0 ? high : low) = middle;
        }
        return low;
    }

    [[nodiscard]] At at(double y) const {
        const double cross = saddle(y);
        const double nudge = 1e-3 * cross;
        const double curvature =
            (saddleSlope(cross + nudge, y) - saddleSlope(cross - nudge, y)) / (2.0 * nudge);
        const double width = curvature > 0.0 ? std::fmin(1.0 / std::sqrt(curvature), cross) : cross;
        At sum;
        double crest = 0.0;
        for (int k = 0; k < 400; ++k) {
            const double up = numeric::exp(step * k);
            const double cosh = (up + 1.0 / up) / 2.0;
            const double sinh = (up - 1.0 / up) / 2.0;
            const Complex lambda{cross + width * sineOfBend * (1.0 - cosh), width * cosineOfBend * sinh};
            const Complex direction{cosh * cosineOfBend, sinh * sineOfBend};
            const Complex exponent = logTransform(lambda) + y * lambda;
            const double height = exponent.re + numeric::log(modulus(direction));
            if (k == 0) {
                crest = height;
            } else if (height < crest - 42.0) {
                break;
            }
            const Complex density = exponential(exponent) * direction;
            const double weight = k == 0 ? 0.5 : 1.0;
            sum.density += weight * density.re;
            sum.probability += weight * (density / lambda).re;
        }
        constexpr double pi = 3.14159265358979324;
        return {sum.probability * step * width / pi, sum.density * step * width / pi};
    }

    /// The y with P(I ≤ y) = below, above = 1 − below: Newton's steps, kept inside a bracket that Cantelli's
    /// inequality gives.
    [[nodiscard]] double integralQuantile(double below, double above) const {
        const double deviation = std::sqrt(variance_);
        double low = mean_ - deviation * std::sqrt(above / below);
        double high = mean_ + deviation * std::sqrt(below / above);
        if (low < nothing) {
            if (at(nothing).probability >= below) {
                return 0.0;
            }
            low = nothing;
        }
        const double logVariance = numeric::log1p(variance_ / (mean_ * mean_));
        double y =
            mean_ * numeric::exp(std::sqrt(logVariance) * numeric::normalQuantile(below) - logVariance / 2.0);
        for (int steps = 0; steps < 200; ++steps) {
            if (!(y > low && y < high)) {
                y = high > 4.0 * low ? std::sqrt(low) * std::sqrt(high) : low + (high - low) / 2.0;
            }
            const At here = at(y);
            (here.probability >= below ? high : low) = y;
            const double move = (below - here.probability) / here.density;
            if (std::fabs(move) <= 1e-7 * std::fmin(deviation, y) || high - low <= 1e-15 * high) {
                return std::isfinite(move) ? std::fmax(y + move, 0.0) : y;
            }
            y += move;
        }
        return y;
    }

    CoxIngersollRoss model_;
    double years_;
    double mean_;
    double variance_;
};

} // namespace

LogLawPtr coxIngersollRossLaw(const CoxIngersollRoss& model, double years, double mean, double variance) {
    if (std::sqrt(variance) <= normalBelow * mean) {
        return normalLaw(-mean, variance);
    }
    return std::make_shared<IntegratedRateLaw>(model, years, mean, variance);
}

} // namespace forwright::discounting::detail
