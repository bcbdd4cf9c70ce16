#pragma once

#include "dates/day_count.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <span>
#include <string>
#include <string_view>

/// The value today of money later: rates, curves, and what is known of a discount factor that is random.
namespace forwright::discounting {

using dates::Date;

/// How often a rate's interest is added to what earns interest.
enum class Compounding { continuous, simple, annual, semiannual, quarterly, monthly };

[[nodiscard]] std::optional<Compounding> parseCompounding(std::string_view name);
[[nodiscard]] std::string_view nameOf(Compounding compounding);
/// All names, in the order of the enumeration.
[[nodiscard]] std::span<const std::string_view> compoundingNames();

/// A rate with its convention. Left as it is made: 0, continuous, ACT/365.FIXED.
struct Rate {
    double value = 0.0; ///< decimal a year, −0.99 to 10
    Compounding compounding = Compounding::continuous;
    dates::DayCountRule dayCount;
};

/// ln of the factor by which one unit at `to` is worth less at `from`. With τ the year fraction: −rτ
/// continuous, −ln(1 + rτ) simple, −mτ ln(1 + r/m) for m times a year. 0 where the dates are one; `from` is
/// not after `to`. +∞ where `refusal` says that there is no factor. The year fraction is that of the whole
/// span, not a sum over periods.
[[nodiscard]] double logFactor(const Rate& rate, Date from, Date to);

/// The derivative of `logFactor` by the rate's value, where that has a factor.
[[nodiscard]] double logFactorSlope(const Rate& rate, Date from, Date to);

/// The value in a rate's own convention (its `value` is not read) that gives `logFactor` between the dates;
/// `from` is before `to`. 0 where the convention counts no time between them (30/360 from the 30th to the
/// 31st): there every rate gives the factor 1.
[[nodiscard]] double valueFromLogFactor(const Rate& convention, Date from, Date to, double logFactor);

/// Why the rate gives no factor between `from` and some day up to `to`, or nothing: `rate-too-low` (1 + rτ or
/// 1 + r/m not positive), `not-finite` (the value is no number). The limits of −0.99 and 10 are the
/// request's, not this function's.
[[nodiscard]] std::optional<outcome::Fault> refusal(const Rate& rate, Date from, Date to);

/// The convention in words: "simple ACT/360".
[[nodiscard]] std::string conventionOf(const Rate& rate);

/// Whether two rates are written in the same convention, so that their mean means something: the same
/// compounding and day count, and what that day count needs beside the dates (frequency, termination date,
/// centres of the calendar).
[[nodiscard]] bool sameConvention(const Rate& one, const Rate& other);

} // namespace forwright::discounting
