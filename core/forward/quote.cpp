#include "forward/quote.hpp"

#include "dates/date.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

namespace forwright::forward {
namespace {

constexpr std::array<std::string_view, 3> clientNames{"buys", "sells", "two-way"};
constexpr std::array<std::string_view, 3> marginUnitNames{"price", "bp-of-spot", "bp-per-year"};

template <class Enum, std::size_t n>
std::optional<Enum> parse(const std::array<std::string_view, n>& names, std::string_view name) {
    const auto found = std::find(names.begin(), names.end(), name);
    if (found == names.end()) {
        return std::nullopt;
    }
    return static_cast<Enum>(found - names.begin());
}

/// The n-th multiple of a tick. Where a whole number of ticks makes one, dividing gives the double nearest to
/// the decimal that is meant: 10005/100 is 100.05, 10005 · 0.01 is not.
double multiple(double n, double tick) {
    const double inOne = 1.0 / tick;
    const double whole = std::round(inOne);
    const bool dividesOne =
        whole >= 1.0 && std::fabs(inOne - whole) <= 4.0 * std::numeric_limits<double>::epsilon() * whole;
    return dividesOne ? n / whole : n * tick;
}

/// How many ticks a value holds, whole where it is on the grid but for the rounding of its last places.
double ticksIn(double value, double tick) {
    const double ticks = value / tick;
    const double nearest = std::round(ticks);
    const double slack = 4.0 * std::numeric_limits<double>::epsilon() * std::max(1.0, std::fabs(ticks));
    return std::fabs(ticks - nearest) <= slack ? nearest : ticks;
}

bool offers(Client client) {
    return client != Client::sells;
}

bool bids(Client client) {
    return client != Client::buys;
}

std::string_view nameOf(const Resolution& resolution) {
    if (resolution.code == "spot") {
        return "Spot date";
    }
    if (resolution.code == "hold-from") {
        return "Hedge held from";
    }
    return resolution.code == "maturity" ? "Maturity" : "Settlement";
}

std::string_view symbolOf(const Resolution& resolution) {
    if (resolution.code == "spot") {
        return "t_s";
    }
    if (resolution.code == "hold-from") {
        return "h";
    }
    return resolution.code == "maturity" ? "T" : "T_s";
}

std::vector<Step> dateSteps(const Schedule& schedule) {
    std::vector<Step> steps;
    for (const Resolution& resolution : schedule.resolutions) {
        Step step;
        step.code = resolution.code + "-date";
        step.side = "dates";
        step.name = nameOf(resolution);
        step.formula = symbolOf(resolution);
        step.given = {{"market's date", schedule.asOf, ""}};
        step.result = resolution.date;
        step.convention = resolution.rule;
        steps.push_back(std::move(step));
    }
    return steps;
}

Step marginStep(const Margin& margin, const Market& market, Date maturity, double result) {
    Step step;
    step.code = "margin";
    step.side = "quote";
    step.name = "Margin";
    step.result = result;
    step.unit = market.asset.currency;
    step.given = {{"margin", margin.amount, std::string(nameOf(margin.unit))}};
    step.convention = "added to the offer, taken off the bid";
    switch (margin.unit) {
    case MarginUnit::price:
        step.formula = "m = margin";
        break;
    case MarginUnit::bpOfSpot:
        step.formula = "m = margin/10000 · S";
        step.given.push_back({"S", mid(market.spot), market.asset.currency});
        break;
    case MarginUnit::bpPerYear:
        step.formula = "m = margin/10000 · S · t(T)";
        step.given.push_back({"S", mid(market.spot), market.asset.currency});
        step.given.push_back({"t(T)", dates::years(market.asOf, maturity), "years"});
        break;
    }
    return step;
}

/// What the client is told on one side.
struct Told {
    const char* code;
    const char* name;
    const char* formula;
    double breakEven;
    double margin; ///< with its sign
};

double quoted(const Market& market, const Told& told, bool upwards, Steps& steps) {
    const double withMargin = told.breakEven + told.margin;
    const std::optional<double>& tick = market.asset.tick;
    const double price = !tick     ? withMargin
                         : upwards ? roundedUp(withMargin, *tick)
                                   : roundedDown(withMargin, *tick);
    return steps.tell(price, [&](double result) {
        Step step;
        step.code = told.code;
        step.side = "quote";
        step.name = told.name;
        step.formula = told.formula;
        step.given = {{"break-even", told.breakEven, market.asset.currency},
                      {"m", std::fabs(told.margin), market.asset.currency}};
        if (tick) {
            step.given.push_back({"tick", *tick, market.asset.currency});
        }
        step.result = result;
        step.unit = market.asset.currency;
        step.convention = !tick     ? "not rounded: the asset has no tick"
                          : upwards ? "rounded up to the tick; a value on it stays"
                                    : "rounded down to the tick; a value on it stays";
        step.effect = result - told.breakEven;
        return step;
    });
}

/// Takes a side's price in, or its faults.
void take(Price& into, outcome::Faults& faults, outcome::Outcome<Price> price) {
    if (price) {
        into = std::move(price).value();
    } else {
        outcome::append(faults, "", price.faults());
    }
}

double annualisedCarry(const Price& fair, const Schedule& schedule) {
    const double years = dates::years(schedule.spot, schedule.settlement);
    return years > 0.0 ? numeric::log(fair.forward / fair.spot) / years : 0.0;
}

/// Why what the client would be told is no price; nothing where it is one. `withMargin` is it before
/// rounding.
std::optional<outcome::Fault> notAPrice(const Market& market, const Places& places, double withMargin,
                                        double told) {
    const bool byMargin = !std::isfinite(withMargin) || withMargin <= 0.0;
    const std::string at = byMargin ? places.margin : market.at + "/asset/tick";
    if (!std::isfinite(told)) {
        return outcome::Fault{
            at, "not-finite",
            byMargin ? "With this margin the quote is too large to be a number: give a smaller one"
                     : "This tick is too small to count the quote in: give a larger one"};
    }
    if (told <= 0.0) {
        return outcome::Fault{at, "not-a-price",
                              byMargin ? "The margin takes the bid to zero or below: give a smaller one"
                                       : "Rounded down to this tick the bid is zero: give a smaller one"};
    }
    return std::nullopt;
}

/// Puts the margin on the sides that are asked for.
void putMargin(Quote& quote, const Market& market, const Inquiry& inquiry, const Places& places, Steps& steps,
               outcome::Faults& faults) {
    const Date maturity = quote.schedule.maturity;
    quote.margin = steps.tell(marginInPrice(inquiry.margin, market, maturity), [&](double result) {
        return marginStep(inquiry.margin, market, maturity, result);
    });
    if (bids(inquiry.client)) {
        quote.quotedBid = quoted(
            market, {"quoted-bid", "Our bid", "bid = break-even − m", quote.bid.forward, -quote.margin},
            false, steps);
        if (auto fault = notAPrice(market, places, quote.bid.forward - quote.margin, *quote.quotedBid)) {
            faults.push_back(std::move(*fault));
        }
    }
    if (offers(inquiry.client)) {
        quote.quotedOffer =
            quoted(market,
                   {"quoted-offer", "Our offer", "offer = break-even + m", quote.offer.forward, quote.margin},
                   true, steps);
        if (auto fault = notAPrice(market, places, quote.offer.forward + quote.margin, *quote.quotedOffer)) {
            faults.push_back(std::move(*fault));
        }
    }
}

} // namespace

std::optional<Client> parseClient(std::string_view name) {
    return parse<Client>(clientNames, name);
}

std::string_view nameOf(Client client) {
    return clientNames[static_cast<std::size_t>(client)];
}

std::optional<MarginUnit> parseMarginUnit(std::string_view name) {
    return parse<MarginUnit>(marginUnitNames, name);
}

std::string_view nameOf(MarginUnit unit) {
    return marginUnitNames[static_cast<std::size_t>(unit)];
}

double marginInPrice(const Margin& margin, const Market& market, Date maturity) {
    switch (margin.unit) {
    case MarginUnit::bpOfSpot:
        return 1e-4 * margin.amount * mid(market.spot);
    case MarginUnit::bpPerYear:
        return 1e-4 * margin.amount * mid(market.spot) * dates::years(market.asOf, maturity);
    case MarginUnit::price:
        break;
    }
    return margin.amount;
}

double roundedDown(double value, double tick) {
    return multiple(std::floor(ticksIn(value, tick)), tick);
}

double roundedUp(double value, double tick) {
    return multiple(std::ceil(ticksIn(value, tick)), tick);
}

outcome::Outcome<Quote> quote(const Market& market, const Inquiry& inquiry, bool withSteps,
                              const Places& places) {
    outcome::Outcome<Schedule> dates = schedule(market, inquiry.maturity, places.maturity);
    if (!dates) {
        return dates.faults();
    }
    outcome::Review found = review(market, dates.value());
    if (!found.faults.empty()) {
        return found.faults;
    }

    const Schedule& schedule = dates.value();
    std::vector<Step> told = withSteps ? dateSteps(schedule) : std::vector<Step>{};
    Steps steps = withSteps ? Steps(told) : Steps();
    Quote quote{schedule,
                inputsOf(market, schedule, Side::fair),
                inputsOf(market, schedule, Side::bid),
                inputsOf(market, schedule, Side::offer),
                {},
                {},
                {},
                0.0,
                {},
                {},
                0.0,
                {},
                {}};
    outcome::Faults faults;
    take(quote.fair, faults, checked(market, price(market, schedule, quote.fairInputs, steps), Side::fair));
    take(quote.bid, faults, checked(market, price(market, schedule, quote.bidInputs, steps), Side::bid));
    take(quote.offer, faults,
         checked(market, price(market, schedule, quote.offerInputs, steps), Side::offer));
    if (faults.empty()) {
        putMargin(quote, market, inquiry, places, steps, faults);
    }
    if (!faults.empty()) {
        return faults;
    }
    quote.annualised = annualisedCarry(quote.fair, schedule);
    quote.notices = schedule.notices;
    outcome::append(quote.notices, "", std::move(found.notices));
    quote.steps = std::move(told);
    return quote;
}

std::vector<BridgeStep> bridge(const Market& market, const Quote& quote, Side side) {
    const std::optional<double>& told = side == Side::bid ? quote.quotedBid : quote.quotedOffer;
    if (side == Side::fair || !told) {
        return {};
    }
    const double breakEven = side == Side::bid ? quote.bid.forward : quote.offer.forward;
    const double withMargin = side == Side::bid ? breakEven - quote.margin : breakEven + quote.margin;
    return bridge(carry(market, quote.schedule, quote.fairInputs, quote.fair), quote.fair.forward, breakEven,
                  withMargin, *told);
}

OnQuantity onQuantity(const Inquiry& inquiry, const Quote& quote, const Sensitivities& sensitivities,
                      const std::optional<RandomView>& random) {
    const double quantity = inquiry.quantity;
    const auto times = [quantity](double figure) {
        return quantity * figure;
    };
    OnQuantity total;
    if (quote.quotedBid) {
        total.notionalBid = times(*quote.quotedBid);
    }
    if (quote.quotedOffer) {
        total.notionalOffer = times(*quote.quotedOffer);
    }
    total.hedgeUnits = {-times(quote.bid.units), times(quote.offer.units)};
    total.margin = times(quote.margin);
    total.fundingBasisPoint = times(sensitivities.funding.parallel);
    if (sensitivities.day) {
        total.day = times(*sensitivities.day);
    }
    if (random) {
        total.gap = times(random->gap);
    }
    return total;
}

} // namespace forwright::forward
