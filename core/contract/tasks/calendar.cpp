// Task `calendar`: the asset's business days, month by month, and when what is dealt settles.
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"
#include "desk/calendar_view.hpp"

namespace forwright::contract {

namespace {

constexpr int usualMonths = 18;

void writeDay(Writer& writer, const desk::SpecialDay& day) {
    writer.beginObject();
    writer.member("date", day.date);
    writer.member("open", day.open);
    writer.member("own", day.own);
    writeList(writer, "centres", day.centres, [&](const desk::ClosedCentre& centre) {
        writer.beginObject();
        writer.member("code", centre.code);
        writer.member("name", centre.name);
        writer.endObject();
    });
    writer.endObject();
}

void answerCalendar(const forward::Market& market, dates::Date from, int months, Findings& findings,
                    Writer& writer) {
    const desk::CalendarView view = desk::calendarView(market, from, months);
    reviewCalendars(market, view.months.back().first, findings);
    writer.beginObject();
    writer.member("from", view.from);
    writeList(writer, "months", view.months, [&](const desk::CalendarMonth& month) {
        writer.beginObject();
        writer.member("first", month.first);
        writer.member("businessDays", month.businessDays);
        writer.member("lastBusinessDay", month.lastBusinessDay);
        writer.member("thirdWednesday", month.thirdWednesday);
        writer.member("thirdFriday", month.thirdFriday);
        writer.endObject();
    });
    writeList(writer, "days", view.days, [&](const desk::SpecialDay& day) { writeDay(writer, day); });
    writeList(writer, "dealings", view.dealings, [&](const desk::DealingDay& dealing) {
        writer.beginObject();
        writer.member("dealt", dealing.dealt);
        writer.member("settles", dealing.settles);
        writer.endObject();
    });
    writer.endObject();
}

} // namespace

Calculation readCalendarTask(Reader& request) {
    const auto market = readMarket(request.required("market", "the market whose calendar is looked at"));
    const Value fromValue = request.optional("from", quotedText(market ? dates::toIso(market->asOf) : ""));
    const auto from = fromValue.date();
    const auto months =
        request.optional("months", std::to_string(usualMonths)).integer(1, desk::mostCalendarMonths);
    if (!market) {
        return {};
    }
    const dates::Date first = from.value_or(market->asOf);
    if (first > dates::latest - std::chrono::days{31 * desk::mostCalendarMonths}) {
        fromValue.fault("too-far", "A calendar is looked at up to five years before " +
                                       dates::toIso(dates::latest) + ".");
        return {};
    }
    return
        [market = *market, first, months = months.value_or(usualMonths)](Findings& findings, Writer& writer) {
            answerCalendar(market, first, months, findings, writer);
        };
}

} // namespace forwright::contract
