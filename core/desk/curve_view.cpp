#include "desk/curve_view.hpp"

#include <algorithm>
#include <set>

namespace forwright::desk {

namespace {

constexpr std::chrono::days oneDay{1};

double forwardAt(const discounting::Curve& curve, Date date) {
    return (curve.logFactor(date) - curve.logFactor(date + oneDay)) / dates::years(date, date + oneDay);
}

CurvePoint pointAt(const discounting::Curve& curve, Date date) {
    CurvePoint point{date, dates::years(curve.asOf(), date), curve.factor(date), 0.0, forwardAt(curve, date)};
    point.zero = date == curve.asOf() ? point.forward : -curve.logFactor(date) / point.years;
    return point;
}

/// Evenly spread dates, with both sides of the jumps as far as there is room.
std::set<Date> datesOf(const discounting::Curve& curve, Date until) {
    const int days = dates::daysBetween(curve.asOf(), until);
    std::set<Date> all;
    for (const Date jump : curve.jumps()) {
        for (const Date date : {jump - oneDay, jump}) {
            if (date >= curve.asOf() && date <= until && all.size() < mostCurvePoints / 2) {
                all.insert(date);
            }
        }
    }
    const int steps = std::min(days, mostCurvePoints / 2 - 1);
    for (int i = 0; i <= steps; ++i) {
        all.insert(curve.asOf() +
                   std::chrono::days{static_cast<int>(static_cast<long long>(days) * i / steps)});
    }
    return all;
}

outcome::Outcome<CurveView> viewAt(const discounting::Curve& curve, const std::set<Date>& dates) {
    outcome::Review found = curve.review(*dates.rbegin() + oneDay);
    if (!found.faults.empty()) {
        return found.faults;
    }
    // To look past a curve's end is not to price there; that its end is held is seen.
    CurveView view;
    for (const Date date : dates) {
        view.points.push_back(pointAt(curve, date));
    }
    view.instruments = curve.instruments();
    view.notices = std::move(found.notices);
    return view;
}

} // namespace

outcome::Outcome<CurveView> curveView(const discounting::Curve& curve, Date until) {
    return viewAt(curve, datesOf(curve, until));
}

outcome::Outcome<CurveView> curveView(const discounting::Curve& curve, const std::vector<Date>& asked) {
    return viewAt(curve, {asked.begin(), asked.end()});
}

} // namespace forwright::desk
