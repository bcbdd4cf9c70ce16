#pragma once

#include "forward/quote.hpp"
#include "outcome/outcome.hpp"

#include <string>
#include <vector>

namespace forwright::desk {

using dates::Date;

/// Fair forward and break-evens for one maturity on the way.
struct PathPoint {
    Date date; ///< maturity
    double fair = 0.0;
    double bid = 0.0;   ///< break-even
    double offer = 0.0; ///< break-even
};
/// What one distribution does to the fair forward on its day.
struct PathStep {
    std::string at; ///< pointer of its row
    Date date;      ///< the first maturity that it counts for
    double change = 0.0;
};
struct Path {
    std::vector<PathPoint> points; ///< by rising date, from the start of the hedge to maturity
    std::vector<PathStep> steps;   ///< by rising date
    outcome::Notices notices;
};

/// The most dates a path is drawn through.
inline constexpr int mostPathPoints = 250;

/// The carry path to the inquiry's maturity: business days from the first on which a forward can end, thinned
/// evenly to at most `mostPathPoints`, and among them the day of each distribution and the one before, as far
/// as there is room. Refused as a quote is.
[[nodiscard]] outcome::Outcome<Path> path(const forward::Market& market, const forward::Inquiry& inquiry);

} // namespace forwright::desk
