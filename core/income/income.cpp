#include "income/income.hpp"

#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>

namespace forwright::income {

double Estimate::on(Side side) const {
    switch (side) {
    case Side::bid:
        return high;
    case Side::offer:
        return low;
    case Side::fair:
        break;
    }
    return amount;
}

const discounting::CurvePtr& YieldCurves::on(Side side) const {
    switch (side) {
    case Side::bid:
        return bid;
    case Side::offer:
        return offer;
    case Side::fair:
        break;
    }
    return fair;
}

namespace {

double sideOf(const TwoWay<double>& both, Side side) {
    switch (side) {
    case Side::bid:
        return both.bid;
    case Side::offer:
        return both.offer;
    case Side::fair:
        break;
    }
    return 0.5 * (both.bid + both.offer);
}

constexpr std::array<std::string_view, 3> treatmentNames{"in-price", "passed-through", "adjusts-contract"};

} // namespace

std::optional<Treatment> parseTreatment(std::string_view name) {
    const auto found = std::find(treatmentNames.begin(), treatmentNames.end(), name);
    return found == treatmentNames.end()
               ? std::nullopt
               : std::optional{static_cast<Treatment>(found - treatmentNames.begin())};
}

std::string_view nameOf(Treatment treatment) {
    return treatmentNames[static_cast<std::size_t>(treatment)];
}

double Income::passThroughOn(Side side) const {
    return sideOf(passThrough, side);
}

double Income::passThroughOn(Side side, const CashDistribution& row) const {
    return sideOf(row.passThrough.value_or(passThrough), side);
}

bool counts(Date ex, Date holdFrom, Date maturity) {
    return holdFrom < ex && ex <= maturity;
}

UnitsToHold::UnitsToHold(const Income& income, const Rate& fee, Side side, Date holdFrom, Date maturity)
    : yield_(income.yield), yieldCurve_(income.yieldCurves ? income.yieldCurves->on(side) : nullptr),
      fee_(fee), maturity_(maturity) {
    const double passed = income.passThroughOn(side);
    for (const ProportionalDistribution& row : income.proportional) {
        if (counts(row.ex, holdFrom, maturity)) {
            const double fraction = row.fraction.on(side);
            reinvestments_.push_back(
                {row.at, row.ex, fraction, (1.0 - fraction) / (1.0 - (1.0 - passed) * fraction)});
        }
    }
    std::stable_sort(reinvestments_.begin(), reinvestments_.end(),
                     [](const Reinvestment& one, const Reinvestment& other) { return one.ex < other.ex; });
    productFrom_.assign(reinvestments_.size() + 1, 1.0);
    for (std::size_t i = reinvestments_.size(); i-- > 0;) {
        productFrom_[i] = reinvestments_[i].kept * productFrom_[i + 1];
    }
}

double UnitsToHold::proportionalAfter(Date u) const {
    const auto later =
        std::upper_bound(reinvestments_.begin(), reinvestments_.end(), u,
                         [](Date date, const Reinvestment& reinvestment) { return date < reinvestment.ex; });
    return productFrom_[static_cast<std::size_t>(later - reinvestments_.begin())];
}

double UnitsToHold::after(Date u) const {
    return proportionalAfter(u) * yieldFactor(u) * feeFactor(u);
}

double UnitsToHold::yieldFactor(Date u) const {
    return numeric::exp(yieldCurve_ == nullptr
                            ? discounting::logFactor(yield_, u, maturity_)
                            : yieldCurve_->logFactor(maturity_) - yieldCurve_->logFactor(u));
}

double UnitsToHold::feeFactor(Date u) const {
    return numeric::exp(discounting::logFactor(fee_, u, maturity_));
}

double UnitsToHold::yieldSlope(Date u) const {
    return yieldCurve_ == nullptr ? discounting::logFactorSlope(yield_, u, maturity_)
                                  : -dates::years(u, maturity_);
}

double UnitsToHold::feeSlope(Date u) const {
    return discounting::logFactorSlope(fee_, u, maturity_);
}

} // namespace forwright::income
