#pragma once

#include "dates/business_calendar.hpp"
#include "dates/date.hpp"
#include "discounting/curve.hpp"
#include "income/income.hpp"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// The forward itself: the market it is priced in, its dates, its price, and all that is read off that one
/// line.
namespace forwright::forward {

using dates::Date;
using discounting::CurvePtr;
using income::Side;
using income::TwoWay;

enum class AssetKind { share, index, currencyPair, commodity };
[[nodiscard]] std::optional<AssetKind>
parseAssetKind(std::string_view name); ///< `share`, `index`, `currency-pair`, `commodity`
[[nodiscard]] std::string_view nameOf(AssetKind kind);

/// The settlement lag of what is dealt from a date on.
struct LagFrom {
    Date from;
    int lag = 0; ///< business days, 0 to 30
};

struct Asset {
    AssetKind kind = AssetKind::share;
    std::string name;
    std::string currency;                ///< ISO 4217, what prices are quoted in
    std::string base;                    ///< ISO 4217, of a currency pair the currency bought and sold
    std::vector<LagFrom> settlementLag;  ///< by rising date; the first holds from the beginning
    dates::BusinessCalendar calendar;    ///< good days are good in all of `calendars`
    dates::BusinessCalendar lagCalendar; ///< whose business days the lag counts
    std::optional<double> tick;          ///< the multiple that quotes are rounded to, positive
};

/// A curve at which the dealer lends at `lendSpread` and borrows at `borrowSpread`, added to continuous zero
/// rates.
struct Funding {
    CurvePtr curve;
    double lendSpread = 0.0;   ///< normally ≤ 0
    double borrowSpread = 0.0; ///< normally ≥ 0
    /// In place of `curve` with its spreads, where quoted forwards imply one curve a side.
    std::optional<TwoWay<CurvePtr>> sides{};
};

/// Duty, tax and commission on dealing the hedge today, fractions of spot.
struct HedgeCost {
    double buy = 0.0;
    double sell = 0.0;
};

/// A forward that the market quotes, one of those that imply a curve: to be held against what is made of it.
struct QuotedForward {
    std::string at;       ///< where it stands in the request
    Date date;            ///< maturity
    TwoWay<double> quote; ///< outright
};

/// Everything a forward on one asset is priced from, as of one day. A currency pair has `base` and neither
/// income nor fee.
struct Market {
    std::string at = "/market"; ///< where it stands in the request, for faults, notices and what
                                ///< sensitivities are named by
    Date asOf;
    Asset asset;
    TwoWay<double> spot;
    Funding funding;
    CurvePtr discount; ///< discounts the value of what is already agreed; the funding curve where the request
                       ///< has none
    income::Income income;
    TwoWay<discounting::Rate> lendingFee;
    HedgeCost hedgeCost;
    std::optional<Funding> base;
    std::vector<QuotedForward> quotedForwards; ///< what the base curve or the yield is implied by; else empty
    CurvePtr against; ///< what interest-rate markets say of the base currency, beside that; may be null
};

/// Whether a forward on the asset is dealt by its delivery date (pairs, commodities) rather than its dealing
/// date (shares, indices).
[[nodiscard]] bool isByDelivery(AssetKind kind);
/// The arithmetic mean of the two sides.
[[nodiscard]] double mid(const TwoWay<double>& both);
/// The mean of two rates of one convention.
[[nodiscard]] discounting::Rate mid(const TwoWay<discounting::Rate>& both);
/// The lag of what is dealt on `dealing`.
[[nodiscard]] int lagOn(const Asset& asset, Date dealing);

} // namespace forwright::forward
