#pragma once

#include "forward/quote.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <string>
#include <vector>

namespace forwright::desk {

using dates::Date;

/// A quoted forward beside what the market that it implies makes of it.
struct RepricedForward {
    std::string at;
    Date date;                        ///< maturity
    forward::TwoWay<double> quote;    ///< outright
    forward::TwoWay<double> repriced; ///< break-evens
    double fair = 0.0;
    double impliedZero = 0.0; ///< what the base currency earns, or the yield: continuous, ACT/365.FIXED, from
                              ///< the market's date to settlement (maturity where it is a yield)
    std::optional<double> againstZero; ///< the same from the interest-rate curve given for it
    std::optional<double> difference;  ///< implied less that
};

/// Every forward that the market's base curve or yield is implied by, in the request's order; empty where
/// there are none. Refused as a quote to its date is.
[[nodiscard]] outcome::Outcome<std::vector<RepricedForward>> repricedForwards(const forward::Market& market);

} // namespace forwright::desk
