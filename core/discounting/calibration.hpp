#pragma once

#include "discounting/curves.hpp"

#include <functional>
#include <span>
#include <variant>
#include <vector>

/// Internal to the core: curves that are made so that what the market quotes comes out of them.
namespace forwright::discounting {

/// Something quoted that a curve has to give back. `miss` is 0 where it does; it is given ln P at `dates`,
/// and puts its derivatives by them into the second list. It may be NaN where factors are far from any that
/// could satisfy it.
struct Condition {
    std::vector<Date> dates;
    std::function<double(std::span<const double> logFactors, std::span<double> byLogFactors)> miss;
    /// How much of `miss` is let pass: what a millionth of a millionth of its own unit comes to.
    double tolerance = 1e-12;
};

/// A curve through pillars whose zero rates satisfy all conditions.
struct Calibrated {
    CurvePtr curve;
    /// ∂ zero rate of pillar / ∂ miss of condition, with its sign turned: how the pillars follow a condition
    /// whose miss is raised from outside. Row by row: `follow[pillar * conditions + condition]`.
    std::vector<double> follow;
};

/// The curve with continuous zero rates at `pillars` (rising, after `asOf`, one for each condition, in whose
/// order they stand) that satisfies the conditions: Newton's method on all pillars at once, its derivatives
/// exact, each step shortened while it does not come nearer; at the kinks of a monotone cubic a one-sided
/// derivative serves. `guess` are zero rates to begin with. Where no curve is found the index of the first
/// condition that cannot be satisfied together with those before it.
[[nodiscard]] std::variant<Calibrated, std::size_t> calibrate(Date asOf, Interpolation interpolation,
                                                              std::span<const Date> pillars,
                                                              std::span<const Condition> conditions,
                                                              std::span<const double> guess);

} // namespace forwright::discounting
