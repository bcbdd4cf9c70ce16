#include "forward/carry_table.hpp"
#include "forward/ledger.hpp"
#include "forward_fixtures.hpp"

#include <rapidcheck.h>

#include <algorithm>
#include <cmath>
#include <string>

using namespace forwright;
using namespace forwright::fixtures;
using forward::Side;

// RapidCheck prints its seed, which main.cpp fixes, and takes another through RC_PARAMS.

namespace {

double between(double low, double high) {
    return low + (high - low) * *rc::gen::inRange(0, 1000001) / 1000000.0;
}

/// A share or commodity with anything in it.
forward::Market anyMarket() {
    const bool share = *rc::gen::arbitrary<bool>();
    forward::Market market = plain(share ? forward::AssetKind::share : forward::AssetKind::commodity,
                                   "2026-12-01", between(5.0, 500.0), between(-0.02, 0.12));
    const double halfSpread = between(0.0, 0.01) * market.spot.bid;
    market.spot = {market.spot.bid - halfSpread, market.spot.offer + halfSpread};
    market.asset.settlementLag = {{dates::earliest, *rc::gen::inRange(0, 6)}};
    market.funding.lendSpread = -between(0.0, 0.01);
    market.funding.borrowSpread = between(0.0, 0.01);
    const int rows = *rc::gen::inRange(0, 6);
    for (int row = 0; row < rows; ++row) {
        const Date ex = market.asOf + std::chrono::days{*rc::gen::inRange(-10, 900)};
        const Date pay = ex + std::chrono::days{*rc::gen::inRange(0, 200)};
        const double amount = between(-0.01, 0.02) * market.spot.bid;
        const double slack = between(0.0, 0.2) * std::fabs(amount);
        market.income.cash.push_back({"/market/income/cash/" + std::to_string(row),
                                      ex,
                                      pay,
                                      {amount, amount - slack, amount + slack}});
        const double fraction = between(-0.02, 0.05);
        market.income.proportional.push_back({"/market/income/proportional/" + std::to_string(row),
                                              market.asOf + std::chrono::days{*rc::gen::inRange(-10, 900)},
                                              {fraction, fraction - 0.002, fraction + 0.002}});
    }
    const double passed = between(0.0, 1.0);
    market.income.passThrough = {std::max(passed, between(0.0, 1.0)), passed};
    market.income.yield = continuous(between(-0.01, 0.04));
    const double fee = between(0.0, 0.02);
    market.lendingFee = {continuous(fee), continuous(fee + between(0.0, 0.01))};
    market.hedgeCost = {between(0.0, 0.005), between(0.0, 0.005)};
    return market;
}

forward::Schedule anySchedule(const forward::Market& market) {
    const dates::Tenor tenor{*rc::gen::inRange(0, 27), dates::TenorUnit::month};
    const auto schedule = forward::schedule(market, {tenor, std::nullopt}, "/inquiry/maturity");
    RC_ASSERT(schedule.ok());
    return schedule.value();
}

double priced(const forward::Market& market, const forward::Schedule& schedule, Side side = Side::fair) {
    return forward::price(market, schedule, side).forward;
}

/// Runs a property and fails the doctest case where RapidCheck finds a counterexample.
template <class Property> void holds(const char* name, Property property) {
    CHECK(rc::check(name, property));
}

} // namespace

TEST_CASE("properties of the price") {
    holds("scaling spot and cash by a number scales every side", [] {
        const forward::Market market = anyMarket();
        const forward::Schedule schedule = anySchedule(market);
        const double by = between(0.1, 20.0);
        forward::Market scaled = market;
        scaled.spot = {by * market.spot.bid, by * market.spot.offer};
        for (income::CashDistribution& row : scaled.income.cash) {
            row.amount = {by * row.amount.amount, by * row.amount.low, by * row.amount.high};
        }
        for (const Side side : {Side::fair, Side::bid, Side::offer}) {
            RC_ASSERT(std::fabs(priced(scaled, schedule, side) - by * priced(market, schedule, side)) <
                      1e-11 * by * market.spot.bid);
        }
    });
    holds("a distribution put in and its value at settlement put back leaves the price", [] {
        forward::Market market = anyMarket();
        const forward::Schedule schedule = anySchedule(market);
        const double before = priced(market, schedule);
        const Date ex = schedule.holdFrom + std::chrono::days{*rc::gen::inRange(1, 400)};
        market.income.cash.push_back({"/market/income/cash/9", ex, ex, {1.0, 1.0, 1.0}});
        const forward::Price after = forward::price(market, schedule, Side::fair);
        double added = 0.0;
        for (const forward::CashInPrice& cash : after.cash) {
            added += cash.row + 1 == market.income.cash.size() ? cash.atSettlement : 0.0;
        }
        const bool passes = ex <= schedule.maturity && market.income.passThroughOn(Side::fair) > 0.0;
        RC_ASSERT(passes == (added != 0.0));
        RC_ASSERT(std::fabs(after.forward + added - before) < 1e-11 * market.spot.bid);
    });
    holds("the corridor holds the fair price: bid break-even ≤ fair ≤ offer break-even, where income is no "
          "cost",
          [] {
              forward::Market market = anyMarket();
              for (income::CashDistribution& row : market.income.cash) {
                  const double low = std::fabs(row.amount.low);
                  row.amount = {low * 1.1, low, low * 1.2};
              }
              for (income::ProportionalDistribution& row : market.income.proportional) {
                  row.fraction = {0.02, 0.01, 0.03};
              }
              const forward::Schedule schedule = anySchedule(market);
              const double slack = 1e-12 * market.spot.bid;
              RC_PRE(priced(market, schedule, Side::bid) > 0.0);
              // Income is paid from borrowed money, so with distributions far larger than the hedge a dearer
              // loan could turn the order; here they are not.
              RC_ASSERT(priced(market, schedule, Side::bid) <= priced(market, schedule) + slack);
              RC_ASSERT(priced(market, schedule) <= priced(market, schedule, Side::offer) + slack);
          });
    holds("the forward rises with spot and funding and falls with yield, fee and every distribution", [] {
        forward::Market market = anyMarket();
        market.funding.curve = discounting::flat(market.asOf, continuous(between(0.0, 0.1)), "");
        for (income::CashDistribution& row : market.income.cash) {
            row.amount.amount = std::fabs(row.amount.amount);
            row.pay = row.ex;
        }
        const forward::Schedule schedule = anySchedule(market);
        RC_PRE(schedule.maturity > schedule.holdFrom && schedule.settlement > schedule.spot);
        const double base = priced(market, schedule);
        const auto with = [&](auto change) {
            forward::Market moved = market;
            change(moved);
            return priced(moved, schedule);
        };
        RC_ASSERT(with([](forward::Market& m) { m.spot.bid *= 1.01; }) > base);
        RC_ASSERT(with([](forward::Market& m) {
                      m.funding.curve = discounting::withSpread(m.funding.curve, 0.001);
                  }) > base);
        RC_ASSERT(with([](forward::Market& m) { m.income.yield.value += 0.001; }) < base);
        RC_ASSERT(with([](forward::Market& m) { m.lendingFee.bid.value += 0.001; }) < base);
        RC_ASSERT(with([](forward::Market& m) {
                      for (income::CashDistribution& row : m.income.cash) {
                          row.amount.amount *= 1.5;
                      }
                  }) <= base);
        RC_ASSERT(with([](forward::Market& m) {
                      for (income::ProportionalDistribution& row : m.income.proportional) {
                          row.fraction.amount += 0.01;
                      }
                  }) <= base);
    });
    holds("every side's ledger closes", [] {
        const forward::Market market = anyMarket();
        const forward::Schedule schedule = anySchedule(market);
        for (const Side side : {Side::fair, Side::bid, Side::offer}) {
            const forward::SideInputs inputs = forward::inputsOf(market, schedule, side);
            const forward::Ledger ledger =
                forward::ledger(market, schedule, inputs, forward::price(market, schedule, inputs));
            RC_ASSERT(std::fabs(ledger.closingUnits - ledger.obligation) < 1e-12);
            RC_ASSERT(std::fabs(ledger.closingCash) < 1e-9 * market.spot.bid);
        }
    });
    holds("the carry table gives every maturity the price it has by itself", [] {
        const forward::Market market = anyMarket();
        const forward::Schedule longest = anySchedule(market);
        RC_ASSERT(forward::CarryTable::separates(market));
        for (const Side side : {Side::fair, Side::bid, Side::offer}) {
            const forward::CarryTable table(market, longest, side);
            for (int i = 0; i < 20; ++i) {
                const int days =
                    *rc::gen::inRange(0, dates::daysBetween(longest.holdFrom, longest.maturity) + 1);
                const Date maturity =
                    market.asset.calendar.preceding(longest.holdFrom + std::chrono::days{days});
                const auto schedule = forward::schedule(market, {maturity, std::nullopt}, "");
                if (!schedule) {
                    continue; // a weekend at the very start
                }
                RC_ASSERT(std::fabs(table.forward(maturity, schedule.value().settlement) -
                                    priced(market, schedule.value(), side)) < 1e-11 * market.spot.bid);
            }
        }
    });
    holds("the order of income rows does not matter", [] {
        const forward::Market market = anyMarket();
        const forward::Schedule schedule = anySchedule(market);
        forward::Market turned = market;
        std::reverse(turned.income.cash.begin(), turned.income.cash.end());
        std::reverse(turned.income.proportional.begin(), turned.income.proportional.end());
        RC_ASSERT(std::fabs(priced(turned, schedule) - priced(market, schedule)) < 1e-12 * market.spot.bid);
    });
}
