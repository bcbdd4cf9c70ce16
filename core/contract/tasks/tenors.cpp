// Task `tenors`: quotes at several maturities, and how one of them moves with spot and funding.
#include "desk/tenors.hpp"

#include "contract/inquiry_reader.hpp"
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"

#include <algorithm>
#include <utility>

namespace forwright::contract {

namespace {

/// Spot may not fall to nothing; nobody asks what tenfold is.
constexpr Range spotMoves{-1.0, 10.0, true, false};
constexpr Range fundingMoves{-1.0, 1.0, false, false};

std::vector<forward::Maturity> readMaturities(Reader& request) {
    const Value list = request.required("maturities", "a list of dates and tenors");
    std::vector<forward::Maturity> maturities;
    bool anyDate = false;
    list.rows([&](const Value& row, std::size_t /*index*/) {
        if (const auto at = row.maturity()) {
            maturities.push_back({*at, std::nullopt});
            anyDate = anyDate || std::holds_alternative<dates::Date>(*at);
        }
    });
    if (list.isList() && list.json().size() == 0) {
        list.fault("empty-list", "Give at least one maturity.");
    }
    const auto roll = readRoll(request, anyDate || maturities.empty());
    for (forward::Maturity& maturity : maturities) {
        maturity.roll = roll;
    }
    return maturities;
}

std::vector<double> readMoves(const Value& list, const Range& range) {
    std::vector<double> moves;
    list.rows([&](const Value& row, std::size_t /*index*/) {
        if (const auto move = row.number(range)) {
            moves.push_back(*move);
        }
    });
    if (list.isList() && list.json().size() == 0) {
        list.fault("empty-list", "Give at least one move; 0 is none.");
    }
    return moves;
}

std::optional<desk::GridAsked> readGrid(const Value& value) {
    Reader object{value};
    const auto maturity = readMaturity(object);
    std::vector<double> spot =
        readMoves(object.required("spot", "relative moves of spot, as in [-0.05, 0, 0.05]"), spotMoves);
    std::vector<double> funding = readMoves(
        object.required("funding", "moves of funding rates, as in [-0.005, 0, 0.005]"), fundingMoves);
    if (spot.size() * funding.size() > mostRows) {
        value.fault("too-many-rows", "A grid may have " + std::to_string(mostRows) + " cells; this one has " +
                                         std::to_string(spot.size()) + " by " +
                                         std::to_string(funding.size()) + ".");
    }
    return maturity ? std::optional{desk::GridAsked{*maturity, std::move(spot), std::move(funding)}}
                    : std::nullopt;
}

void writeRow(Writer& writer, const desk::TenorRow& row) {
    writer.beginObject();
    writer.member("maturity", row.maturity);
    writer.member("settlement", row.settlement);
    writer.member("fair", row.fair);
    writeTwoWay(writer, "breakEven", row.breakEven.bid, row.breakEven.offer);
    writeTwoWay(writer, "quote", row.bid, row.offer);
    writer.member("points", row.points);
    writer.member("annualised", row.annualised);
    writer.endObject();
}

void answerTenors(const forward::Market& market, const desk::TenorsAsked& asked, Findings& findings,
                  Writer& writer) {
    const outcome::Outcome<desk::Tenors> outcome = desk::tenors(market, asked);
    if (!outcome) {
        findings.faults(Place{}, outcome.faults());
        return;
    }
    const desk::Tenors& tenors = outcome.value();
    findings.notices(Place{}, tenors.notices);
    dates::Date last = market.asOf;
    for (const desk::TenorRow& row : tenors.rows) {
        last = std::max(last, row.settlement);
    }
    reviewCalendars(market, last, findings);
    writer.beginObject();
    writeList(writer, "rows", tenors.rows, [&](const desk::TenorRow& row) { writeRow(writer, row); });
    if (asked.grid) {
        writeList(writer, "grid", tenors.grid, [&](const std::vector<double>& row) {
            writer.beginList();
            for (const double forward : row) {
                writer.value(forward);
            }
            writer.endList();
        });
    }
    writer.endObject();
}

} // namespace

Calculation readTenors(Reader& request) {
    const auto market = readMarket(request.required("market", "the market that the forwards are priced in"));
    desk::TenorsAsked asked;
    Reader terms{request.optional("inquiry")};
    asked.inquiry = readTerms(terms);
    asked.maturities = readMaturities(request);
    asked.grid = readGrid(request.optional("grid"));
    if (!market) {
        return {};
    }
    return [market = *market, asked = std::move(asked)](Findings& findings, Writer& writer) {
        answerTenors(market, asked, findings, writer);
    };
}

} // namespace forwright::contract
