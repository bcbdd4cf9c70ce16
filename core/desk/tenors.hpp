#pragma once

#include "forward/quote.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <vector>

/// What a desk does with forwards beyond one quote.
namespace forwright::desk {

using dates::Date;
using income::TwoWay;

/// The fair forward of one maturity under moves of the market.
struct GridAsked {
    forward::Maturity maturity;
    std::vector<double> spot;    ///< relative moves of spot, above −1
    std::vector<double> funding; ///< parallel moves of funding's continuous zero rates
};
/// The same inquiry for several maturities; the maturity in `inquiry` is not read.
struct TenorsAsked {
    forward::Inquiry inquiry;
    std::vector<forward::Maturity> maturities;
    std::optional<GridAsked> grid;
};

struct TenorRow {
    Date maturity;
    Date settlement;
    double fair = 0.0;
    TwoWay<double> breakEven;
    std::optional<double> bid, offer; ///< the quote; none on a side not asked for
    double points = 0.0;
    double annualised = 0.0; ///< ln(F/S)/(t(T_s) − t(t_s))
};
struct Tenors {
    std::vector<TenorRow> rows; ///< as asked
    std::vector<std::vector<double>>
        grid; ///< rows by spot move, columns by funding move; empty where not asked for
    outcome::Notices notices;
};

/// How many prices times income rows one request may ask for, so that none takes minutes.
inline constexpr double mostWork = 2e7;

/// Every row, or every fault of every row; more work than `mostWork` is refused (`too-much-work`), as is a
/// grid cell that is no price.
[[nodiscard]] outcome::Outcome<Tenors> tenors(const forward::Market& market, const TenorsAsked& asked);

} // namespace forwright::desk
