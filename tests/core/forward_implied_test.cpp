#include "discounting/curves.hpp"
#include "forward/carry_table.hpp"
#include "forward/implied.hpp"
#include "forward/ledger.hpp"
#include "forward/quote.hpp"
#include "forward/sensitivities.hpp"
#include "forward_fixtures.hpp"

#include <cmath>
#include <utility>

using namespace forwright;
using namespace forwright::fixtures;
using doctest::Approx;
using forward::Side;

namespace {

constexpr discounting::Interpolation everyInterpolation[] = {discounting::Interpolation::logLinear,
                                                             discounting::Interpolation::linearZero,
                                                             discounting::Interpolation::monotoneCubic};

template <class T> T valueOf(const outcome::Outcome<T>& outcome) {
    for (const outcome::Fault& fault : outcome.faults()) {
        FAIL_CHECK(fault.at << " " << fault.code << " " << fault.message);
    }
    REQUIRE(outcome.ok());
    return outcome.value();
}

forward::ForwardQuote row(const char* at, double bid, double offer) {
    return {{day(at), std::nullopt}, {bid, offer}};
}

forward::Market withImplied(forward::Market market, const forward::QuotedForwards& quoted) {
    const forward::Implied found = valueOf(forward::implied(market, quoted, "/market/x"));
    if (market.asset.kind == forward::AssetKind::currencyPair) {
        market.base =
            forward::Funding{found.curves.fair, 0.0, 0.0,
                             income::TwoWay<discounting::CurvePtr>{found.curves.bid, found.curves.offer}};
    } else {
        market.income.yieldCurves =
            income::YieldCurves{found.curves.fair, found.curves.bid, found.curves.offer};
    }
    return market;
}

forward::Quote quoteTo(const forward::Market& market, const forward::Maturity& maturity) {
    forward::Inquiry inquiry;
    inquiry.maturity = maturity;
    return valueOf(forward::quote(market, inquiry, false));
}

/// A pair, a share and a commodity with everything that has two sides, and rows of each.
std::vector<std::pair<forward::Market, forward::QuotedForwards>> everyMarket() {
    forward::Market ofPair = pair();
    ofPair.base.reset();
    ofPair.hedgeCost = {0.0001, 0.0002};
    forward::Market share = fullShare();
    share.income.yield = {};
    forward::Market ofCommodity = commodity();
    ofCommodity.income.yield = {};
    forward::QuotedForwards outrights;
    outrights.rows = {row("2026-12-10", 1.1002, 1.1004), row("2027-03-03", 1.1046, 1.1049),
                      row("2027-12-03", 1.1190, 1.1196), row("2029-12-03", 1.1301, 1.1322)};
    forward::QuotedForwards listed;
    listed.rows = {row("2027-03-19", 48.1, 48.4), row("2027-06-18", 47.2, 47.9),
                   row("2028-06-16", 46.8, 48.3)};
    forward::QuotedForwards deliveries;
    deliveries.rows = {row("2027-01-20", 452.0, 454.0), row("2027-06-18", 463.0, 466.5)};
    return {{ofPair, outrights}, {share, listed}, {ofCommodity, deliveries}};
}

/// The fair forward where the zero rate implied at one row is moved: through pillars of the zero rates.
double fairWithZeroMoved(forward::Market market, const forward::Schedule& schedule,
                         const forward::QuotedForwards& quoted, std::size_t moved, double by) {
    const bool ofPair = market.base.has_value();
    const auto parameters = (ofPair ? market.base->curve : market.income.yieldCurves->fair)->parameters();
    discounting::Pillars points;
    points.interpolation = quoted.interpolation;
    for (std::size_t i = 0; i < parameters.size(); ++i) {
        points.pillars.push_back(
            {std::get<Date>(quoted.rows[i].maturity.at), parameters[i].value + (i == moved ? by : 0.0)});
    }
    const discounting::CurvePtr curve = valueOf(discounting::pillars(market.asOf, points));
    if (ofPair) {
        market.base = forward::Funding{curve, 0.0, 0.0, std::nullopt};
    } else {
        market.income.yieldCurves = income::YieldCurves{curve, curve, curve};
    }
    return forward::price(market, schedule, Side::fair).forward;
}

std::string refused(const forward::Market& market, std::vector<forward::ForwardQuote> rows) {
    forward::QuotedForwards quoted;
    quoted.rows = std::move(rows);
    std::string all;
    for (const auto& fault : forward::implied(market, quoted, "").faults()) {
        all += (all.empty() ? "" : " ") + fault.at + " " + fault.code;
    }
    return all;
}

} // namespace

TEST_SUITE("forward: implied by quoted forwards") {
    TEST_CASE("derivatives by implied zero rates are those of finite differences, each at its row") {
        for (const auto interpolation : everyInterpolation) {
            CAPTURE(discounting::nameOf(interpolation));
            for (const auto& each : everyMarket()) {
                const forward::Market& market = each.first;
                forward::QuotedForwards quoted = each.second;
                CAPTURE(forward::nameOf(market.asset.kind));
                quoted.interpolation = interpolation;
                const forward::Market made = withImplied(market, quoted);
                const forward::Schedule schedule = scheduled(made, on("2027-05-12"));
                const forward::SideInputs fair = forward::inputsOf(made, schedule, Side::fair);
                const forward::Price price = forward::price(made, schedule, fair);
                const forward::Sensitivities found = forward::sensitivities(made, schedule, fair, price);
                CHECK(found.base.has_value() != found.yieldCurve.has_value());
                const forward::CurveSensitivity& curve = found.base ? *found.base : *found.yieldCurve;
                REQUIRE(curve.parameters.size() == quoted.rows.size());
                if (!found.base) {
                    CHECK(std::fabs(curve.parallel - found.yield) < 1e-12 * price.forward);
                }
                for (std::size_t i = 0; i < curve.parameters.size(); ++i) {
                    CAPTURE(i);
                    CHECK(
                        curve.parameters[i].parameter.at.ends_with("/rows/" + std::to_string(i) + "/value"));
                    constexpr double step = 1e-5;
                    const double up = fairWithZeroMoved(made, schedule, quoted, i, step);
                    const double down = fairWithZeroMoved(made, schedule, quoted, i, -step);
                    CHECK(std::fabs(curve.parameters[i].change - 1e-4 * (up - down) / (2.0 * step)) <
                          1e-8 * price.forward);
                }
            }
        }
    }

    TEST_CASE("the path's table agrees with the price on every side") {
        for (const auto& [market, quoted] : everyMarket()) {
            const forward::Market made = withImplied(market, quoted);
            const forward::Schedule schedule = scheduled(made, on("2027-06-10"));
            REQUIRE(forward::CarryTable::separates(made));
            for (const Side side : {Side::fair, Side::bid, Side::offer}) {
                const forward::CarryTable table(made, schedule, side);
                CHECK(table.forward(schedule.maturity, schedule.settlement) ==
                      Approx(forward::price(made, schedule, side).forward).epsilon(1e-12));
            }
        }
    }

    TEST_CASE("prices of any size are met: what is let pass is no more than their logarithms' rounding") {
        forward::Market large = plain(forward::AssetKind::index, "2026-12-01", 3.7e7, 0.03);
        large.income.cash = {{"/c/0", day("2027-03-10"), day("2027-03-24"), {9.1e6, 9.1e6, 9.1e6}}};
        forward::Market small = plain(forward::AssetKind::index, "2026-12-01", 3.7e-7, 0.03);
        for (const auto& [market, scale] : {std::pair{large, 1e7}, {small, 1e-7}}) {
            forward::QuotedForwards quoted;
            for (const char* at : {"2027-01-15", "2027-02-19", "2027-03-19", "2027-06-18"}) {
                const double price = (quoted.rows.size() < 2 || scale < 1.0 ? 3.71 : 2.83) * scale;
                quoted.rows.push_back(row(at, price, 1.001 * price));
            }
            const forward::Market made = withImplied(market, quoted);
            for (const forward::ForwardQuote& given : quoted.rows) {
                CHECK(quoteTo(made, given.maturity).offer.forward ==
                      Approx(given.value.offer).epsilon(1e-12));
            }
        }
    }

    TEST_CASE("what cannot be is refused and named") {
        forward::Market market = pair();
        market.base.reset();
        CHECK(refused(market, {}) == "/rows empty-list");
        CHECK(refused(market, std::vector<forward::ForwardQuote>(201, row("2027-03-03", 1.0, 1.0))) ==
              "/rows too-many-rows");
        CHECK(refused(market, {row("2027-03-03", 1.2, 1.1)}) == "/rows/0/value bid-above-offer");
        CHECK(refused(market, {row("2027-03-03", 0.0, 1.1)}) == "/rows/0/value not-positive");
        CHECK(refused(market, {row("2027-03-03", std::nan(""), 1.1)}) == "/rows/0/value not-positive");
        CHECK(refused(market, {row("2027-03-03", 1.1, HUGE_VAL)}) == "/rows/0/value not-positive");
        CHECK(refused(market, {row("2027-03-03", 1.1, 1.1), row("2027-03-03", 1.2, 1.2)}) ==
              "/rows/1/at not-rising");
        CHECK(refused(market, {row("2027-03-06", 1.1, 1.1)}) == "/rows/0/at not-a-business-day");
        forward::Market rich = fullShare();
        rich.income.yield = {};
        rich.income.cash[1].amount = {4000.0, 4000.0, 4000.0};
        CHECK(refused(rich, {row("2027-06-18", 47.0, 48.0)}) == "/rows/0/value no-solution");
    }

    TEST_CASE(
        "both sides of every row come out of the market again, in every interpolation, and ledgers close") {
        forward::Market pair = plain(forward::AssetKind::currencyPair, "2026-12-01", 1.1, 0.04);
        pair.spot = {1.0999, 1.1001};
        pair.funding.lendSpread = -0.001;
        pair.funding.borrowSpread = 0.002;
        pair.hedgeCost = {0.0001, 0.0002};
        forward::Market index = plain(forward::AssetKind::index, "2026-12-01", 1000.0, 0.03);
        index.spot = {999.0, 1001.0};
        index.funding.borrowSpread = 0.001;
        index.income.cash = {{"/c/0", day("2027-03-10"), day("2027-03-24"), {10.0, 8.0, 12.0}}};
        index.income.proportional = {{"/p/0", day("2027-05-10"), {0.01, 0.008, 0.012}}};
        index.income.passThrough = {1.0, 0.85};
        for (const auto interpolation : everyInterpolation) {
            forward::QuotedForwards points{true, 10000.0, interpolation, {}, nullptr};
            points.rows = {row("2026-12-31", 10, 14), row("2027-03-01", 35, 41), row("2027-12-01", 150, 170)};
            forward::QuotedForwards listed{false, 1.0, interpolation, {}, nullptr};
            listed.rows = {row("2027-01-15", 1001, 1003), row("2027-03-19", 990, 996),
                           row("2027-06-18", 985, 993)};
            for (const auto& [market, quoted] : {std::pair{pair, points}, {index, listed}}) {
                const forward::Market made = withImplied(market, quoted);
                for (const forward::ForwardQuote& given : quoted.rows) {
                    const forward::Quote quote = quoteTo(made, given.maturity);
                    const double bid =
                        quoted.points ? market.spot.bid + given.value.bid / 10000.0 : given.value.bid;
                    const double offer =
                        quoted.points ? market.spot.offer + given.value.offer / 10000.0 : given.value.offer;
                    CHECK(quote.bid.forward == Approx(bid).epsilon(1e-12));
                    CHECK(quote.offer.forward == Approx(offer).epsilon(1e-12));
                    CHECK(quote.fair.forward == Approx((bid + offer) / 2.0).epsilon(1e-12));
                    for (const auto* inputs : {&quote.fairInputs, &quote.bidInputs, &quote.offerInputs}) {
                        const forward::Price& price = inputs->side == Side::bid     ? quote.bid
                                                      : inputs->side == Side::offer ? quote.offer
                                                                                    : quote.fair;
                        const forward::Ledger ledger = forward::ledger(made, quote.schedule, *inputs, price);
                        CHECK(std::fabs(ledger.closingCash) < 1e-9 * price.spot);
                    }
                }
            }
        }
    }

    TEST_CASE("forwards made with a yield imply that yield back, between the rows too") {
        forward::Market share = plain(forward::AssetKind::share, "2026-12-01", 50.0, 0.03);
        share.income.yield.value = 0.02;
        forward::QuotedForwards quoted;
        for (const char* at : {"2027-02-01", "2027-06-01", "2027-12-01"}) {
            const double fair = quoteTo(share, {day(at), std::nullopt}).fair.forward;
            quoted.rows.push_back(row(at, fair, fair));
        }
        forward::Market blank = share;
        blank.income.yield.value = 0.0;
        const forward::Market made = withImplied(blank, quoted);
        for (const char* at : {"2026-12-21", "2027-04-05", "2027-09-01"}) {
            const forward::Maturity maturity{day(at), std::nullopt};
            CHECK(quoteTo(made, maturity).fair.forward ==
                  Approx(quoteTo(share, maturity).fair.forward).epsilon(1e-12));
        }
    }
}
