#pragma once

#include "forward/quote.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <string>
#include <vector>

namespace forwright::desk {

/// One assumption of how the deal is funded.
struct FundingAssumption {
    std::string name;
    discounting::CurvePtr curve; ///< of the market's date
};

struct ComparisonAsked {
    forward::Inquiry inquiry;
    std::vector<FundingAssumption> fundings; ///< at least one; `/fundings/<i>/curve` is where each stands
};

struct ComparisonRow {
    std::string name;
    bool random = false;
    bool fitted =
        false; ///< a model fitted to a given curve: its forward is that curve's, whatever its parameters
    double fair = 0.0;
    double expectedFactor = 1.0;        ///< E[D(T_s)]
    double averageRateForward = 0.0;    ///< `fair` where nothing is random
    double gap = 0.0;                   ///< fair − averageRateForward
    std::optional<double> deviationLog; ///< of ln D(T_s), where it is known; 0 where nothing is random
    double change = 0.0;                ///< fair less that of the first row
    double onQuantity = 0.0;            ///< the change times the quantity
};
struct Comparison {
    forward::Schedule schedule;
    std::vector<ComparisonRow> rows; ///< as asked
    outcome::Notices notices;
};

/// The same inquiry under one funding assumption after the other: spreads, income and fee as in the market.
/// Refused as a quote is, with every fault at its assumption.
[[nodiscard]] outcome::Outcome<Comparison> compare(const forward::Market& market,
                                                   const ComparisonAsked& asked);

} // namespace forwright::desk
