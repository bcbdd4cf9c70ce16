#include "desk/path.hpp"
#include "desk/tenors.hpp"
#include "forward_fixtures.hpp"

#include <algorithm>

using namespace forwright;
using namespace forwright::fixtures;
using doctest::Approx;

TEST_CASE("tenors are the same quotes one by one") {
    const forward::Market market = fullShare();
    desk::TenorsAsked asked;
    asked.inquiry.margin = {forward::MarginUnit::bpPerYear, 10.0};
    asked.maturities = {
        {*dates::parseTenor("3M"), std::nullopt}, on("2027-12-15"), {*dates::parseTenor("1W"), std::nullopt}};
    const auto answer = desk::tenors(market, asked);
    REQUIRE(answer.ok());
    REQUIRE(answer.value().rows.size() == 3);
    for (std::size_t i = 0; i < 3; ++i) {
        forward::Inquiry one = asked.inquiry;
        one.maturity = asked.maturities[i];
        const forward::Quote quote = quoted(market, one);
        CHECK(answer.value().rows[i].fair == quote.fair.forward);
        CHECK(answer.value().rows[i].offer == quote.quotedOffer);
        CHECK(answer.value().rows[i].annualised == quote.annualised);
    }
}

TEST_CASE("the grid moves spot and funding alone, and its middle is the fair price") {
    const forward::Market market = fullShare();
    desk::TenorsAsked asked;
    asked.grid = desk::GridAsked{on("2027-12-15"), {-0.05, 0.0, 0.05}, {-0.005, 0.0, 0.005, 0.01}};
    const auto answer = desk::tenors(market, asked);
    REQUIRE(answer.ok());
    const auto& grid = answer.value().grid;
    REQUIRE(grid.size() == 3);
    REQUIRE(grid[0].size() == 4);
    const forward::Price middle =
        forward::price(market, scheduled(market, on("2027-12-15")), forward::Side::fair);
    CHECK(grid[1][1] == Approx(middle.forward).epsilon(1e-15));
    forward::Market moved = market;
    moved.spot = {48.62 * 1.05, 48.66 * 1.05};
    moved.funding.curve = discounting::withSpread(market.funding.curve, 0.01);
    CHECK(grid[2][3] ==
          Approx(forward::price(moved, scheduled(moved, on("2027-12-15")), forward::Side::fair).forward)
              .epsilon(1e-15));
}

TEST_CASE("every fault of every row is reported at its row") {
    desk::TenorsAsked asked;
    asked.maturities = {on("2027-03-26"), on("2026-11-30"), on("2027-12-15")};
    const auto answer = desk::tenors(fullShare(), asked);
    REQUIRE_FALSE(answer.ok());
    REQUIRE(answer.faults().size() == 2);
    CHECK(answer.faults()[0].at == "/maturities/0");
    CHECK(answer.faults()[1].code == "in-the-past");

    desk::TenorsAsked endless;
    endless.grid =
        desk::GridAsked{on("2027-12-15"), std::vector<double>(10000, 0.0), std::vector<double>(10000, 0.0)};
    CHECK(desk::tenors(fullShare(), endless).faults().front().code == "too-much-work");
}

TEST_CASE("the carry path starts at spot, ends at the quote and steps at every distribution") {
    const forward::Market market = fullShare();
    const forward::Inquiry inquiry{forward::Client::twoWay, 1.0, on("2027-12-15"), {}};
    const auto answer = desk::path(market, inquiry);
    REQUIRE(answer.ok());
    const desk::Path& path = answer.value();
    const forward::Quote quote = quoted(market, inquiry);
    CHECK(path.points.size() <= static_cast<std::size_t>(desk::mostPathPoints));
    CHECK(path.points.size() > 100);
    CHECK(path.points.front().date == market.asOf);
    CHECK(path.points.front().fair == Approx(48.64).epsilon(1e-15));
    CHECK(path.points.back().date == quote.schedule.maturity);
    CHECK(path.points.back().fair == quote.fair.forward);
    CHECK(path.points.back().bid == quote.bid.forward);
    CHECK(path.points.back().offer == quote.offer.forward);
    REQUIRE(path.steps.size() == 6);
    for (const desk::PathStep& step : path.steps) {
        const auto on =
            std::find_if(path.points.begin(), path.points.end(),
                         [&step](const desk::PathPoint& point) { return point.date == step.date; });
        REQUIRE(on != path.points.end());
        const auto before = std::prev(on);
        CHECK(dates::daysBetween(before->date, on->date) <= 4);
        CHECK(on->fair < before->fair);
        CHECK(step.change < 0.0);
    }
}

TEST_CASE("a long path, and one of no length, are drawn within bounds") {
    const forward::Market market = fullShare();
    const auto longest =
        desk::path(market, {forward::Client::twoWay, 1.0, {*dates::parseTenor("100Y"), std::nullopt}, {}});
    REQUIRE(longest.ok());
    CHECK(longest.value().points.size() <= static_cast<std::size_t>(desk::mostPathPoints));
    const auto none = desk::path(market, {forward::Client::twoWay, 1.0, on("2026-12-01"), {}});
    REQUIRE(none.ok());
    CHECK(none.value().points.size() == 1);
}
