#include "forward/price.hpp"

#include "dates/date.hpp"
#include "discounting/curves.hpp"

#include <algorithm>
#include <cmath>
#include <string>

namespace forwright::forward {
namespace {

std::string nameOf(Side side) {
    switch (side) {
    case Side::bid:
        return "bid";
    case Side::offer:
        return "offer";
    case Side::fair:
        break;
    }
    return "fair";
}

double spotOn(const Market& market, Side side) {
    switch (side) {
    case Side::bid:
        return market.spot.bid * (1.0 - market.hedgeCost.sell);
    case Side::offer:
        return market.spot.offer * (1.0 + market.hedgeCost.buy);
    case Side::fair:
        break;
    }
    return mid(market.spot);
}

/// The curve at which the side finances: who sells forward buys the asset and borrows, who buys forward sells
/// it and lends.
CurvePtr fundingOn(const Funding& funding, Side side) {
    switch (side) {
    case Side::bid:
        return discounting::withSpread(funding.curve, funding.lendSpread);
    case Side::offer:
        return discounting::withSpread(funding.curve, funding.borrowSpread);
    case Side::fair:
        break;
    }
    return funding.curve;
}

/// The base currency is the asset: who sells forward lends it, who buys forward borrows it.
CurvePtr baseOn(const Funding& base, Side side) {
    if (base.sides && side != Side::fair) {
        return side == Side::bid ? base.sides->bid : base.sides->offer;
    }
    switch (side) {
    case Side::bid:
        return discounting::withSpread(base.curve, base.borrowSpread);
    case Side::offer:
        return discounting::withSpread(base.curve, base.lendSpread);
    case Side::fair:
        break;
    }
    return base.curve;
}

std::vector<std::size_t> countedRows(const std::vector<income::CashDistribution>& rows,
                                     const Schedule& schedule) {
    std::vector<std::size_t> counted;
    for (std::size_t row = 0; row < rows.size(); ++row) {
        if (rows[row].treatment == income::Treatment::inPrice &&
            income::counts(rows[row].ex, schedule.holdFrom, schedule.maturity)) {
            counted.push_back(row);
        }
    }
    std::stable_sort(counted.begin(), counted.end(),
                     [&rows](std::size_t one, std::size_t other) { return rows[one].ex < rows[other].ex; });
    return counted;
}

/// Tells the figures of one price; every text of its working stands here.
class Teller {
  public:
    Teller(const Market& market, const Schedule& schedule, const SideInputs& inputs, Steps& steps)
        : market_(market), schedule_(schedule), inputs_(inputs), steps_(steps) {}

    double spot(double figure) {
        return steps_.tell(figure, [&](double result) {
            Step step = started("spot", "Spot price", result, perUnit());
            const HedgeCost& cost = market_.hedgeCost;
            switch (inputs_.side) {
            case Side::bid:
                step.formula = "S = S_bid · (1 − cost of selling)";
                step.given = {{"S_bid", market_.spot.bid, perUnit()}, {"cost of selling", cost.sell, ""}};
                break;
            case Side::offer:
                step.formula = "S = S_offer · (1 + cost of buying)";
                step.given = {{"S_offer", market_.spot.offer, perUnit()}, {"cost of buying", cost.buy, ""}};
                break;
            case Side::fair:
                step.formula = "S = (S_bid + S_offer)/2";
                step.given = {{"S_bid", market_.spot.bid, perUnit()},
                              {"S_offer", market_.spot.offer, perUnit()}};
                break;
            }
            step.convention = inputs_.side == Side::offer ? "who sells forward buys the asset today"
                              : inputs_.side == Side::bid ? "who buys forward sells the asset today"
                                                          : "the mean of both sides, without cost";
            return step;
        });
    }

    double factor(const std::string& code, const std::string& name, const std::string& symbol, Date date,
                  double figure) {
        return steps_.tell(figure, [&](double result) {
            Step step = started(code, name, result, "");
            const bool ofBase = code.rfind("base", 0) == 0;
            const CurvePtr& curve = ofBase ? inputs_.base : inputs_.funding;
            const double years = dates::years(market_.asOf, date);
            step.formula = "P(" + symbol + ") = e^(−z·t)";
            step.given = {{symbol, date, ""}, {"t", years, "years"}};
            if (years > 0.0) {
                step.given.push_back({"z", -curve->logFactor(date) / years, "a year, continuous"});
            }
            step.convention =
                (ofBase ? "base curve, " : "funding curve, ") + curve->convention() + "; t in ACT/365.FIXED";
            return step;
        });
    }

    double unitsOfPair(double figure, double atSpot, double atSettlement, double costEffect) {
        return steps_.tell(figure, [&](double result) {
            Step step = started("units", "Units of base currency to hold", result, "units");
            step.formula = "n(h) = P_base(T_s)/P_base(t_s)";
            step.given = {{"P_base(T_s)", atSettlement, ""}, {"P_base(t_s)", atSpot, ""}};
            step.convention = "put on deposit they grow to exactly one";
            step.effect = costEffect;
            return step;
        });
    }

    void reinvestments() {
        if (!steps_.heard()) {
            return;
        }
        for (const income::UnitsToHold::Reinvestment& row : inputs_.units.reinvestments()) {
            steps_.tell(row.kept, [&](double result) {
                Step step = started("reinvestment", "Proportional distribution reinvested", result, "units");
                step.formula = "(1 − δ)/(1 − (1 − g)·δ)";
                step.given = {{"δ", row.fraction, ""}, {"g", inputs_.passThrough, ""}, {"ex", row.ex, ""}};
                step.convention = "bought at the price without the distribution";
                return step;
            });
        }
    }

    double units(double figure, double effect) {
        return steps_.tell(figure, [&](double result) {
            const Date from = schedule_.holdFrom;
            Step step = started("units", "Units to hold from the start", result, "units");
            step.formula = "n(h) = ∏ (1 − δ)/(1 − (1 − g)·δ) · Y(h,T) · L(h,T)";
            step.given = {{"∏", inputs_.units.proportionalAfter(from), ""},
                          {"Y(h,T)", inputs_.units.yieldFactor(from), ""},
                          {"L(h,T)", inputs_.units.feeFactor(from), ""},
                          {"h", from, ""},
                          {"T", schedule_.maturity, ""}};
            step.convention = "exactly one unit is there at maturity";
            if (market_.income.yieldCurves) {
                step.convention +=
                    "; Y from a curve, " + market_.income.yieldCurves->on(inputs_.side)->convention();
            }
            step.effect = effect;
            return step;
        });
    }

    double costOfUnits(double figure, const Price& price) {
        return steps_.tell(figure, [&](double result) {
            Step step = started("cost-of-units", "Cost of the hedge, today's value", result, perUnit());
            step.formula = "S · P(t_s) · n(h)";
            step.given = {{"S", price.spot, perUnit()},
                          {"P(t_s)", price.spotFactor, ""},
                          {"n(h)", price.units, "units"}};
            step.convention = "paid on the spot date";
            return step;
        });
    }

    double distribution(double figure, const CashInPrice& cash) {
        return steps_.tell(figure, [&](double result) {
            const income::CashDistribution& row = market_.income.cash[cash.row];
            Step step = started("distribution", "Cash distribution at settlement", result, perUnit());
            step.formula = "g · c · n(ex) · P(pay)/P(T_s)";
            step.given = {{"g", market_.income.passThroughOn(inputs_.side, row), ""},
                          {"c", cash.amount, perUnit()},
                          {"n(ex)", cash.units, "units"},
                          {"P(pay)", cash.factor, ""},
                          {"ex", row.ex, ""},
                          {"pay", row.pay, ""}};
            step.convention = inputs_.side == Side::offer ? "the low end: who sells forward receives it"
                              : inputs_.side == Side::bid ? "the high end: who buys forward owes it"
                                                          : "the amount expected";
            step.effect = -result;
            return step;
        });
    }

    double forward(double figure, const Price& price) {
        return steps_.tell(figure, [&](double result) {
            Step step = started("forward", inputs_.side == Side::fair ? "Fair forward" : "Break-even forward",
                                result, perUnit());
            step.formula = "F = (S · P(t_s) · n(h) − Σ g · c · n(ex) · P(pay))/P(T_s)";
            step.given = {{"S · P(t_s) · n(h)", price.costOfUnits, perUnit()},
                          {"Σ g · c · n(ex) · P(pay)", price.incomeValue, perUnit()},
                          {"P(T_s)", price.settlementFactor, ""}};
            step.convention = "the contract is worth nothing when it is agreed";
            return step;
        });
    }

  private:
    [[nodiscard]] std::string perUnit() const { return market_.asset.currency; }

    [[nodiscard]] Step started(const std::string& code, const std::string& name, double result,
                               const std::string& unit) const {
        Step step;
        step.code = code;
        step.side = nameOf(inputs_.side);
        step.name = name;
        step.result = result;
        step.unit = unit;
        return step;
    }

    const Market& market_;
    const Schedule& schedule_;
    const SideInputs& inputs_;
    Steps& steps_;
};

/// n(h), told with what holding other than one unit does to the forward.
double unitsHeld(const Schedule& schedule, const SideInputs& inputs, const Price& price, Teller& teller) {
    const double grown = price.spot * price.spotFactor / price.settlementFactor;
    if (inputs.base != nullptr) {
        const double atSpot = teller.factor("base-spot-factor", "Base discount factor to the spot date",
                                            "t_s", schedule.spot, inputs.base->factor(schedule.spot));
        const double atSettlement =
            teller.factor("base-settlement-factor", "Base discount factor to settlement", "T_s",
                          schedule.settlement, inputs.base->factor(schedule.settlement));
        const double units = atSettlement / atSpot;
        return teller.unitsOfPair(units, atSpot, atSettlement, grown * (units - 1.0));
    }
    teller.reinvestments();
    const double units = inputs.units.after(schedule.holdFrom);
    return teller.units(units, grown * (units - 1.0));
}

} // namespace

discounting::Rate feeOn(const TwoWay<discounting::Rate>& fee, Side side) {
    switch (side) {
    case Side::bid:
        return fee.offer;
    case Side::offer:
        return fee.bid;
    case Side::fair:
        break;
    }
    return mid(fee);
}

SideInputs inputsOf(const Market& market, const Schedule& schedule, Side side) {
    return {side,
            spotOn(market, side),
            fundingOn(market.funding, side),
            market.base ? baseOn(*market.base, side) : nullptr,
            market.income.passThroughOn(side),
            income::UnitsToHold(market.income, feeOn(market.lendingFee, side), side, schedule.holdFrom,
                                schedule.maturity),
            countedRows(market.income.cash, schedule)};
}

Price price(const Market& market, const Schedule& schedule, const SideInputs& inputs, Steps& steps) {
    Teller teller(market, schedule, inputs, steps);
    Price price;
    price.spot = teller.spot(inputs.spot);
    price.spotFactor = teller.factor("spot-factor", "Discount factor to the spot date", "t_s", schedule.spot,
                                     inputs.funding->factor(schedule.spot));
    price.settlementFactor = teller.factor("settlement-factor", "Discount factor to settlement", "T_s",
                                           schedule.settlement, inputs.funding->factor(schedule.settlement));
    price.units = unitsHeld(schedule, inputs, price, teller);
    price.costOfUnits = teller.costOfUnits(price.spot * price.spotFactor * price.units, price);
    for (const std::size_t index : inputs.cashRows) {
        const income::CashDistribution& row = market.income.cash[index];
        CashInPrice cash;
        cash.row = index;
        cash.amount = row.amount.on(inputs.side);
        cash.passed = market.income.passThroughOn(inputs.side, row) * cash.amount;
        cash.units = inputs.units.after(row.ex);
        cash.factor = inputs.funding->factor(row.pay);
        cash.value = cash.passed * cash.units * cash.factor;
        cash.atSettlement = teller.distribution(cash.value / price.settlementFactor, cash);
        price.incomeValue += cash.value;
        price.cash.push_back(cash);
    }
    price.forward = teller.forward((price.costOfUnits - price.incomeValue) / price.settlementFactor, price);
    return price;
}

Price price(const Market& market, const Schedule& schedule, const SideInputs& inputs) {
    Steps nobody;
    return price(market, schedule, inputs, nobody);
}

Price price(const Market& market, const Schedule& schedule, Side side) {
    return price(market, schedule, inputsOf(market, schedule, side));
}

outcome::Outcome<Price> checked(const Market& market, Price price, Side side) {
    const std::string which = side == Side::fair ? "fair forward" : "break-even " + nameOf(side);
    if (!std::isfinite(price.forward) || !std::isfinite(price.costOfUnits) ||
        !std::isfinite(price.incomeValue)) {
        return outcome::Fault{market.at, "not-finite",
                              "The " + which +
                                  " is too large to be a number: rates, spreads or amounts this extreme over "
                                  "so long a time give no price"};
    }
    if (price.forward <= 0.0) {
        return outcome::Fault{market.at + (price.incomeValue > 0.0 ? "/income" : ""), "not-a-price",
                              "The " + which +
                                  " is not above zero: the income taken off until maturity is worth more "
                                  "than the asset; check amounts and dates"};
    }
    return price;
}

outcome::Review review(const Market& market, const Schedule& schedule) {
    outcome::Review review;
    Date last = std::max(schedule.settlement, schedule.spot);
    for (const std::size_t row : countedRows(market.income.cash, schedule)) {
        last = std::max(last, market.income.cash[row].pay);
    }
    const auto add = [&review](const std::string& at, outcome::Review more) {
        outcome::append(review.faults, at, std::move(more.faults));
        outcome::append(review.notices, at, std::move(more.notices));
    };
    // What is to be said of a curve with sides is said of the fair one; no side may be worse.
    const auto addSides = [&review](const std::string& at, const CurvePtr& bid, const CurvePtr& offer,
                                    Date end) {
        for (const CurvePtr& curve : {bid, offer}) {
            if (review.faults.empty()) {
                outcome::append(review.faults, at, curve->review(end).faults);
            }
        }
    };
    add(market.at + "/funding/curve", market.funding.curve->review(last));
    if (market.base) {
        add(market.at + "/base/curve", market.base->curve->review(last));
        if (market.base->sides) {
            addSides(market.at + "/base/curve", market.base->sides->bid, market.base->sides->offer, last);
        }
    }
    // The quote does not discount by it, so its end being passed is no matter; that it is a curve at all is.
    if (market.discount != market.funding.curve) {
        outcome::append(review.faults, market.at + "/discount", market.discount->review(last).faults);
    }
    const auto addRate = [&](const char* at, const discounting::Rate& rate) {
        if (auto fault = discounting::refusal(rate, schedule.holdFrom, schedule.maturity)) {
            review.faults.push_back(outcome::under(market.at + at, std::move(*fault)));
        }
    };
    if (market.income.yieldCurves) {
        const income::YieldCurves& curves = *market.income.yieldCurves;
        add(market.at + "/income/yield", curves.fair->review(schedule.maturity));
        addSides(market.at + "/income/yield", curves.bid, curves.offer, schedule.maturity);
    } else {
        addRate("/income/yield", market.income.yield);
    }
    // Both sides are of one convention and a single rate stands for both: one fault names the fee as a whole.
    const bool bidIsLower = market.lendingFee.bid.value < market.lendingFee.offer.value;
    addRate("/lendingFee", bidIsLower ? market.lendingFee.bid : market.lendingFee.offer);
    return review;
}

} // namespace forwright::forward
