#pragma once

#include "forward/carry.hpp"
#include "forward/ledger.hpp"
#include "forward/market.hpp"
#include "forward/price.hpp"
#include "forward/random.hpp"
#include "forward/schedule.hpp"
#include "forward/sensitivities.hpp"
#include "forward/working.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <string_view>
#include <vector>

namespace forwright::forward {

/// What the client does: buys (we offer), sells (we bid), or asks for both.
enum class Client { buys, sells, twoWay };
[[nodiscard]] std::optional<Client> parseClient(std::string_view name); ///< `buys`, `sells`, `two-way`
[[nodiscard]] std::string_view nameOf(Client client);

enum class MarginUnit { price, bpOfSpot, bpPerYear };
[[nodiscard]] std::optional<MarginUnit>
parseMarginUnit(std::string_view name); ///< `price`, `bp-of-spot`, `bp-per-year`
[[nodiscard]] std::string_view nameOf(MarginUnit unit);

/// What is put on a break-even: added to the offer, taken off the bid.
struct Margin {
    MarginUnit unit = MarginUnit::price;
    double amount = 0.0; ///< not negative
};
/// The margin in the quote currency a unit; `bp-per-year` is 1e-4 · amount · mid spot · t(T).
[[nodiscard]] double marginInPrice(const Margin& margin, const Market& market, Date maturity);

struct Inquiry {
    Client client = Client::twoWay;
    double quantity = 1.0; ///< units, positive
    Maturity maturity;
    Margin margin;
};

/// What the quote means on the whole quantity, in the quote currency; the client's deal, not a unit's.
struct OnQuantity {
    std::optional<double> notionalBid, notionalOffer; ///< quantity × quote; none on a side not asked for
    TwoWay<double> hedgeUnits;      ///< units bought (+, offer) or sold (−, bid) today to hedge it
    double margin = 0.0;            ///< what the margin comes to, before rounding to the tick
    double fundingBasisPoint = 0.0; ///< change of the fair forward's amount per +1 bp of funding
    std::optional<double> day;      ///< and when a business day passes
    std::optional<double> gap; ///< what random discounting is worth: quantity × (F − average-rate forward)
};

/// A whole quote: prices of all three sides and what the client is told. The side not asked for has no quote.
struct Quote {
    Schedule schedule;
    SideInputs fairInputs, bidInputs, offerInputs;
    Price fair, bid, offer;
    double margin = 0.0; ///< in price
    std::optional<double> quotedBid;
    std::optional<double> quotedOffer;
    double annualised = 0.0;  ///< ln(F/S)/(t(T_s) − t(t_s)), 0 where both dates are one
    outcome::Notices notices; ///< pointers relative to the request
    std::vector<Step> steps;  ///< where asked for
};

/// Where what is asked stands in the request.
struct Places {
    std::string maturity = "/inquiry/maturity";
    std::string margin = "/inquiry/margin";
};

/// The quote, or every reason why there is none.
[[nodiscard]] outcome::Outcome<Quote> quote(const Market& market, const Inquiry& inquiry, bool withSteps,
                                            const Places& places = {});

/// The quote's steps from spot to what the client is told, on one side; nothing on a side not asked for.
[[nodiscard]] std::vector<BridgeStep> bridge(const Market& market, const Quote& quote, Side side);

/// What it all comes to on the quantity; `sensitivities` and `random` are those of the quote's fair price.
[[nodiscard]] OnQuantity onQuantity(const Inquiry& inquiry, const Quote& quote,
                                    const Sensitivities& sensitivities,
                                    const std::optional<RandomView>& random);

/// `value` on the grid of `tick`: itself where it is on it already (to a few units in the last place), else
/// the next multiple below (bid) or above (offer).
[[nodiscard]] double roundedDown(double value, double tick);
[[nodiscard]] double roundedUp(double value, double tick);

} // namespace forwright::forward
