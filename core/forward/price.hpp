#pragma once

#include "forward/market.hpp"
#include "forward/schedule.hpp"
#include "forward/working.hpp"
#include "income/income.hpp"
#include "outcome/outcome.hpp"

#include <cstddef>
#include <vector>

namespace forwright::forward {

/// What one side prices with: the side's own spot, curves, amounts and units, chosen once and read by
/// everything after.
struct SideInputs {
    Side side = Side::fair;
    double spot =
        0.0; ///< fair: mid; offer: the offer with the cost of buying; bid: the bid less the cost of selling
    CurvePtr funding;                  ///< with the side's spread
    CurvePtr base;                     ///< of a currency pair, with the side's spread; null otherwise
    double passThrough = 1.0;          ///< g, of distributions that have none of their own
    income::UnitsToHold units;         ///< of a currency pair 1 on every day
    std::vector<std::size_t> cashRows; ///< indices of the market's cash rows that count, by ex date
};

/// The lending fee of a side: a holder lends at its bid, a short seller borrows at its offer, the fair price
/// takes the mean.
[[nodiscard]] discounting::Rate feeOn(const TwoWay<discounting::Rate>& fee, Side side);
[[nodiscard]] SideInputs inputsOf(const Market& market, const Schedule& schedule, Side side);

/// One cash distribution that counts, as it enters the price.
struct CashInPrice {
    std::size_t row = 0;       ///< index into the market's cash rows
    double amount = 0.0;       ///< c: a unit, on this side
    double passed = 0.0;       ///< g·c
    double units = 1.0;        ///< n(ex)
    double factor = 1.0;       ///< P(pay)
    double value = 0.0;        ///< g·c·n(ex)·P(pay): what it is worth today
    double atSettlement = 0.0; ///< the same at settlement: what it takes off the forward
};

/// A forward price and everything it was made of.
struct Price {
    double forward = 0.0;          ///< F
    double spot = 0.0;             ///< S
    double spotFactor = 1.0;       ///< P(t_s)
    double settlementFactor = 1.0; ///< P(T_s)
    double units = 1.0;            ///< n(h)
    double costOfUnits = 0.0;      ///< S·P(t_s)·n(h), today's value of the hedge
    double incomeValue = 0.0;      ///< Σ g·c·n(ex)·P(pay), today's value of the cash it brings
    std::vector<CashInPrice> cash; ///< by ex date
};

/// The price at which the forward is worth nothing, S the side's spot, P its funding, n its units:
///     F = [ S·P(t_s)·n(h) − Σ g·c·n(ex)·P(pay) ] / P(T_s)
/// the martingale property of discounted prices under the pricing measure with income taken off (Harrison and
/// Kreps 1979, from memory); P is an expected discount factor, so random discounting changes nothing else. At
/// T = h and without lag it is S. Each figure is told to `steps` as it is made. Not finite or below zero is
/// the caller's to refuse: see `checked`.
[[nodiscard]] Price price(const Market& market, const Schedule& schedule, const SideInputs& inputs,
                          Steps& steps);
[[nodiscard]] Price price(const Market& market, const Schedule& schedule, const SideInputs& inputs);
[[nodiscard]] Price price(const Market& market, const Schedule& schedule, Side side);

/// The price, or why it is none: `not-finite`, `not-a-price` (not above zero).
[[nodiscard]] outcome::Outcome<Price> checked(const Market& market, Price price, Side side);

/// What stands against pricing to these dates (curves that give no factor so far ahead, rates out of their
/// domain), and what the person should know (a curve's end passed).
[[nodiscard]] outcome::Review review(const Market& market, const Schedule& schedule);

} // namespace forwright::forward
