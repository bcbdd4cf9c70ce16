#include "contract/market_reader.hpp"

#include "contract/asset_reader.hpp"
#include "contract/curve_reader.hpp"
#include "contract/forwards_reader.hpp"
#include "contract/rate_reader.hpp"
#include "contract/two_way_reader.hpp"

#include <chrono>
#include <utility>

namespace forwright::contract {

using dates::Date;
using discounting::CurvePtr;
using forward::AssetKind;
using forward::Market;
using income::TwoWay;

namespace {

/// Where the request names no day that the market is of.
constexpr Date beforeAllDates = dates::earliest - std::chrono::days{1};

std::optional<TwoWay<double>> readSpot(const Value& value) {
    const std::optional<TwoWay<double>> spot = readTwoWay(value, positive, "a spot price");
    if (spot && spot->bid > spot->offer) {
        value.findings().fault(value.place().member("bid"), "bid-above-offer",
                               "The bid, " + numberText(spot->bid) + ", has to be at most the offer, " +
                                   numberText(spot->offer) + ".");
        return std::nullopt;
    }
    return spot;
}

/// Spreads cost the dealer something; a gain is told.
void reviewSpreads(const Reader& funding, double lendSpread, double borrowSpread) {
    if (lendSpread > 0.0) {
        funding.findings().notice(
            funding.at("lendSpread"), "unusual-sign",
            "The dealer would lend above the curve; a lend spread is normally 0 or below.");
    }
    if (borrowSpread < 0.0) {
        funding.findings().notice(
            funding.at("borrowSpread"), "unusual-sign",
            "The dealer would borrow below the curve; a borrow spread is normally 0 or above.");
    }
}

std::optional<forward::Funding> readFunding(const Value& value, const CurveContext& context) {
    Reader object{value};
    forward::Funding funding;
    funding.curve =
        readCurve(object.required("curve", "the curve: a rate, pillars or a random model"), context);
    funding.lendSpread = object.number("lendSpread", rateRange, 0.0);
    funding.borrowSpread = object.number("borrowSpread", rateRange, 0.0);
    reviewSpreads(object, funding.lendSpread, funding.borrowSpread);
    return funding.curve ? std::optional{std::move(funding)} : std::nullopt;
}

/// `amount` (or `fraction`), with `low` and `high` around it.
std::optional<income::Estimate> readEstimate(Reader& row, std::string_view name, std::string_view what,
                                             const Range& range) {
    const std::optional<double> amount = row.required(name, what).number(range);
    const std::string fallback = numberText(amount.value_or(0.0));
    const Value lowValue = row.optional("low", fallback);
    const Value highValue = row.optional("high", fallback);
    const std::optional<double> low = lowValue.present() ? lowValue.number(range) : amount;
    const std::optional<double> high = highValue.present() ? highValue.number(range) : amount;
    if (!amount || !low || !high) {
        return std::nullopt;
    }
    const std::string figure = std::string{name} + ", " + numberText(*amount);
    if (*low > *amount) {
        lowValue.fault("out-of-order",
                       "It has to be at most the " + figure + "; it is " + numberText(*low) + ".");
    }
    if (*high < *amount) {
        highValue.fault("out-of-order",
                        "It has to be at least the " + figure + "; it is " + numberText(*high) + ".");
    }
    return income::Estimate{*amount, *low, *high};
}

enum class Status { declared, estimated };
std::string_view nameOf(Status status) {
    return status == Status::declared ? "declared" : "estimated";
}
enum class Occasion { ordinary, special };
std::string_view nameOf(Occasion occasion) {
    return occasion == Occasion::ordinary ? "ordinary" : "special";
}

/// How sure a distribution is, what kind, and what becomes of it under the forward.
void readTreatment(Reader& row, income::CashDistribution& made) {
    using income::Treatment;
    if (const Value status = row.optional("status"); status.present()) {
        if (const auto read = status.choice({Status::declared, Status::estimated})) {
            made.estimated = *read == Status::estimated;
        }
    }
    if (const Value type = row.optional("type"); type.present()) {
        made.special = type.choice({Occasion::ordinary, Occasion::special}) == Occasion::special;
    }
    made.treatment =
        row.choice("treatment", {Treatment::inPrice, Treatment::passedThrough, Treatment::adjustsContract},
                   Treatment::inPrice);
    if (const Value share = row.optional("passThrough"); share.present()) {
        made.passThrough = readTwoWay(share, shareRange, "a share from 0 to 1");
    }
}

/// An amount in another currency comes with the rate that makes it the quote currency's. False where one of
/// the two is missing or at fault.
bool readGiven(Reader& row, const std::optional<income::Estimate>& amount, income::CashDistribution& made) {
    const Value currency = row.optional("currency");
    const Value rate = row.optional("forwardRate");
    if (!currency.present() && !rate.present()) {
        return true;
    }
    if (!currency.present() || !rate.present()) {
        const char* lacking = currency.present() ? "forwardRate" : "currency";
        row.findings().fault(
            row.at(lacking), "missing",
            "An amount in another currency needs both: the currency, and what one of it is worth in "
            "the quote currency on the day of payment.");
        return false;
    }
    const std::string code = readCurrency(currency);
    const auto number = rate.number(positive);
    if (!number || !amount) {
        return false;
    }
    made.given = income::GivenAmount{amount->amount, code, *number};
    return true;
}

std::optional<income::CashDistribution> readCash(const Value& value) {
    Reader row{value};
    const std::optional<Date> ex = row.required("ex", "the ex date").date();
    const Value payValue = row.optional("pay", quotedText(ex ? dates::toIso(*ex) : ""));
    const std::optional<Date> pay = payValue.present() ? payValue.date() : ex;
    const auto amount = readEstimate(row, "amount", "the amount a unit", anyNumber);
    if (ex && pay && *pay < *ex) {
        payValue.fault("pay-before-ex", "The day of payment has to be the ex date, " + dates::toIso(*ex) +
                                            ", or later; it is " + dates::toIso(*pay) + ".");
    }
    income::CashDistribution made;
    readTreatment(row, made);
    const bool given = readGiven(row, amount, made);
    if (!ex || !pay || !amount || !given) {
        return std::nullopt;
    }
    made.at = value.place().pointer();
    made.ex = *ex;
    made.pay = *pay;
    made.amount = *amount;
    if (made.given) {
        const double rate = made.given->forwardRate;
        made.amount = {amount->amount * rate, amount->low * rate, amount->high * rate};
    }
    return made;
}

std::optional<income::ProportionalDistribution> readProportional(const Value& value) {
    Reader row{value};
    const std::optional<Date> ex = row.required("ex", "the ex date").date();
    const auto fraction = readEstimate(row, "fraction", "the fraction of the price", fractionRange);
    if (!ex || !fraction) {
        return std::nullopt;
    }
    return income::ProportionalDistribution{value.place().pointer(), *ex, *fraction};
}

/// Quoted forwards in place of a curve or rate, and where they stand.
struct Quotes {
    forward::QuotedForwards quoted;
    std::string at;
};
using QuotesIfAny = std::optional<Quotes>;

void takeQuotes(const Value& value, const CurveContext& context, const forward::Asset& asset,
                QuotesIfAny& quotes) {
    if (auto quoted = readForwards(value, context, asset)) {
        quotes.emplace(Quotes{std::move(*quoted), value.place().pointer()});
    }
}

income::Income readIncome(const Value& value, const CurveContext& context, const forward::Asset& asset,
                          QuotesIfAny& quotes) {
    const dates::BusinessCalendar& calendar = context.calendar;
    Reader object{value};
    income::Income income;
    object.optional("cash", "[]").rows([&](const Value& row, std::size_t /*index*/) {
        if (auto cash = readCash(row)) {
            income.cash.push_back(std::move(*cash));
        }
    });
    object.optional("proportional", "[]").rows([&](const Value& row, std::size_t /*index*/) {
        if (auto proportional = readProportional(row)) {
            income.proportional.push_back(std::move(*proportional));
        }
    });
    const Value yieldValue = object.optional("yield", "0");
    if (quotesForwards(yieldValue)) {
        takeQuotes(yieldValue, context, asset, quotes);
    } else if (const auto yield = readRate(yieldValue, calendar)) {
        income.yield = *yield;
    }
    if (const auto share =
            readTwoWay(object.optional("passThrough", "1"), shareRange, "a share from 0 to 1")) {
        income.passThrough = *share;
    }
    return income;
}

forward::HedgeCost readHedgeCost(const Value& value) {
    Reader object{value};
    return {object.number("buy", costRange, 0.0), object.number("sell", costRange, 0.0)};
}

/// The base currency's funding; where its forwards are quoted they say all of it, spreads too.
std::optional<forward::Funding> readBase(const Value& value, const CurveContext& context,
                                         const forward::Asset& asset, QuotesIfAny& quotes) {
    if (!value.has("curve")) {
        return readFunding(value, context);
    }
    const auto curve = value.json().find("curve");
    const Place place = value.place().member("curve");
    const Value curveValue{curve, place, value.findings()};
    if (!quotesForwards(curveValue)) {
        return readFunding(value, context);
    }
    Reader object{value};
    takeQuotes(object.required("curve", "the forwards quoted"), context, asset, quotes);
    for (const std::string_view name : {"lendSpread", "borrowSpread"}) {
        object.forbid(
            name, "Forwards are quoted on both sides, so what lending and borrowing the base currency costs "
                  "is in them.");
    }
    return std::nullopt;
}

/// What a currency pair has instead of income and fee, and nothing else has.
void readPair(Reader& market, const CurveContext& context, Market& result, QuotesIfAny& quotes) {
    market.forbid("income",
                  "A currency pair has no income; what the base currency earns is its curve, in base.");
    market.forbid("lendingFee",
                  "A currency pair has no lending fee; what borrowing the base currency costs is in base.");
    result.base =
        readBase(market.required("base", "the curve of the base currency, {curve, lendSpread, borrowSpread}"),
                 context, result.asset, quotes);
}

void readHolding(Reader& market, const CurveContext& context, Market& result, QuotesIfAny& quotes) {
    market.forbid("base", "Only a currency pair has a base curve; what this asset earns is its income.");
    result.income = readIncome(market.optional("income"), context, result.asset, quotes);
    if (const auto fee = readTwoWayRate(market.optional("lendingFee", "0"), context.calendar)) {
        result.lendingFee = *fee;
    }
}

/// Where the kind of the asset is not known it is not known either which of these belong.
void passOverKind(Reader& market) {
    for (const std::string_view name : {"income", "lendingFee", "base"}) {
        (void)market.optional(name);
    }
}

} // namespace

std::optional<Market> readMarket(const Value& value) {
    Reader object{value};
    Market market;
    market.at = value.place().pointer();
    market.asOf = object.required("asOf", "the market's date, YYYY-MM-DD").date().value_or(beforeAllDates);
    const std::optional<AssetKind> kind =
        readAsset(object.required("asset", "what is dealt, {kind, currency, …}"), market.asset);
    const CurveContext context{market.asOf, market.asset.calendar};

    const auto spot = readSpot(object.required("spot", "the spot price, a number or {bid, offer}"));
    const auto funding = readFunding(
        object.required("funding", "what cash costs, {curve, lendSpread, borrowSpread}"), context);
    const Value discount = object.optional("discount", quotedText(market.at + "/funding/curve"));
    const CurvePtr discountCurve = readCurve(discount, context);
    market.hedgeCost = readHedgeCost(object.optional("hedgeCost"));
    QuotesIfAny quotes;
    if (!kind) {
        passOverKind(object);
    } else if (*kind == AssetKind::currencyPair) {
        readPair(object, context, market, quotes);
    } else {
        readHolding(object, context, market, quotes);
    }
    if (!object.findings().ok() || !spot || !funding) {
        return std::nullopt;
    }
    market.spot = *spot;
    market.funding = *funding;
    market.discount = discountCurve ? discountCurve : funding->curve;
    if (quotes && !implyFrom(quotes->quoted, quotes->at, object.findings(), market)) {
        return std::nullopt;
    }
    return market;
}

void reviewCalendars(const Market& market, Date last, Findings& findings) {
    const auto yearOf = [](Date date) {
        return static_cast<int>(std::chrono::year_month_day{date}.year());
    };
    std::size_t index = 0;
    for (const std::string& code : market.asset.calendar.centres()) {
        const dates::Centre* centre = dates::findCentre(code);
        if (centre != nullptr &&
            (yearOf(market.asOf) < centre->firstYear || yearOf(last) > centre->lastYear)) {
            findings.notices(
                Place{}, {{market.at + "/asset/calendars/" + std::to_string(index), "calendar-years",
                           "The holidays of " + code + " are known from " +
                               std::to_string(centre->firstYear) + " to " + std::to_string(centre->lastYear) +
                               "; outside of these years they follow the same rules and may change."}});
        }
        ++index;
    }
}

} // namespace forwright::contract
