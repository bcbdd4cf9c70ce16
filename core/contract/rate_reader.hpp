#pragma once

#include "contract/reader.hpp"
#include "dates/business_calendar.hpp"
#include "discounting/rate.hpp"
#include "income/income.hpp"

#include <optional>

namespace forwright::contract {

/// RATE: a number, or an object with its convention. `calendar` is what BUS/252 counts on. Nothing where it
/// is not there or at fault.
[[nodiscard]] std::optional<discounting::Rate> readRate(const Value& value,
                                                        const dates::BusinessCalendar& calendar);

/// One RATE for both sides, or `bid` and `offer` in one convention (`different-conventions`).
[[nodiscard]] std::optional<income::TwoWay<discounting::Rate>>
readTwoWayRate(const Value& value, const dates::BusinessCalendar& calendar);

/// The members `compounding`, `dayCount` and `frequency` of an object that has more; its value is left 0.
[[nodiscard]] discounting::Rate readConvention(Reader& object, const dates::BusinessCalendar& calendar);

} // namespace forwright::contract
