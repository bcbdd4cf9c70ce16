#include "dates/date.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"

#include <cmath>

namespace forwright::discounting {

namespace {

/// The review of the curve below, and a fault where this curve's own factor for `last` leaves what is
/// accepted.
outcome::Review withOwnEnd(outcome::Review below, const Curve& self, Date last) {
    if (!below.faults.empty()) {
        return below;
    }
    const double log = self.logFactor(last);
    if (std::fabs(log) > largestLogFactor) {
        below.faults.push_back({"", "not-finite",
                                "The discount factor for " + dates::toIso(last) + " would be e^" +
                                    detail::toText(log) +
                                    ", beyond what a number holds; use a smaller rate or a nearer date."});
    }
    return below;
}

class SpreadCurve final : public Curve {
  public:
    SpreadCurve(CurvePtr curve, double spread)
        : Curve(curve->asOf()), curve_(std::move(curve)), spread_(spread) {}

    [[nodiscard]] double logFactor(Date u) const override {
        return curve_->logFactor(u) - spread_ * dates::years(asOf(), u);
    }
    [[nodiscard]] std::vector<Parameter> parameters() const override { return curve_->parameters(); }
    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        return curve_->logFactorGradient(u);
    }
    [[nodiscard]] outcome::Review review(Date last) const override {
        return withOwnEnd(curve_->review(last), *this, last);
    }
    [[nodiscard]] std::string convention() const override { return curve_->convention() + ", with a spread"; }

  private:
    CurvePtr curve_;
    double spread_;
};

class AverageRateCurve final : public Curve {
  public:
    explicit AverageRateCurve(CurvePtr curve) : Curve(curve->asOf()), curve_(std::move(curve)) {}

    [[nodiscard]] double logFactor(Date u) const override { return curve_->random()->meanLog(u); }
    [[nodiscard]] std::vector<Parameter> parameters() const override { return {}; }
    [[nodiscard]] std::vector<double> logFactorGradient(Date /*u*/) const override { return {}; }
    [[nodiscard]] outcome::Review review(Date last) const override {
        return withOwnEnd(curve_->review(last), *this, last);
    }
    [[nodiscard]] std::string convention() const override {
        return curve_->convention() + ", at its average rate in place of the expected discount factor";
    }

  private:
    CurvePtr curve_;
};

class HeldByTimeCurve final : public Curve {
  public:
    HeldByTimeCurve(CurvePtr curve, Date asOf) : Curve(asOf), curve_(std::move(curve)) {}

    [[nodiscard]] double logFactor(Date u) const override { return curve_->logFactor(moved(u)); }
    [[nodiscard]] std::vector<Parameter> parameters() const override { return curve_->parameters(); }
    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        return curve_->logFactorGradient(moved(u));
    }
    [[nodiscard]] outcome::Review review(Date last) const override { return curve_->review(moved(last)); }
    [[nodiscard]] std::string convention() const override {
        return curve_->convention() + ", zero rates by time held";
    }

  private:
    [[nodiscard]] Date moved(Date u) const { return curve_->asOf() + (u - asOf()); }

    CurvePtr curve_;
};

class ForwardsComeTrueCurve final : public Curve {
  public:
    ForwardsComeTrueCurve(CurvePtr curve, Date asOf)
        : Curve(asOf), curve_(std::move(curve)), passed_(curve_->logFactor(asOf)) {}

    [[nodiscard]] double logFactor(Date u) const override { return curve_->logFactor(u) - passed_; }
    [[nodiscard]] std::vector<Parameter> parameters() const override { return curve_->parameters(); }
    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        std::vector<double> gradient = curve_->logFactorGradient(u);
        const std::vector<double> passed = curve_->logFactorGradient(asOf());
        for (std::size_t i = 0; i < gradient.size(); ++i) {
            gradient[i] -= passed[i];
        }
        return gradient;
    }
    [[nodiscard]] outcome::Review review(Date last) const override {
        return withOwnEnd(curve_->review(last), *this, last);
    }
    [[nodiscard]] std::string convention() const override {
        return curve_->convention() + ", its forward rates come true";
    }

  private:
    CurvePtr curve_;
    double passed_;
};

} // namespace

CurvePtr withSpread(CurvePtr curve, double spread) {
    return std::make_shared<SpreadCurve>(std::move(curve), spread);
}

CurvePtr atAverageRate(CurvePtr curve) {
    return curve->random() == nullptr ? curve : std::make_shared<AverageRateCurve>(std::move(curve));
}

CurvePtr heldByTime(CurvePtr curve, Date asOf) {
    return std::make_shared<HeldByTimeCurve>(std::move(curve), asOf);
}

CurvePtr forwardsComeTrue(CurvePtr curve, Date asOf) {
    return std::make_shared<ForwardsComeTrueCurve>(std::move(curve), asOf);
}

} // namespace forwright::discounting
