#include "forward/schedule.hpp"

#include "dates/date.hpp"
#include "dates/tenor.hpp"

#include <algorithm>

namespace forwright::forward {
namespace {

using outcome::Fault;

std::string plural(int count, const std::string& what) {
    return std::to_string(count) + " " + what + (count == 1 ? "" : "s");
}

std::string namesOf(const dates::BusinessCalendar& calendar) {
    std::string names;
    for (const std::string& centre : calendar.centres()) {
        names += (names.empty() ? "" : ", ") + centre;
    }
    return names.empty() ? "weekends only" : names;
}

std::string settlementRule(const Asset& asset, Date dealing) {
    const int lag = lagOn(asset, dealing);
    if (lag == 0) {
        return dates::toIso(dealing) + ", or the next good day (" + namesOf(asset.calendar) + ")";
    }
    return dates::toIso(dealing) + " plus " + plural(lag, "business day") + " (" +
           namesOf(asset.lagCalendar) + "), good in " + namesOf(asset.calendar);
}

/// The first day a forward can end on.
Date earliestMaturity(const Market& market, Date spot) {
    return market.asset.kind == AssetKind::commodity ? spot : market.asOf;
}

/// The last day a forward can end on: a hundred years from spot, moved to a business day.
Date latestMaturity(const Market& market, Date spot) {
    const Date end = dates::addTenor(spot, {100, dates::TenorUnit::year});
    return std::min(market.asset.calendar.following(end), dates::latest);
}

Fault notABusinessDay(const dates::BusinessCalendar& calendar, Date date, const std::string& at) {
    return {at, "not-a-business-day",
            dates::toIso(date) + " is no business day (" + namesOf(calendar) + "): the one before is " +
                dates::toIso(calendar.preceding(date)) + ", the next is " +
                dates::toIso(calendar.following(date)) + "; take one of them or give a roll"};
}

/// The maturity's date and the rule that gave it.
struct Reached {
    Date date;
    std::string rule;
};

Reached reachedByTenor(const Market& market, const dates::Tenor& tenor, Date spot) {
    const bool byDelivery = isByDelivery(market.asset.kind);
    const Date from = byDelivery ? spot : market.asOf;
    const bool monthly = tenor.unit == dates::TenorUnit::month || tenor.unit == dates::TenorUnit::year;
    const bool endToEnd = byDelivery && monthly && market.asset.calendar.isLastOfMonth(from);
    const Date date = dates::advanceTenor(from, tenor, market.asset.calendar, byDelivery);
    return {date, dates::toIso(from) + " plus " + dates::toText(tenor) +
                      (monthly ? ", modified following" : ", following") + (endToEnd ? ", end to end" : "") +
                      " (" + namesOf(market.asset.calendar) + ")"};
}

outcome::Outcome<Reached> reachedByDate(const Market& market, Date date,
                                        const std::optional<dates::Roll>& roll, const std::string& at,
                                        outcome::Notices& notices) {
    const dates::BusinessCalendar& calendar = market.asset.calendar;
    if (calendar.isBusinessDay(date)) {
        return Reached{date, "as given, a business day (" + namesOf(calendar) + ")"};
    }
    if (!roll) {
        return notABusinessDay(calendar, date, at);
    }
    const Date moved = dates::adjust(date, *roll, calendar);
    notices.push_back({at, "maturity-moved",
                       dates::toIso(date) + " is no business day (" + namesOf(calendar) +
                           "): the forward ends on " + dates::toIso(moved) + ", " +
                           std::string(dates::nameOf(*roll))});
    return Reached{moved, dates::toIso(date) + " moved, " + std::string(dates::nameOf(*roll)) + " (" +
                              namesOf(calendar) + ")"};
}

outcome::Outcome<Reached> reachedByShortPeriod(const Market& market, dates::ShortPeriod period, Date spot,
                                               const std::string& at) {
    if (!isByDelivery(market.asset.kind)) {
        return Fault{
            at, "not-applicable",
            std::string(dates::nameOf(period)) +
                " is a period of currency and money markets: a share or an index is dealt for a date or a "
                "tenor"};
    }
    const dates::BusinessCalendar& calendar = market.asset.calendar;
    const dates::Period days = dates::datesOf(period, market.asOf, spot, calendar);
    return Reached{days.end, std::string(dates::nameOf(period)) + ", from " + dates::toIso(days.start) +
                                 " to the next business day (" + namesOf(calendar) + ")"};
}

Reached reachedByThirdDay(const Market& market, const dates::ThirdDay& third) {
    const dates::BusinessCalendar& calendar = market.asset.calendar;
    const Date date = third.date();
    return {third.friday ? calendar.preceding(date) : calendar.following(date),
            std::string(third.friday ? "third Friday, " : "third Wednesday, ") + dates::toIso(date) +
                (third.friday ? ", preceding (" : ", following (") + namesOf(calendar) + ")"};
}

outcome::Outcome<Reached> reached(const Market& market, const Maturity& maturity, Date spot,
                                  const std::string& at, outcome::Notices& notices) {
    if (const auto* period = std::get_if<dates::ShortPeriod>(&maturity.at)) {
        return reachedByShortPeriod(market, *period, spot, at);
    }
    if (const auto* third = std::get_if<dates::ThirdDay>(&maturity.at)) {
        return reachedByThirdDay(market, *third);
    }
    if (const auto* tenor = std::get_if<dates::Tenor>(&maturity.at)) {
        return reachedByTenor(market, *tenor, spot);
    }
    return reachedByDate(market, *std::get_if<Date>(&maturity.at), maturity.roll, at, notices);
}

Fault tooEarly(const Market& market, Date maturity, Date spot, const std::string& at) {
    if (maturity < market.asOf) {
        return {at, "in-the-past",
                dates::toIso(maturity) + " is before the market's date " + dates::toIso(market.asOf) +
                    ": give a later one"};
    }
    return {at, "before-spot",
            dates::toIso(maturity) + " is before the spot date " + dates::toIso(spot) +
                ", the first day this asset can be delivered: give that day or a later one"};
}

Fault tooFar(const std::string& at) {
    return {at, "too-far",
            "A forward may end at most 100 years ahead and settle by " + dates::toIso(dates::latest) +
                ": give an earlier maturity"};
}

} // namespace

Date settlementOf(const Asset& asset, Date dealing) {
    return dates::settlementDate(dealing, lagOn(asset, dealing), asset.lagCalendar, asset.calendar);
}

outcome::Outcome<Schedule> schedule(const Market& market, const Maturity& maturity, const std::string& at) {
    const Asset& asset = market.asset;
    Schedule result;
    result.asOf = market.asOf;
    result.spot = settlementOf(asset, market.asOf);
    result.holdFrom = isByDelivery(asset.kind) ? result.spot : market.asOf;
    if (!asset.calendar.isBusinessDay(market.asOf)) {
        result.notices.push_back({market.at + "/asOf", "as-of-not-a-business-day",
                                  dates::toIso(market.asOf) + " is no business day (" +
                                      namesOf(asset.calendar) + "): check the date of the market sheet"});
    }

    const outcome::Outcome<Reached> end = reached(market, maturity, result.spot, at, result.notices);
    if (!end) {
        return end.faults();
    }
    result.maturity = end.value().date;
    if (result.maturity < earliestMaturity(market, result.spot)) {
        return tooEarly(market, result.maturity, result.spot, at);
    }
    if (result.maturity > latestMaturity(market, result.spot)) {
        return tooFar(at);
    }
    result.settlement = isByDelivery(asset.kind) ? result.maturity : settlementOf(asset, result.maturity);
    if (std::max(result.settlement, result.spot) > dates::latest) {
        return tooFar(at);
    }
    result.days = dates::daysBetween(market.asOf, result.maturity);
    result.resolutions = {
        {"spot", result.spot, settlementRule(asset, market.asOf)},
        {"hold-from", result.holdFrom,
         isByDelivery(asset.kind) ? "delivered on the spot date" : "dealt today"},
        {"maturity", result.maturity, end.value().rule},
        {"settlement", result.settlement,
         isByDelivery(asset.kind) ? "the delivery date itself" : settlementRule(asset, result.maturity)},
    };
    return result;
}

} // namespace forwright::forward
