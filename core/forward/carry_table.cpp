#include "forward/carry_table.hpp"

#include "numeric/elementary.hpp"

#include <algorithm>

namespace forwright::forward {
namespace {

bool separates(const discounting::Rate& rate) {
    if (rate.value == 0.0) {
        return true;
    }
    const dates::DayCount kind = rate.dayCount.kind;
    return rate.compounding != discounting::Compounding::simple &&
           (kind == dates::DayCount::act360 || kind == dates::DayCount::act365Fixed);
}

} // namespace

bool CarryTable::separates(const Market& market) {
    return (market.income.yieldCurves || forward::separates(market.income.yield)) &&
           forward::separates(market.lendingFee.bid) && forward::separates(market.lendingFee.offer);
}

CarryTable::CarryTable(const Market& market, const Schedule& longest, Side side)
    : holdFrom_(longest.holdFrom), spot_(longest.spot), yield_(market.income.yield),
      yieldCurve_(market.income.yieldCurves ? market.income.yieldCurves->on(side) : nullptr),
      fee_(feeOn(market.lendingFee, side)),
      grows_(yieldCurve_ != nullptr || yield_.value != 0.0 || fee_.value != 0.0), standings_{
                                                                                      {longest.holdFrom}} {
    const SideInputs inputs = inputsOf(market, longest, side);
    funding_ = inputs.funding;
    base_ = inputs.base;
    paid_ = inputs.spot * funding_->factor(spot_);

    const auto standingOn = [this](Date ex) -> Standing& {
        if (standings_.back().ex != ex) {
            Standing next = standings_.back();
            next.ex = ex;
            standings_.push_back(next);
        }
        return standings_.back();
    };
    auto reinvestment = inputs.units.reinvestments().begin();
    const auto lastReinvestment = inputs.units.reinvestments().end();
    const auto reinvestUpTo = [&](Date date) {
        for (; reinvestment != lastReinvestment && reinvestment->ex <= date; ++reinvestment) {
            standingOn(reinvestment->ex).kept *= reinvestment->kept;
        }
    };
    for (const std::size_t index : inputs.cashRows) {
        const income::CashDistribution& row = market.income.cash[index];
        reinvestUpTo(row.ex); // a proportional distribution of the same day is behind it
        Standing& standing = standingOn(row.ex);
        standing.received += market.income.passThroughOn(side, row) * row.amount.on(side) *
                             funding_->factor(row.pay) / (standing.kept * growth(row.ex));
    }
    reinvestUpTo(longest.maturity);
}

double CarryTable::growth(Date u) const {
    if (!grows_) {
        return 1.0;
    }
    const double yielded = yieldCurve_ == nullptr
                               ? discounting::logFactor(yield_, holdFrom_, u)
                               : yieldCurve_->logFactor(u) - yieldCurve_->logFactor(holdFrom_);
    return numeric::exp(yielded + discounting::logFactor(fee_, holdFrom_, u));
}

double CarryTable::forward(Date maturity, Date settlement) const {
    if (base_ != nullptr) {
        return paid_ * (base_->factor(settlement) / base_->factor(spot_)) / funding_->factor(settlement);
    }
    const auto later =
        std::upper_bound(standings_.begin(), standings_.end(), maturity,
                         [](Date date, const Standing& standing) { return date < standing.ex; });
    const Standing& standing = *std::prev(later);
    return standing.kept * growth(maturity) * (paid_ - standing.received) / funding_->factor(settlement);
}

} // namespace forwright::forward
