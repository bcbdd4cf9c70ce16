#include "desk/quoted_forwards.hpp"

namespace forwright::desk {

namespace {

double zeroOf(const discounting::Curve& curve, Date date) {
    return -curve.logFactor(date) / dates::years(curve.asOf(), date);
}

} // namespace

outcome::Outcome<std::vector<RepricedForward>> repricedForwards(const forward::Market& market) {
    std::vector<RepricedForward> rows;
    for (const forward::QuotedForward& quoted : market.quotedForwards) {
        forward::Inquiry inquiry;
        inquiry.maturity.at = quoted.date;
        const outcome::Outcome<forward::Quote> quote =
            forward::quote(market, inquiry, false, {quoted.at + "/at", quoted.at});
        if (!quote) {
            return quote.faults();
        }
        const forward::Quote& made = quote.value();
        RepricedForward row{
            quoted.at,         quoted.date, quoted.quote, {made.bid.forward, made.offer.forward},
            made.fair.forward, 0.0,         {},           {}};
        const Date end = market.base ? made.schedule.settlement : made.schedule.maturity;
        const discounting::Curve& curve =
            market.base ? *market.base->curve : *market.income.yieldCurves->fair;
        row.impliedZero = zeroOf(curve, end);
        if (market.against && market.against->review(end).faults.empty()) {
            row.againstZero = zeroOf(*market.against, end);
            row.difference = row.impliedZero - *row.againstZero;
        }
        rows.push_back(std::move(row));
    }
    return rows;
}

} // namespace forwright::desk
