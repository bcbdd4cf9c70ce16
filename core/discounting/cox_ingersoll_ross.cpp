#include "discounting/cox_ingersoll_ross.hpp"

#include "dates/date.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "discounting/mean_reversion.hpp"
#include "discounting/path_makers.hpp"

namespace forwright::discounting {

namespace {

class CoxIngersollRossCurve final : public Curve, public RandomDiscount {
  public:
    CoxIngersollRossCurve(Date asOf, const CoxIngersollRoss& model) : Curve(asOf), model_(model) {}

    [[nodiscard]] double logFactor(Date u) const override {
        const double years = dates::years(asOf(), u);
        if (rateIsConstant()) {
            return -model_.r0 * years;
        }
        return detail::coxIngersollRossTransform(1.0, model_.r0, model_.meanReversion, model_.longRun,
                                                 model_.volatility, years);
    }

    [[nodiscard]] std::vector<Parameter> parameters() const override {
        return {{"/r0", Parameter::Kind::model, model_.r0},
                {"/meanReversion", Parameter::Kind::model, model_.meanReversion},
                {"/longRun", Parameter::Kind::model, model_.longRun},
                {"/volatility", Parameter::Kind::model, model_.volatility}};
    }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        const double years = dates::years(asOf(), u);
        if (rateIsConstant()) {
            return {-years, (model_.r0 - model_.longRun) * years * years / 2.0, 0.0, 0.0};
        }
        using Dual = detail::Dual<4>;
        const Dual log = detail::coxIngersollRossTransform(
            Dual(1.0), Dual::parameter(model_.r0, 0), Dual::parameter(model_.meanReversion, 1),
            Dual::parameter(model_.longRun, 2), Dual::parameter(model_.volatility, 3), years);
        return {log.slope.begin(), log.slope.end()};
    }

    [[nodiscard]] outcome::Review review(Date last) const override {
        // e^(E[ln D]) ≤ P ≤ 1, and E[ln D] only falls.
        return detail::finiteReview(*this, last, -meanLog(last));
    }

    [[nodiscard]] std::string convention() const override {
        return "Cox–Ingersoll–Ross model, expected discount factor";
    }

    [[nodiscard]] const RandomDiscount* random() const override { return this; }

    [[nodiscard]] double meanLog(Date u) const override {
        const double years = dates::years(asOf(), u);
        const double x = model_.meanReversion * years;
        return -(model_.r0 * detail::decayMean(x) + model_.longRun * x * detail::decayGap(x)) * years;
    }

    /// The second derivative of ln E[e^(−λ∫r)] by λ at 0: σ²t³·(r0·v₁(κt) + θ·v₂(κt)).
    [[nodiscard]] std::optional<double> varianceLog(Date u) const override {
        const double years = dates::years(asOf(), u);
        const double x = model_.meanReversion * years;
        return model_.volatility * model_.volatility * years * years * years *
               (model_.r0 * detail::decayStartVariance(x) + model_.longRun * detail::decayLongRunVariance(x));
    }

    [[nodiscard]] outcome::Outcome<LogLawPtr> law(Date u) const override {
        return detail::coxIngersollRossLaw(model_, dates::years(asOf(), u), -meanLog(u), *varianceLog(u));
    }

    [[nodiscard]] double quantileError() const override { return 1e-9; }

    [[nodiscard]] outcome::Outcome<PathMakerPtr> pathMaker(std::span<const Date> dates,
                                                           std::size_t target) const override {
        return detail::coxIngersollRossPaths(model_, detail::yearsTo(*this, dates), target);
    }
    [[nodiscard]] double pathBias() const override { return detail::coxIngersollRossPathBias(model_); }

  private:
    /// Whether κ and σ are so small that they move nothing that a double could show, while their squares
    /// would underflow.
    [[nodiscard]] bool rateIsConstant() const {
        return model_.meanReversion < 1e-140 && model_.volatility < 1e-140;
    }

    CoxIngersollRoss model_;
};

} // namespace

Outcome<CurvePtr> coxIngersollRoss(Date asOf, const CoxIngersollRoss& model) {
    outcome::Faults faults;
    detail::requireWithin(faults, "/r0", model.r0, 0.0, 10.0, "The rate today");
    detail::requireWithin(faults, "/meanReversion", model.meanReversion, 0.0, 100.0, "The mean reversion");
    detail::requireWithin(faults, "/longRun", model.longRun, 0.0, 10.0, "The long-run rate");
    detail::requireWithin(faults, "/volatility", model.volatility, 0.0, 10.0, "The volatility");
    if (!faults.empty()) {
        return faults;
    }
    return CurvePtr(std::make_shared<CoxIngersollRossCurve>(asOf, model));
}

} // namespace forwright::discounting
