#include "discounting/checks.hpp"
#include "discounting/curves.hpp"

#include <cmath>

namespace forwright::discounting {

namespace {

class FlatCurve final : public Curve {
  public:
    FlatCurve(Date asOf, const Rate& rate, std::string rateAt)
        : Curve(asOf), rate_(rate), rateAt_(std::move(rateAt)) {}

    [[nodiscard]] double logFactor(Date u) const override { return discounting::logFactor(rate_, asOf(), u); }

    [[nodiscard]] std::vector<Parameter> parameters() const override {
        return {{rateAt_, Parameter::Kind::model, rate_.value}};
    }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        return {logFactorSlope(rate_, asOf(), u)};
    }

    [[nodiscard]] outcome::Review review(Date last) const override {
        if (auto fault = refusal(rate_, asOf(), last)) {
            return {{outcome::under(rateAt_, std::move(*fault))}, {}};
        }
        // Time only grows towards `last` (but for a day's worth of ACT/365L), and with it |ln P|.
        outcome::Review review = detail::finiteReview(*this, last, std::fabs(logFactor(last)) * 1.01);
        for (outcome::Fault& fault : review.faults) {
            fault.at = rateAt_;
        }
        return review;
    }

    [[nodiscard]] std::string convention() const override { return "one rate, " + conventionOf(rate_); }

  private:
    Rate rate_;
    std::string rateAt_;
};

} // namespace

CurvePtr flat(Date asOf, const Rate& rate, const std::string& rateAt) {
    return std::make_shared<FlatCurve>(asOf, rate, rateAt);
}

} // namespace forwright::discounting
