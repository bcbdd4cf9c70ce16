#pragma once

#include "dates/business_calendar.hpp"
#include "dates/tenor.hpp"
#include "discounting/curves.hpp"

#include <variant>

/// The dates of what a money market quotes, by common practice of the trade.
namespace forwright::discounting {

/// Where instruments are dealt: they begin `spotLag` business days (0 to 30) after today.
struct MoneyMarket {
    dates::BusinessCalendar calendar;
    int spotLag = 2;
};

/// How often a swap's fixed side pays.
enum class Payments : int { annual = 12, semiannual = 6, quarterly = 3, monthly = 1, atEnd = 0 };
[[nodiscard]] std::string_view
nameOf(Payments payments); ///< `annual`, `semiannual`, `quarterly`, `monthly`, `at-end`

/// ON, TN and SN run as datesOf(ShortPeriod) says; a tenor runs from the spot date, its end as `advanceTenor`
/// has it with end-to-end.
[[nodiscard]] Instrument deposit(Date today, const MoneyMarket& market,
                                 const std::variant<dates::ShortPeriod, dates::Tenor>& period, double rate,
                                 const dates::DayCountRule& dayCount);
/// From one tenor after the spot date to another. Where the second is not longer the end is not after the
/// start, which `instruments` refuses.
[[nodiscard]] Instrument forwardRateAgreement(Date today, const MoneyMarket& market,
                                              const dates::Tenor& start, const dates::Tenor& end, double rate,
                                              const dates::DayCountRule& dayCount);
/// From the spot date. Payments are counted back from the end, so that a tenor which is no multiple of their
/// interval has its short period first; a tenor of days or weeks pays once.
[[nodiscard]] Instrument overnightSwap(Date today, const MoneyMarket& market, const dates::Tenor& tenor,
                                       double rate, const dates::DayCountRule& dayCount, Payments payments);

} // namespace forwright::discounting
