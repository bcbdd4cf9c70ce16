#pragma once

#include "dates/date.hpp"

#include <memory>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace forwright::dates {

/// The business days of one or several centres together: a day is good when it is good in each of them and no
/// weekend. Without a centre only weekends are no business days. A cheap value: copies share their tables.
///
/// Before `earliest` and after `latest` only weekends close, whatever the centres: so a good day is always
/// found, however long a list of holidays is. Between them each centre's rules are applied in every year,
/// also outside those for which they are sourced
/// (`Centre::firstYear`, `Centre::lastYear`: who builds the calendar says so to the person).
class BusinessCalendar {
  public:
    /// Weekends only.
    BusinessCalendar();

    /// The union of the closing days of `centres` (each known: see `knownCentres`), of the
    /// person's own `holidays`; and on `openDays`, which win over everything, weekends included, business is
    /// done. Own days outside [earliest, latest] have no effect.
    BusinessCalendar(std::span<const std::string> centres, std::span<const Date> holidays = {},
                     std::span<const Date> openDays = {});

    [[nodiscard]] bool isBusinessDay(Date date) const;
    /// `date` itself where it is good, else the next good day after it.
    [[nodiscard]] Date following(Date date) const;
    /// `date` itself where it is good, else the last good day before it.
    [[nodiscard]] Date preceding(Date date) const;
    /// `following`, but `preceding` where that would leave the month. (It leaves it the other way where the
    /// whole month is closed.)
    [[nodiscard]] Date modifiedFollowing(Date date) const;
    /// The `count`-th good day strictly after `date` (before it where negative); `date` itself, good or not,
    /// where 0. |count| up to 100,000.
    [[nodiscard]] Date advance(Date date, int count) const;
    /// Good days in [from, to): the numerator of BUS/252. Where `to` is earlier, minus those in [to, from).
    [[nodiscard]] int businessDaysBetween(Date from, Date to) const;
    /// Whether `date` is good and no later day of its month is.
    [[nodiscard]] bool isLastOfMonth(Date date) const;
    /// The centres, as given.
    [[nodiscard]] const std::vector<std::string>& centres() const;

  private:
    struct Tables;
    std::shared_ptr<const Tables> tables_;
};

/// A centre whose closing days the core knows by rule.
struct Centre {
    std::string_view code; ///< FpML business centre, or a longer code of our own where there is none
    std::string_view name; ///< what the calendar is, in plain words
    int firstYear;         ///< the first year for which the rules are sourced
    int lastYear; ///< the last one; 2199 where the law sets no end. A closing announced later is in no rule
};

/// Every centre known, in the order of their codes.
[[nodiscard]] std::span<const Centre> knownCentres();
/// The centre of that code, or null.
[[nodiscard]] const Centre* findCentre(std::string_view code);
/// The name of the holiday of `centre` on `date` ("Good Friday"), also of one that falls on a weekend and is
/// not moved; empty where there is none and where the centre is unknown.
[[nodiscard]] std::string_view holidayName(std::string_view centre, Date date);

} // namespace forwright::dates
