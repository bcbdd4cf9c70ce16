#include "forward/ledger.hpp"
#include "forward_fixtures.hpp"

#include <cmath>

using namespace forwright;
using namespace forwright::fixtures;
using doctest::Approx;
using forward::Side;

TEST_CASE("the ledger of each side closes at zero and delivers exactly one unit") {
    for (const forward::Market& market : {fullShare(), pair(), commodity()}) {
        const forward::Quote quote = quoted(market, {forward::Client::twoWay, 1.0, on("2027-12-15"), {}});
        for (const forward::SideInputs* inputs : {&quote.fairInputs, &quote.bidInputs, &quote.offerInputs}) {
            const forward::Price price = forward::price(market, quote.schedule, *inputs);
            const forward::Ledger ledger = forward::ledger(market, quote.schedule, *inputs, price);
            CHECK(ledger.forward == price.forward);
            CHECK(ledger.obligation == (inputs->side == Side::bid ? -1.0 : 1.0));
            CHECK(std::fabs(ledger.closingUnits - ledger.obligation) < 1e-12);
            CHECK(std::fabs(ledger.closingCash) < 1e-9 * market.spot.bid);
            CHECK(std::fabs(ledger.rows.back().held) < 1e-12);
            for (std::size_t i = 1; i < ledger.rows.size(); ++i) {
                CHECK(ledger.rows[i - 1].date <= ledger.rows[i].date);
                CHECK(ledger.rows[i - 1].balance + ledger.rows[i].cash == ledger.rows[i].balance);
            }
        }
    }
}

TEST_CASE("the ledger's own cash, carried through the curve by hand, is worth nothing today") {
    const forward::Market market = fullShare();
    const forward::Schedule schedule = scheduled(market, on("2027-12-15"));
    for (const Side side : {Side::fair, Side::bid, Side::offer}) {
        const forward::SideInputs inputs = forward::inputsOf(market, schedule, side);
        const forward::Price price = forward::price(market, schedule, inputs);
        const forward::Ledger ledger = forward::ledger(market, schedule, inputs, price);
        double today = 0.0;
        for (const forward::LedgerRow& row : ledger.rows) {
            if (row.code != "interest") {
                today += row.cash * inputs.funding->factor(row.date);
            }
        }
        CHECK(std::fabs(today) < 1e-12 * market.spot.bid);
    }
}

TEST_CASE("a wrong forward price leaves exactly what it is wrong by") {
    const forward::Market market = fullShare();
    const forward::Schedule schedule = scheduled(market, on("2027-12-15"));
    const forward::SideInputs inputs = forward::inputsOf(market, schedule, Side::offer);
    forward::Price price = forward::price(market, schedule, inputs);
    price.forward += 0.25;
    CHECK(forward::ledger(market, schedule, inputs, price).closingCash == Approx(0.25));
}

TEST_CASE("a distribution paid after settlement enters as what it is worth then") {
    const forward::Market market =
        fullShare(); // its third row goes ex in June 2027 and is paid in February 2028
    const forward::Schedule schedule = scheduled(market, on("2027-12-15"));
    const forward::SideInputs inputs = forward::inputsOf(market, schedule, Side::fair);
    const forward::Ledger ledger =
        forward::ledger(market, schedule, inputs, forward::price(market, schedule, inputs));
    bool found = false;
    for (const forward::LedgerRow& row : ledger.rows) {
        if (row.code == "receivable") {
            found = true;
            CHECK(row.date == schedule.settlement);
            CHECK(row.cash < 0.55);
        }
    }
    CHECK(found);
}
