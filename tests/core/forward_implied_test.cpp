#include "discounting/curves.hpp"
#include "forward/implied.hpp"
#include "forward/ledger.hpp"
#include "forward/quote.hpp"
#include "forward_fixtures.hpp"

#include <cmath>

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

} // namespace

TEST_SUITE("forward: implied by quoted forwards") {
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
