#pragma once

#include "discounting/paths.hpp"
#include "discounting/rate.hpp"
#include "outcome/outcome.hpp"

#include <memory>
#include <optional>
#include <span>
#include <string>
#include <vector>

namespace forwright::discounting {

/// A number that a curve was made from and to which sensitivities are taken.
struct Parameter {
    enum class Kind {
        pillar, ///< a pillar or the quote of an instrument
        model,  ///< a parameter of a random model, or the one rate of a flat curve
    };
    /// Pointer below the curve: `/pillars/2/value`, `/meanReversion`, `/scenarios/0/curve/rate`; "" for a
    /// bare number.
    std::string at;
    Kind kind = Kind::model;
    double value = 0.0; ///< in its own convention; of a pillar quoted as a factor, the continuous zero rate
                        ///< that it makes
};

/// One quantile of a random discount factor.
struct Quantile {
    double probability = 0.0;
    double factor = 0.0;
};

/// The law of a random discount factor at one date, told in its logarithm.
class LogLaw {
  public:
    virtual ~LogLaw() = default;
    /// P(ln D ≤ x).
    [[nodiscard]] virtual double probabilityAtMost(double x) const = 0;
    /// The smallest x whose probability reaches `probability`, which lies inside (0, 1). Where outcomes are
    /// single points a sum of probabilities that misses by no more than `probabilityRounding` reaches it all
    /// the same.
    [[nodiscard]] virtual double quantile(double probability) const = 0;
    /// Whether no single outcome has odds of its own.
    [[nodiscard]] virtual bool isContinuous() const { return false; }
    /// How long one `probabilityAtMost` takes, in units of a normal law's (about 0.1 µs); mixtures refuse to
    /// grow without end.
    [[nodiscard]] virtual double work() const { return 1.0; }
};
using LogLawPtr = std::shared_ptr<const LogLaw>;

/// Sums of probabilities are compared with this much room for their rounding: 0.1 + 0.4 reaches 0.5.
inline constexpr double probabilityRounding = 1e-12;

/// A normal short rate about its mean: it returns to it with the speed κ and has the volatility σ.
struct NormalRate {
    double meanReversion = 0.0;
    double volatility = 0.0;
    bool fitted =
        false; ///< to a curve given: expected discount factors are that curve's, whatever κ and σ are
};

/// One level that the overnight rate can stand at, and how likely that is.
struct RateLevel {
    double rate = 0.0; ///< continuous, ACT/365.FIXED
    double probability = 0.0;
};
/// A move from one level to another; `from` and `to` are indices into the levels before and after it.
struct RateBranch {
    std::size_t from = 0;
    std::size_t to = 0;
    double by = 0.0;
    double probability = 0.0; ///< of the move, at that level
};
/// The levels from a date on, by rising rate, and the moves that lead to them. Ways that lead to one level
/// meet.
struct RateLevels {
    Date from;
    std::vector<RateLevel> levels;
    std::vector<RateBranch> branches; ///< none to the first levels
};

/// A column of samples beside the same factor of the curve that they should agree with.
struct SampleColumn {
    Date date;
    double mean = 1.0;
    std::optional<double> standardError; ///< none of a single path
    double factor = 1.0;                 ///< the curve's
    std::optional<double> errors; ///< (mean − factor)/standardError; none where that is 0 or not known
};
/// So many standard errors apart, samples and curve are said to disagree: by chance about one column in 370.
inline constexpr double samplesDisagreeFrom = 3.0;

/// What a random curve knows of the law of D(u), the discount factor that will have been realised from its
/// `asOf` to u.
class RandomDiscount {
  public:
    virtual ~RandomDiscount() = default;
    /// E[ln D(u)].
    [[nodiscard]] virtual double meanLog(Date u) const = 0;
    /// Var[ln D(u)] where it is known in closed form.
    [[nodiscard]] virtual std::optional<double> varianceLog(Date u) const = 0;
    /// The law of ln D(u); a fault `too-many-outcomes` where it can't be had.
    [[nodiscard]] virtual outcome::Outcome<LogLawPtr> law(Date u) const = 0;
    /// The bound of the quantiles' error, relative to the factor; 0 where they are exact but for rounding.
    [[nodiscard]] virtual double quantileError() const { return 0.0; }
    /// For a curve that is the mean of simulated paths: how many there are; else 0.
    [[nodiscard]] virtual long paths() const { return 0; }
    /// For such a curve: the standard error of Σ weights[i] · P(dates[i]), by the delta method over whole
    /// paths, so that the dates' common movement counts; nothing for the others and for a single path.
    [[nodiscard]] virtual std::optional<double> standardError(std::span<const Date> dates,
                                                              std::span<const double> weights) const;

    /// What makes paths of ln D through `dates`, which rise and are after `asOf`; that of `dates[target]` is
    /// to be known best. A fault `too-much-work` where there are so many parts and dates that memory would
    /// not hold them.
    [[nodiscard]] virtual outcome::Outcome<PathMakerPtr> pathMaker(std::span<const Date> dates,
                                                                   std::size_t target) const = 0;
    /// How far the mean of D(u) over such paths can be from P(u), relative to it, however many there are; 0
    /// where paths are exact.
    [[nodiscard]] virtual double pathBias() const { return 0.0; }
    /// The tree of the overnight rate, level by level from `asOf`, for a curve that moves at meetings; empty
    /// for the others, and where it has more than `mostRateLevels` levels at one of them.
    [[nodiscard]] virtual std::vector<RateLevels> rateTree() const { return {}; }
    /// For samples that were given a curve to be held against: each column beside it; else empty.
    [[nodiscard]] virtual std::vector<SampleColumn> againstCurve() const { return {}; }
    /// How the short rate moves, where it is normal.
    [[nodiscard]] virtual std::optional<NormalRate> normalRate() const { return std::nullopt; }

    /// Quantiles of D(u) at `probabilities` (rising, inside (0, 1)); a fault where they can't be had:
    /// `too-many-outcomes`, or `not-finite` where one is beyond what a number holds.
    [[nodiscard]] outcome::Outcome<std::vector<Quantile>>
    quantiles(Date u, std::span<const double> probabilities) const;
};

/// A tree of rates with more levels at one meeting shows nothing to anybody.
inline constexpr std::size_t mostRateLevels = 200;

/// The largest |ln P| that is accepted; e^±700 are the last whole hundreds that double precision holds in
/// full.
inline constexpr double largestLogFactor = 700.0;

/// An instrument that a curve was made from: its quote, and what the curve makes of it.
struct RepricedInstrument {
    std::string at; ///< `/items/2`
    std::string type;
    Date start;
    Date end;
    double quote = 0.0;
    double repriced = 0.0;
};

/// P(u): the value at `asOf` of one unit paid at u, the expectation under the pricing measure of the discount
/// factor D(u). P(asOf) = 1. Immutable; every u asked for is from `asOf` on. In curves t(u) is ACT/365.FIXED
/// years from `asOf`. ln P is never NaN, whatever the parameters. A factor outside e^±`largestLogFactor` is
/// refused by `review`, with the code `not-finite`: beyond it double precision ends.
class Curve {
  public:
    virtual ~Curve() = default;

    [[nodiscard]] Date asOf() const { return asOf_; }

    /// ln P(u). Finite wherever `review` of a date not before u has no fault.
    [[nodiscard]] virtual double logFactor(Date u) const = 0;
    /// P(u) = e^(ln P(u)).
    [[nodiscard]] double factor(Date u) const;

    /// The numbers the curve was made from, in the order of the request.
    [[nodiscard]] virtual std::vector<Parameter> parameters() const = 0;
    /// ∂ ln P(u) / ∂ parameter, exact, in the order of `parameters`; one-sided at the kinks of a monotone
    /// cubic.
    [[nodiscard]] virtual std::vector<double> logFactorGradient(Date u) const = 0;

    /// What stands against asking for factors up to `last`, and what the person should know of them (the
    /// curve's end passed).
    [[nodiscard]] virtual outcome::Review review(Date last) const = 0;

    /// How the curve is made, in plain words for the working: "3 pillars, zero rates annual ACT/365.FIXED,
    /// log-linear", "Vasicek model, expected discount factor". No number of it is repeated.
    [[nodiscard]] virtual std::string convention() const = 0;

    /// Of a curve made from instruments, each of them in the request's order; else empty.
    [[nodiscard]] virtual std::vector<RepricedInstrument> instruments() const { return {}; }

    /// Dates from which the forward rate may be another than the day before; none need be told where it
    /// changes smoothly.
    [[nodiscard]] virtual std::vector<Date> jumps() const { return {}; }

    /// What is known of D(u) where discounting is random; null where it is not.
    [[nodiscard]] virtual const RandomDiscount* random() const { return nullptr; }

  protected:
    explicit Curve(Date asOf) : asOf_(asOf) {}
    Curve(const Curve&) = default;
    Curve& operator=(const Curve&) = delete;

  private:
    Date asOf_;
};

using CurvePtr = std::shared_ptr<const Curve>;

} // namespace forwright::discounting
