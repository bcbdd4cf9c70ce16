#pragma once

#include "discounting/curve.hpp"
#include "discounting/rate.hpp"
#include "outcome/outcome.hpp"

#include <memory>
#include <vector>

/// Every curve there is, each made by one function that checks what it is given. Pointers in faults are
/// relative to the curve. Throughout, t is ACT/365.FIXED years from `asOf` and B = (1 − e^(−κt))/κ, t where κ
/// = 0. The closed forms are kept exact near κ = 0, σ = 0 and t = 0 (relative error about 1e-14;
/// discounting/decay.hpp says how). Numbers outside the limits written beside them are refused with
/// `out-of-range`; in review every curve refuses with `not-finite` what `largestLogFactor` excludes.
namespace forwright::discounting {

template <class T> using Outcome = outcome::Outcome<T>;

/// One rate for every date, with that rate's own factor. `rateAt` is where the number stands: "/rate", or ""
/// for a bare number; it is the one parameter. In review `rate-too-low` where the rate gives no factor.
[[nodiscard]] CurvePtr flat(Date asOf, const Rate& rate, const std::string& rateAt = "/rate");

enum class Interpolation { logLinear, linearZero, monotoneCubic };
[[nodiscard]] std::optional<Interpolation>
parseInterpolation(std::string_view name); ///< `log-linear`, `linear-zero`, `monotone-cubic`
[[nodiscard]] std::string_view nameOf(Interpolation interpolation);

/// A point of a curve: a zero rate in the curve's convention, or a factor.
struct Pillar {
    Date at;
    double value = 0.0;
};
/// Whether pillars' values are zero rates or factors. A curve's parameters are its pillars' values in their
/// own convention; where these are factors, the continuous zero rates that they make.
enum class PillarQuote { zero, factor };
struct Pillars {
    PillarQuote quote = PillarQuote::zero;
    Rate convention; ///< of zero quotes; its value is not read
    Interpolation interpolation = Interpolation::logLinear;
    std::vector<Pillar> pillars; ///< at least one, dates rising, after `asOf`
};
/// log-linear: ln P linear in t from (0, 0), its last forward rate held past the last pillar. linear-zero:
/// the continuous zero rate linear in t, flat before the first pillar and past the last. monotone-cubic: the
/// monotone cubic of Fritsch and Carlson (1980) through (t, −ln P) from (0, 0), its last forward rate held
/// past the last pillar (the choice of slopes: discounting/monotone_cubic.hpp); forward rates are continuous,
/// and not negative wherever the pillars' own factors do not rise. Every curve gives its pillars back.
/// Refused: `empty-list`, `not-after-as-of`, `not-rising`, `not-positive` (a factor), `out-of-range` and
/// `rate-too-low` (a zero rate). In review: the notice `beyond-last-pillar`.
[[nodiscard]] Outcome<CurvePtr> pillars(Date asOf, const Pillars& points);

/// What the market quotes and a curve is made from.
enum class InstrumentType {
    deposit,       ///< P(start)/P(end) = 1 + r·τ
    fra,           ///< a forward rate agreement: the same, from a later start
    overnightSwap, ///< r·Σ τᵢ·P(tᵢ) = P(start) − P(end): fixed payments against overnight interest,
                   ///< compounded
};
[[nodiscard]] std::optional<InstrumentType>
parseInstrumentType(std::string_view name); ///< `deposit`, `fra`, `overnight-swap`
[[nodiscard]] std::string_view nameOf(InstrumentType type);

struct Instrument {
    InstrumentType type = InstrumentType::deposit;
    Date start;
    Date end;
    std::vector<Date> payments; ///< of a swap: rising, the last is `end`
    double rate = 0.0;          ///< −0.99 to 10
    dates::DayCountRule dayCount;
};
/// A jump of the overnight rate for some days, as over a year's end: it lowers ln P(u) by `spread` times the
/// years of [from, to) that lie before u.
struct Turn {
    Date from; ///< not before `asOf`
    Date to;
    double spread = 0.0; ///< −10 to 10
};
struct Instruments {
    Interpolation interpolation = Interpolation::logLinear;
    std::vector<Instrument> items; ///< in any order
    std::vector<Turn> turns;       ///< they add up where they overlap
};
inline constexpr std::size_t mostInstruments = 200;

/// The curve with a pillar at every instrument's end, interpolated as `pillars` are, that gives every
/// instrument its quote again to 1e-12 in its rate; the turns lie on top of it. All pillars are found
/// together (discounting/calibration.hpp), since a monotone cubic hangs on its neighbours. Parameters:
/// `/items/i/rate` (pillar) and `/turns/i/spread` (model), with the derivatives through the calibration.
/// Refused, naming the instrument: `same-end`, `gap` (a forward rate agreement that begins after what the
/// others tell), `rate-too-low`, `no-solution`; `not-rising`, `out-of-range`, `empty-list`, `too-many-rows`.
/// In review the notice `beyond-last-pillar`.
[[nodiscard]] Outcome<CurvePtr> instruments(Date asOf, Instruments given);

/// Vasicek (1977): dr = κ(θ − r)dt + σ dW. ln D(u) is normal with mean −θt − (r0 − θ)B and variance
/// V = σ²/κ²·(t − 2B + (1 − e^(−2κt))/(2κ)), σ²t³/3 where κ = 0; P = e^(mean + V/2). Parameters: `/r0`,
/// `/meanReversion`, `/longRun`, `/volatility`.
struct Vasicek {
    double r0 = 0.0;            ///< −0.99 to 10
    double meanReversion = 0.0; ///< κ, 0 to 100
    double longRun = 0.0;       ///< θ, −0.99 to 10
    double volatility = 0.0;    ///< σ, 0 to 10
};
[[nodiscard]] Outcome<CurvePtr> vasicek(Date asOf, const Vasicek& model);

/// Cox, Ingersoll and Ross (1985): dr = κ(θ − r)dt + σ√r dW; r0 and θ not negative. With γ = √(κ² + 2σ²),
/// P = [2γe^((κ+γ)t/2) / ((γ+κ)(e^(γt)−1) + 2γ)]^(2κθ/σ²) · e^(−r0·2(e^(γt)−1) / ((γ+κ)(e^(γt)−1) + 2γ)), at
/// σ = 0 its limit, Vasicek's P without volatility. E[ln D] as Vasicek's; Var[ln D] = σ²/κ³·(r0(1 −
/// 2κt·e^(−κt) − e^(−2κt)) + θ(κt − 5/2 + 2(1 + κt)e^(−κt) + e^(−2κt)/2)), σ²r0t³/3 where κ = 0. Quantiles by
/// inverting the transform E[e^(−λ∫r)]: relative error of the factor below 1e-9 for probabilities from 0.001
/// to 0.999. Parameters as Vasicek's.
struct CoxIngersollRoss {
    double r0 = 0.0;            ///< 0 to 10
    double meanReversion = 0.0; ///< κ, 0 to 100
    double longRun = 0.0;       ///< θ, 0 to 10
    double volatility = 0.0;    ///< σ, 0 to 10
};
[[nodiscard]] Outcome<CurvePtr> coxIngersollRoss(Date asOf, const CoxIngersollRoss& model);

/// Ho and Lee (1986): the curve `fit`, which is not random (else `random-fit`) and has the same `asOf`, with
/// a short rate of volatility σ, 0 to 10, about it. P is `fit`; ln D is normal with Vasicek's V and the mean
/// ln P − V/2. Parameters: the model's own, to which P is indifferent, then those of the fit below `/fit`.
[[nodiscard]] Outcome<CurvePtr> hoLee(Date asOf, double volatility, CurvePtr fit);
/// Hull and White (1990): as Ho–Lee with mean reversion κ, 0 to 100.
[[nodiscard]] Outcome<CurvePtr> hullWhite(Date asOf, double meanReversion, double volatility, CurvePtr fit);

/// One outcome of a central bank's meeting.
struct RateMove {
    double by = 0.0;          ///< change of the overnight rate, decimal, −10 to 10
    double probability = 0.0; ///< risk-neutral, 0 to 1
};
struct PolicyMeeting {
    Date date; ///< the move is in force from this date; after `asOf`
    std::vector<RateMove> moves;
};
/// The overnight rate (continuous, ACT/365.FIXED, −0.99 to 10) moved by independent decisions at meetings,
/// dates rising: P(u) = e^(−overnight·t) ∏ₖ Σₘ p e^(−by·max(0, t − tₖ)). The odds of a meeting sum to 1
/// within 1e-9, and are divided by their sum so that P(asOf) is 1. Mean and variance of ln D in closed form.
/// Quantiles are the smallest outcome whose probability reaches them, exact but for rounding; where either
/// half of the meetings has more than 2²⁰ outcomes of its own (24 meetings of 3 moves have 3¹² each)
/// `too-many-outcomes`. P itself has no such bound. Parameters: `/overnight` and `/meetings/k/moves/m/by`;
/// the odds are none, since one can't move alone while they sum to 1. Refused: `not-after-as-of`,
/// `not-rising`, `empty-list` (a meeting without moves), `sum-not-one`.
[[nodiscard]] Outcome<CurvePtr> policyMeetings(Date asOf, double overnight,
                                               const std::vector<PolicyMeeting>& meetings);

/// One possible curve with its risk-neutral weight.
struct Scenario {
    double weight = 0.0;
    CurvePtr curve;
};
/// P(u) = Σ w P_s(u); weights, none negative, sum to 1 within 1e-9 (else `sum-not-one`), and are divided by
/// their sum so that P(asOf) is 1. All curves have the same `asOf`; at least one is needed (`empty-list`). A
/// curve may itself be random: then D's law is the mixture, found by halving, and its mean and variance are
/// known where every part's are. Too many random parts have no quantiles: `too-many-outcomes`, at about 80
/// Cox–Ingersoll–Ross curves or 16,000 normal ones. Parameters, faults and notices are those of the parts,
/// below `/scenarios/s/curve`; the weights are no parameters, since one can't move alone.
[[nodiscard]] Outcome<CurvePtr> scenarios(Date asOf, const std::vector<Scenario>& all);

/// Simulated discount factors brought from elsewhere: one row a path, one column a date.
struct SamplePaths {
    std::vector<Date> dates; ///< rising, after `asOf`
    std::vector<double>
        factors;        ///< positive, row by row: `factors[path * dates.size() + date]`; 2,000,000 at most
    CurvePtr against{}; ///< what the columns' means should be, where it is known: compared, never priced with
};
/// P at a date of `dates` is that column's mean; between them ln P is linear in t from (0, 0), and past the
/// last its last forward rate is held, with the notice `beyond-last-date`. The law of D(u) is that of the
/// paths, each read in the same way; its quantiles are linear in D between the order statistics, at the
/// positions p·(n − 1) (type 7 of Hyndman and Fan, The American Statistician 50 (1996)). E[ln D] is the
/// paths' mean; no variance in closed form. No parameters. Where a column's mean is `samplesDisagreeFrom`
/// standard errors or more from the factor of `against`, review says so: `samples-disagree`. Refused:
/// `empty-list`, `not-after-as-of`, `not-rising`, `not-positive`, `row-length` (factors that fill no whole
/// rows), `too-many`; `random-fit` where `against` is random itself.
[[nodiscard]] Outcome<CurvePtr> samples(Date asOf, SamplePaths paths);

/// The curve with every continuous zero rate moved by `spread`: P(u)·e^(−spread·t(u)). Parameters and
/// gradient are those of `curve`; not random.
[[nodiscard]] CurvePtr withSpread(CurvePtr curve, double spread);
/// E[ln D(u)] of a random curve in place of ln P(u): discounting at the average rate. The curve itself where
/// it is not random. Made to be compared with, not to take sensitivities to: no parameters, not random.
[[nodiscard]] CurvePtr atAverageRate(CurvePtr curve);
/// The curve seen from a later `asOf` with its zero rates by time held: P'(asOf' + t) = P(asOf + t).
/// Parameters are those of `curve`; not random.
[[nodiscard]] CurvePtr heldByTime(CurvePtr curve, Date asOf);
/// The curve seen from a later `asOf`, its own forward rates come true: P'(u) = P(u)/P(asOf'). Parameters are
/// those of `curve`; not random.
[[nodiscard]] CurvePtr forwardsComeTrue(CurvePtr curve, Date asOf);

} // namespace forwright::discounting
