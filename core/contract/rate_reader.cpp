#include "contract/rate_reader.hpp"

namespace forwright::contract {

using dates::BusinessCalendar;
using dates::DayCount;
using discounting::Compounding;
using discounting::Rate;
using income::TwoWay;

namespace {

DayCount readDayCount(Reader& object) {
    const Value value = object.optional("dayCount", quotedText(dates::nameOf(DayCount::act365Fixed)));
    // `1/1` counts every period as one year, which makes no factor between two dates.
    return value
        .choice({DayCount::act360, DayCount::act365Fixed, DayCount::actActIsda, DayCount::actActIcma,
                 DayCount::thirty360, DayCount::thirtyE360, DayCount::thirtyE360Isda, DayCount::act365L,
                 DayCount::bus252})
        .value_or(DayCount::act365Fixed);
}

/// Coupons a year, which ACT/ACT.ICMA alone has a use for.
int readFrequency(Reader& object, DayCount dayCount) {
    constexpr int once = 1;
    constexpr int monthly = 12;
    if (dayCount != DayCount::actActIcma) {
        if (const Value unused = object.optional("frequency"); unused.present()) {
            object.findings().notice(unused.place(), "not-used",
                                     "Only ACT/ACT.ICMA counts by a frequency; it is not used.");
        }
        return once;
    }
    const Value value =
        object.required("frequency", "the coupons a year that ACT/ACT.ICMA counts by: 1, 2, 3, 4, 6 or 12");
    const int frequency = value.integer(once, monthly).value_or(once);
    if (!dates::isCouponFrequency(frequency)) {
        value.fault("not-one-of", "ACT/ACT.ICMA counts by 1, 2, 3, 4, 6 or 12 coupons a year; it is " +
                                      std::to_string(frequency) + ".");
    }
    return frequency;
}

} // namespace

Rate readConvention(Reader& object, const BusinessCalendar& calendar) {
    Rate rate;
    rate.compounding = object.choice("compounding",
                                     {Compounding::continuous, Compounding::simple, Compounding::annual,
                                      Compounding::semiannual, Compounding::quarterly, Compounding::monthly},
                                     Compounding::continuous);
    rate.dayCount.kind = readDayCount(object);
    rate.dayCount.frequency = readFrequency(object, rate.dayCount.kind);
    if (rate.dayCount.kind == DayCount::bus252) {
        rate.dayCount.calendar = calendar;
    }
    return rate;
}

std::optional<Rate> readRate(const Value& value, const BusinessCalendar& calendar) {
    if (!value.present()) {
        return std::nullopt;
    }
    Rate rate;
    std::optional<double> number;
    if (value.isNumber()) {
        number = value.number(rateRange);
    } else if (value.isObject()) {
        Reader object{value};
        number = object.required("rate", "the rate, a decimal number (0.03 is 3 %)").number(rateRange);
        rate = readConvention(object, calendar);
    } else {
        value.wrongType("a rate (a number, or an object with rate, compounding and dayCount)");
    }
    if (!number) {
        return std::nullopt;
    }
    rate.value = *number;
    return rate;
}

std::optional<TwoWay<Rate>> readTwoWayRate(const Value& value, const BusinessCalendar& calendar) {
    if (!value.has("bid") && !value.has("offer")) {
        const std::optional<Rate> both = readRate(value, calendar);
        return both ? std::optional{TwoWay<Rate>{*both, *both}} : std::nullopt;
    }
    Reader object{value};
    const std::optional<Rate> bid = readRate(object.required("bid", "the bid rate"), calendar);
    const std::optional<Rate> offer = readRate(object.required("offer", "the offered rate"), calendar);
    if (!bid || !offer) {
        return std::nullopt;
    }
    if (!discounting::sameConvention(*bid, *offer)) {
        value.fault(
            "different-conventions",
            "Bid and offer have to be in one convention, so that their mean means something; the bid is " +
                discounting::conventionOf(*bid) + ", the offer " + discounting::conventionOf(*offer) + ".");
        return std::nullopt;
    }
    if (bid->value > offer->value) {
        object.findings().notice(object.at("bid"), "bid-above-offer",
                                 "The bid is above the offer, which is unusual.");
    }
    return TwoWay<Rate>{*bid, *offer};
}

} // namespace forwright::contract
