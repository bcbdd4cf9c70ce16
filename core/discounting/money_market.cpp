#include "discounting/money_market.hpp"

#include <algorithm>

namespace forwright::discounting {

namespace {

Date spotOf(Date today, const MoneyMarket& market) {
    return dates::settlementDate(today, market.spotLag, market.calendar, market.calendar);
}

Date after(Date spot, const dates::Tenor& tenor, const MoneyMarket& market) {
    return dates::advanceTenor(spot, tenor, market.calendar, true);
}

/// Nothing for days and weeks.
std::optional<int> monthsOf(const dates::Tenor& tenor) {
    constexpr int monthsOfYear = 12;
    switch (tenor.unit) {
    case dates::TenorUnit::month:
        return tenor.count;
    case dates::TenorUnit::year:
        return monthsOfYear * tenor.count;
    case dates::TenorUnit::day:
    case dates::TenorUnit::week:
        break;
    }
    return std::nullopt;
}

} // namespace

std::string_view nameOf(Payments payments) {
    switch (payments) {
    case Payments::annual:
        return "annual";
    case Payments::semiannual:
        return "semiannual";
    case Payments::quarterly:
        return "quarterly";
    case Payments::monthly:
        return "monthly";
    case Payments::atEnd:
        break;
    }
    return "at-end";
}

Instrument deposit(Date today, const MoneyMarket& market,
                   const std::variant<dates::ShortPeriod, dates::Tenor>& period, double rate,
                   const dates::DayCountRule& dayCount) {
    const Date spot = spotOf(today, market);
    Instrument made{InstrumentType::deposit, spot, spot, {}, rate, dayCount};
    if (const auto* tenor = std::get_if<dates::Tenor>(&period)) {
        made.end = after(spot, *tenor, market);
        return made;
    }
    const dates::Period days =
        dates::datesOf(*std::get_if<dates::ShortPeriod>(&period), today, spot, market.calendar);
    made.start = days.start;
    made.end = days.end;
    return made;
}

Instrument forwardRateAgreement(Date today, const MoneyMarket& market, const dates::Tenor& start,
                                const dates::Tenor& end, double rate, const dates::DayCountRule& dayCount) {
    const Date spot = spotOf(today, market);
    return {InstrumentType::fra, after(spot, start, market), after(spot, end, market), {}, rate, dayCount};
}

Instrument overnightSwap(Date today, const MoneyMarket& market, const dates::Tenor& tenor, double rate,
                         const dates::DayCountRule& dayCount, Payments payments) {
    const Date spot = spotOf(today, market);
    const Date end = after(spot, tenor, market);
    Instrument made{InstrumentType::overnightSwap, spot, end, {end}, rate, dayCount};
    const std::optional<int> months = monthsOf(tenor);
    if (!months || payments == Payments::atEnd) {
        return made;
    }
    const int interval = static_cast<int>(payments);
    for (int left = *months - interval; left > 0; left -= interval) {
        const Date date = after(spot, {left, dates::TenorUnit::month}, market);
        if (date > spot && date < made.payments.back()) { // a calendar with long closings may join two
            made.payments.push_back(date);
        }
    }
    std::reverse(made.payments.begin(), made.payments.end());
    return made;
}

} // namespace forwright::discounting
