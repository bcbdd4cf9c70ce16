#pragma once

#include "discounting/curve.hpp"
#include "outcome/outcome.hpp"

#include <vector>

namespace forwright::desk {

using dates::Date;

/// One date of a curve.
struct CurvePoint {
    Date date;
    double years = 0.0;   ///< t, ACT/365.FIXED
    double factor = 1.0;  ///< P
    double zero = 0.0;    ///< continuous, ACT/365.FIXED; at the curve's own date what it begins with
    double forward = 0.0; ///< the overnight rate from this date to the next day, continuous, ACT/365.FIXED
};

/// A curve to be looked at: what it is made from and whether that comes out of it again, and its rates.
struct CurveView {
    std::vector<CurvePoint> points; ///< by rising date, from the curve's own
    std::vector<discounting::RepricedInstrument> instruments;
    outcome::Notices notices; ///< places below the curve
};

/// The most dates a curve is drawn through.
inline constexpr int mostCurvePoints = 400;

/// The curve from its own date to `until`, which is after it: every day where they are few, else evenly
/// thinned, with both sides of every date at which its forward rate jumps. Refused as the curve's own review
/// does.
[[nodiscard]] outcome::Outcome<CurveView> curveView(const discounting::Curve& curve, Date until);
/// The same at dates asked for, at least one, none before the curve's own, in whatever order.
[[nodiscard]] outcome::Outcome<CurveView> curveView(const discounting::Curve& curve,
                                                    const std::vector<Date>& asked);

} // namespace forwright::desk
