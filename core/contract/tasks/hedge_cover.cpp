// Task `hedge-cover`: the price by the share of the exposure that is hedged.
#include "desk/hedge_cover.hpp"

#include "contract/inquiry_reader.hpp"
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"

#include <utility>

namespace forwright::contract {

namespace {

constexpr Range growthRange{-10.0, 10.0, false, false};
constexpr Range volatilityRange{0.0, 10.0, false, false};
constexpr Range loadingRange{0.0, 1000.0, false, false};

void writeQuantiles(Writer& writer, const char* name, const std::vector<desk::ResultQuantile>& quantiles) {
    writeList(writer, name, quantiles, [&](const desk::ResultQuantile& quantile) {
        writer.beginObject();
        writer.member("probability", quantile.probability);
        writer.member("result", quantile.result);
        writer.endObject();
    });
}

void writeCover(Writer& writer, const desk::CoverAt& cover) {
    writer.member("share", cover.share);
    writer.member("deviation", cover.deviation);
    writer.member("sell", cover.sell);
    writer.member("buy", cover.buy);
    writeQuantiles(writer, "quantiles", cover.quantiles);
    writer.member("lossProbability", cover.lossProbability);
    writeQuantiles(writer, "buyQuantiles", cover.buyQuantiles);
    writer.member("buyLossProbability", cover.buyLossProbability);
}

void answerHedgeCover(const forward::Market& market, const desk::HedgeCoverAsked& asked, Findings& findings,
                      Writer& writer) {
    const outcome::Outcome<desk::HedgeCover> outcome = desk::hedgeCover(market, asked);
    if (!outcome) {
        findings.faults(Place{}, outcome.faults());
        return;
    }
    const desk::HedgeCover& cover = outcome.value();
    findings.notices(Place{}, cover.notices);
    writer.beginObject();
    writer.member("maturity", cover.schedule.maturity);
    writer.member("settlement", cover.schedule.settlement);
    writer.member("fair", cover.fair);
    writer.member("expected", cover.expected);
    writeCover(writer, cover.asked);
    writer.key("onQuantity").beginObject();
    writer.member("sell", cover.onQuantity.sell);
    writer.member("buy", cover.onQuantity.buy);
    writer.member("deviation", cover.onQuantity.deviation);
    writer.endObject();
    if (!asked.shares.empty()) {
        writeList(writer, "rows", cover.shares, [&](const desk::CoverAt& row) {
            writer.beginObject();
            writeCover(writer, row);
            writer.endObject();
        });
    }
    writer.endObject();
}

} // namespace

Calculation readHedgeCover(Reader& request) {
    const auto market = readMarket(request.required("market", "the market that the forward is priced in"));
    desk::HedgeCoverAsked asked;
    const auto maturity = readMaturity(request);
    const auto growth =
        request.required("growth", "the growth of the price itself, a year, continuous").number(growthRange);
    const auto volatility =
        request.required("volatility", "the volatility of the price, a year").number(volatilityRange);
    const auto share = request.required("share", "the share hedged, from 0 to 1").number(shareRange);
    asked.loading = request.number("loading", loadingRange, 0.0);
    asked.quantity = request.number("quantity", positive, 1.0);
    request.optional("shares").rows([&](const Value& row, std::size_t /*index*/) {
        if (const auto one = row.number(shareRange)) {
            asked.shares.push_back(*one);
        }
    });
    if (!market || !maturity || !growth || !volatility || !share) {
        return {};
    }
    asked.maturity = *maturity;
    asked.growth = *growth;
    asked.volatility = *volatility;
    asked.share = *share;
    return [market = *market, asked = std::move(asked)](Findings& findings, Writer& writer) {
        answerHedgeCover(market, asked, findings, writer);
    };
}

} // namespace forwright::contract
