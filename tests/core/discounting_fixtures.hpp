#pragma once

#include "dates/date.hpp"
#include "discounting/curves.hpp"

#include <doctest/doctest.h>

#include <cmath>
#include <functional>
#include <string>
#include <vector>

/// What the tests of rates and curves share. All data is invented.
namespace forwright::discounting::testing {

inline const Date asOf{std::chrono::year{2026} / std::chrono::December / 1};

/// The day whose t is `count` years of 365 days.
inline Date afterYears(int count) {
    return asOf + std::chrono::days{365 * count};
}
inline Date afterDays(int count) {
    return asOf + std::chrono::days{count};
}

inline Date day(const std::string& iso) {
    const std::optional<Date> date = dates::parseIso(iso);
    REQUIRE_MESSAGE(date.has_value(), iso);
    return *date;
}

inline Rate rateOf(double value, Compounding compounding = Compounding::continuous,
                   dates::DayCount dayCount = dates::DayCount::act365Fixed) {
    Rate rate;
    rate.value = value;
    rate.compounding = compounding;
    rate.dayCount.kind = dayCount;
    return rate;
}

/// The curve, which has to be there.
inline CurvePtr made(const Outcome<CurvePtr>& curve) {
    for (const outcome::Fault& fault : curve.faults()) {
        FAIL_CHECK(fault.at << " " << fault.code << " " << fault.message);
    }
    REQUIRE(curve.ok());
    return curve.value();
}

inline CurvePtr flatAt(double value) {
    return flat(asOf, rateOf(value));
}

/// "at code" of every remark, in order, with blanks between.
inline std::string codes(const std::vector<outcome::Remark>& remarks) {
    std::string all;
    for (const outcome::Remark& remark : remarks) {
        CHECK_MESSAGE(remark.message.ends_with('.'), remark.message);
        all += (all.empty() ? "" : " ") + remark.at + " " + remark.code;
    }
    return all;
}
template <class T> std::string codes(const Outcome<T>& refused) {
    return codes(refused.faults());
}

/// |a − b| at most `error`.
inline void checkNear(double a, double b, double error) {
    CHECK_MESSAGE(std::fabs(a - b) <= error, a << " against " << b << ", apart by " << std::fabs(a - b));
}
inline void checkRelative(double a, double b, double error) {
    checkNear(a, b, error * std::fabs(b));
}

/// The derivative of f at x by central differences of the eighth order (Fornberg, Mathematics of Computation
/// 51 (1988), table 1).
inline double centralDifference(const std::function<double(double)>& f, double x, double step) {
    const auto pair = [&](double far) {
        return f(x + far * step) - f(x - far * step);
    };
    return (4.0 / 5.0 * pair(1) - 1.0 / 5.0 * pair(2) + 4.0 / 105.0 * pair(3) - 1.0 / 280.0 * pair(4)) / step;
}

/// The same from one side, of the sixth order (table 3).
inline double forwardDifference(const std::function<double(double)>& f, double x, double step) {
    constexpr double weights[] = {-49.0 / 20.0, 6.0,       -15.0 / 2.0, 20.0 / 3.0,
                                  -15.0 / 4.0,  6.0 / 5.0, -1.0 / 6.0};
    double sum = 0.0;
    for (int i = 0; i < 7; ++i) {
        sum += weights[i] * f(x + i * step);
    }
    return sum / step;
}

} // namespace forwright::discounting::testing
