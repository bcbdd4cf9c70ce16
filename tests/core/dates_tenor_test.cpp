#include "dates/date.hpp"
#include "dates/tenor.hpp"

#include <doctest/doctest.h>

#include <string>

using namespace forwright::dates;

TEST_SUITE("dates: dates and tenors") {

    TEST_CASE("ISO 8601 dates, extended form, from 1900 to 2199") {
        int wrong = 0;
        for (Date date = earliest; date <= latest; date += std::chrono::days{1}) {
            wrong += parseIso(toIso(date)) == date ? 0 : 1;
        }
        CHECK(wrong == 0);
        CHECK(toIso(earliest) == "1900-01-01");
        CHECK(toIso(latest) == "2199-12-31");
        for (const char* text :
             {"",           "2026-1-01",  "2026-01-1",   "20260101",    "2026/01/01",       "2026-13-01",
              "2026-00-10", "2026-02-29", "1900-02-29",  "2100-02-29",  "2026-04-31",       "2026-04-00",
              "1899-12-31", "2200-01-01", "2026-01-01 ", " 2026-01-01", "2026-01-01T00:00", "+026-01-01",
              "-026-01-01", "2O26-01-01", "2026-01-0x"}) {
            CAPTURE(text);
            CHECK_FALSE(parseIso(text).has_value());
        }
    }

    TEST_CASE("days and years between") {
        CHECK(daysBetween(Date{std::chrono::year{2026} / 12 / 1}, Date{std::chrono::year{2027} / 12 / 1}) ==
              365);
        CHECK(daysBetween(latest, earliest) ==
              -109'572); // 300 years with 73 leap days (none in 1900 and 2100), less one
        CHECK(years(Date{std::chrono::year{2026} / 12 / 1}, Date{std::chrono::year{2027} / 12 / 1}) == 1);
    }

    TEST_CASE("tenors are read as they are written") {
        for (const char* text : {"0D", "1D", "36500D", "1W", "5200W", "3M", "1200M", "1Y", "100Y"}) {
            CAPTURE(text);
            const auto tenor = parseTenor(text);
            REQUIRE(tenor.has_value());
            CHECK(toText(*tenor) == text);
        }
        for (const char* text : {"",
                                 "D",
                                 "3",
                                 "3m",
                                 "M3",
                                 "03M",
                                 "00D",
                                 "-3M",
                                 "+3M",
                                 "3.5M",
                                 "3 M",
                                 " 3M",
                                 "3M ",
                                 "3MM",
                                 "36501D",
                                 "5201W",
                                 "1201M",
                                 "101Y",
                                 "99999999999999999999D",
                                 "1Q",
                                 "ON"}) {
            CAPTURE(text);
            CHECK_FALSE(parseTenor(text).has_value());
        }
    }

    TEST_CASE("every day of 1990 to 2100: tenors against std::chrono") {
        using namespace std::chrono;
        int wrong = 0;
        for (Date date{year{1990} / 1 / 1}; date < Date{year{2101} / 1 / 1}; date += days{1}) {
            const year_month_day day{date};
            wrong += addTenor(date, {5, TenorUnit::day}) == date + days{5} ? 0 : 1;
            wrong += addTenor(date, {3, TenorUnit::week}) == date + weeks{3} ? 0 : 1;
            for (const int count : {0, 1, 6, 13, 1200}) {
                const year_month_day plain = day + months{count};
                const Date expected = plain.ok() ? Date{plain} : Date{plain.year() / plain.month() / last};
                wrong += addTenor(date, {count, TenorUnit::month}) == expected ? 0 : 1;
            }
            for (const int count : {1, 4, 100}) {
                const year_month_day plain = day + std::chrono::years{count};
                const Date expected = plain.ok() ? Date{plain} : Date{plain.year() / plain.month() / last};
                wrong += addTenor(date, {count, TenorUnit::year}) == expected ? 0 : 1;
            }
        }
        CHECK(wrong == 0);
    }

    TEST_CASE("a tenor may lead past the last date") {
        CHECK(toIso(addTenor(latest, {100, TenorUnit::year})) == "2299-12-31");
        CHECK(addTenor(latest, {36500, TenorUnit::day}) > latest);
        CHECK(toIso(advanceTenor(latest, {100, TenorUnit::year}, BusinessCalendar{}, true)) ==
              "2299-12-29"); // the 31st is a Sunday
    }

    TEST_CASE("rolls") {
        for (const Roll roll : {Roll::following, Roll::modifiedFollowing, Roll::preceding}) {
            CHECK(parseRoll(nameOf(roll)) == roll);
        }
        CHECK(nameOf(Roll::modifiedFollowing) == "modified-following");
        CHECK_FALSE(parseRoll("Following").has_value());
        CHECK(rollOf(TenorUnit::day) == Roll::following);
        CHECK(rollOf(TenorUnit::week) == Roll::following);
        CHECK(rollOf(TenorUnit::month) == Roll::modifiedFollowing);
        CHECK(rollOf(TenorUnit::year) == Roll::modifiedFollowing);
        // Saturday 30 May 2026: a day tenor leaves the month, a month's does not.
        const BusinessCalendar weekends;
        const Date from{std::chrono::year{2026} / 4 / 30};
        CHECK(toIso(advanceTenor(from, {30, TenorUnit::day}, weekends, false)) == "2026-06-01");
        CHECK(toIso(advanceTenor(from, {1, TenorUnit::month}, weekends, false)) == "2026-05-29");
    }

} // TEST_SUITE
