#ifndef __EMSCRIPTEN__

#include "forward/implied.hpp"
#include "forward/price.hpp"
#include "forward_fixtures.hpp"
#include "numeric/elementary.hpp"

#include <rapidcheck.h>

#include <cmath>

using namespace forwright;
using namespace forwright::fixtures;
using discounting::Interpolation;
using forward::Side;

namespace {

constexpr Interpolation everyInterpolation[] = {Interpolation::logLinear, Interpolation::linearZero,
                                                Interpolation::monotoneCubic};

/// Rows on good days, whose rates of carry lie between ±`most` basis points a year, drawn afresh for each.
forward::QuotedForwards arbitraryRows(const forward::Market& market, Interpolation interpolation, int most) {
    forward::QuotedForwards quoted;
    quoted.interpolation = interpolation;
    const auto gaps = *rc::gen::nonEmpty(rc::gen::container<std::vector<int>>(rc::gen::inRange(5, 700)));
    int days = 5;
    for (const int gap : gaps) {
        days += gap;
        if (days > 12'000) {
            break;
        }
        const Date end = market.asset.calendar.following(market.asOf + std::chrono::days{days});
        if (!quoted.rows.empty() && end <= std::get<Date>(quoted.rows.back().maturity.at)) {
            continue;
        }
        const double rate = *rc::gen::inRange(-most, most + 1) * 1e-4;
        const double mean = forward::mid(market.spot) * numeric::exp(rate * days / 365.0);
        const double half = *rc::gen::inRange(0, 100) * 1e-5 * mean;
        quoted.rows.push_back({{end, std::nullopt}, {mean - half, mean + half}});
    }
    return quoted;
}

forward::Market withImplied(forward::Market market, const forward::Implied& found) {
    const forward::ImpliedCurves& curves = found.curves;
    if (market.asset.kind == forward::AssetKind::currencyPair) {
        market.base = forward::Funding{curves.fair, 0.0, 0.0,
                                       income::TwoWay<discounting::CurvePtr>{curves.bid, curves.offer}};
    } else {
        market.income.yield = {};
        market.income.yieldCurves = income::YieldCurves{curves.fair, curves.bid, curves.offer};
    }
    return market;
}

} // namespace

TEST_SUITE("forward: properties of implied curves") {
    TEST_CASE("forwards at any carry come back") {
        for (const Interpolation interpolation : everyInterpolation) {
            CHECK(rc::check("a pair's forwards come back", [interpolation] {
                forward::Market market = pair();
                market.base.reset();
                const auto quoted = arbitraryRows(market, interpolation, 1000);
                RC_PRE(!quoted.rows.empty());
                const auto made = forward::implied(market, quoted, "");
                RC_ASSERT(made.ok());
                const forward::Market priced = withImplied(market, made.value());
                for (const forward::ForwardQuote& row : quoted.rows) {
                    const auto schedule = forward::schedule(priced, row.maturity, "").value();
                    const auto on = [&](Side side) {
                        return forward::price(priced, schedule, side).forward;
                    };
                    RC_ASSERT(std::fabs(on(Side::bid) / row.value.bid - 1) < 1e-12);
                    RC_ASSERT(std::fabs(on(Side::offer) / row.value.offer - 1) < 1e-12);
                }
            }));
        }
    }

    TEST_CASE("any values are met or refused, never by something that is no number") {
        for (const Interpolation interpolation : everyInterpolation) {
            CHECK(rc::check("any values", [interpolation] {
                forward::Market market = fullShare();
                market.income.yield = {};
                auto quoted = arbitraryRows(market, interpolation, 3000);
                RC_PRE(!quoted.rows.empty());
                for (forward::ForwardQuote& row : quoted.rows) {
                    const double scale = std::pow(10.0, *rc::gen::inRange(-30, 30));
                    if (*rc::gen::inRange(0, 4) == 0) {
                        row.value = {row.value.bid * scale, row.value.offer * scale};
                    }
                }
                const auto made = forward::implied(market, quoted, "");
                for (const auto& fault : made.faults()) {
                    RC_ASSERT(!fault.code.empty());
                }
                if (!made.ok()) {
                    return;
                }
                const forward::Market priced = withImplied(market, made.value());
                for (const forward::ForwardQuote& row : quoted.rows) {
                    const auto schedule = forward::schedule(priced, row.maturity, "").value();
                    if (!forward::review(priced, schedule).faults.empty()) {
                        continue;
                    }
                    const double offer = forward::price(priced, schedule, Side::offer).forward;
                    RC_ASSERT(std::fabs(offer / row.value.offer - 1) < 1e-11);
                }
            }));
        }
    }
}

#endif
