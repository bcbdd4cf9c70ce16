// Task `path`: the forward by maturity, up to the inquiry's, to be drawn.
#include "desk/path.hpp"

#include "contract/inquiry_reader.hpp"
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"

namespace forwright::contract {

namespace {

void answerPath(const forward::Market& market, const forward::Inquiry& inquiry, Findings& findings,
                Writer& writer) {
    const outcome::Outcome<desk::Path> outcome = desk::path(market, inquiry);
    if (!outcome) {
        findings.faults(Place{}, outcome.faults());
        return;
    }
    const desk::Path& path = outcome.value();
    findings.notices(Place{}, path.notices);
    writer.beginObject();
    writeList(writer, "points", path.points, [&](const desk::PathPoint& point) {
        writer.beginObject();
        writer.member("date", point.date);
        writer.member("fair", point.fair);
        writer.member("bid", point.bid);
        writer.member("offer", point.offer);
        writer.endObject();
    });
    writeList(writer, "steps", path.steps, [&](const desk::PathStep& step) {
        writer.beginObject();
        writer.member("at", step.at);
        writer.member("date", step.date);
        writer.member("change", step.change);
        writer.endObject();
    });
    writer.endObject();
}

} // namespace

Calculation readPath(Reader& request) {
    const auto market = readMarket(request.required("market", "the market that the forward is priced in"));
    const auto inquiry = readInquiry(request.required("inquiry", "what the client asks for, {maturity, …}"));
    if (!market || !inquiry) {
        return {};
    }
    return [market = *market, inquiry = *inquiry](Findings& findings, Writer& writer) {
        answerPath(market, inquiry, findings, writer);
    };
}

} // namespace forwright::contract
