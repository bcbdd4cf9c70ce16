#pragma once

#include "contract/reader.hpp"
#include "dates/business_calendar.hpp"
#include "discounting/curve.hpp"

namespace forwright::contract {

/// What a curve's members are read against.
struct CurveContext {
    dates::Date asOf; ///< where the request has none, a day before all others, so that what is read is not
                      ///< blamed for it
    dates::BusinessCalendar calendar; ///< of the asset, for BUS/252
};

/// CURVE: a number or a RATE (flat), pillars, or a random model. Null where it is not there or at fault.
[[nodiscard]] discounting::CurvePtr readCurve(const Value& value, const CurveContext& context);

} // namespace forwright::contract
