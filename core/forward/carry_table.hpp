#pragma once

#include "forward/price.hpp"

#include <vector>

namespace forwright::forward {

/// One side of one market made ready for many maturities. With M(T) = n(h) for maturity T, n(u) for that
/// maturity is M(T)/M(u), so
///     F(T) = M(T) · [ S·P(t_s) − Σ_{ex ≤ T} g·c·P(pay)/M(ex) ] / P(T_s)
/// and the sum is a prefix sum that is made once: a forward then costs two searches and one factor instead of
/// one factor a distribution. Agrees with `price` to 1e-12 of spot and discounted income; see `separates` for
/// where it can be used.
class CarryTable {
  public:
    /// `longest` is the schedule of the last maturity that will be asked for; all share its spot date and
    /// start of the hedge.
    CarryTable(const Market& market, const Schedule& longest, Side side);

    /// The side's forward for a maturity from the start of the hedge to the longest, settled on `settlement`.
    [[nodiscard]] double forward(Date maturity, Date settlement) const;

    /// Whether n(u) splits as M(T)/M(u): yield and fee are continuous or compounded on a day count that adds
    /// up (ACT/360, ACT/365.FIXED), or 0.
    [[nodiscard]] static bool separates(const Market& market);

  private:
    /// What stands after the distributions of one day.
    struct Standing {
        Date ex;
        double kept = 1.0;     ///< ∏ (1 − δ)/(1 − (1 − g)δ) so far
        double received = 0.0; ///< Σ g·c·P(pay)/M(ex) so far
    };
    [[nodiscard]] double growth(Date u) const;

    Date holdFrom_;
    Date spot_;
    discounting::Rate yield_;
    CurvePtr yieldCurve_; ///< in its place, where there is one
    discounting::Rate fee_;
    bool grows_ = false; ///< yield or fee is not 0
    CurvePtr funding_;
    CurvePtr base_;
    double paid_ = 0.0;               ///< S·P(t_s)
    std::vector<Standing> standings_; ///< by ex date, the first before all
};

} // namespace forwright::forward
