#pragma once

#include "dates/business_calendar.hpp"
#include "dates/holiday_rules.hpp"

namespace forwright::dates::holidays {

/// The rule sets of a known centre, by its place in `knownCentres`. It is closed when one of them closes it.
[[nodiscard]] std::span<const RuleSet> rulesOf(std::size_t centre);

inline constexpr std::size_t centreCount = 10;

} // namespace forwright::dates::holidays
