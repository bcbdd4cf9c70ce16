#include "desk/calendar_view.hpp"

#include "dates/special_days.hpp"
#include "forward/schedule.hpp"

namespace forwright::desk {

namespace {

using std::chrono::year_month;
using std::chrono::year_month_day;

constexpr std::chrono::days oneDay{1};

bool isWeekend(Date date) {
    const std::chrono::weekday day{date};
    return day == std::chrono::Saturday || day == std::chrono::Sunday;
}

std::vector<ClosedCentre> closedOn(const dates::BusinessCalendar& calendar, Date date) {
    std::vector<ClosedCentre> closed;
    for (const std::string& code : calendar.centres()) {
        if (const std::string_view name = dates::holidayName(code, date); !name.empty()) {
            closed.push_back({code, std::string(name)});
        }
    }
    return closed;
}

/// Adds the day where it is not what the week says.
void look(const dates::BusinessCalendar& calendar, Date date, std::vector<SpecialDay>& days) {
    const bool open = calendar.isBusinessDay(date);
    std::vector<ClosedCentre> closed = closedOn(calendar, date);
    if (open && (isWeekend(date) || !closed.empty())) {
        days.push_back({date, true, false, std::move(closed)});
    } else if (!open && !isWeekend(date)) {
        const bool own = closed.empty();
        days.push_back({date, false, own, std::move(closed)});
    }
}

} // namespace

CalendarView calendarView(const forward::Market& market, Date from, int months) {
    const dates::BusinessCalendar& calendar = market.asset.calendar;
    const year_month_day start{from};
    CalendarView view;
    view.from = Date{start.year() / start.month() / 1};
    for (int i = 0; i < months; ++i) {
        const year_month month = start.year() / start.month() + std::chrono::months{i};
        const Date first{month / 1};
        const Date next{(month + std::chrono::months{1}) / 1};
        CalendarMonth made{first, 0, first, dates::thirdWednesday(month), dates::thirdFriday(month)};
        for (Date date = first; date < next; date += oneDay) {
            look(calendar, date, view.days);
            if (calendar.isBusinessDay(date)) {
                ++made.businessDays;
                made.lastBusinessDay = date;
            }
        }
        view.months.push_back(made);
    }
    Date dealt = calendar.following(market.asOf);
    for (int i = 0; i < dealingDaysShown; ++i) {
        view.dealings.push_back({dealt, forward::settlementOf(market.asset, dealt)});
        dealt = calendar.advance(dealt, 1);
    }
    return view;
}

} // namespace forwright::desk
