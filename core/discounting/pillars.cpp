#include "dates/date.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "discounting/monotone_cubic.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>
#include <cmath>

namespace forwright::discounting {

namespace {

constexpr std::array<std::string_view, 3> interpolationNames{"log-linear", "linear-zero", "monotone-cubic"};

/// The knots of a curve: t in years, y = −ln P, the start (0, 0) among them, and how each y follows its
/// pillar's parameter.
struct Knots {
    std::vector<double> time{0.0};
    std::vector<double> y{0.0};
    std::vector<double> yByParameter{0.0};
};

/// y as a sum over few knots: what the gradient needs.
struct KnotWeight {
    std::size_t knot = 0;
    double weight = 0.0;
};
using KnotWeights = std::vector<KnotWeight>;

std::string conventionOf(const Pillars& points) {
    const std::size_t count = points.pillars.size();
    return std::to_string(count) + (count == 1 ? " pillar, " : " pillars, ") +
           (points.quote == PillarQuote::factor
                ? "discount factors"
                : "zero rates " + discounting::conventionOf(points.convention)) +
           ", " + std::string(nameOf(points.interpolation));
}

class PillarCurve : public Curve {
  public:
    PillarCurve(Date asOf, std::vector<Parameter> parameters, Knots knots, const Pillars& points)
        : Curve(asOf), parameters_(std::move(parameters)), knots_(std::move(knots)),
          lastPillar_(points.pillars.back().at), convention_(conventionOf(points)) {
        for (std::size_t i = 1; i < knots_.y.size(); ++i) {
            largestZero_ = std::max(largestZero_, std::fabs(knots_.y[i] / knots_.time[i]));
            largestY_ = std::max(largestY_, std::fabs(knots_.y[i]));
        }
    }

    [[nodiscard]] double logFactor(Date u) const override { return -yAt(dates::years(asOf(), u)); }
    [[nodiscard]] std::vector<Parameter> parameters() const override { return parameters_; }

    [[nodiscard]] std::string convention() const override { return convention_; }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        std::vector<double> gradient(parameters_.size(), 0.0);
        for (const KnotWeight& part : weightsAt(dates::years(asOf(), u))) {
            if (part.knot > 0) {
                gradient[part.knot - 1] -= part.weight * knots_.yByParameter[part.knot];
            }
        }
        return gradient;
    }

    [[nodiscard]] outcome::Review review(Date last) const override {
        const double span = dates::years(asOf(), last);
        const double bound = std::max({largestY_, largestZero_ * span, std::fabs(yAt(span))});
        outcome::Review review = detail::finiteReview(*this, last, bound);
        for (outcome::Fault& fault : review.faults) {
            fault.at = "/pillars";
        }
        if (last > lastPillar_) {
            review.notices.push_back(
                {detail::place("/pillars", parameters_.size() - 1) + "/at", "beyond-last-pillar",
                 "The curve ends on " + dates::toIso(lastPillar_) + " and is needed to " +
                     dates::toIso(last) + "; " + heldBeyond() + "."});
        }
        return review;
    }

  protected:
    [[nodiscard]] const Knots& knots() const { return knots_; }

    /// The knot that ends the interval in which `time` lies: the first that is not before it, else the last.
    [[nodiscard]] std::size_t upperKnot(double time) const {
        const auto from = knots_.time.begin() + 1;
        const auto found = std::lower_bound(from, knots_.time.end(), time);
        return static_cast<std::size_t>((found == knots_.time.end() ? found - 1 : found) -
                                        knots_.time.begin());
    }

  private:
    /// −ln P at t years.
    [[nodiscard]] virtual double yAt(double time) const = 0;
    /// ∂ yAt / ∂ y of the knots.
    [[nodiscard]] virtual KnotWeights weightsAt(double time) const = 0;
    /// What is held past the last pillar, as the notice says it.
    [[nodiscard]] virtual std::string heldBeyond() const { return "its last forward rate is held"; }

    std::vector<Parameter> parameters_;
    Knots knots_;
    Date lastPillar_;
    std::string convention_;
    double largestZero_ = 0.0;
    double largestY_ = 0.0;
};

/// y linear between the knots, and on along the last piece.
class LogLinearCurve final : public PillarCurve {
  public:
    using PillarCurve::PillarCurve;

  private:
    [[nodiscard]] double yAt(double time) const override {
        const std::size_t upper = upperKnot(time);
        const double share = shareAt(time, upper);
        return (1.0 - share) * knots().y[upper - 1] + share * knots().y[upper];
    }
    [[nodiscard]] KnotWeights weightsAt(double time) const override {
        const std::size_t upper = upperKnot(time);
        const double share = shareAt(time, upper);
        return {{upper - 1, 1.0 - share}, {upper, share}};
    }
    [[nodiscard]] double shareAt(double time, std::size_t upper) const {
        const double start = knots().time[upper - 1];
        return (time - start) / (knots().time[upper] - start);
    }
};

/// y/t linear between the pillars, flat before the first and past the last.
class LinearZeroCurve final : public PillarCurve {
  public:
    using PillarCurve::PillarCurve;

  private:
    [[nodiscard]] double yAt(double time) const override {
        const std::size_t upper = upperKnot(time);
        if (upper == 1 || time >= knots().time[upper]) {
            return zero(upper) * time;
        }
        const double share = shareAt(time, upper);
        return ((1.0 - share) * zero(upper - 1) + share * zero(upper)) * time;
    }
    [[nodiscard]] KnotWeights weightsAt(double time) const override {
        const std::size_t upper = upperKnot(time);
        if (upper == 1 || time >= knots().time[upper]) {
            return {{upper, time / knots().time[upper]}};
        }
        const double share = shareAt(time, upper);
        return {{upper - 1, (1.0 - share) * time / knots().time[upper - 1]},
                {upper, share * time / knots().time[upper]}};
    }
    [[nodiscard]] std::string heldBeyond() const override { return "its last zero rate is held"; }

    [[nodiscard]] double zero(std::size_t knot) const { return knots().y[knot] / knots().time[knot]; }
    [[nodiscard]] double shareAt(double time, std::size_t upper) const {
        const double start = knots().time[upper - 1];
        return (time - start) / (knots().time[upper] - start);
    }
};

/// y a monotone cubic through the knots, and on along its last slope.
class MonotoneCubicCurve final : public PillarCurve {
  public:
    MonotoneCubicCurve(Date asOf, std::vector<Parameter> parameters, Knots knots, const Pillars& points)
        : PillarCurve(asOf, std::move(parameters), std::move(knots), points),
          slopes_(detail::monotoneSlopes(this->knots().time, this->knots().y)) {}

  private:
    /// The four Hermite polynomials of the interval that ends at `upper`; past the last knot they are those
    /// of the straight line on.
    struct Hermite {
        double lowerY, upperY, lowerSlope, upperSlope;
    };
    [[nodiscard]] Hermite hermiteAt(double time, std::size_t upper) const {
        const double start = knots().time[upper - 1];
        const double end = knots().time[upper];
        if (time > end) {
            return {0.0, 1.0, 0.0, time - end};
        }
        const double width = end - start;
        const double s = (time - start) / width;
        const double rest = 1.0 - s;
        return {(1.0 + 2.0 * s) * rest * rest, s * s * (3.0 - 2.0 * s), width * s * rest * rest,
                -width * s * s * rest};
    }

    [[nodiscard]] double yAt(double time) const override {
        const std::size_t upper = upperKnot(time);
        const Hermite h = hermiteAt(time, upper);
        return h.lowerY * knots().y[upper - 1] + h.upperY * knots().y[upper] +
               h.lowerSlope * slopes_[upper - 1].slope + h.upperSlope * slopes_[upper].slope;
    }

    [[nodiscard]] KnotWeights weightsAt(double time) const override {
        const std::size_t upper = upperKnot(time);
        const Hermite h = hermiteAt(time, upper);
        KnotWeights weights{{upper - 1, h.lowerY}, {upper, h.upperY}};
        const auto addSlope = [&](const detail::KnotSlope& slope, double weight) {
            for (std::size_t i = 0; i < slope.byValue.size() && slope.first + i < knots().y.size(); ++i) {
                weights.push_back({slope.first + i, weight * slope.byValue[i]});
            }
        };
        addSlope(slopes_[upper - 1], h.lowerSlope);
        addSlope(slopes_[upper], h.upperSlope);
        return weights;
    }

    std::vector<detail::KnotSlope> slopes_;
};

outcome::Faults faultsOf(Date asOf, const Pillars& points) {
    outcome::Faults faults;
    if (points.pillars.empty()) {
        return {{"/pillars", "empty-list", "A curve needs at least one pillar."}};
    }
    for (std::size_t i = 0; i < points.pillars.size(); ++i) {
        const Pillar& pillar = points.pillars[i];
        const std::string at = detail::place("/pillars", i);
        const auto previous = i == 0 ? std::nullopt : std::optional<Date>(points.pillars[i - 1].at);
        detail::requireLater(faults, at + "/at", pillar.at, asOf, previous, "A pillar's date");
        if (points.quote == PillarQuote::factor) {
            if (!std::isfinite(pillar.value) || pillar.value <= 0.0) {
                faults.push_back(
                    {at + "/value", "not-positive", "A discount factor has to be a positive number."});
            }
            continue;
        }
        const std::size_t before = faults.size();
        detail::requireWithin(faults, at + "/value", pillar.value, -0.99, 10.0, "A zero rate");
        if (faults.size() == before && pillar.at > asOf) {
            Rate rate = points.convention;
            rate.value = pillar.value;
            if (auto fault = refusal(rate, asOf, pillar.at)) {
                faults.push_back(outcome::under(at + "/value", std::move(*fault)));
            }
        }
    }
    return faults;
}

} // namespace

std::optional<Interpolation> parseInterpolation(std::string_view name) {
    for (std::size_t i = 0; i < interpolationNames.size(); ++i) {
        if (interpolationNames[i] == name) {
            return static_cast<Interpolation>(i);
        }
    }
    return std::nullopt;
}

std::string_view nameOf(Interpolation interpolation) {
    return interpolationNames[static_cast<std::size_t>(interpolation)];
}

Outcome<CurvePtr> pillars(Date asOf, const Pillars& points) {
    if (outcome::Faults faults = faultsOf(asOf, points); !faults.empty()) {
        return faults;
    }
    Knots knots;
    std::vector<Parameter> parameters;
    for (std::size_t i = 0; i < points.pillars.size(); ++i) {
        const Pillar& pillar = points.pillars[i];
        const double time = dates::years(asOf, pillar.at);
        knots.time.push_back(time);
        double value = pillar.value;
        if (points.quote == PillarQuote::factor) {
            knots.y.push_back(-numeric::log(pillar.value));
            knots.yByParameter.push_back(time);
            value = knots.y.back() / time;
        } else {
            Rate rate = points.convention;
            rate.value = pillar.value;
            knots.y.push_back(-logFactor(rate, asOf, pillar.at));
            knots.yByParameter.push_back(-logFactorSlope(rate, asOf, pillar.at));
        }
        parameters.push_back({detail::place("/pillars", i) + "/value", Parameter::Kind::pillar, value});
    }
    switch (points.interpolation) {
    case Interpolation::linearZero:
        return CurvePtr(
            std::make_shared<LinearZeroCurve>(asOf, std::move(parameters), std::move(knots), points));
    case Interpolation::monotoneCubic:
        return CurvePtr(
            std::make_shared<MonotoneCubicCurve>(asOf, std::move(parameters), std::move(knots), points));
    case Interpolation::logLinear:
        break;
    }
    return CurvePtr(std::make_shared<LogLinearCurve>(asOf, std::move(parameters), std::move(knots), points));
}

} // namespace forwright::discounting
