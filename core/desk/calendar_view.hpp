#pragma once

#include "forward/market.hpp"

#include <string>
#include <vector>

namespace forwright::desk {

using dates::Date;

/// Why a centre is closed on a day.
struct ClosedCentre {
    std::string code;
    std::string name; ///< of the holiday
};
/// A day from Monday to Friday without business, or one with business all the same.
struct SpecialDay {
    Date date;
    bool open = false;                 ///< one of the person's own open days
    bool own = false;                  ///< closed by one of the person's own holidays
    std::vector<ClosedCentre> centres; ///< that are closed
};
struct CalendarMonth {
    Date first;
    int businessDays = 0;
    Date lastBusinessDay; ///< `first` where there is none
    Date thirdWednesday;  ///< on which currency and interest-rate futures commonly mature, wherever it falls
    Date thirdFriday;     ///< and options and futures on shares and indices
};
/// What is dealt on a day settles on another.
struct DealingDay {
    Date dealt;
    Date settles;
};

struct CalendarView {
    Date from; ///< the first of its month
    std::vector<CalendarMonth> months;
    std::vector<SpecialDay> days;     ///< by rising date
    std::vector<DealingDay> dealings; ///< the next business days from the market's date on
};

inline constexpr int mostCalendarMonths = 60;
inline constexpr int dealingDaysShown = 20;

/// The asset's business days over `months` (1 to `mostCalendarMonths`) from the month of `from` on.
[[nodiscard]] CalendarView calendarView(const forward::Market& market, Date from, int months);

} // namespace forwright::desk
