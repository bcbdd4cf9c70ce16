// Task `futures`: the futures price beside the forward, at one maturity and at more.
#include "desk/futures.hpp"

#include "contract/inquiry_reader.hpp"
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"

#include <utility>

namespace forwright::contract {

namespace {

constexpr Range volatilityRange{0.0, 10.0, false, false};
constexpr std::size_t mostFuturesRows = 1000;
constexpr Range correlationRange{-1.0, 1.0, false, false};

void writeFigures(Writer& writer, const desk::FuturesRow& row) {
    writer.member("maturity", row.schedule.maturity);
    writer.member("settlement", row.schedule.settlement);
    writer.member("forward", row.forward);
    writer.member("futures", row.futures);
    writer.member("ratio", row.ratio);
    writer.key("terms").beginObject();
    writer.member("covariance", row.covariance);
    writer.member("convexity", row.convexity);
    writer.endObject();
    writer.member("difference", row.difference);
    writer.key("parts").beginObject();
    writer.member("covariance", row.covarianceInPrice);
    writer.member("convexity", row.convexityInPrice);
    writer.endObject();
    writer.member("onQuantity", row.onQuantity);
}

void answerFutures(const forward::Market& market, const desk::FuturesAsked& asked, Findings& findings,
                   Writer& writer) {
    const outcome::Outcome<desk::Futures> outcome = desk::futures(market, asked);
    if (!outcome) {
        findings.faults(Place{}, outcome.faults());
        return;
    }
    const std::vector<desk::FuturesRow>& rows = outcome.value().rows;
    findings.notices(Place{}, outcome.value().notices);
    writer.beginObject();
    writeFigures(writer, rows.front());
    if (rows.size() > 1) {
        writer.key("rows").beginList();
        for (std::size_t i = 1; i < rows.size(); ++i) {
            writer.beginObject();
            writeFigures(writer, rows[i]);
            writer.endObject();
        }
        writer.endList();
    }
    writer.endObject();
}

} // namespace

Calculation readFutures(Reader& request) {
    const auto market = readMarket(request.required("market", "the market that the forward is priced in"));
    desk::FuturesAsked asked;
    const auto maturity = readMaturity(request);
    const auto volatility =
        request.required("volatility", "the volatility of the spot price, a year").number(volatilityRange);
    const auto correlation =
        request.required("correlation", "the correlation of the spot price with the short rate")
            .number(correlationRange);
    asked.quantity = request.number("quantity", positive, 1.0);
    const Value more = request.optional("maturities");
    if (maturity) {
        asked.maturities.push_back(*maturity);
        asked.places.emplace_back("/maturity");
    }
    more.rows(
        [&](const Value& row, std::size_t /*index*/) {
            if (const auto at = row.maturity()) {
                asked.maturities.push_back({*at, dates::Roll::following});
                asked.places.push_back(row.place().pointer());
            }
        },
        mostFuturesRows);
    if (!market || !maturity || !volatility || !correlation) {
        return {};
    }
    asked.volatility = *volatility;
    asked.correlation = *correlation;
    return [market = *market, asked = std::move(asked)](Findings& findings, Writer& writer) {
        answerFutures(market, asked, findings, writer);
    };
}

} // namespace forwright::contract
