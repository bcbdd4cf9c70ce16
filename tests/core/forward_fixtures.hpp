#pragma once

#include "dates/date.hpp"
#include "discounting/curves.hpp"
#include "forward/market.hpp"
#include "forward/quote.hpp"

#include <doctest/doctest.h>

#include <string>
#include <vector>

/// Markets of invented assets that the forward and desk tests start from.
namespace forwright::fixtures {

using dates::Date;

inline Date day(const std::string& iso) {
    const std::optional<Date> date = dates::parseIso(iso);
    REQUIRE_MESSAGE(date, iso);
    return *date;
}

inline discounting::Rate continuous(double value) {
    discounting::Rate rate;
    rate.value = value;
    return rate;
}

/// Weekends only, no lag, mid spot, a flat continuous rate: what textbooks price.
inline forward::Market plain(forward::AssetKind kind, const std::string& asOf, double spot, double rate) {
    forward::Market market;
    market.asOf = day(asOf);
    market.asset.kind = kind;
    market.asset.name = "Invented";
    market.asset.currency = "EUR";
    market.asset.settlementLag = {{dates::earliest, 0}};
    market.spot = {spot, spot};
    market.funding.curve = discounting::flat(market.asOf, continuous(rate), "");
    market.discount = market.funding.curve;
    return market;
}

inline income::CashDistribution cash(const std::string& ex, const std::string& pay, double amount, double low,
                                     double high, std::size_t row = 0) {
    return {"/market/income/cash/" + std::to_string(row), day(ex), day(pay), {amount, low, high}};
}

inline income::ProportionalDistribution proportional(const std::string& ex, double fraction, double low,
                                                     double high, std::size_t row = 0) {
    return {"/market/income/proportional/" + std::to_string(row), day(ex), {fraction, low, high}};
}

inline discounting::CurvePtr pillarCurve(Date asOf, discounting::Interpolation interpolation) {
    discounting::Pillars points;
    points.interpolation = interpolation;
    points.convention.compounding = discounting::Compounding::annual;
    points.pillars = {{asOf + std::chrono::days{31}, 0.0212},
                      {asOf + std::chrono::days{182}, 0.0231},
                      {asOf + std::chrono::days{400}, 0.0255},
                      {asOf + std::chrono::days{1826}, 0.0297}};
    const auto curve = discounting::pillars(asOf, points);
    REQUIRE(curve.ok());
    return curve.value();
}

/// A share with everything a share can have: two-way spot, spreads, cost, fee, yield, cash and proportional
/// distributions, pass-through.
inline forward::Market fullShare() {
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 48.64, 0.02);
    const std::vector<std::string> centres{"EUTA"};
    market.asset.calendar = dates::BusinessCalendar(centres);
    market.asset.lagCalendar = market.asset.calendar;
    market.asset.settlementLag = {{dates::earliest, 2}};
    market.asset.tick = 0.01;
    market.spot = {48.62, 48.66};
    market.funding = {pillarCurve(market.asOf, discounting::Interpolation::logLinear), -0.001, 0.002};
    market.discount = market.funding.curve;
    market.income.cash = {cash("2027-09-10", "2027-09-24", 0.60, 0.50, 0.70, 0),
                          cash("2027-03-10", "2027-03-24", 0.55, 0.50, 0.60, 1),
                          cash("2027-06-10", "2028-02-01", 0.55, 0.50, 0.60, 2),
                          cash("2028-06-12", "2028-06-20", 0.55, 0.50, 0.60, 3)};
    market.income.proportional = {proportional("2027-11-10", 0.011, 0.010, 0.012, 0),
                                  proportional("2027-04-12", 0.004, 0.004, 0.004, 1),
                                  proportional("2027-04-12", 0.006, 0.005, 0.007, 2)};
    market.income.yield = continuous(0.003);
    market.income.passThrough = {1.0, 0.85};
    market.lendingFee = {continuous(0.001), continuous(0.003)};
    market.hedgeCost = {0.0005, 0.0002};
    return market;
}

inline forward::Market pair() {
    forward::Market market = plain(forward::AssetKind::currencyPair, "2026-12-01", 1.1001, 0.03);
    const std::vector<std::string> both{"EUTA", "USNY"};
    const std::vector<std::string> counted{"EUTA"};
    market.asset.base = "EUR";
    market.asset.currency = "USD";
    market.asset.calendar = dates::BusinessCalendar(both);
    market.asset.lagCalendar = dates::BusinessCalendar(counted);
    market.asset.settlementLag = {{dates::earliest, 2}};
    market.spot = {1.1000, 1.1002};
    market.funding = {market.funding.curve, -0.0005, 0.0005};
    market.base =
        forward::Funding{pillarCurve(market.asOf, discounting::Interpolation::linearZero), -0.0004, 0.0006};
    return market;
}

inline forward::Market commodity() {
    forward::Market market = plain(forward::AssetKind::commodity, "2026-12-01", 450.0, 0.07);
    market.asset.settlementLag = {{dates::earliest, 2}};
    market.spot = {449.5, 450.5};
    market.funding.lendSpread = -0.001;
    market.funding.borrowSpread = 0.001;
    market.income.cash = {cash("2027-02-01", "2027-02-01", -0.40, -0.45, -0.35, 0),
                          cash("2027-05-03", "2027-05-10", -0.40, -0.45, -0.35, 1)};
    market.income.yield = continuous(0.004);
    return market;
}

inline forward::Maturity on(const std::string& iso) {
    return {day(iso), std::nullopt};
}

inline forward::Schedule scheduled(const forward::Market& market, const forward::Maturity& maturity) {
    const auto schedule = forward::schedule(market, maturity, "/inquiry/maturity");
    REQUIRE(schedule.ok());
    return schedule.value();
}

inline forward::Quote quoted(const forward::Market& market, const forward::Inquiry& inquiry) {
    const auto quote = forward::quote(market, inquiry, true);
    REQUIRE_MESSAGE(quote.ok(), (quote.ok() ? "" : quote.faults().front().message));
    return quote.value();
}

} // namespace forwright::fixtures
