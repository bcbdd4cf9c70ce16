#pragma once

#include "dates/date.hpp"
#include "discounting/curve.hpp"
#include "discounting/rate.hpp"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// What an asset pays or costs while it is held, and so how many units must be held to end with one.
namespace forwright::income {

using dates::Date;
using discounting::Rate;

/// A bid and an offer of the same thing.
template <class T> struct TwoWay {
    T bid{};
    T offer{};
};

/// A side of the price: the middle that nobody deals at, what the dealer buys at and what the dealer sells
/// at.
enum class Side { fair, bid, offer };

/// An amount a unit, known between bounds: low ≤ amount ≤ high.
struct Estimate {
    double amount = 0.0;
    double low = 0.0;
    double high = 0.0;
    /// What a side reckons with: the fair price the amount; who sells forward holds the asset and reckons
    /// with the low end, who buys forward is short of it and reckons with the high one.
    [[nodiscard]] double on(Side side) const;
};

/// What becomes of a distribution under the forward.
enum class Treatment {
    inPrice,         ///< taken off the price that is agreed
    passedThrough,   ///< paid on to the client when it is paid, and so not in the price
    adjustsContract, ///< the contract's terms are changed on the ex date, and so not in the price
};
[[nodiscard]] std::optional<Treatment>
parseTreatment(std::string_view name); ///< `in-price`, `passed-through`, `adjusts-contract`
[[nodiscard]] std::string_view nameOf(Treatment treatment);

/// An amount as it was given, in another currency.
struct GivenAmount {
    double amount = 0.0;
    std::string currency;
    double forwardRate = 1.0; ///< quote currency for one of it, on the day of payment
};

/// A distribution in money; negative for a cost (storage, insurance).
struct CashDistribution {
    std::string at;  ///< pointer of its row in the request
    Date ex;         ///< who holds before this date is paid
    Date pay;        ///< not before `ex`
    Estimate amount; ///< quote currency a unit
    Treatment treatment = Treatment::inPrice;
    std::optional<bool> estimated{}; ///< whether it is an estimate or declared, where that is said
    bool special = false;            ///< out of the ordinary
    std::optional<TwoWay<double>> passThrough{}; ///< its own share, in place of the income's
    std::optional<GivenAmount> given{}; ///< what `amount` was made from, where it is another currency's
};

/// A distribution that is a fraction of the price, −1 to 1 exclusive.
struct ProportionalDistribution {
    std::string at;
    Date ex;
    Estimate fraction;
};

/// A yield that differs by date, one curve a side: from u to T it comes to P_y(T)/P_y(u).
struct YieldCurves {
    discounting::CurvePtr fair, bid, offer;
    [[nodiscard]] const discounting::CurvePtr& on(Side side) const;
};

struct Income {
    std::vector<CashDistribution> cash;                 ///< as the request has them, in any order
    std::vector<ProportionalDistribution> proportional; ///< likewise
    Rate yield;                                         ///< paid in the asset all the time
    std::optional<YieldCurves> yieldCurves; ///< in its place, where it is implied by quoted forwards
    TwoWay<double> passThrough{
        1.0, 1.0}; ///< share of a distribution that reaches (offer) or is owed by (bid) the hedge
    /// The share for a side; the fair price takes the mean of the two.
    [[nodiscard]] double passThroughOn(Side side) const;
    /// The share of one distribution, which may have its own.
    [[nodiscard]] double passThroughOn(Side side, const CashDistribution& row) const;
};

/// Whether a distribution falls to who holds from `holdFrom` to `maturity`: holdFrom < ex ≤ maturity.
[[nodiscard]] bool counts(Date ex, Date holdFrom, Date maturity);

/// The units that must be held from any date on so that exactly one is held at maturity:
///     n(u) = ∏_{u < ex_j ≤ T} (1 − δ_j)/(1 − (1−g)δ_j) · Y(u,T) · L(u,T)
/// with δ the proportional distributions of the side, g their pass-through, Y and L the factors of yield and
/// lending fee. Each distribution that passes is reinvested at the price without it. n(T) = 1.
class UnitsToHold {
  public:
    /// What one proportional distribution does on its date.
    struct Reinvestment {
        std::string at;
        Date ex;
        double fraction = 0.0; ///< δ
        double kept = 1.0;     ///< (1 − δ)/(1 − (1−g)δ): the units before it for one after it
    };

    UnitsToHold(const Income& income, const Rate& fee, Side side, Date holdFrom, Date maturity);

    /// n(u), taken just after the distributions of u itself; u from `holdFrom` to `maturity`.
    [[nodiscard]] double after(Date u) const;
    /// ∏ (1 − δ)/(1 − (1−g)δ) over u < ex ≤ T alone.
    [[nodiscard]] double proportionalAfter(Date u) const;
    /// Y(u, T) and L(u, T) alone, and the derivatives of their logarithms by the rate (of a yield curve: by a
    /// move of all its continuous zero rates alike).
    [[nodiscard]] double yieldFactor(Date u) const;
    [[nodiscard]] double feeFactor(Date u) const;
    [[nodiscard]] double yieldSlope(Date u) const;
    [[nodiscard]] double feeSlope(Date u) const;
    /// The distributions that count, holdFrom < ex ≤ maturity, by date (those of one date in the request's
    /// order).
    [[nodiscard]] const std::vector<Reinvestment>& reinvestments() const { return reinvestments_; }

  private:
    std::vector<Reinvestment> reinvestments_;
    std::vector<double>
        productFrom_; ///< productFrom_[i]: ∏ kept over reinvestments i, i+1, …; one more entry, 1
    Rate yield_;
    discounting::CurvePtr yieldCurve_; ///< in its place, where there is one
    Rate fee_;
    Date maturity_;
};

} // namespace forwright::income
