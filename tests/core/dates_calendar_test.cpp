#include "dates/business_calendar.hpp"
#include "dates/special_days.hpp"
#include "dates/tenor.hpp"

#include <doctest/doctest.h>

#include <array>
#include <string>
#include <vector>

using namespace forwright::dates;

namespace {

Date d(std::string_view text) {
    const auto date = parseIso(text);
    REQUIRE_MESSAGE(date.has_value(), text);
    return *date;
}

BusinessCalendar calendarOf(const std::vector<std::string>& centres) {
    return BusinessCalendar{centres};
}

/// The weekdays of a year on which the calendar is closed, as "MM-DD MM-DD ...".
std::string closedWeekdays(std::string_view centre, int year) {
    const BusinessCalendar calendar = calendarOf({std::string{centre}});
    std::string closed;
    const Date end{std::chrono::year{year + 1} / 1 / 1};
    for (Date date{std::chrono::year{year} / 1 / 1}; date < end; date += std::chrono::days{1}) {
        if (isWeekday(date) && !calendar.isBusinessDay(date)) {
            closed += (closed.empty() ? "" : " ") + toIso(date).substr(5);
        }
    }
    return closed;
}

struct YearRow {
    const char* centre;
    int year;
    const char* closed;
};

void check(std::span<const YearRow> rows) {
    for (const YearRow& row : rows) {
        CAPTURE(row.centre);
        CAPTURE(row.year);
        CHECK(closedWeekdays(row.centre, row.year) == std::string{row.closed});
    }
}

} // namespace

TEST_SUITE("dates: calendars") {

    TEST_CASE("Easter Sundays") {
        // From published Good Fridays; the last three from memory, reproduced by independent arithmetic.
        for (const char* sunday :
             {"2010-04-04", "2012-04-08", "2013-03-31", "2014-04-20", "2015-04-05", "2016-03-27",
              "2017-04-16", "2018-04-01", "2019-04-21", "2020-04-12", "2021-04-04", "2022-04-17",
              "2023-04-09", "2026-04-05", "2008-03-23", "2035-03-25", "2038-04-25"}) {
            const Date date = d(sunday);
            CHECK(toIso(easterSunday(std::chrono::year_month_day{date}.year())) == sunday);
        }
    }

    TEST_CASE("Easter by another reckoning, and within its bounds") {
        // The anonymous reckoning printed in Nature, 20 April 1876, from memory: other arithmetic than the
        // core's.
        const auto marchDay = [](int year) {
            const int a = year % 19;
            const int b = year / 100;
            const int c = year % 100;
            const int g = (b - (b + 8) / 25 + 1) / 3;
            const int h = (19 * a + b - b / 4 - g + 15) % 30;
            const int l = (32 + 2 * (b % 4) + 2 * (c / 4) - h - c % 4) % 7;
            const int m = (a + 11 * h + 22 * l) / 451;
            return h + l - 7 * m + 22;
        };
        int wrong = 0;
        for (int year = 1583; year <= 9999; ++year) {
            const Date march{std::chrono::year{year} / 3 / 1};
            const Date sunday = easterSunday(std::chrono::year{year});
            wrong += sunday == march + std::chrono::days{marchDay(year) - 1} ? 0 : 1;
            wrong += std::chrono::weekday{sunday} == std::chrono::Sunday ? 0 : 1;
            wrong += sunday >= Date{std::chrono::year{year} / 3 / 22} &&
                             sunday <= Date{std::chrono::year{year} / 4 / 25}
                         ? 0
                         : 1;
        }
        CHECK(wrong == 0);
    }

    TEST_CASE("third Wednesdays and Fridays") {
        // Computed from the rule.
        for (const char* date : {"2026-03-18", "2026-06-17", "2026-09-16", "2026-12-16", "2027-03-17",
                                 "2027-06-16", "2027-09-15", "2027-12-15"}) {
            const std::chrono::year_month_day day{d(date)};
            CHECK(toIso(thirdWednesday(day.year() / day.month())) == date);
        }
        for (int month = 1; month <= 2400; ++month) {
            const auto inMonth = std::chrono::year{1990} / 1 + std::chrono::months{month};
            const Date friday = thirdFriday(inMonth);
            const std::chrono::year_month_day day{friday};
            CHECK(std::chrono::weekday{friday} == std::chrono::Friday);
            CHECK(day.year() / day.month() == inMonth);
            CHECK(unsigned(day.day()) >= 15);
            CHECK(unsigned(day.day()) <= 21);
        }
    }

    TEST_CASE("TARGET closing days") {
        // European Central Bank, notices of TARGET closing days; 2001 from memory.
        check(std::array<YearRow, 8>{{
            {"EUTA", 1999, "01-01 12-31"}, // 25 December was a Saturday
            {"EUTA", 2000, "04-21 04-24 05-01 12-25 12-26"},
            {"EUTA", 2001, "01-01 04-13 04-16 05-01 12-25 12-26 12-31"},
            {"EUTA", 2002, "01-01 03-29 04-01 05-01 12-25 12-26"},
            {"EUTA", 2024, "01-01 03-29 04-01 05-01 12-25 12-26"},
            {"EUTA", 2025, "01-01 04-18 04-21 05-01 12-25 12-26"},
            {"EUTA", 2026, "01-01 04-03 04-06 05-01 12-25"},
            {"EUTA", 2027, "01-01 03-26 03-29"},
        }});
    }

    TEST_CASE("Federal Reserve Banks") {
        // 5 U.S.C. 6103 and the Reserve Banks' published schedules: a Saturday holiday is not moved, a Sunday
        // one goes to Monday.
        check(std::array<YearRow, 5>{{
            {"USNY", 2020,
             "01-01 01-20 02-17 05-25 09-07 10-12 11-11 11-26 12-25"}, // before Juneteenth; 4 July a Saturday
            {"USNY", 2021, "01-01 01-18 02-15 05-31 07-05 09-06 10-11 11-11 11-25"}, // Juneteenth and
                                                                                     // Christmas on Saturdays
            {"USNY", 2025, "01-01 01-20 02-17 05-26 06-19 07-04 09-01 10-13 11-11 11-27 12-25"},
            {"USNY", 2026, "01-01 01-19 02-16 05-25 06-19 09-07 10-12 11-11 11-26 12-25"},
            {"USNY", 2027, "01-01 01-18 02-15 05-31 07-05 09-06 10-11 11-11 11-25"},
        }});
    }

    TEST_CASE("shares in New York are dealt on days when banks are closed, and do not settle then") {
        // National Association of Securities Dealers, Notices to Members 88-82 (11 November 1988 is before
        // these years), 95-77, 99-83: Columbus Day 1999 was a dealing day and no settlement day: 5 October
        // settled on the 8th, the 6th on the 12th, the 7th on the 13th.
        const BusinessCalendar dealing = calendarOf({"NYSE"});
        const BusinessCalendar settling = calendarOf({"US-SECURITIES"});
        CHECK(dealing.isBusinessDay(d("1999-10-11")));
        CHECK_FALSE(settling.isBusinessDay(d("1999-10-11")));
        CHECK(toIso(settling.advance(d("1999-10-05"), 3)) == "1999-10-08");
        CHECK(toIso(settling.advance(d("1999-10-06"), 3)) == "1999-10-12");
        CHECK(toIso(settling.advance(d("1999-10-07"), 3)) == "1999-10-13");
        CHECK(toIso(settling.advance(d("1999-10-08"), 3)) == "1999-10-14");
        CHECK(toIso(settling.advance(d("1999-10-11"), 3)) == "1999-10-14");
        CHECK(toIso(settling.advance(d("1999-10-12"), 3)) == "1999-10-15");
        // Rule 7.2 of the exchange, from memory: Saturday holidays on Friday, but not New Year's Day.
        check(std::array<YearRow, 5>{{
            {"NYSE", 2001, "01-01 01-15 02-19 04-13 05-28 07-04 09-03 09-11 09-12 09-13 09-14 11-22 12-25"},
            {"NYSE", 2012, "01-02 01-16 02-20 04-06 05-28 07-04 09-03 10-29 10-30 11-22 12-25"},
            {"NYSE", 2021, "01-01 01-18 02-15 04-02 05-31 07-05 09-06 11-25 12-24"},
            {"NYSE", 2022, "01-17 02-21 04-15 05-30 06-20 07-04 09-05 11-24 12-26"},
            {"NYSE", 2026, "01-01 01-19 02-16 04-03 05-25 06-19 07-03 09-07 11-26 12-25"},
        }});
    }

    TEST_CASE("England and Wales") {
        // Government data of bank holidays; 1995, 1999 and 2002 from memory.
        check(std::array<YearRow, 9>{{
            {"GBLO", 1995, "01-02 04-14 04-17 05-08 05-29 08-28 12-25 12-26"},
            {"GBLO", 1999, "01-01 04-02 04-05 05-03 05-31 08-30 12-27 12-28 12-31"},
            {"GBLO", 2002, "01-01 03-29 04-01 05-06 06-03 06-04 08-26 12-25 12-26"},
            {"GBLO", 2011, "01-03 04-22 04-25 04-29 05-02 05-30 08-29 12-26 12-27"},
            {"GBLO", 2012, "01-02 04-06 04-09 05-07 06-04 06-05 08-27 12-25 12-26"},
            {"GBLO", 2020, "01-01 04-10 04-13 05-08 05-25 08-31 12-25 12-28"},
            {"GBLO", 2021, "01-01 04-02 04-05 05-03 05-31 08-30 12-27 12-28"},
            {"GBLO", 2022, "01-03 04-15 04-18 05-02 06-02 06-03 08-29 09-19 12-26 12-27"},
            {"GBLO", 2023, "01-02 04-07 04-10 05-01 05-08 05-29 08-28 12-25 12-26"},
        }});
        CHECK(holidayName("GBLO", d("2021-12-27")) == "Christmas Day");
        CHECK(holidayName("GBLO", d("2021-12-28")) == "Boxing Day");
        CHECK(holidayName("GBLO", d("2022-12-26")) == "Boxing Day");
        CHECK(holidayName("GBLO", d("2022-12-27")) == "Christmas Day");
    }

    TEST_CASE("Japan") {
        // 2026: the published list, with the banks' 2 January and 31 December (from memory). Others from
        // memory.
        check(std::array<YearRow, 5>{{
            {"JPTO", 2026,
             "01-01 01-02 01-12 02-11 02-23 03-20 04-29 05-04 05-05 05-06 07-20 08-11 09-21 09-22 09-23 "
             "10-12 11-03 11-23 12-31"},
            {"JPTO", 2019,
             "01-01 01-02 01-03 01-14 02-11 03-21 04-29 04-30 05-01 05-02 05-03 05-06 07-15 08-12 09-16 "
             "09-23 10-14 10-22 11-04 12-31"},
            {"JPTO", 2020,
             "01-01 01-02 01-03 01-13 02-11 02-24 03-20 04-29 05-04 05-05 05-06 07-23 07-24 08-10 09-21 "
             "09-22 11-03 11-23 12-31"},
            {"JPTO", 2021,
             "01-01 01-11 02-11 02-23 04-29 05-03 05-04 05-05 07-22 07-23 08-09 09-20 09-23 11-03 11-23 "
             "12-31"},
            {"JPTO", 2009,
             "01-01 01-02 01-12 02-11 03-20 04-29 05-04 05-05 05-06 07-20 09-21 09-22 09-23 10-12 11-03 "
             "11-23 12-23 12-31"},
        }});
        CHECK(holidayName("JPTO", d("2026-09-22")) == "Day between two holidays");
    }

    TEST_CASE("Switzerland") {
        // From memory.
        check(std::array<YearRow, 2>{{
            {"CHZU", 2024, "01-01 01-02 03-29 04-01 05-01 05-09 05-20 08-01 12-25 12-26"},
            {"CHZU", 2026, "01-01 01-02 04-03 04-06 05-01 05-14 05-25 12-25"},
        }});
    }

    TEST_CASE("Toronto") {
        // 2024: a large bank's published list. 2023: days moved off a weekend, from memory.
        check(std::array<YearRow, 3>{{
            {"CATO", 2024, "01-01 02-19 03-29 05-20 07-01 08-05 09-02 09-30 10-14 11-11 12-25 12-26"},
            {"CATO", 2023, "01-02 02-20 04-07 05-22 07-03 08-07 09-04 10-02 10-09 11-13 12-25 12-26"},
            {"CATO", 2020, "01-01 02-17 04-10 05-18 07-01 08-03 09-07 10-12 11-11 12-25 12-28"},
        }});
    }

    TEST_CASE("Sydney") {
        // Public Holidays Act 2010 and Retail Trading Act 2008, section 14B; 2026 by the order of 20 February
        // 2026.
        check(std::array<YearRow, 4>{{
            {"AUSY", 2011, "01-03 01-26 04-22 04-25 04-26 06-13 08-01 10-03 12-26 12-27"},
            {"AUSY", 2022, "01-03 01-26 04-15 04-18 04-25 06-13 08-01 09-22 10-03 12-26 12-27"},
            {"AUSY", 2026, "01-01 01-26 04-03 04-06 04-27 06-08 08-03 10-05 12-25 12-28"},
            {"AUSY", 2027, "01-01 01-26 03-26 03-29 04-26 06-14 08-02 10-04 12-27 12-28"},
        }});
    }

    TEST_CASE("Hong Kong") {
        // 2014: the government's gazetted list. The others from memory.
        check(std::array<YearRow, 6>{{
            {"HKHK", 2014,
             "01-01 01-31 02-03 04-18 04-21 05-01 05-06 06-02 07-01 09-09 10-01 10-02 12-25 12-26"},
            {"HKHK", 1999, "01-01 02-16 02-17 02-18 04-02 04-05 04-06 06-18 07-01 10-01 10-18 12-27 12-31"},
            {"HKHK", 2003, "01-01 01-31 02-03 04-18 04-21 05-01 05-08 06-04 07-01 09-12 10-01 12-25 12-26"},
            {"HKHK", 2012,
             "01-02 01-23 01-24 01-25 04-04 04-06 04-09 05-01 07-02 10-01 10-02 10-23 12-25 12-26"},
            {"HKHK", 2020, "01-01 01-27 01-28 04-10 04-13 04-30 05-01 06-25 07-01 10-01 10-02 10-26 12-25"},
            {"HKHK", 2022,
             "02-01 02-02 02-03 04-05 04-15 04-18 05-02 05-09 06-03 07-01 09-12 10-04 12-26 12-27"},
        }});
    }

    TEST_CASE("adjusted on TARGET") {
        // Computed from the rules.
        struct Row {
            const char* date;
            const char* following;
            const char* modified;
            const char* preceding;
        };
        const BusinessCalendar target = calendarOf({"EUTA"});
        for (const Row& row : std::array<Row, 4>{{
                 {"2024-03-29", "2024-04-02", "2024-03-28", "2024-03-28"},
                 {"2026-05-30", "2026-06-01", "2026-05-29", "2026-05-29"},
                 {"2025-12-25", "2025-12-29", "2025-12-29", "2025-12-24"},
                 {"2026-12-25", "2026-12-28", "2026-12-28", "2026-12-24"},
             }}) {
            CAPTURE(row.date);
            CHECK(toIso(adjust(d(row.date), Roll::following, target)) == row.following);
            CHECK(toIso(adjust(d(row.date), Roll::modifiedFollowing, target)) == row.modified);
            CHECK(toIso(adjust(d(row.date), Roll::preceding, target)) == row.preceding);
        }
    }

    TEST_CASE("end-to-end over weekends only") {
        // Computed from the rule.
        const BusinessCalendar weekends;
        const auto oneMonth = [&](const char* from) {
            return toIso(advanceTenor(d(from), {1, TenorUnit::month}, weekends, true));
        };
        CHECK(oneMonth("2026-02-27") == "2026-03-31");
        CHECK(oneMonth("2026-01-30") == "2026-02-27");
        CHECK(oneMonth("2026-01-29") == "2026-02-27");
        CHECK(oneMonth("2026-01-15") == "2026-02-16"); // no end of a month: the 15th is a Sunday
        CHECK(toIso(advanceTenor(d("2026-02-27"), {1, TenorUnit::month}, weekends, false)) == "2026-03-27");
        CHECK(toIso(advanceTenor(d("2026-02-27"), {4, TenorUnit::week}, weekends, true)) == "2026-03-27");
    }

    TEST_CASE(
        "settlement: the lag counts the business days of one calendar, the day reached is good in both") {
        // Computed from the rule of the currency market (common practice): the dollar's own holiday delays
        // only the spot day itself.
        struct Row {
            const char* other;
            const char* dealt;
            const char* spot;
        };
        for (const Row& row : std::array<Row, 5>{{
                 {"EUTA", "2026-05-22", "2026-05-26"},
                 {"GBLO", "2026-05-22", "2026-05-27"},
                 {"EUTA", "2026-05-21", "2026-05-26"},
                 {"EUTA", "2026-04-02", "2026-04-08"},
                 {"JPTO", "2026-05-01", "2026-05-08"},
             }}) {
            CAPTURE(row.dealt);
            const BusinessCalendar lagCalendar = calendarOf({row.other});
            const BusinessCalendar both = calendarOf({row.other, "USNY"});
            CHECK(toIso(settlementDate(d(row.dealt), 2, lagCalendar, both)) == row.spot);
        }
        const BusinessCalendar target = calendarOf({"EUTA"});
        CHECK(toIso(settlementDate(d("2026-05-02"), 0, target, target)) == "2026-05-04"); // a Saturday
        CHECK(toIso(settlementDate(d("2026-05-04"), 0, target, target)) == "2026-05-04");
    }

    TEST_CASE("short periods") {
        // Common practice of the trade.
        const BusinessCalendar target = calendarOf({"EUTA"});
        const auto text = [&](ShortPeriod period, const char* today, const char* spot) {
            const Period dates = datesOf(period, d(today), d(spot), target);
            return toIso(dates.start) + " " + toIso(dates.end);
        };
        CHECK(text(ShortPeriod::overnight, "2026-04-02", "2026-04-08") == "2026-04-02 2026-04-07");
        CHECK(text(ShortPeriod::tomorrowNext, "2026-04-02", "2026-04-08") == "2026-04-07 2026-04-08");
        CHECK(text(ShortPeriod::spotNext, "2026-04-02", "2026-04-08") == "2026-04-08 2026-04-09");
        CHECK(text(ShortPeriod::overnight, "2026-05-02", "2026-05-06") == "2026-05-04 2026-05-05");
        for (const ShortPeriod period :
             {ShortPeriod::overnight, ShortPeriod::tomorrowNext, ShortPeriod::spotNext}) {
            CHECK(parseShortPeriod(nameOf(period)) == period);
        }
        CHECK_FALSE(parseShortPeriod("on").has_value());
    }

    TEST_CASE("the person's own days") {
        const std::vector<std::string> centres{"EUTA"};
        const std::vector<Date> holidays{d("2026-05-04"), d("2026-05-05")};
        const std::vector<Date> openDays{d("2026-05-01"), d("2026-05-02"), d("2026-05-05")};
        const BusinessCalendar calendar{centres, holidays, openDays};
        CHECK(calendar.isBusinessDay(d("2026-05-01")));       // wins over Labour Day
        CHECK(calendar.isBusinessDay(d("2026-05-02")));       // wins over a Saturday
        CHECK_FALSE(calendar.isBusinessDay(d("2026-05-04"))); // closed by hand
        CHECK(calendar.isBusinessDay(d("2026-05-05")));       // wins over the person's own holiday
        CHECK(calendar.centres() == centres);
        CHECK(BusinessCalendar{}.centres().empty());
    }

    TEST_CASE("a calendar closed for years, or for all of them, still finds its days") {
        std::vector<Date> everyDay;
        for (Date date = earliest; date <= latest; date += std::chrono::days{1}) {
            everyDay.push_back(date);
        }
        const BusinessCalendar never{{}, everyDay};
        const Date afterAll{std::chrono::year{2200} / 1 / 1};    // a Wednesday
        const Date beforeAll{std::chrono::year{1899} / 12 / 29}; // a Friday
        CHECK(never.following(d("2026-05-04")) == afterAll);
        CHECK(never.preceding(d("2026-05-04")) == beforeAll);
        CHECK(never.modifiedFollowing(d("2026-05-04")) == beforeAll);
        CHECK(never.advance(d("2026-05-04"), 3) == afterAll + std::chrono::days{2});
        CHECK(never.advance(d("2026-05-04"), -1) == beforeAll);
        CHECK(never.businessDaysBetween(earliest, latest) == 0);
        CHECK(never.businessDaysBetween(beforeAll, afterAll + std::chrono::days{1}) == 2);
    }

    TEST_CASE("the table of centres") {
        std::string last;
        for (const Centre& centre : knownCentres()) {
            CHECK(last < centre.code);
            last = centre.code;
            CHECK(findCentre(centre.code) == &centre);
            CHECK_FALSE(centre.name.empty());
            CHECK(centre.firstYear < centre.lastYear);
        }
        CHECK(findCentre("XXXX") == nullptr);
        CHECK(findCentre("") == nullptr);
        CHECK(holidayName("XXXX", d("2026-12-25")).empty());
        CHECK(holidayName("EUTA", d("2026-04-03")) == "Good Friday");
        CHECK(holidayName("EUTA", d("2026-04-04")).empty()); // a Saturday
        CHECK(holidayName("EUTA", d("2026-04-02")).empty());
    }

    TEST_CASE("every weekday that a centre closes has a name, and every name closes") {
        for (const Centre& centre : knownCentres()) {
            const BusinessCalendar calendar = calendarOf({std::string{centre.code}});
            int unnamed = 0;
            int open = 0;
            for (Date date = earliest; date <= latest; date += std::chrono::days{1}) {
                const bool closed = !calendar.isBusinessDay(date);
                const bool named = !holidayName(centre.code, date).empty();
                unnamed += isWeekday(date) && closed && !named ? 1 : 0;
                open += named && !closed ? 1 : 0;
            }
            CAPTURE(centre.code);
            CHECK(unnamed == 0);
            CHECK(open == 0);
        }
    }

    TEST_CASE("every day of 1990 to 2100 on several calendars") {
        for (const auto& centres : std::vector<std::vector<std::string>>{
                 {}, {"EUTA"}, {"EUTA", "USNY"}, {"GBLO", "JPTO", "HKHK"}}) {
            const BusinessCalendar calendar = calendarOf(centres);
            int count = 0;
            int wrong = 0;
            const Date start{std::chrono::year{1990} / 1 / 1};
            const Date end{std::chrono::year{2101} / 1 / 1};
            for (Date date = start; date < end; date += std::chrono::days{1}) {
                const bool good = calendar.isBusinessDay(date);
                const Date next = calendar.following(date);
                const Date before = calendar.preceding(date);
                const Date modified = calendar.modifiedFollowing(date);
                const auto monthOf = [](Date of) {
                    return std::chrono::year_month_day{of}.month();
                };
                bool right = next >= date && before <= date && calendar.isBusinessDay(next) &&
                             calendar.isBusinessDay(before);
                right = right && calendar.isBusinessDay(modified) && monthOf(modified) == monthOf(date);
                right = right && (!good || (next == date && before == date && modified == date));
                right = right && calendar.advance(date, 0) == date;
                if (daysBetween(start, date) % 61 == 0) { // a prime to the word and to the week
                    right = right && calendar.businessDaysBetween(start, date) == count;
                    right = right && calendar.businessDaysBetween(date, start) == -count;
                }
                right = right && calendar.isLastOfMonth(date) ==
                                     (good && monthOf(calendar.advance(date, 1)) != monthOf(date));
                if (good) {
                    for (const int days : {1, 2, 30}) {
                        const Date there = calendar.advance(date, days);
                        right = right && there > date && calendar.advance(there, -days) == date;
                        right = right && calendar.businessDaysBetween(date, there) == days;
                    }
                    ++count;
                }
                wrong += right ? 0 : 1;
            }
            CHECK(wrong == 0);
        }
    }

    TEST_CASE("a union is good where each of its calendars is") {
        const BusinessCalendar target = calendarOf({"EUTA"});
        const BusinessCalendar london = calendarOf({"GBLO"});
        const BusinessCalendar both = calendarOf({"GBLO", "EUTA"});
        int differences = 0;
        for (Date date = earliest; date <= latest; date += std::chrono::days{1}) {
            differences +=
                both.isBusinessDay(date) == (target.isBusinessDay(date) && london.isBusinessDay(date)) ? 0
                                                                                                       : 1;
        }
        CHECK(differences == 0);
    }

} // TEST_SUITE
