#pragma once

#include "contract/reader.hpp"
#include "forward/market.hpp"

#include <optional>

namespace forwright::contract {

/// The market, or nothing where anything in it is at fault.
[[nodiscard]] std::optional<forward::Market> readMarket(const Value& value);

/// Notices of calendars whose rules do not reach over all the years from the market's date to `last`.
void reviewCalendars(const forward::Market& market, dates::Date last, Findings& findings);

} // namespace forwright::contract
