#include "contract/curve_reader.hpp"

#include "contract/calendar_reader.hpp"
#include "contract/rate_reader.hpp"
#include "discounting/curves.hpp"
#include "discounting/money_market.hpp"

#include <utility>
#include <vector>

namespace forwright::contract {

using dates::Date;
using dates::Tenor;
using discounting::CurvePtr;

namespace {

constexpr std::string_view curveInWords =
    "a curve: a rate, or an object with rate (flat) or kind (pillars, instruments, random)";

/// The curve, or null with its faults told where it stands.
CurvePtr made(const Reader& object, discounting::Outcome<CurvePtr> curve) {
    if (curve) {
        return std::move(curve).value();
    }
    object.findings().faults(object.place(), curve.faults());
    return nullptr;
}

/// A model's number; its domain is the model's own to check.
std::optional<double> parameter(Reader& object, std::string_view name, std::string_view what) {
    return object.required(name, what).number(anyNumber);
}

// ---- pillars
// ---------------------------------------------------------------------------------------------------

enum class CurveKind { pillars, instruments, random };
std::string_view nameOf(CurveKind kind) {
    switch (kind) {
    case CurveKind::pillars:
        return "pillars";
    case CurveKind::instruments:
        return "instruments";
    case CurveKind::random:
        break;
    }
    return "random";
}

/// Names of what values are, as the curve's member `quote` has them.
enum class QuoteName { zero, factor };
std::string_view nameOf(QuoteName quote) {
    return quote == QuoteName::zero ? "zero" : "factor";
}

std::optional<Date> pillarDate(const Value& value, const CurveContext& context) {
    const auto at = value.dateOrTenor();
    if (!at) {
        return std::nullopt;
    }
    if (const Date* date = std::get_if<Date>(&*at)) {
        return *date;
    }
    const Date date = dates::addTenor(context.asOf, *std::get_if<Tenor>(&*at));
    if (date > dates::latest) {
        value.fault("too-far", "This tenor ends on " + dates::toIso(date) +
                                   ", after the last date there is, " + dates::toIso(dates::latest) +
                                   "; take a shorter one.");
        return std::nullopt;
    }
    return date;
}

std::vector<discounting::Pillar> readPillars(const Value& list, const CurveContext& context, bool& whole) {
    std::vector<discounting::Pillar> pillars;
    whole = list.rows([&](const Value& row, std::size_t /*index*/) {
        Reader pillar{row};
        const auto at = pillarDate(pillar.required("at", "the pillar's date or tenor"), context);
        const auto value = pillar.required("value", "the zero rate or discount factor").number(anyNumber);
        if (at && value) {
            pillars.push_back({*at, *value});
        }
    });
    whole = whole && pillars.size() == list.json().size();
    return pillars;
}

/// Factors have no convention; one that is given is told to be of no use.
void passOverConvention(Reader& object) {
    for (const std::string_view name : {"compounding", "dayCount", "frequency"}) {
        if (const Value unused = object.optional(name); unused.present()) {
            object.findings().notice(unused.place(), "not-used",
                                     "Discount factors have no convention; it is not used.");
        }
    }
}

CurvePtr readPillarCurve(Reader& object, const CurveContext& context) {
    discounting::Pillars points;
    if (object.choice("quote", {QuoteName::zero, QuoteName::factor}, QuoteName::zero) == QuoteName::factor) {
        points.quote = discounting::PillarQuote::factor;
        passOverConvention(object);
    } else {
        points.convention = readConvention(object, context.calendar);
    }
    using discounting::Interpolation;
    points.interpolation = object.choice(
        "interpolation", {Interpolation::logLinear, Interpolation::linearZero, Interpolation::monotoneCubic},
        Interpolation::logLinear);
    bool whole = false;
    points.pillars = readPillars(object.required("pillars", "a list of {at, value}"), context, whole);
    return whole ? made(object, discounting::pillars(context.asOf, points)) : nullptr;
}

// ---- instruments
// ---------------------------------------------------------------------------------------------------

/// A tenor, whose end must not lie beyond the dates there are.
std::optional<Tenor> readTenor(const Value& value, const CurveContext& context) {
    const std::optional<std::string_view> text = value.text();
    if (!text) {
        return std::nullopt;
    }
    const std::optional<Tenor> tenor = dates::parseTenor(*text);
    if (!tenor || tenor->count == 0) {
        value.fault("not-a-tenor",
                    shownText(*text) + " is no tenor: write a number above 0 and D, W, M or Y, as in 3M.");
        return std::nullopt;
    }
    if (dates::addTenor(context.asOf, *tenor) > dates::latest - std::chrono::years{1}) {
        value.fault("too-far", "This tenor ends after the last dates there are; take a shorter one.");
        return std::nullopt;
    }
    return tenor;
}

std::optional<std::variant<dates::ShortPeriod, Tenor>> readPeriod(const Value& value,
                                                                  const CurveContext& context) {
    if (const auto text = value.present() && value.json().isText() ? value.text() : std::nullopt) {
        if (const auto period = dates::parseShortPeriod(*text)) {
            return *period;
        }
    }
    const std::optional<Tenor> tenor = readTenor(value, context);
    return tenor ? std::optional<std::variant<dates::ShortPeriod, Tenor>>{*tenor} : std::nullopt;
}

dates::DayCountRule readInstrumentDayCount(Reader& object, const dates::BusinessCalendar& calendar) {
    dates::DayCountRule rule;
    using dates::DayCount;
    rule.kind =
        object.choice("dayCount",
                      {DayCount::act360, DayCount::act365Fixed, DayCount::actActIsda, DayCount::thirty360,
                       DayCount::thirtyE360, DayCount::thirtyE360Isda, DayCount::act365L, DayCount::bus252},
                      DayCount::act360);
    rule.calendar = calendar;
    return rule;
}

std::optional<discounting::Instrument> readInstrument(const Value& row, const CurveContext& context,
                                                      const discounting::MoneyMarket& market) {
    using discounting::InstrumentType;
    using discounting::Payments;
    Reader object{row};
    const auto type =
        object.required("type", "deposit, fra or overnight-swap")
            .choice({InstrumentType::deposit, InstrumentType::fra, InstrumentType::overnightSwap});
    if (!type) {
        object.passOver();
        return std::nullopt;
    }
    const auto rate = object.required("rate", "the rate quoted, a decimal number").number(anyNumber);
    const dates::DayCountRule dayCount = readInstrumentDayCount(object, market.calendar);
    switch (*type) {
    case InstrumentType::deposit: {
        const auto period = readPeriod(object.required("tenor", "ON, TN, SN or a tenor"), context);
        return period && rate
                   ? std::optional{discounting::deposit(context.asOf, market, *period, *rate, dayCount)}
                   : std::nullopt;
    }
    case InstrumentType::fra: {
        const auto start = readTenor(object.required("start", "the tenor after which it begins"), context);
        const auto end = readTenor(object.required("end", "the tenor after which it ends"), context);
        return start && end && rate ? std::optional{discounting::forwardRateAgreement(
                                          context.asOf, market, *start, *end, *rate, dayCount)}
                                    : std::nullopt;
    }
    case InstrumentType::overnightSwap:
        break;
    }
    const auto tenor = readTenor(object.required("tenor", "the swap's tenor"), context);
    const Payments payments = object.choice(
        "payments",
        {Payments::annual, Payments::semiannual, Payments::quarterly, Payments::monthly, Payments::atEnd},
        Payments::annual);
    return tenor && rate ? std::optional{discounting::overnightSwap(context.asOf, market, *tenor, *rate,
                                                                    dayCount, payments)}
                         : std::nullopt;
}

std::optional<discounting::Turn> readTurn(const Value& row) {
    Reader object{row};
    const auto from = object.required("from", "the first day of the jump").date();
    const auto to = object.required("to", "the day after its last").date();
    const auto spread = object.required("spread", "what the overnight rate is higher by").number(anyNumber);
    return from && to && spread ? std::optional{discounting::Turn{*from, *to, *spread}} : std::nullopt;
}

CurvePtr readInstrumentCurve(Reader& object, const CurveContext& context) {
    discounting::Instruments given;
    using discounting::Interpolation;
    given.interpolation = object.choice(
        "interpolation", {Interpolation::logLinear, Interpolation::linearZero, Interpolation::monotoneCubic},
        Interpolation::logLinear);
    discounting::MoneyMarket market;
    market.calendar = readCalendar(object, context.calendar);
    market.spotLag = object.optional("spotLag", "2").integer(0, 30).value_or(2);
    const Value items = object.required("items", "a list of instruments");
    const bool areItems = items.rows([&](const Value& row, std::size_t /*index*/) {
        if (auto item = readInstrument(row, context, market)) {
            given.items.push_back(std::move(*item));
        }
    });
    const Value turns = object.optional("turns");
    turns.rows([&](const Value& row, std::size_t /*index*/) {
        if (auto turn = readTurn(row)) {
            given.turns.push_back(*turn);
        }
    });
    if (!areItems || given.items.size() != items.json().size() ||
        (turns.present() && (!turns.isList() || given.turns.size() != turns.json().size()))) {
        return nullptr;
    }
    return made(object, discounting::instruments(context.asOf, std::move(given)));
}

// ---- random models
// ---------------------------------------------------------------------------------------------

CurvePtr readVasicek(Reader& object, const CurveContext& context) {
    const auto r0 = parameter(object, "r0", "the short rate today");
    const auto meanReversion = parameter(object, "meanReversion", "the speed of return to the long run");
    const auto longRun = parameter(object, "longRun", "the long-run rate");
    const auto volatility = parameter(object, "volatility", "the volatility of the short rate");
    if (!r0 || !meanReversion || !longRun || !volatility) {
        return nullptr;
    }
    return made(object, discounting::vasicek(context.asOf, {*r0, *meanReversion, *longRun, *volatility}));
}

CurvePtr readCoxIngersollRoss(Reader& object, const CurveContext& context) {
    const auto r0 = parameter(object, "r0", "the short rate today");
    const auto meanReversion = parameter(object, "meanReversion", "the speed of return to the long run");
    const auto longRun = parameter(object, "longRun", "the long-run rate");
    const auto volatility = parameter(object, "volatility", "the volatility of the short rate over its root");
    if (!r0 || !meanReversion || !longRun || !volatility) {
        return nullptr;
    }
    return made(object,
                discounting::coxIngersollRoss(context.asOf, {*r0, *meanReversion, *longRun, *volatility}));
}

CurvePtr readHoLee(Reader& object, const CurveContext& context) {
    const auto volatility = parameter(object, "volatility", "the volatility of the short rate");
    const CurvePtr fit = readCurve(object.required("fit", "the curve that the model is fitted to"), context);
    return volatility && fit ? made(object, discounting::hoLee(context.asOf, *volatility, fit)) : nullptr;
}

CurvePtr readHullWhite(Reader& object, const CurveContext& context) {
    const auto meanReversion = parameter(object, "meanReversion", "the speed of return");
    const auto volatility = parameter(object, "volatility", "the volatility of the short rate");
    const CurvePtr fit = readCurve(object.required("fit", "the curve that the model is fitted to"), context);
    if (!meanReversion || !volatility || !fit) {
        return nullptr;
    }
    return made(object, discounting::hullWhite(context.asOf, *meanReversion, *volatility, fit));
}

std::optional<discounting::PolicyMeeting> readMeeting(const Value& row) {
    Reader meeting{row};
    const auto date = meeting.required("date", "the date from which the decision is in force").date();
    std::vector<discounting::RateMove> moves;
    const Value list = meeting.required("moves", "a list of {by, probability}");
    const bool isList = list.rows([&](const Value& moveRow, std::size_t /*index*/) {
        Reader move{moveRow};
        const auto by = parameter(move, "by", "the change of the overnight rate");
        const auto probability = parameter(move, "probability", "its risk-neutral probability");
        if (by && probability) {
            moves.push_back({*by, *probability});
        }
    });
    if (!date || !isList || moves.size() != list.json().size()) {
        return std::nullopt;
    }
    return discounting::PolicyMeeting{*date, std::move(moves)};
}

CurvePtr readPolicyMeetings(Reader& object, const CurveContext& context) {
    const auto overnight = parameter(object, "overnight", "the overnight rate today");
    std::vector<discounting::PolicyMeeting> meetings;
    const Value list = object.required("meetings", "a list of {date, moves}");
    const bool isList = list.rows([&](const Value& row, std::size_t /*index*/) {
        if (auto meeting = readMeeting(row)) {
            meetings.push_back(std::move(*meeting));
        }
    });
    if (!overnight || !isList || meetings.size() != list.json().size()) {
        return nullptr;
    }
    return made(object, discounting::policyMeetings(context.asOf, *overnight, meetings));
}

CurvePtr readScenarios(Reader& object, const CurveContext& context) {
    std::vector<discounting::Scenario> scenarios;
    const Value list = object.required("scenarios", "a list of {weight, curve}");
    const bool isList = list.rows([&](const Value& row, std::size_t /*index*/) {
        Reader scenario{row};
        const auto weight = parameter(scenario, "weight", "the scenario's risk-neutral weight");
        CurvePtr curve = readCurve(scenario.required("curve", curveInWords), context);
        if (weight && curve) {
            scenarios.push_back({*weight, std::move(curve)});
        }
    });
    if (!isList || scenarios.size() != list.json().size()) {
        return nullptr;
    }
    return made(object, discounting::scenarios(context.asOf, scenarios));
}

/// Adds a path's factors to `factors`; it has one for each of `columns` dates.
void readPath(const Value& row, std::size_t columns, std::vector<double>& factors) {
    if (!row.isList()) {
        row.wrongType("a list of discount factors");
        return;
    }
    if (row.json().size() != columns) {
        row.fault("row-length", "A path has one discount factor for each of the " + std::to_string(columns) +
                                    " dates; this one has " + std::to_string(row.json().size()) + ".");
        return;
    }
    row.rows([&factors](const Value& factor, std::size_t /*index*/) {
        if (const auto number = factor.number(anyNumber)) {
            factors.push_back(*number);
        }
    });
}

CurvePtr readSamples(Reader& object, const CurveContext& context) {
    discounting::SamplePaths paths;
    const Value dates = object.required("dates", "the dates of the columns");
    const bool haveDates = dates.rows([&](const Value& row, std::size_t /*index*/) {
        if (const auto date = row.date()) {
            paths.dates.push_back(*date);
        }
    }) && paths.dates.size() == dates.json().size();

    const Value againstValue = object.optional("against");
    paths.against = readCurve(againstValue, context);
    if (againstValue.present() && !paths.against) {
        (void)object.optional("factors");
        return nullptr;
    }

    const Value rows = object.required("factors", "the discount factors, one row a path");
    if (!haveDates || !rows.present()) {
        return nullptr;
    }
    const std::size_t columns = paths.dates.size();
    // How many numbers there may be is the samples' own to check; no request has more paths than values.
    const bool haveRows = rows.rows(
        [&](const Value& row, std::size_t /*index*/) { readPath(row, columns, paths.factors); }, mostValues);
    if (!haveRows || paths.factors.size() != columns * rows.json().size()) {
        return nullptr;
    }
    return made(object, discounting::samples(context.asOf, std::move(paths)));
}

/// A random model by its name. Adding one adds a line.
struct Model {
    std::string_view name;
    CurvePtr (*read)(Reader&, const CurveContext&);
};
constexpr Model models[] = {
    {"vasicek", readVasicek},      {"cox-ingersoll-ross", readCoxIngersollRoss}, {"ho-lee", readHoLee},
    {"hull-white", readHullWhite}, {"policy-meetings", readPolicyMeetings},      {"scenarios", readScenarios},
    {"samples", readSamples},
};

CurvePtr readRandom(Reader& object, const CurveContext& context) {
    const Value value = object.required("model", "the random model's name");
    const std::optional<std::string_view> name = value.text();
    if (!name) {
        object.passOver();
        return nullptr;
    }
    std::vector<std::string_view> names;
    for (const Model& model : models) {
        if (model.name == *name) {
            return model.read(object, context);
        }
        names.push_back(model.name);
    }
    value.notOneOf(*name, names);
    object.passOver();
    return nullptr;
}

/// Forwards imply a curve only where spot and funding stand beside them.
bool isImplied(const Value& value) {
    const auto kind = value.json().find("kind");
    return kind && kind->isText() && kind->text() == "forwards";
}

CurvePtr readByKind(const Value& value, const CurveContext& context) {
    Reader object{value};
    if (isImplied(value)) {
        object.findings().fault(
            object.at("kind"), "not-applicable",
            "Quoted forwards imply the base curve of a currency pair, or the yield of another "
            "asset, and stand there only.");
        object.passOver();
        return nullptr;
    }
    const auto kind =
        object
            .required("kind", "what the curve is: pillars, instruments or random (or rate in its "
                              "place, where it is flat)")
            .choice({CurveKind::pillars, CurveKind::instruments, CurveKind::random});
    if (!kind) {
        object.passOver();
        return nullptr;
    }
    switch (*kind) {
    case CurveKind::pillars:
        return readPillarCurve(object, context);
    case CurveKind::instruments:
        return readInstrumentCurve(object, context);
    case CurveKind::random:
        break;
    }
    return readRandom(object, context);
}

} // namespace

CurvePtr readCurve(const Value& value, const CurveContext& context) {
    if (!value.present()) {
        return nullptr;
    }
    if (value.isNumber() || (value.has("rate") && !value.has("kind"))) {
        const std::optional<discounting::Rate> rate = readRate(value, context.calendar);
        return rate ? discounting::flat(context.asOf, *rate, value.isNumber() ? "" : "/rate") : nullptr;
    }
    if (!value.isObject()) {
        value.wrongType(curveInWords);
        return nullptr;
    }
    return readByKind(value, context);
}

} // namespace forwright::contract
