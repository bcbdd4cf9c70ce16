#pragma once

#include "discounting/curve.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

/// Internal to the folder: the checks that several curves make of what they are given.
namespace forwright::discounting::detail {

/// A place in a list, as a pointer: `/pillars/3`.
[[nodiscard]] std::string place(std::string_view list, std::size_t index);

/// Adds the fault `out-of-range` where `value` is not in [low, high] (no number is in no range). `what` opens
/// the sentence.
void requireWithin(outcome::Faults& faults, std::string_view at, double value, double low, double high,
                   std::string_view what);

/// Adds the fault `not-after-as-of` or `not-rising` where `date`, one of a list after `previous`, does not
/// come after both.
void requireLater(outcome::Faults& faults, std::string_view at, Date date, Date asOf,
                  std::optional<Date> previous, std::string_view what);

/// Adds the fault `sum-not-one` where numbers that are odds do not sum to 1 within 1e-9.
void requireSumOne(outcome::Faults& faults, std::string_view at, double sum, std::string_view what);

/// The fault `not-finite` where ln P leaves ±largestLogFactor on a day up to `last`. `bound` is at least
/// every |ln P| up to `last`: where it is small, as almost always, nothing else is looked at; else every day
/// is, from the last.
[[nodiscard]] std::optional<outcome::Fault> notFinite(const Curve& curve, Date last, double bound);

/// `notFinite` as a review.
[[nodiscard]] outcome::Review finiteReview(const Curve& curve, Date last, double bound);

/// ln(Σ weights·e^(scale·values) / Σ weights), without overflow and without loss near 0: 0 exactly where
/// every exponent is 0, even where the weights' sum misses 1 by the little that is allowed. No weight is
/// negative and some are positive.
[[nodiscard]] double logOfMean(std::span<const double> weights, std::span<const double> values,
                               double scale = 1.0);

/// Written for people, with six significant digits.
[[nodiscard]] std::string toText(double value);

} // namespace forwright::discounting::detail
