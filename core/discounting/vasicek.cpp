#include "dates/date.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "discounting/decay.hpp"
#include "discounting/laws.hpp"
#include "discounting/mean_reversion.hpp"
#include "discounting/path_makers.hpp"

#include <cmath>

namespace forwright::discounting {

namespace {

/// E[ln D] = −θt − (r0 − θ)B, written without the cancellation of θt and θB.
template <class T> T meanLogOf(const T& r0, const T& meanReversion, const T& longRun, double years) {
    const T x = meanReversion * years;
    return -(r0 * detail::decayMean(x) + longRun * x * detail::decayGap(x)) * years;
}

template <class T> T varianceLogOf(const T& meanReversion, const T& volatility, double years) {
    return volatility * volatility * (years * years * years) * detail::decayVariance(meanReversion * years);
}

class VasicekCurve final : public Curve, public RandomDiscount {
  public:
    VasicekCurve(Date asOf, const Vasicek& model) : Curve(asOf), model_(model) {}

    [[nodiscard]] double logFactor(Date u) const override { return meanLog(u) + variance(u) / 2.0; }

    [[nodiscard]] std::vector<Parameter> parameters() const override {
        return {{"/r0", Parameter::Kind::model, model_.r0},
                {"/meanReversion", Parameter::Kind::model, model_.meanReversion},
                {"/longRun", Parameter::Kind::model, model_.longRun},
                {"/volatility", Parameter::Kind::model, model_.volatility}};
    }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        using Dual = detail::Dual<4>;
        const Dual r0 = Dual::parameter(model_.r0, 0);
        const Dual meanReversion = Dual::parameter(model_.meanReversion, 1);
        const Dual longRun = Dual::parameter(model_.longRun, 2);
        const Dual volatility = Dual::parameter(model_.volatility, 3);
        const double years = dates::years(asOf(), u);
        const Dual log = meanLogOf(r0, meanReversion, longRun, years) +
                         varianceLogOf(meanReversion, volatility, years) / 2.0;
        return {log.slope.begin(), log.slope.end()};
    }

    [[nodiscard]] outcome::Review review(Date last) const override {
        // |r0|B + |θ|(t − B) + V/2 grows with t and is at least every |ln P| before it.
        const double years = dates::years(asOf(), last);
        const double bound =
            -meanLogOf(std::fabs(model_.r0), model_.meanReversion, std::fabs(model_.longRun), years) +
            variance(last) / 2.0;
        return detail::finiteReview(*this, last, bound);
    }

    [[nodiscard]] std::string convention() const override {
        return "Vasicek model, expected discount factor";
    }

    [[nodiscard]] const RandomDiscount* random() const override { return this; }

    [[nodiscard]] double meanLog(Date u) const override {
        return meanLogOf(model_.r0, model_.meanReversion, model_.longRun, dates::years(asOf(), u));
    }
    [[nodiscard]] std::optional<double> varianceLog(Date u) const override { return variance(u); }
    [[nodiscard]] outcome::Outcome<LogLawPtr> law(Date u) const override {
        return detail::normalLaw(meanLog(u), variance(u));
    }
    [[nodiscard]] outcome::Outcome<PathMakerPtr> pathMaker(std::span<const Date> dates,
                                                           std::size_t target) const override {
        return detail::normalPaths(*this, dates, target);
    }
    [[nodiscard]] std::optional<NormalRate> normalRate() const override {
        return NormalRate{model_.meanReversion, model_.volatility, false};
    }

  private:
    [[nodiscard]] double variance(Date u) const {
        return varianceLogOf(model_.meanReversion, model_.volatility, dates::years(asOf(), u));
    }

    Vasicek model_;
};

} // namespace

Outcome<CurvePtr> vasicek(Date asOf, const Vasicek& model) {
    outcome::Faults faults;
    detail::requireWithin(faults, "/r0", model.r0, -0.99, 10.0, "The rate today");
    detail::requireWithin(faults, "/meanReversion", model.meanReversion, 0.0, 100.0, "The mean reversion");
    detail::requireWithin(faults, "/longRun", model.longRun, -0.99, 10.0, "The long-run rate");
    detail::requireWithin(faults, "/volatility", model.volatility, 0.0, 10.0, "The volatility");
    if (!faults.empty()) {
        return faults;
    }
    return CurvePtr(std::make_shared<VasicekCurve>(asOf, model));
}

} // namespace forwright::discounting
