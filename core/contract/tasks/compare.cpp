// Task `compare`: the same inquiry under several funding assumptions.
#include "desk/compare.hpp"

#include "contract/asset_reader.hpp"
#include "contract/curve_reader.hpp"
#include "contract/inquiry_reader.hpp"
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"

#include <chrono>
#include <utility>

namespace forwright::contract {

namespace {

constexpr std::size_t mostFundings = 100;

std::vector<desk::FundingAssumption> readFundings(const Value& list, const CurveContext& context) {
    std::vector<desk::FundingAssumption> fundings;
    list.rows(
        [&](const Value& row, std::size_t /*index*/) {
            Reader object{row};
            const Value name = object.required("name", "what it is called");
            discounting::CurvePtr curve =
                readCurve(object.required("curve", "the curve: a rate, pillars or a random model"), context);
            std::string called = readName(name);
            if (curve) {
                fundings.push_back({std::move(called), std::move(curve)});
            }
        },
        mostFundings);
    if (list.isList() && list.json().size() == 0) {
        list.fault("empty-list", "Give at least one assumption.");
    }
    return fundings;
}

void answerCompare(const forward::Market& market, const desk::ComparisonAsked& asked, Findings& findings,
                   Writer& writer) {
    const outcome::Outcome<desk::Comparison> outcome = desk::compare(market, asked);
    if (!outcome) {
        findings.faults(Place{}, outcome.faults());
        return;
    }
    const desk::Comparison& comparison = outcome.value();
    findings.notices(Place{}, comparison.notices);
    writer.beginObject();
    writer.member("maturity", comparison.schedule.maturity);
    writer.member("settlement", comparison.schedule.settlement);
    writeList(writer, "rows", comparison.rows, [&](const desk::ComparisonRow& row) {
        writer.beginObject();
        writer.member("name", row.name);
        writer.member("random", row.random);
        writer.member("fitted", row.fitted);
        writer.member("fair", row.fair);
        writer.member("expectedFactor", row.expectedFactor);
        writer.member("deviationLog", row.deviationLog);
        writer.member("averageRateForward", row.averageRateForward);
        writer.member("gap", row.gap);
        writer.member("change", row.change);
        writer.member("onQuantity", row.onQuantity);
        writer.endObject();
    });
    writer.endObject();
}

} // namespace

Calculation readCompare(Reader& request) {
    const auto market = readMarket(request.required("market", "the market that the forward is priced in"));
    const auto inquiry =
        readInquiry(request.required("inquiry", "what the client asks for, {quantity, maturity, …}"));
    // Where the market is at fault the curves are read all the same, as of a day that blames none of theirs.
    const CurveContext context = market ? CurveContext{market->asOf, market->asset.calendar}
                                        : CurveContext{dates::earliest - std::chrono::days{1}, {}};
    desk::ComparisonAsked asked;
    asked.fundings = readFundings(
        request.required("fundings", "the funding assumptions, a list of {name, curve}"), context);
    if (!market || !inquiry || !request.findings().ok()) {
        return {};
    }
    asked.inquiry = *inquiry;
    return [market = *market, asked = std::move(asked)](Findings& findings, Writer& writer) {
        answerCompare(market, asked, findings, writer);
    };
}

} // namespace forwright::contract
