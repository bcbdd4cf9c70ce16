#pragma once

#include "discounting/curve.hpp"
#include "discounting/rate.hpp"
#include "outcome/outcome.hpp"

#include <memory>
#include <vector>

/// Every curve there is, each made by one function that checks what it is given. Pointers in faults are relative to the curve.
namespace forwright::discounting {

template <class T> using Outcome = outcome::Outcome<T>;

/// One rate for every date, with that rate's own factor. `rateAt` is where the number stands: "/rate", or "" for a bare number.
[[nodiscard]] CurvePtr flat(Date asOf, const Rate& rate, const std::string& rateAt = "/rate");

enum class Interpolation { logLinear, linearZero, monotoneCubic };
[[nodiscard]] std::optional<Interpolation> parseInterpolation(std::string_view name); ///< `log-linear`, `linear-zero`, `monotone-cubic`
[[nodiscard]] std::string_view nameOf(Interpolation interpolation);

/// A point of a curve: a zero rate in the curve's convention, or a factor.
struct Pillar {
    Date at;
    double value = 0.0;
};
/// Whether pillars' values are zero rates or factors. A curve's parameters are its pillars' values in their own convention; where these
/// are factors, the continuous zero rates that they make.
enum class PillarQuote { zero, factor };
struct Pillars {
    PillarQuote quote = PillarQuote::zero;
    Rate convention; ///< of zero quotes; its value is not read
    Interpolation interpolation = Interpolation::logLinear;
    std::vector<Pillar> pillars; ///< at least one, dates rising, after `asOf`
};
/// log-linear: ln P linear in t from (0, 0), its last forward rate held past the last pillar. linear-zero: the continuous zero rate linear in t,
/// flat before the first pillar and past the last. monotone-cubic: the monotone cubic of Fritsch and Carlson (1980) through (t, −ln P) from
/// (0, 0), its last forward rate held past the last pillar (the choice of slopes: discounting/monotone_cubic.hpp); forward rates are continuous,
/// and not negative wherever the pillars' own factors do not rise. Every curve gives its pillars back.
/// Refused: `empty-list`, `not-after-as-of`, `not-rising`, `not-positive` (a factor), `out-of-range` and `rate-too-low` (a zero rate).
/// In review: the notice `beyond-last-pillar`.
[[nodiscard]] Outcome<CurvePtr> pillars(Date asOf, const Pillars& points);

/// Vasicek (1977): dr = κ(θ − r)dt + σ dW.
struct Vasicek {
    double r0 = 0.0;            ///< −0.99 to 10
    double meanReversion = 0.0; ///< κ, 0 to 100
    double longRun = 0.0;       ///< θ, −0.99 to 10
    double volatility = 0.0;    ///< σ, 0 to 10
};
[[nodiscard]] Outcome<CurvePtr> vasicek(Date asOf, const Vasicek& model);

/// Cox, Ingersoll and Ross (1985): dr = κ(θ − r)dt + σ√r dW; r0 and θ not negative.
struct CoxIngersollRoss {
    double r0 = 0.0;            ///< 0 to 10
    double meanReversion = 0.0; ///< κ, 0 to 100
    double longRun = 0.0;       ///< θ, 0 to 10
    double volatility = 0.0;    ///< σ, 0 to 10
};
[[nodiscard]] Outcome<CurvePtr> coxIngersollRoss(Date asOf, const CoxIngersollRoss& model);

/// Ho and Lee (1986): the curve `fit`, which is not random, with a short rate of volatility σ about it.
[[nodiscard]] Outcome<CurvePtr> hoLee(Date asOf, double volatility, CurvePtr fit);
/// Hull and White (1990): as Ho–Lee with mean reversion κ.
[[nodiscard]] Outcome<CurvePtr> hullWhite(Date asOf, double meanReversion, double volatility, CurvePtr fit);

/// One outcome of a central bank's meeting.
struct RateMove {
    double by = 0.0;          ///< change of the overnight rate, decimal
    double probability = 0.0; ///< risk-neutral
};
struct PolicyMeeting {
    Date date; ///< the move is in force from this date; after `asOf`
    std::vector<RateMove> moves;
};
/// The overnight rate (continuous, ACT/365.FIXED) moved by independent decisions at meetings, dates rising.
[[nodiscard]] Outcome<CurvePtr> policyMeetings(Date asOf, double overnight, const std::vector<PolicyMeeting>& meetings);

/// One possible curve with its risk-neutral weight.
struct Scenario {
    double weight = 0.0;
    CurvePtr curve;
};
/// P(u) = Σ w P_s(u); weights, none negative, sum to 1 within 1e-9.
[[nodiscard]] Outcome<CurvePtr> scenarios(Date asOf, const std::vector<Scenario>& all);

/// Simulated discount factors brought from elsewhere: one row a path, one column a date.
struct SamplePaths {
    std::vector<Date> dates;     ///< rising, after `asOf`
    std::vector<double> factors; ///< positive, row by row: `factors[path * dates.size() + date]`
};
[[nodiscard]] Outcome<CurvePtr> samples(Date asOf, SamplePaths paths);

/// The curve with every continuous zero rate moved by `spread`: P(u)·e^(−spread·t(u)). Parameters and gradient are those of `curve`; not random.
[[nodiscard]] CurvePtr withSpread(CurvePtr curve, double spread);
/// E[ln D(u)] of a random curve in place of ln P(u): discounting at the average rate. The curve itself where it is not random.
[[nodiscard]] CurvePtr atAverageRate(CurvePtr curve);
/// The curve seen from a later `asOf` with its zero rates by time held: P'(asOf' + t) = P(asOf + t).
[[nodiscard]] CurvePtr heldByTime(CurvePtr curve, Date asOf);
/// The curve seen from a later `asOf`, its own forward rates come true: P'(u) = P(u)/P(asOf').
[[nodiscard]] CurvePtr forwardsComeTrue(CurvePtr curve, Date asOf);

} // namespace forwright::discounting
