#pragma once

#include "discounting/curves.hpp"
#include "forward/market.hpp"
#include "forward/schedule.hpp"
#include "outcome/outcome.hpp"

#include <string>
#include <vector>

namespace forwright::forward {

/// A forward that the market quotes for one maturity.
struct ForwardQuote {
    Maturity maturity;
    TwoWay<double> value; ///< an outright price, or points
};

/// Forwards by rising maturity, from which the curve of what the asset earns is implied: a currency pair's
/// base currency, another asset's yield.
struct QuotedForwards {
    bool points = false;    ///< outright = spot + points/scale, bid with bid and offer with offer
    double scale = 10000.0; ///< positive
    discounting::Interpolation interpolation = discounting::Interpolation::logLinear;
    std::vector<ForwardQuote> rows;
    CurvePtr against; ///< what interest-rate markets say of the base currency: compared, never priced with;
                      ///< may be null
};

/// One curve a side: with the funding, income and fee of its own side each reprices that side of every row
/// exactly, and `fair` the mean of both outrights.
struct ImpliedCurves {
    CurvePtr fair, bid, offer;
};

/// A row once its dates are known.
struct ResolvedForward {
    std::string at; ///< `/rows/2`
    Schedule schedule;
    TwoWay<double> outright;
};

struct Implied {
    ImpliedCurves curves;
    std::vector<ResolvedForward> rows;
    CurvePtr against;
};

/// The curves of the base currency that make each row's break-evens its quotes: P_base(T_s)/P_base(t_s) =
/// F·P(T_s) / (S·P(t_s)), with S and P of the side; until the first row its forward rate is held back to
/// `asOf`. Or, for an asset that is no pair, the curves of a continuous yield in place of
/// `market.income.yield`, with everything else that the market's income and fee take off in its place.
/// Between the rows as `pillars` interpolates. Parameters: the zero rate at each row, `/rows/i/value`.
/// `market` may lack the base curve and yield; `at` is where the forwards stand in the request. Refused, at
/// the row: what `schedule` refuses, `not-rising`, `before-spot` (not after the spot date),
/// `bid-above-offer`, `not-positive` (an outright), `no-solution`; `empty-list`, `too-many-rows` (200).
[[nodiscard]] outcome::Outcome<Implied> implied(const Market& market, const QuotedForwards& quoted,
                                                const std::string& at);

} // namespace forwright::forward
