// Task `curve`: one of a market's curves to be looked at, with what it was made from.
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"
#include "desk/curve_view.hpp"
#include "desk/quoted_forwards.hpp"

namespace forwright::contract {

namespace {

enum class Which { funding, discount, base, yield };
std::string_view nameOf(Which which) {
    switch (which) {
    case Which::funding:
        return "funding";
    case Which::discount:
        return "discount";
    case Which::yield:
        return "yield";
    case Which::base:
        break;
    }
    return "base";
}

/// Where the curve stands in the market.
std::string_view placeOf(Which which) {
    switch (which) {
    case Which::funding:
        return "/funding/curve";
    case Which::discount:
        return "/discount";
    case Which::yield:
        return "/income/yield";
    case Which::base:
        break;
    }
    return "/base/curve";
}

discounting::CurvePtr curveOf(const forward::Market& market, Which which) {
    switch (which) {
    case Which::funding:
        return market.funding.curve;
    case Which::discount:
        return market.discount;
    case Which::yield:
        return market.income.yieldCurves ? market.income.yieldCurves->fair : nullptr;
    case Which::base:
        break;
    }
    return market.base ? market.base->curve : nullptr;
}

void writeView(Writer& writer, const desk::CurveView& view, const std::string& at) {
    writeList(writer, "points", view.points, [&](const desk::CurvePoint& point) {
        writer.beginObject();
        writer.member("date", point.date);
        writer.member("years", point.years);
        writer.member("factor", point.factor);
        writer.member("zero", point.zero);
        writer.member("forward", point.forward);
        writer.endObject();
    });
    writeList(writer, "instruments", view.instruments, [&](const discounting::RepricedInstrument& item) {
        writer.beginObject();
        writer.member("at", at + item.at);
        writer.member("type", item.type);
        writer.member("start", item.start);
        writer.member("end", item.end);
        writer.member("quote", item.quote);
        writer.member("repriced", item.repriced);
        writer.member("difference", item.repriced - item.quote);
        writer.endObject();
    });
}

void writeQuoted(Writer& writer, const std::vector<desk::RepricedForward>& rows) {
    writeList(writer, "rows", rows, [&](const desk::RepricedForward& row) {
        writer.beginObject();
        writer.member("at", row.at);
        writer.member("date", row.date);
        writeTwoWay(writer, "quote", row.quote.bid, row.quote.offer);
        writeTwoWay(writer, "repriced", row.repriced.bid, row.repriced.offer);
        writer.member("fair", row.fair);
        writer.member("impliedZero", row.impliedZero);
        writer.member("againstZero", row.againstZero);
        writer.member("difference", row.difference);
        writer.endObject();
    });
}

/// The dates a curve is looked at: as asked for, or spread up to one.
struct LookedAt {
    std::vector<dates::Date> asked;
    dates::Date until;
};

void answerCurve(const forward::Market& market, Which which, const LookedAt& dates, Findings& findings,
                 Writer& writer) {
    const discounting::CurvePtr curve = curveOf(market, which);
    const std::string at = market.at + std::string(placeOf(which));
    const outcome::Outcome<desk::CurveView> view =
        dates.asked.empty() ? desk::curveView(*curve, dates.until) : desk::curveView(*curve, dates.asked);
    if (!view) {
        outcome::Faults faults;
        outcome::append(faults, at, view.faults());
        findings.faults(Place{}, faults);
        return;
    }
    outcome::Notices notices;
    outcome::append(notices, at, view.value().notices);
    findings.notices(Place{}, notices);
    writer.beginObject();
    writer.member("which", nameOf(which));
    writer.member("convention", curve->convention());
    writer.member("random", curve->random() != nullptr);
    writeView(writer, view.value(), at);
    if (which == Which::base || which == Which::yield) {
        const outcome::Outcome<std::vector<desk::RepricedForward>> rows = desk::repricedForwards(market);
        if (!rows) {
            findings.faults(Place{}, rows.faults());
            return;
        }
        writeQuoted(writer, rows.value());
    } else {
        writeQuoted(writer, {});
    }
    writer.endObject();
}

constexpr int mostDays = 36'525; ///< about a hundred years

dates::Date dateOf(const std::variant<dates::Date, dates::Tenor>& at, dates::Date asOf) {
    const auto* tenor = std::get_if<dates::Tenor>(&at);
    return tenor != nullptr ? dates::addTenor(asOf, *tenor) : std::get<dates::Date>(at);
}

/// Whether the curve is there on that date; else the fault is told.
bool isWithin(const Value& value, dates::Date date, dates::Date first) {
    if (date < first) {
        value.fault("not-after-as-of", "A curve is looked at from " + dates::toIso(first) + " on; this is " +
                                           dates::toIso(date) + ".");
        return false;
    }
    if (date >= dates::latest || dates::daysBetween(first, date) > mostDays) {
        value.fault("too-far", "A curve is looked at to 100 years ahead, and to the day before " +
                                   dates::toIso(dates::latest) + ".");
        return false;
    }
    return true;
}

/// The last date to be looked at, after the market's own.
std::optional<dates::Date> readUntil(const Value& value, dates::Date asOf) {
    constexpr dates::Tenor fiveYears{5, dates::TenorUnit::year};
    dates::Date until = std::min(dates::addTenor(asOf, fiveYears), dates::latest - std::chrono::days{1});
    if (value.present()) {
        const auto at = value.dateOrTenor();
        if (!at) {
            return std::nullopt;
        }
        until = dateOf(*at, asOf);
    }
    return isWithin(value, until, asOf + std::chrono::days{1}) ? std::optional{until} : std::nullopt;
}

/// The dates asked for; none where the member is not there, nothing where it is at fault.
std::optional<std::vector<dates::Date>> readAsked(const Value& list, dates::Date asOf) {
    std::vector<dates::Date> asked;
    if (!list.present()) {
        return asked;
    }
    const bool isList = list.rows(
        [&](const Value& row, std::size_t /*index*/) {
            if (const auto at = row.dateOrTenor(); at && isWithin(row, dateOf(*at, asOf), asOf)) {
                asked.push_back(dateOf(*at, asOf));
            }
        },
        desk::mostCurvePoints);
    if (isList && list.json().size() == 0) {
        list.fault("empty-list", "Give at least one date.");
    }
    return isList && !asked.empty() && asked.size() == list.json().size() ? std::optional{std::move(asked)}
                                                                          : std::nullopt;
}

} // namespace

Calculation readCurveTask(Reader& request) {
    const auto market = readMarket(request.required("market", "the market whose curve is looked at"));
    const Value whichValue = request.optional("which", quotedText("funding"));
    const auto which = whichValue.present()
                           ? whichValue.choice({Which::funding, Which::discount, Which::base, Which::yield})
                           : std::optional{Which::funding};
    const Value datesValue = request.optional("dates");
    const Value untilValue =
        datesValue.present() ? request.optional("until") : request.optional("until", quotedText("5Y"));
    if (!market || !which) {
        return {};
    }
    const auto asked = readAsked(datesValue, market->asOf);
    if (asked && !asked->empty() && untilValue.present()) {
        request.findings().notice(untilValue.place(), "not-used",
                                  "The dates asked for are looked at instead.");
    }
    const auto until = readUntil(untilValue, market->asOf);
    if (!curveOf(*market, *which)) {
        whichValue.fault(
            "not-applicable",
            "Only a currency pair has a base curve, and only where listed contracts are quoted has an "
            "asset a curve of its yield.");
        return {};
    }
    if (!until || !asked) {
        return {};
    }
    return [market = *market, which = *which, dates = LookedAt{*asked, *until}](Findings& findings,
                                                                                Writer& writer) {
        answerCurve(market, which, dates, findings, writer);
    };
}

} // namespace forwright::contract
