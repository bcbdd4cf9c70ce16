#pragma once

#include "forward/price.hpp"

#include <string>
#include <vector>

namespace forwright::forward {

/// The way from spot to the fair forward. Each part is the change when it is added to those before it; they
/// add up to `points`. Of a pair only funding and base differ from 0, otherwise base is 0.
struct Carry {
    double spot = 0.0; ///< mid
    double funding = 0.0;
    double fee = 0.0;
    double yield = 0.0;
    double proportional = 0.0;
    double cash = 0.0;
    double base = 0.0;
    double points = 0.0; ///< F − S
};
[[nodiscard]] Carry carry(const Market& market, const Schedule& schedule, const SideInputs& fair,
                          const Price& price);

/// One row of income and what became of it in the fair price.
struct IncomeLine {
    std::string at; ///< pointer of its row
    Date ex;
    std::optional<Date> pay;        ///< of cash
    std::optional<double> amount;   ///< of cash, quote currency a unit
    std::optional<double> fraction; ///< of a proportional distribution
    bool counted = false;
    std::string
        reason; ///< code: `counted`, `before-hold`, `after-maturity`, `passed-through`, `adjusts-contract`
    std::string effect;     ///< what its treatment does to the price, in a sentence
    double wouldTake = 0.0; ///< cash: what it takes off the forward, or would where it were in the price; 0
                            ///< outside the time of the hedge
    double units = 0.0;     ///< n(ex); 0 where not counted
    double factor = 0.0;    ///< P(pay), cash only
    double atSettlement =
        0.0; ///< what it takes off the forward; of a proportional one, its part of `Carry::proportional`
};
/// Every row of the request in its order, counted or not.
[[nodiscard]] std::vector<IncomeLine> incomeLines(const Market& market, const Schedule& schedule,
                                                  const SideInputs& fair, const Price& price);

/// One bar of the way from spot to what the client is told.
struct BridgeStep {
    std::string code; ///< `spot`, `funding`, `fee`, `yield`, `proportional`, `cash`, `base`, `fair`, `side`,
                      ///< `margin`, `rounding`, `quote`
    bool total = false;  ///< a level to stand on (`spot`, `fair`, `quote`) rather than a change
    double change = 0.0; ///< 0 of a total
    double level = 0.0;  ///< where it ends
};
/// From mid spot over the fair forward (`carry`) to the quote: `side` leads from fair to the side's
/// break-even, then margin and rounding to the tick. Parts of the carry that are exactly 0 (the asset has no
/// such thing) are left out.
[[nodiscard]] std::vector<BridgeStep> bridge(const Carry& carry, double fair, double breakEven,
                                             double withMargin, double quoted);

} // namespace forwright::forward
