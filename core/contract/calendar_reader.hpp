#pragma once

#include "contract/reader.hpp"
#include "dates/business_calendar.hpp"

#include <string>
#include <vector>

namespace forwright::contract {

/// Codes of business centres; only known ones are kept, the others are told (`unknown-calendar`).
[[nodiscard]] std::vector<std::string> readCentres(const Value& list);
/// A list of days.
[[nodiscard]] std::vector<dates::Date> readDates(const Value& list);

/// The members `calendars`, `holidays` and `openDays` of an object; where `calendars` is left out,
/// `fallback`, with which own days of the object have no meaning.
[[nodiscard]] dates::BusinessCalendar readCalendar(Reader& object, const dates::BusinessCalendar& fallback);

} // namespace forwright::contract
