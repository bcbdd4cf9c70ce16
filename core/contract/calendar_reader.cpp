#include "contract/calendar_reader.hpp"

namespace forwright::contract {

using dates::BusinessCalendar;
using dates::Date;

namespace {

std::vector<std::string_view> knownCodes() {
    std::vector<std::string_view> codes;
    for (const dates::Centre& centre : dates::knownCentres()) {
        codes.push_back(centre.code);
    }
    return codes;
}

std::string codesOf(const BusinessCalendar& calendar) {
    Writer writer;
    writer.beginList();
    for (const std::string& code : calendar.centres()) {
        writer.value(code);
    }
    writer.endList();
    return writer.take();
}

} // namespace

std::vector<std::string> readCentres(const Value& list) {
    std::vector<std::string> centres;
    list.rows([&centres](const Value& row, std::size_t /*index*/) {
        const std::optional<std::string_view> code = row.text();
        if (!code) {
            return;
        }
        if (dates::findCentre(*code) == nullptr) {
            row.fault("unknown-calendar", shownText(*code) + " is no calendar known here: give " +
                                              listedText(knownCodes()) + ", or your own days in holidays.");
            return;
        }
        centres.emplace_back(*code);
    });
    return centres;
}

std::vector<Date> readDates(const Value& list) {
    std::vector<Date> days;
    list.rows([&days](const Value& row, std::size_t /*index*/) {
        if (const auto day = row.date()) {
            days.push_back(*day);
        }
    });
    return days;
}

BusinessCalendar readCalendar(Reader& object, const BusinessCalendar& fallback) {
    const Value calendars = object.optional("calendars", codesOf(fallback));
    if (!calendars.present()) {
        for (const std::string_view own : {"holidays", "openDays"}) {
            object.forbid(
                own, "Without calendars of its own a curve keeps those of the asset, whose own days count; "
                     "give calendars beside them.");
        }
        return fallback;
    }
    const std::vector<std::string> centres = readCentres(calendars);
    const std::vector<Date> holidays = readDates(object.optional("holidays"));
    const std::vector<Date> openDays = readDates(object.optional("openDays"));
    return {centres, holidays, openDays};
}

} // namespace forwright::contract
