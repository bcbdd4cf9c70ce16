#include "contract/forwards_reader.hpp"

#include "contract/two_way_reader.hpp"

namespace forwright::contract {

using forward::AssetKind;
using forward::QuotedForwards;

namespace {

enum class Quoted { points, outright };
std::string_view nameOf(Quoted quoted) {
    return quoted == Quoted::points ? "points" : "outright";
}

/// Points of a pair against the yen are hundredths, of the others ten-thousandths (common practice of the
/// trade).
double usualScale(const forward::Asset& asset) {
    return asset.currency == "JPY" ? 100.0 : 10000.0;
}

std::optional<forward::ForwardQuote> readRow(const Value& row) {
    Reader object{row};
    const auto at = object.required("at", "the maturity, a date or a tenor").maturity();
    const auto value = readTwoWay(object.required("value", "what is quoted, a number or {bid, offer}"),
                                  anyNumber, "a forward");
    return at && value ? std::optional{forward::ForwardQuote{{*at, std::nullopt}, *value}} : std::nullopt;
}

} // namespace

bool quotesForwards(const Value& value) {
    if (!value.has("kind")) {
        return false;
    }
    const auto kind = value.json().find("kind");
    return kind && kind->isText() && kind->text() == "forwards";
}

std::optional<QuotedForwards> readForwards(const Value& value, const CurveContext& context,
                                           const forward::Asset& asset) {
    Reader object{value};
    (void)object.required("kind", "forwards");
    QuotedForwards quoted;
    using discounting::Interpolation;
    quoted.interpolation = object.choice(
        "interpolation", {Interpolation::logLinear, Interpolation::linearZero, Interpolation::monotoneCubic},
        Interpolation::logLinear);
    if (asset.kind == AssetKind::currencyPair) {
        quoted.points =
            object.required("quoted", "points or outright").choice({Quoted::points, Quoted::outright}) ==
            Quoted::points;
        if (quoted.points) {
            quoted.scale = object.number("scale", positive, usualScale(asset));
        } else {
            object.forbid("scale", "An outright forward has no scale.");
        }
        const Value against = object.optional("against");
        quoted.against = readCurve(against, context);
    } else {
        for (const std::string_view name : {"quoted", "scale", "against"}) {
            object.forbid(
                name, "Only a currency pair's forwards have it: another asset's are listed contracts, quoted "
                      "outright.");
        }
    }
    const Value rows = object.required("rows", "a list of {at, value}");
    const bool areRows = rows.rows([&quoted](const Value& row, std::size_t /*index*/) {
        if (auto quote = readRow(row)) {
            quoted.rows.push_back(std::move(*quote));
        }
    });
    return areRows && quoted.rows.size() == rows.json().size() ? std::optional{std::move(quoted)}
                                                               : std::nullopt;
}

bool implyFrom(const QuotedForwards& quoted, const std::string& at, Findings& findings,
               forward::Market& market) {
    outcome::Outcome<forward::Implied> found = forward::implied(market, quoted, at);
    if (!found) {
        findings.faults(Place{}, found.faults());
        return false;
    }
    const forward::Implied& implied = found.value();
    const forward::ImpliedCurves& curves = implied.curves;
    if (market.asset.kind == AssetKind::currencyPair) {
        market.base = forward::Funding{curves.fair, 0.0, 0.0,
                                       income::TwoWay<discounting::CurvePtr>{curves.bid, curves.offer}};
    } else {
        market.income.yieldCurves = income::YieldCurves{curves.fair, curves.bid, curves.offer};
    }
    market.against = implied.against;
    for (const forward::ResolvedForward& row : implied.rows) {
        market.quotedForwards.push_back({at + row.at, row.schedule.maturity, row.outright});
    }
    return true;
}

} // namespace forwright::contract
