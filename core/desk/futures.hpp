#pragma once

#include "forward/quote.hpp"
#include "outcome/outcome.hpp"

#include <vector>

namespace forwright::desk {

using dates::Date;

/// A spot price that moves with the short rate: lognormal with this volatility a year (0 to 10) and
/// correlation (−1 to 1).
struct FuturesAsked {
    std::vector<forward::Maturity> maturities; ///< at least one
    std::vector<std::string> places;           ///< where each stands
    double volatility = 0.0;
    double correlation = 0.0;
    double quantity = 1.0; ///< units, positive
};

/// The futures price beside the forward. The ratio is e to the sum of the two terms.
struct FuturesRow {
    forward::Schedule schedule;
    double forward = 0.0; ///< fair
    double futures = 0.0;
    double ratio = 1.0;
    double covariance =
        0.0; ///< ρ·s·σ·(t − B)/κ: gains come in when rates are high, and earn them, or the other way
    double convexity = 0.0;         ///< V: of the random factor itself
    double difference = 0.0;        ///< futures − forward, a unit: the sum of the two parts
    double covarianceInPrice = 0.0; ///< forward·(e^covariance − 1)
    double convexityInPrice = 0.0;  ///< the rest, on top of it
    double onQuantity = 0.0;        ///< the difference times the quantity
};
struct Futures {
    std::vector<FuturesRow> rows;
    outcome::Notices notices; ///< cash distributions, for which the ratio is near rather than exact
};

/// The price of a future, which is settled every day, on an asset that pays no fixed cash:
///     futures = forward · e^(ρ·s·σ·(t − B)/κ + V),    t the years to settlement (ρ·s·σ·t²/2 + V where κ =
///     0),
/// because a futures price is a martingale under the pricing measure, and the forward price one with ln D's
/// covariance taken out (Cox, Ingersoll and Ross, J. Financial Economics 9 (1981), give the sign). Where
/// funding is not random both are one. Refused: a random curve whose short rate is not normal
/// (`no-closed-form`).
[[nodiscard]] outcome::Outcome<Futures> futures(const forward::Market& market, const FuturesAsked& asked);

} // namespace forwright::desk
