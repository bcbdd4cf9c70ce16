#include "forward_fixtures.hpp"
#include "numeric/elementary.hpp"

#include <cmath>

using namespace forwright;
using namespace forwright::fixtures;
using doctest::Approx;
using forward::Side;

namespace {

double fair(const forward::Market& market, const forward::Maturity& maturity) {
    return forward::price(market, scheduled(market, maturity), Side::fair).forward;
}

} // namespace

TEST_CASE("an asset without income grows at the funding rate") {
    // Hull, Options, Futures and Other Derivatives, ch. 5: 40 at 5 % for 3 months, 40.50 (from memory,
    // reproduced). A quarter of 365 days is no whole day: 91.25 is replaced by 91 and the expected value
    // computed for it.
    const forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 40.0, 0.05);
    CHECK(fair(market, on("2027-03-02")) == Approx(40.0 * std::exp(0.05 * 91 / 365.0)).epsilon(1e-15));
    CHECK(fair(market, on("2026-12-01")) == 40.0); // nothing to wait for
}

TEST_CASE("cash distributions are taken off at what they are worth at settlement") {
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 900.0, 0.04);
    market.income.cash = {cash("2027-03-01", "2027-04-01", 40.0, 40.0, 40.0)};
    const double early = std::exp(-0.04 * 121 / 365.0);
    const double late = std::exp(-0.04 * 274 / 365.0);
    CHECK(fair(market, on("2027-09-01")) == Approx((900.0 - 40.0 * early) / late).epsilon(1e-15));
}

TEST_CASE("who buys reckons with the high end, who sells with the low one, each at its own curve and fee") {
    forward::Market market = fullShare();
    const forward::Schedule schedule = scheduled(market, on("2027-12-15"));
    const forward::SideInputs offer = forward::inputsOf(market, schedule, Side::offer);
    const forward::SideInputs bid = forward::inputsOf(market, schedule, Side::bid);
    CHECK(offer.spot == 48.66 * 1.0005);
    CHECK(bid.spot == 48.62 * (1.0 - 0.0002));
    CHECK(offer.passThrough == 0.85);
    CHECK(bid.passThrough == 1.0);
    const double years = dates::years(market.asOf, schedule.settlement);
    CHECK(std::log(offer.funding->factor(schedule.settlement) /
                   market.funding.curve->factor(schedule.settlement)) == Approx(-0.002 * years));
    CHECK(std::log(bid.funding->factor(schedule.settlement) /
                   market.funding.curve->factor(schedule.settlement)) == Approx(0.001 * years));
    const forward::Price sold = forward::price(market, schedule, offer);
    const forward::Price bought = forward::price(market, schedule, bid);
    REQUIRE(sold.cash.size() == 3);
    CHECK(sold.cash[0].amount == 0.50);
    CHECK(bought.cash[0].amount == 0.60);
    const double middle = forward::price(market, schedule, Side::fair).forward;
    CHECK(bought.forward < middle);
    CHECK(middle < sold.forward);
}

TEST_CASE("a pair's offer lends the base currency and its bid borrows it") {
    forward::Market market = pair();
    const forward::Schedule schedule = scheduled(market, on("2027-06-03"));
    const double quoteYears = dates::years(schedule.spot, schedule.settlement);
    const auto base = [&](double spread) {
        return market.base->curve->factor(schedule.settlement) / market.base->curve->factor(schedule.spot) *
               std::exp(-spread * quoteYears);
    };
    CHECK(forward::price(market, schedule, Side::offer).forward ==
          Approx(1.1002 * base(-0.0004) * std::exp(0.0305 * quoteYears)).epsilon(1e-14));
    CHECK(forward::price(market, schedule, Side::bid).forward ==
          Approx(1.1000 * base(0.0006) * std::exp(0.0295 * quoteYears)).epsilon(1e-14));
}

TEST_CASE("the units to hold reinvest what passes at the price without the distribution") {
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
    market.income.proportional = {proportional("2027-03-10", 0.04, 0.04, 0.04)};
    CHECK(fair(market, on("2027-06-01")) == Approx(96.0).epsilon(1e-15));
    market.income.passThrough = {0.5, 0.5};
    CHECK(fair(market, on("2027-06-01")) == Approx(100.0 * 0.96 / 0.98).epsilon(1e-15));
    market.income.passThrough = {0.0, 0.0};
    CHECK(fair(market, on("2027-06-01")) == Approx(100.0).epsilon(1e-15));
    // On the ex date itself it counts, the day before it does not.
    market.income.passThrough = {1.0, 1.0};
    CHECK(fair(market, on("2027-03-10")) == Approx(96.0));
    CHECK(fair(market, on("2027-03-09")) == Approx(100.0));
}

TEST_CASE("a proportional distribution on the ex date of a cash one is already behind it") {
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 100.0, 0.0);
    market.income.proportional = {proportional("2027-03-10", 0.04, 0.04, 0.04)};
    market.income.cash = {cash("2027-03-10", "2027-03-10", 1.0, 1.0, 1.0)};
    CHECK(fair(market, on("2027-06-01")) == Approx(95.0).epsilon(1e-15));
    market.income.cash = {cash("2027-03-09", "2027-03-10", 1.0, 1.0, 1.0)};
    CHECK(fair(market, on("2027-06-01")) == Approx(96.0 - 0.96).epsilon(1e-15));
}

TEST_CASE("the carry adds up to the points and the bridge to the quote") {
    for (const forward::Market& market : {fullShare(), pair(), commodity()}) {
        const forward::Quote quote = quoted(
            market, {forward::Client::twoWay, 1.0, on("2027-06-15"), {forward::MarginUnit::bpOfSpot, 5.0}});
        const forward::Carry carry = forward::carry(market, quote.schedule, quote.fairInputs, quote.fair);
        CHECK(carry.funding + carry.fee + carry.yield + carry.proportional + carry.cash + carry.base ==
              Approx(carry.points).epsilon(1e-11));
        CHECK(carry.spot + carry.points == Approx(quote.fair.forward).epsilon(1e-15));
        for (const Side side : {Side::bid, Side::offer}) {
            const auto steps = forward::bridge(market, quote, side);
            CHECK(steps.front().level == carry.spot);
            CHECK(steps.back().level == (side == Side::bid ? *quote.quotedBid : *quote.quotedOffer));
            for (std::size_t i = 1; i < steps.size(); ++i) {
                CHECK(steps[i - 1].level + steps[i].change == Approx(steps[i].level).epsilon(1e-12));
            }
        }
    }
}

TEST_CASE("every income row is listed with what became of it") {
    const forward::Market market = fullShare();
    const forward::Quote quote = quoted(market, {forward::Client::twoWay, 1.0, on("2027-12-15"), {}});
    const auto lines = forward::incomeLines(market, quote.schedule, quote.fairInputs, quote.fair);
    REQUIRE(lines.size() == 7);
    CHECK(lines[0].reason == "counted");
    CHECK(lines[3].reason == "after-maturity");
    CHECK_FALSE(lines[3].counted);
    double cash = 0.0;
    double proportional = 0.0;
    for (const forward::IncomeLine& line : lines) {
        (line.amount ? cash : proportional) += line.atSettlement;
    }
    const forward::Carry carry = forward::carry(market, quote.schedule, quote.fairInputs, quote.fair);
    CHECK(cash == Approx(-carry.cash).epsilon(1e-14));
    CHECK(proportional == Approx(-carry.proportional).epsilon(1e-12));

    forward::Market late = market;
    late.income.cash = {fixtures::cash("2026-12-01", "2026-12-10", 1.0, 1.0, 1.0)};
    const forward::Quote without = quoted(late, {forward::Client::twoWay, 1.0, on("2027-12-15"), {}});
    CHECK(forward::incomeLines(late, without.schedule, without.fairInputs, without.fair).front().reason ==
          "before-hold");
}

TEST_CASE("the quote puts the margin on and rounds away from the client's side") {
    forward::Market market = fullShare();
    market.asset.tick = 0.05;
    const forward::Quote quote =
        quoted(market, {forward::Client::twoWay, 10.0, on("2027-12-15"), {forward::MarginUnit::price, 0.06}});
    CHECK(*quote.quotedBid <= quote.bid.forward - 0.06);
    CHECK(*quote.quotedBid > quote.bid.forward - 0.06 - 0.05);
    CHECK(*quote.quotedOffer >= quote.offer.forward + 0.06);
    CHECK(*quote.quotedOffer < quote.offer.forward + 0.06 + 0.05);
    const forward::Quote sells = quoted(market, {forward::Client::sells, 10.0, on("2027-12-15"), {}});
    CHECK(sells.quotedBid);
    CHECK_FALSE(sells.quotedOffer);
    CHECK(forward::marginInPrice({forward::MarginUnit::bpPerYear, 10.0}, market, day("2027-12-01")) ==
          Approx(0.001 * 48.64));
    CHECK(forward::marginInPrice({forward::MarginUnit::bpOfSpot, 10.0}, market, day("2027-12-01")) ==
          Approx(0.001 * 48.64));
}

TEST_CASE("rounding to the tick leaves what is on it and gives the decimal that is meant") {
    CHECK(forward::roundedUp(100.05, 0.01) == 100.05);
    CHECK(forward::roundedDown(100.05, 0.01) == 100.05);
    CHECK(forward::roundedUp(0.1 + 0.2, 0.1) == 0.3);
    CHECK(forward::roundedUp(100.0501, 0.01) == 100.06);
    CHECK(forward::roundedDown(100.0599, 0.01) == 100.05);
    CHECK(forward::roundedDown(1.005, 0.01) == 1.0);
    CHECK(forward::roundedUp(101.0, 0.25) == 101.0);
    CHECK(forward::roundedUp(101.1, 0.25) == 101.25);
    CHECK(forward::roundedUp(7.0, 5.0) == 10.0);
    CHECK(forward::roundedDown(1.23456, 0.0001) == 1.2345);
    for (int cents = 1; cents <= 20000; ++cents) {
        const double value = cents / 100.0;
        REQUIRE(forward::roundedUp(value, 0.01) == value);
        REQUIRE(forward::roundedDown(value, 0.01) == value);
    }
}

TEST_CASE("what is not above zero or not finite is no price") {
    forward::Market market = plain(forward::AssetKind::share, "2026-12-01", 10.0, 0.02);
    market.income.cash = {cash("2027-03-10", "2027-03-10", 12.0, 12.0, 12.0)};
    const auto refused = forward::quote(market, {forward::Client::twoWay, 1.0, on("2027-12-15"), {}}, false);
    REQUIRE_FALSE(refused.ok());
    CHECK(refused.faults().front().code == "not-a-price");
    CHECK(refused.faults().front().at == "/market/income");
    CHECK(refused.faults().size() == 3);

    const auto margin = forward::quote(
        plain(forward::AssetKind::share, "2026-12-01", 10.0, 0.02),
        {forward::Client::twoWay, 1.0, on("2027-12-15"), {forward::MarginUnit::price, 20.0}}, false);
    REQUIRE_FALSE(margin.ok());
    CHECK(margin.faults().front().at == "/inquiry/margin");

    const forward::Market huge = plain(forward::AssetKind::share, "2026-12-01", 1e200, 9.0);
    CHECK_FALSE(forward::quote(huge, {forward::Client::twoWay, 1.0, on("2099-12-01"), {}}, false).ok());
}

TEST_CASE("the working tells every figure of the price as it was used") {
    const forward::Market market = fullShare();
    const forward::Quote quote =
        quoted(market, {forward::Client::twoWay, 1.0, on("2027-12-15"), {forward::MarginUnit::price, 0.06}});
    const auto result = [&quote](const std::string& code, const std::string& side) {
        for (const forward::Step& step : quote.steps) {
            if (step.code == code && step.side == side) {
                REQUIRE(std::holds_alternative<double>(step.result));
                return *std::get_if<double>(&step.result);
            }
        }
        FAIL("no step ", code, " of ", side);
        return 0.0;
    };
    CHECK(result("forward", "fair") == quote.fair.forward);
    CHECK(result("forward", "bid") == quote.bid.forward);
    CHECK(result("settlement-factor", "offer") == quote.offer.settlementFactor);
    CHECK(result("units", "fair") == quote.fair.units);
    CHECK(result("quoted-bid", "quote") == *quote.quotedBid);
    CHECK(result("margin", "quote") == 0.06);
    CHECK(quote.steps.front().side == "dates");
}
