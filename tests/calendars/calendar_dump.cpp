// Prints the weekdays on which each known centre is closed, one a line: centre, date, name, separated by
// tabs. The years are those of the command line: first and last. Read by date_holidays.test.ts, which holds
// them against another library's.

#include "dates/business_calendar.hpp"

#include <cstdio>
#include <cstdlib>
#include <string>

using namespace forwright::dates;

int main(int count, char** arguments) {
    if (count != 3) {
        std::fputs("usage: forwright_calendar_dump FIRST-YEAR LAST-YEAR\n", stderr);
        return 2;
    }
    const Date first{std::chrono::year{std::atoi(arguments[1])} / 1 / 1};
    const Date last{std::chrono::year{std::atoi(arguments[2])} / 12 / 31};
    for (const Centre& centre : knownCentres()) {
        const std::string code{centre.code};
        const BusinessCalendar calendar{std::span{&code, 1}};
        for (Date date = first; date <= last; date += std::chrono::days{1}) {
            if (isWeekday(date) && !calendar.isBusinessDay(date)) {
                const std::string name{holidayName(centre.code, date)};
                std::printf("%s\t%s\t%s\n", code.c_str(), toIso(date).c_str(), name.c_str());
            }
        }
    }
    return 0;
}
