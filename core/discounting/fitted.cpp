#include "dates/date.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "discounting/laws.hpp"
#include "discounting/mean_reversion.hpp"
#include "discounting/path_makers.hpp"

#include <cassert>

namespace forwright::discounting {

namespace {

/// A curve that is not random, with a normal short rate about it whose expected discount factors are the
/// curve's.
class FittedCurve final : public Curve, public RandomDiscount {
  public:
    FittedCurve(std::vector<Parameter> own, double meanReversion, double volatility, CurvePtr fit,
                std::string name)
        : Curve(fit->asOf()), own_(std::move(own)), meanReversion_(meanReversion), volatility_(volatility),
          fit_(std::move(fit)), name_(std::move(name)) {}

    [[nodiscard]] double logFactor(Date u) const override { return fit_->logFactor(u); }

    [[nodiscard]] std::vector<Parameter> parameters() const override {
        std::vector<Parameter> all = own_;
        for (Parameter& parameter : fit_->parameters()) {
            parameter.at = "/fit" + parameter.at;
            all.push_back(std::move(parameter));
        }
        return all;
    }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        std::vector<double> gradient = fit_->logFactorGradient(u);
        gradient.insert(gradient.begin(), own_.size(), 0.0);
        return gradient;
    }

    [[nodiscard]] outcome::Review review(Date last) const override {
        outcome::Review below = fit_->review(last);
        outcome::Review review;
        outcome::append(review.faults, "/fit", std::move(below.faults));
        outcome::append(review.notices, "/fit", std::move(below.notices));
        return review;
    }

    [[nodiscard]] std::string convention() const override {
        return name_ + " model, expected discount factor, fitted to " + fit_->convention();
    }

    [[nodiscard]] const RandomDiscount* random() const override { return this; }

    [[nodiscard]] double meanLog(Date u) const override { return fit_->logFactor(u) - variance(u) / 2.0; }
    [[nodiscard]] std::optional<double> varianceLog(Date u) const override { return variance(u); }
    [[nodiscard]] outcome::Outcome<LogLawPtr> law(Date u) const override {
        return detail::normalLaw(meanLog(u), variance(u));
    }
    [[nodiscard]] outcome::Outcome<PathMakerPtr> pathMaker(std::span<const Date> dates,
                                                           std::size_t target) const override {
        return detail::normalPaths(*this, dates, target);
    }
    [[nodiscard]] std::optional<NormalRate> normalRate() const override {
        return NormalRate{meanReversion_, volatility_, true};
    }

  private:
    [[nodiscard]] double variance(Date u) const {
        return integralVariance(meanReversion_, volatility_, dates::years(asOf(), u));
    }

    std::vector<Parameter> own_;
    double meanReversion_;
    double volatility_;
    CurvePtr fit_;
    std::string name_;
};

outcome::Faults faultsOf(double meanReversion, double volatility, const Curve& fit) {
    outcome::Faults faults;
    detail::requireWithin(faults, "/meanReversion", meanReversion, 0.0, 100.0, "The mean reversion");
    detail::requireWithin(faults, "/volatility", volatility, 0.0, 10.0, "The volatility");
    if (fit.random() != nullptr) {
        faults.push_back(
            {"/fit", "random-fit", "The curve that a model is fitted to may not be random itself."});
    }
    return faults;
}

} // namespace

Outcome<CurvePtr> hoLee(Date asOf, double volatility, CurvePtr fit) {
    assert(fit->asOf() == asOf);
    static_cast<void>(asOf);
    if (outcome::Faults faults = faultsOf(0.0, volatility, *fit); !faults.empty()) {
        return faults;
    }
    std::vector<Parameter> own{{"/volatility", Parameter::Kind::model, volatility}};
    return CurvePtr(std::make_shared<FittedCurve>(std::move(own), 0.0, volatility, std::move(fit), "Ho–Lee"));
}

Outcome<CurvePtr> hullWhite(Date asOf, double meanReversion, double volatility, CurvePtr fit) {
    assert(fit->asOf() == asOf);
    static_cast<void>(asOf);
    if (outcome::Faults faults = faultsOf(meanReversion, volatility, *fit); !faults.empty()) {
        return faults;
    }
    std::vector<Parameter> own{{"/meanReversion", Parameter::Kind::model, meanReversion},
                               {"/volatility", Parameter::Kind::model, volatility}};
    return CurvePtr(std::make_shared<FittedCurve>(std::move(own), meanReversion, volatility, std::move(fit),
                                                  "Hull–White"));
}

} // namespace forwright::discounting
