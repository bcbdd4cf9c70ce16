#include "forward/implied.hpp"

#include "discounting/calibration.hpp"
#include "forward/price.hpp"
#include "numeric/elementary.hpp"

#include <cmath>
#include <limits>

namespace forwright::forward {
namespace {

constexpr std::size_t mostRows = 200;

/// A curve through the rows, whose parameters are named by them.
class ImpliedCurve final : public discounting::Curve {
  public:
    ImpliedCurve(CurvePtr pillars, std::vector<Date> ends)
        : Curve(pillars->asOf()), pillars_(std::move(pillars)), ends_(std::move(ends)) {}

    [[nodiscard]] double logFactor(Date u) const override { return pillars_->logFactor(u); }
    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        return pillars_->logFactorGradient(u);
    }
    [[nodiscard]] std::vector<discounting::Parameter> parameters() const override {
        std::vector<discounting::Parameter> all = pillars_->parameters();
        for (std::size_t i = 0; i < all.size(); ++i) {
            all[i].at = rowAt(i) + "/value";
        }
        return all;
    }
    [[nodiscard]] outcome::Review review(Date last) const override {
        outcome::Review review = pillars_->review(last);
        for (outcome::Fault& fault : review.faults) {
            fault.at = "/rows";
        }
        for (outcome::Notice& notice : review.notices) {
            notice.at = rowAt(ends_.size() - 1) + "/at";
        }
        return review;
    }
    [[nodiscard]] std::string convention() const override {
        return "implied by " + std::to_string(ends_.size()) +
               (ends_.size() == 1 ? " forward quoted" : " forwards quoted");
    }
    [[nodiscard]] std::vector<Date> jumps() const override { return ends_; }

    [[nodiscard]] static std::string rowAt(std::size_t row) { return "/rows/" + std::to_string(row); }

  private:
    CurvePtr pillars_;
    std::vector<Date> ends_;
};

/// How much of a miss in ln F is let pass: a forward of 1e9 has its logarithm to 4e-15, and what income takes
/// off adds to it.
constexpr double tolerance = 2e-13;

double sideOf(const TwoWay<double>& both, Side side) {
    switch (side) {
    case Side::bid:
        return both.bid;
    case Side::offer:
        return both.offer;
    case Side::fair:
        break;
    }
    return mid(both);
}

bool isPair(const Market& market) {
    return market.asset.kind == AssetKind::currencyPair;
}

/// The day whose factor a row tells: a pair is paid on its settlement, a yield accrues to maturity.
Date pillarOf(const Market& market, const Schedule& schedule) {
    return isPair(market) ? schedule.settlement : schedule.maturity;
}

/// ln F + ln P(T_s) = ln S + ln P(t_s) + ln P_base(T_s) − ln P_base(t_s).
discounting::Condition ofPair(const SideInputs& inputs, const Schedule& schedule, double outright) {
    const double wanted = numeric::log(outright / inputs.spot) +
                          inputs.funding->logFactor(schedule.settlement) -
                          inputs.funding->logFactor(schedule.spot);
    return {{schedule.spot, schedule.settlement},
            [wanted](std::span<const double> logs, std::span<double> byLogs) {
                byLogs[0] = -1.0;
                byLogs[1] = 1.0;
                return logs[1] - logs[0] - wanted;
            },
            tolerance};
}

/// ln(S·P(t_s)·n(h) − Σ g·c·n(ex)·P(pay)) = ln F + ln P(T_s), where n has the yield's factor from u to T in
/// it.
discounting::Condition ofYield(const Market& market, const SideInputs& inputs, const Schedule& schedule,
                               double outright) {
    const auto withoutYield = [&](Date u) {
        return inputs.units.proportionalAfter(u) * inputs.units.feeFactor(u);
    };
    discounting::Condition condition{{schedule.maturity, schedule.holdFrom}, {}, tolerance};
    std::vector<double> amounts{inputs.spot * inputs.funding->factor(schedule.spot) *
                                withoutYield(schedule.holdFrom)};
    for (const std::size_t index : inputs.cashRows) {
        const income::CashDistribution& row = market.income.cash[index];
        condition.dates.push_back(row.ex);
        amounts.push_back(-market.income.passThroughOn(inputs.side, row) * row.amount.on(inputs.side) *
                          withoutYield(row.ex) * inputs.funding->factor(row.pay));
    }
    const double wanted = numeric::log(outright) + inputs.funding->logFactor(schedule.settlement);
    condition.miss = [amounts, wanted](std::span<const double> logs, std::span<double> byLogs) {
        double sum = 0.0;
        for (std::size_t i = 0; i < amounts.size(); ++i) {
            byLogs[i + 1] = -amounts[i] * numeric::exp(logs[0] - logs[i + 1]);
            sum -= byLogs[i + 1];
        }
        if (!(sum > 0.0)) {
            return std::numeric_limits<double>::quiet_NaN();
        }
        for (std::size_t i = 0; i < amounts.size(); ++i) {
            byLogs[i + 1] /= sum;
            byLogs[0] -= byLogs[i + 1];
        }
        return numeric::log(sum) - wanted;
    };
    return condition;
}

/// Rows with their dates, or what stands against them.
std::vector<ResolvedForward> resolved(const Market& market, const QuotedForwards& quoted,
                                      const std::string& at, outcome::Faults& faults) {
    std::vector<ResolvedForward> rows;
    for (std::size_t i = 0; i < quoted.rows.size(); ++i) {
        const ForwardQuote& row = quoted.rows[i];
        const std::string rowAt = ImpliedCurve::rowAt(i);
        const auto schedule = forward::schedule(market, row.maturity, at + rowAt + "/at");
        if (!schedule) {
            outcome::append(faults, "", schedule.faults());
            continue;
        }
        ResolvedForward made{rowAt, schedule.value(), row.value};
        if (quoted.points) {
            made.outright = {market.spot.bid + row.value.bid / quoted.scale,
                             market.spot.offer + row.value.offer / quoted.scale};
        }
        const Date pillar = pillarOf(market, made.schedule);
        if (pillar <= made.schedule.spot) {
            faults.push_back({at + rowAt + "/at", "before-spot",
                              "A forward that is quoted ends after the spot date, " +
                                  dates::toIso(made.schedule.spot) + "."});
        } else if (!rows.empty() && pillar <= pillarOf(market, rows.back().schedule)) {
            faults.push_back(
                {at + rowAt + "/at", "not-rising",
                 "Forwards stand by rising maturity; this one does not end after the one before it, " +
                     dates::toIso(pillarOf(market, rows.back().schedule)) + "."});
        }
        if (!(made.outright.bid > 0.0) || !std::isfinite(made.outright.offer)) {
            faults.push_back({at + rowAt + "/value", "not-positive",
                              "The outright forward that this makes is not a positive number."});
        } else if (made.outright.bid > made.outright.offer) {
            faults.push_back(
                {at + rowAt + "/value", "bid-above-offer",
                 "The bid that this makes is above the offer: look at the order of the two sides and at "
                 "the scale."});
        }
        rows.push_back(std::move(made));
    }
    return rows;
}

outcome::Outcome<CurvePtr> curveOn(const Market& market, const QuotedForwards& quoted,
                                   const std::vector<ResolvedForward>& rows, Side side,
                                   const std::string& at) {
    std::vector<Date> pillars;
    std::vector<discounting::Condition> conditions;
    std::vector<double> guess;
    for (const ResolvedForward& row : rows) {
        const SideInputs inputs = inputsOf(market, row.schedule, side);
        const double outright = sideOf(row.outright, side);
        pillars.push_back(pillarOf(market, row.schedule));
        conditions.push_back(isPair(market) ? ofPair(inputs, row.schedule, outright)
                                            : ofYield(market, inputs, row.schedule, outright));
        guess.push_back(0.0);
    }
    auto found = discounting::calibrate(market.asOf, quoted.interpolation, pillars, conditions, guess);
    if (const std::size_t* failed = std::get_if<std::size_t>(&found)) {
        return outcome::Fault{
            at + rows[*failed].at + "/value", "no-solution",
            "No curve gives this forward together with those before it: look at it, at spot and at "
            "the income until then."};
    }
    return CurvePtr(
        std::make_shared<ImpliedCurve>(std::get<discounting::Calibrated>(found).curve, std::move(pillars)));
}

} // namespace

outcome::Outcome<Implied> implied(const Market& market, const QuotedForwards& quoted, const std::string& at) {
    outcome::Faults faults;
    if (quoted.rows.empty()) {
        return outcome::Fault{at + "/rows", "empty-list", "At least one forward has to be quoted."};
    }
    if (quoted.rows.size() > mostRows) {
        return outcome::Fault{at + "/rows", "too-many-rows",
                              "At most " + std::to_string(mostRows) + " forwards make a curve."};
    }
    Implied made;
    made.against = quoted.against;
    made.rows = resolved(market, quoted, at, faults);
    if (!faults.empty()) {
        return faults;
    }
    // Factors are taken below; where a curve or rate gives none so far ahead, that is told as for any
    // forward.
    const outcome::Review found = review(market, made.rows.back().schedule);
    if (!found.faults.empty()) {
        return found.faults;
    }
    for (const auto& [side, curve] : {std::pair{Side::fair, &made.curves.fair},
                                      {Side::bid, &made.curves.bid},
                                      {Side::offer, &made.curves.offer}}) {
        outcome::Outcome<CurvePtr> one = curveOn(market, quoted, made.rows, side, at);
        if (!one) {
            return one.faults();
        }
        *curve = std::move(one).value();
    }
    return made;
}

} // namespace forwright::forward
