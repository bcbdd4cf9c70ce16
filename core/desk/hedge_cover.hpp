#pragma once

#include "forward/quote.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <vector>

namespace forwright::desk {

/// What the dealer thinks of the price itself, how much of it can be hedged, and what the rest is charged
/// for.
struct HedgeCoverAsked {
    forward::Maturity maturity;
    double growth = 0.0;        ///< μ, a year, continuous
    double volatility = 0.0;    ///< s
    double share = 1.0;         ///< h, 0 to 1: hedged
    double loading = 0.0;       ///< λ, not negative: price of a deviation
    std::vector<double> shares; ///< more of h, for a picture
    double quantity = 1.0;      ///< units, positive
};

/// One quantile of what the dealer ends with, a unit.
struct ResultQuantile {
    double probability = 0.0;
    double result = 0.0;
};

struct CoverAt {
    double share = 1.0;
    double deviation = 0.0;    ///< of the result: (1 − h)·E·√(e^(s²t) − 1)
    double sell = 0.0;         ///< F + (1 − h)(E − F) + λ·deviation
    std::optional<double> buy; ///< the same with − λ; none where that is not above zero
    std::vector<ResultQuantile>
        quantiles;                ///< of the result when sold at `sell`, at 1, 5, 25, 50, 75, 95, 99 %
    double lossProbability = 0.0; ///< that the result then is below zero
    std::vector<ResultQuantile> buyQuantiles; ///< the same when bought at `buy`; empty where there is none
    std::optional<double> buyLossProbability;
};

/// What the prices asked for come to on the quantity, in the quote currency.
struct CoverOnQuantity {
    double sell = 0.0;         ///< quantity × (sell − F): what the client pays over the hedged price
    std::optional<double> buy; ///< quantity × (F − buy)
    double deviation = 0.0;    ///< quantity × deviation
};

struct HedgeCover {
    forward::Schedule schedule;
    double fair = 0.0;     ///< F
    double expected = 0.0; ///< E = mid spot·e^(μt), t to maturity
    CoverAt asked;
    CoverOnQuantity onQuantity;
    std::vector<CoverAt> shares;
    outcome::Notices notices;
};

/// The price from the insurer's to the hedger's. Selling at K and hedging the share h, the dealer ends with
/// (K − F) + (1 − h)(F − S(T)), S(T) lognormal with mean E; buying at K, with (F − K) + (1 − h)(S(T) − F). At
/// h = 1 nothing of the price's own growth and risk is left: both prices are F whatever μ is. At h = 0 they
/// are the expected value with a loading. Refused: a price asked for by `share` that is not above zero
/// (`not-a-price`), figures that are not finite.
[[nodiscard]] outcome::Outcome<HedgeCover> hedgeCover(const forward::Market& market,
                                                      const HedgeCoverAsked& asked);

} // namespace forwright::desk
