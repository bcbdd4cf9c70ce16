#include "dates/day_count.hpp"

#include <doctest/doctest.h>

#include <array>
#include <cmath>
#include <string>
#include <vector>

using namespace forwright::dates;

namespace {

Date d(std::string_view text) {
    const auto date = parseIso(text);
    REQUIRE_MESSAGE(date.has_value(), text);
    return *date;
}

DayCountRule ruleOf(DayCount kind) {
    DayCountRule rule;
    rule.kind = kind;
    return rule;
}

int thirtyDays(DayCount kind, Date from, Date to, std::optional<Date> termination = std::nullopt) {
    DayCountRule rule = ruleOf(kind);
    rule.termination = termination;
    return static_cast<int>(std::lround(360 * yearFraction(rule, from, to)));
}

constexpr std::array<DayCount, 10> everyKind{
    DayCount::act360,    DayCount::act365Fixed, DayCount::actActIsda,     DayCount::actActIcma,
    DayCount::thirty360, DayCount::thirtyE360,  DayCount::thirtyE360Isda, DayCount::act365L,
    DayCount::one,       DayCount::bus252};

} // namespace

TEST_SUITE("dates: day counts") {

    TEST_CASE("names are FpML's") {
        CHECK(dayCountNames().size() == everyKind.size());
        for (const DayCount kind : everyKind) {
            CHECK(parseDayCount(nameOf(kind)) == kind);
        }
        CHECK(parseDayCount("ACT/365.FIXED") == DayCount::act365Fixed);
        CHECK(parseDayCount("30E/360.ISDA") == DayCount::thirtyE360Isda);
        for (const char* wrong : {"", "act/360", "ACT/365", "ACT/360 ", "30/365"}) {
            CHECK_FALSE(parseDayCount(wrong).has_value());
        }
    }

    TEST_CASE("actual/actual, ISDA and ICMA") {
        // ISDA, "The actual/actual day count fraction" (1999), from memory, reproduced by independent
        // arithmetic. `regular` is the end of an odd first period, the start of an odd last one, none for a
        // regular one.
        struct Row {
            const char* from;
            const char* to;
            int frequency;
            const char* regular;
            double isda;
            double icma;
        };
        for (const Row& row : std::array<Row, 6>{{
                 {"2003-11-01", "2004-05-01", 2, "", 0.497724380567, 0.5},
                 {"1999-02-01", "1999-07-01", 1, "1999-07-01", 0.410958904110, 150.0 / 365},
                 {"1999-07-01", "2000-07-01", 1, "", 1.001377348604, 1},
                 {"2002-08-15", "2003-07-15", 2, "2003-07-15", 0.915068493151, 181.0 / 362 + 153.0 / 368},
                 {"1999-07-30", "2000-01-30", 2, "", 0.503892506924, 0.5},
                 {"1999-11-30", "2000-04-30", 4, "1999-11-30", 0.415540085336, 91.0 / 364 + 61.0 / 368},
             }}) {
            CAPTURE(row.from);
            DayCountRule icma = ruleOf(DayCount::actActIcma);
            icma.frequency = row.frequency;
            icma.regularDate = parseIso(row.regular);
            CHECK(std::fabs(yearFraction(ruleOf(DayCount::actActIsda), d(row.from), d(row.to)) - row.isda) <
                  1e-12);
            CHECK(std::fabs(yearFraction(icma, d(row.from), d(row.to)) - row.icma) < 1e-15);
        }
    }

    TEST_CASE(
        "ICMA: without a regular date the periods are counted back from the end, whole ones are exact") {
        DayCountRule rule = ruleOf(DayCount::actActIcma);
        rule.frequency = 2;
        // The long first period of the ISDA paper, unannounced.
        CHECK(std::fabs(yearFraction(rule, d("2002-08-15"), d("2003-07-15")) - (181.0 / 362 + 153.0 / 368)) <
              1e-15);
        // Whole by the calendar from either end (computed from the rule): February's end is both 28 and last
        // of month.
        CHECK(yearFraction(rule, d("2002-08-28"), d("2003-02-28")) == 0.5);
        CHECK(yearFraction(rule, d("2002-08-31"), d("2003-02-28")) == 0.5);
        CHECK(yearFraction(rule, d("2003-02-28"), d("2003-08-31")) == 0.5);
        CHECK(yearFraction(rule, d("2003-02-28"), d("2003-08-28")) == 0.5);
        CHECK(yearFraction(rule, d("2000-02-29"), d("2010-02-28")) == 10);
        for (const int frequency : {1, 2, 3, 4, 6, 12}) {
            CHECK(isCouponFrequency(frequency));
            rule.frequency = frequency;
            CHECK(yearFraction(rule, d("2001-03-15"), d("2101-03-15")) == 100);
        }
        for (const int frequency : {-1, 0, 5, 7, 8, 9, 10, 11, 13, 24}) {
            CHECK_FALSE(isCouponFrequency(frequency));
        }
    }

    TEST_CASE("ICMA: with a regular date fractions add up and every regular period is 1/frequency") {
        for (const char* regular : {"2001-03-15", "1999-11-30", "2000-02-29", "2030-08-31", "2003-01-30"}) {
            for (const int frequency : {1, 2, 3, 4, 6, 12}) {
                DayCountRule rule = ruleOf(DayCount::actActIcma);
                rule.frequency = frequency;
                rule.regularDate = d(regular);
                const Date start = d("1990-01-01");
                double last = 0;
                int wrong = 0;
                for (Date date = start; date < d("2050-01-01"); date += std::chrono::days{13}) {
                    const double here = yearFraction(rule, start, date);
                    const Date on = date + std::chrono::days{57};
                    wrong +=
                        std::fabs(here + yearFraction(rule, date, on) - yearFraction(rule, start, on)) < 1e-13
                            ? 0
                            : 1;
                    wrong += here >= last ? 0 : 1;
                    last = here;
                }
                CHECK(wrong == 0);
            }
        }
    }

    TEST_CASE("the 30/360 family") {
        // Days of ISDA's worked sheet to the 2006 Definitions, from memory, reproduced by independent
        // arithmetic.
        struct Row {
            const char* from;
            const char* to;
            int thirty360;
            int thirtyE360;
            int isda;
            int isdaAtEnd;
        };
        for (const Row& row : std::array<Row, 12>{{
                 {"2006-08-31", "2007-02-28", 178, 178, 180, 178},
                 {"2007-02-28", "2007-08-31", 183, 182, 180, 180},
                 {"2007-08-31", "2008-02-29", 179, 179, 180, 179},
                 {"2008-02-29", "2008-08-31", 182, 181, 180, 180},
                 {"2006-02-28", "2006-03-03", 5, 5, 3, 3},
                 {"2006-09-30", "2006-10-31", 30, 30, 30, 30},
                 {"2008-02-28", "2008-08-31", 183, 182, 182, 182},
                 {"2008-02-29", "2009-02-28", 359, 359, 360, 358},
                 {"2007-02-28", "2008-02-29", 361, 361, 360, 359},
                 {"2008-02-29", "2008-03-31", 32, 31, 30, 30},
                 {"2007-01-15", "2007-01-31", 16, 15, 15, 15},
                 {"2007-02-28", "2007-03-31", 33, 32, 30, 30},
             }}) {
            CAPTURE(row.from);
            CAPTURE(row.to);
            const Date from = d(row.from);
            const Date to = d(row.to);
            CHECK(thirtyDays(DayCount::thirty360, from, to) == row.thirty360);
            CHECK(thirtyDays(DayCount::thirtyE360, from, to) == row.thirtyE360);
            CHECK(thirtyDays(DayCount::thirtyE360Isda, from, to) == row.isda);
            CHECK(thirtyDays(DayCount::thirtyE360Isda, from, to, to) == row.isdaAtEnd);
        }
    }

    TEST_CASE("ACT/365L, annual: 366 where 29 February lies after the start and not after the end") {
        // Supplement 14 to the 2006 ISDA Definitions (2009); computed from the rule.
        const DayCountRule rule = ruleOf(DayCount::act365L);
        CHECK(yearFraction(rule, d("2007-03-01"), d("2008-02-28")) == 364 / 365.0);
        CHECK(yearFraction(rule, d("2007-03-01"), d("2008-02-29")) == 365 / 366.0);
        CHECK(yearFraction(rule, d("2008-02-29"), d("2009-02-28")) == 365 / 365.0);
        CHECK(yearFraction(rule, d("2008-02-28"), d("2009-02-28")) == 366 / 366.0);
        CHECK(yearFraction(rule, d("1900-01-01"), d("1900-12-31")) == 364 / 365.0); // no leap year
    }

    TEST_CASE("1/1 and BUS/252") {
        CHECK(yearFraction(ruleOf(DayCount::one), d("2026-01-01"), d("2026-01-02")) == 1);
        CHECK(yearFraction(ruleOf(DayCount::one), d("2026-01-01"), d("2026-01-01")) == 1);
        CHECK(yearFraction(ruleOf(DayCount::one), d("2026-01-02"), d("2026-01-01")) == -1);
        DayCountRule business = ruleOf(DayCount::bus252);
        CHECK(yearFraction(business, d("2026-04-03"), d("2026-04-07")) == 2 / 252.0); // Friday and Monday
        business.calendar = BusinessCalendar{std::vector<std::string>{"EUTA"}};
        CHECK(yearFraction(business, d("2026-04-03"), d("2026-04-07")) == 0); // Good Friday and Easter Monday
        CHECK(yearFraction(business, d("2026-04-02"), d("2026-04-03")) == 1 / 252.0); // the start is counted
        // A published daily factor: 16.62 % a year of 252 days is 0.00061031 a business day.
        CHECK(std::fabs(std::pow(1.1662, yearFraction(business, d("2026-04-02"), d("2026-04-03"))) - 1 -
                        0.00061031) < 5e-9);
    }

    TEST_CASE("simple interest of 272 days at 4 %") {
        // A treasurers' handbook prints 2.9808 % and 3.0222 %.
        const Date from = d("2026-01-05");
        const Date to = from + std::chrono::days{272};
        CHECK(std::fabs(4 * yearFraction(ruleOf(DayCount::act365Fixed), from, to) - 2.9808) < 5e-5);
        CHECK(std::fabs(4 * yearFraction(ruleOf(DayCount::act360), from, to) - 3.0222) < 5e-5);
    }

    TEST_CASE("every day of 1990 to 2100: backward is minus forward, nothing between a day and itself") {
        for (const DayCount kind : everyKind) {
            const DayCountRule rule = ruleOf(kind);
            int wrong = 0;
            for (Date date = d("1990-01-01"); date < d("2101-01-01"); date += std::chrono::days{1}) {
                const Date on = date + std::chrono::days{97};
                wrong += yearFraction(rule, date, on) == -yearFraction(rule, on, date) ? 0 : 1;
                wrong += yearFraction(rule, date, date) == (kind == DayCount::one ? 1 : 0) ? 0 : 1;
            }
            CAPTURE(nameOf(kind));
            CHECK(wrong == 0);
        }
    }

    TEST_CASE("every day of 1990 to 2100: fractions of actual days add up") {
        for (const DayCount kind :
             {DayCount::act360, DayCount::act365Fixed, DayCount::actActIsda, DayCount::bus252}) {
            const DayCountRule rule = ruleOf(kind);
            int wrong = 0;
            for (Date date = d("1990-01-01"); date < d("2100-01-01"); date += std::chrono::days{1}) {
                const Date middle = date + std::chrono::days{61};
                const Date end = date + std::chrono::days{365};
                const double parts = yearFraction(rule, date, middle) + yearFraction(rule, middle, end);
                wrong += std::fabs(parts - yearFraction(rule, date, end)) < 1e-14 ? 0 : 1;
            }
            CAPTURE(nameOf(kind));
            CHECK(wrong == 0);
        }
    }

    TEST_CASE(
        "every day of 1990 to 2100: actual days are std::chrono's, ISDA's count is 1 over a calendar year") {
        int wrong = 0;
        for (Date date = d("1990-01-01"); date < d("2100-01-01"); date += std::chrono::days{1}) {
            const Date on = date + std::chrono::days{91};
            wrong += yearFraction(ruleOf(DayCount::act365Fixed), date, on) == 91 / 365.0 ? 0 : 1;
            wrong += yearFraction(ruleOf(DayCount::act360), date, on) == 91 / 360.0 ? 0 : 1;
        }
        for (int year = 1990; year < 2100; ++year) {
            const Date start{std::chrono::year{year} / 1 / 1};
            const Date end{std::chrono::year{year + 1} / 1 / 1};
            wrong += yearFraction(ruleOf(DayCount::actActIsda), start, end) == 1 ? 0 : 1;
        }
        CHECK(wrong == 0);
    }

    TEST_CASE("every day of 1990 to 2100: a month of 30/360 is 30 days, give or take 2 at its end") {
        int wrong = 0;
        for (Date date = d("1990-01-01"); date < d("2100-01-01"); date += std::chrono::days{1}) {
            const bool lastDays = unsigned(std::chrono::year_month_day{date}.day()) > 27;
            for (const DayCount kind :
                 {DayCount::thirty360, DayCount::thirtyE360, DayCount::thirtyE360Isda}) {
                const int month = thirtyDays(kind, date, addMonths(date, 1));
                const int year = thirtyDays(kind, date, addMonths(date, 12));
                wrong += lastDays ? (month < 28 || month > 32) : month != 30;
                wrong += lastDays ? (year < 358 || year > 362) : year != 360;
                int last = 0;
                for (const int days : {1, 27, 28, 29, 30, 31, 32, 58, 59, 60, 61, 62}) {
                    const int here = thirtyDays(kind, date, date + std::chrono::days{days});
                    wrong += here >= last && here >= days - 3 && here <= days + 3 ? 0 : 1;
                    last = here;
                }
            }
        }
        CHECK(wrong == 0);
    }

} // TEST_SUITE
