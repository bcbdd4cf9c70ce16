#include "forward_fixtures.hpp"

using namespace forwright;
using namespace forwright::fixtures;

namespace {

forward::Market pairIn(const std::string& asOf, const std::vector<std::string>& centres,
                       const std::vector<std::string>& counted, int lag) {
    forward::Market market = pair();
    market.asOf = day(asOf);
    market.asset.calendar = dates::BusinessCalendar(centres);
    market.asset.lagCalendar = dates::BusinessCalendar(counted);
    market.asset.settlementLag = {{dates::earliest, lag}};
    return market;
}

std::string spotOf(const forward::Market& market) {
    return dates::toIso(forward::settlementOf(market.asset, market.asOf));
}

} // namespace

TEST_CASE("spot of a pair: a holiday in the United States alone between dealing and spot does not delay it") {
    // Computed from the stated rule: two good days of the other currency, then good in both.
    CHECK(spotOf(pairIn("2026-05-22", {"EUTA", "USNY"}, {"EUTA"}, 2)) == "2026-05-26");
    CHECK(spotOf(pairIn("2026-05-22", {"GBLO", "USNY"}, {"GBLO"}, 2)) == "2026-05-27");
    CHECK(spotOf(pairIn("2026-05-21", {"EUTA", "USNY"}, {"EUTA"}, 2)) == "2026-05-26");
    CHECK(spotOf(pairIn("2026-04-02", {"EUTA", "USNY"}, {"EUTA"}, 2)) == "2026-04-08");
}

TEST_CASE("the lag may change by dealing date") {
    // Share settlement in the European Union moves from two days to one on 11 October 2027 (planned).
    forward::Market market = fullShare();
    market.asset.settlementLag = {{dates::earliest, 2}, {day("2027-10-11"), 1}};
    CHECK(dates::toIso(forward::settlementOf(market.asset, day("2027-10-08"))) == "2027-10-12");
    CHECK(dates::toIso(forward::settlementOf(market.asset, day("2027-10-11"))) == "2027-10-12");
    CHECK(dates::toIso(forward::settlementOf(market.asset, day("2027-10-12"))) == "2027-10-13");
}

TEST_CASE("a lag of 0 on no business day is the next one") {
    forward::Market market = plain(forward::AssetKind::commodity, "2026-12-05", 10.0, 0.0);
    CHECK(spotOf(market) == "2026-12-07");
    market.asOf = day("2026-12-04");
    CHECK(spotOf(market) == "2026-12-04");
}

TEST_CASE("a share ends on a dealing date counted from today and settles after its lag") {
    const forward::Market market = fullShare();
    const forward::Schedule date = scheduled(market, on("2027-12-15"));
    CHECK(dates::toIso(date.spot) == "2026-12-03");
    CHECK(date.holdFrom == market.asOf);
    CHECK(dates::toIso(date.settlement) == "2027-12-17");
    CHECK(date.days == 379);
    CHECK(date.resolutions.size() == 4);

    const forward::Schedule tenor = scheduled(market, {*dates::parseTenor("1M"), std::nullopt});
    CHECK(dates::toIso(tenor.maturity) ==
          "2027-01-04"); // 1 January closes the euro system's settlement; then a weekend
    const forward::Schedule days = scheduled(market, {*dates::parseTenor("4D"), std::nullopt});
    CHECK(dates::toIso(days.maturity) == "2026-12-07");
}

TEST_CASE("a pair ends on its delivery date counted from spot, end to end") {
    forward::Market market =
        pairIn("2026-02-25", {}, {}, 2); // spot Friday 27 February, the month's last business day
    const forward::Schedule schedule = scheduled(market, {*dates::parseTenor("1M"), std::nullopt});
    CHECK(dates::toIso(schedule.spot) == "2026-02-27");
    CHECK(schedule.holdFrom == schedule.spot);
    CHECK(dates::toIso(schedule.maturity) == "2026-03-31");
    CHECK(schedule.settlement == schedule.maturity);
}

TEST_CASE("a maturity on no business day is refused with its neighbours, or rolled with a notice") {
    const forward::Market market = fullShare();
    const auto refused = forward::schedule(market, on("2027-03-26"), "/here"); // Good Friday 2027
    REQUIRE_FALSE(refused.ok());
    CHECK(refused.faults().front().at == "/here");
    CHECK(refused.faults().front().code == "not-a-business-day");
    CHECK(refused.faults().front().message.find("2027-03-25") != std::string::npos);
    CHECK(refused.faults().front().message.find("2027-03-30") != std::string::npos);

    const auto following = forward::schedule(market, {day("2027-03-26"), dates::Roll::following}, "/here");
    REQUIRE(following.ok());
    CHECK(dates::toIso(following.value().maturity) == "2027-03-30");
    REQUIRE(following.value().notices.size() == 1);
    CHECK(following.value().notices.front().code == "maturity-moved");
    const auto preceding = forward::schedule(market, {day("2027-03-26"), dates::Roll::preceding}, "/here");
    CHECK(dates::toIso(preceding.value().maturity) == "2027-03-25");
}

TEST_CASE("maturities before the first possible day or too far ahead are refused") {
    const auto code = [](const forward::Market& market, const forward::Maturity& maturity) {
        const auto schedule = forward::schedule(market, maturity, "/m");
        return schedule.ok() ? std::string() : schedule.faults().front().code;
    };
    CHECK(code(fullShare(), on("2026-11-30")) == "in-the-past");
    CHECK(code(fullShare(), on("2026-12-01")).empty());
    CHECK(code(pair(), on("2026-12-02")).empty()); // value tomorrow
    CHECK(code(pair(), on("2026-12-03")).empty());
    CHECK(code(fullShare(), {*dates::parseTenor("100Y"), std::nullopt}).empty());
    CHECK(code(fullShare(), {*dates::parseTenor("1200M"), std::nullopt}).empty());
    CHECK(code(fullShare(), {*dates::parseTenor("36500D"), std::nullopt}).empty());
    CHECK(code(fullShare(), on("2126-12-03")).empty()); // a hundred years from spot
    CHECK(code(fullShare(), on("2126-12-04")) == "too-far");
    forward::Market late = fullShare();
    late.asOf = day("2199-12-20");
    CHECK(code(late, {*dates::parseTenor("1Y"), std::nullopt}) == "too-far");
}

TEST_CASE("an as-of date on no business day is a notice") {
    forward::Market market = fullShare();
    market.asOf = day("2026-12-05");
    market.funding.curve = discounting::flat(market.asOf, continuous(0.02), "");
    const forward::Schedule schedule = scheduled(market, on("2027-12-15"));
    REQUIRE(schedule.notices.size() == 1);
    CHECK(schedule.notices.front().at == "/market/asOf");
    CHECK(schedule.notices.front().code == "as-of-not-a-business-day");
}
