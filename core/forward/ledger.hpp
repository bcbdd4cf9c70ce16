#pragma once

#include "forward/price.hpp"

#include <string>
#include <vector>

namespace forwright::forward {

/// One entry of the cash-and-carry.
struct LedgerRow {
    Date date;
    std::string code;     ///< `buy`, `sell-short`, `pay-for-units`, `proceeds-of-sale`, `yield-and-fee`,
                          ///< `proportional`, `distribution`, `receivable`, `interest`, `deposit-base`,
                          ///< `borrow-base`, `repay-base`, `delivery`
    std::string text;     ///< in plain words
    double units = 0.0;   ///< bought (+) or sold (−)
    double held = 0.0;    ///< units after the entry
    double cash = 0.0;    ///< received (+) or paid (−)
    double balance = 0.0; ///< cash account after the entry; below zero it is borrowed
};

/// What the dealer does today and until settlement so that one forward at `forward` leaves nothing over: who
/// sells it (offer, and fair at mid prices) buys the units and borrows; who buys it (bid) sells them short
/// and lends.
struct Ledger {
    Side side = Side::fair;
    double forward = 0.0; ///< the price that it makes
    std::vector<LedgerRow> rows;
    double obligation = 0.0;   ///< units to deliver (+1) or to take (−1)
    double closingUnits = 0.0; ///< held before delivery; equals the obligation
    double closingCash = 0.0;  ///< after delivery is paid; 0 to within 1e-9·S
};
/// The balance is carried from date to date at P(u)/P(v) of the side's own funding; income paid after
/// settlement enters as what it is worth then.
[[nodiscard]] Ledger ledger(const Market& market, const Schedule& schedule, const SideInputs& inputs,
                            const Price& price);

} // namespace forwright::forward
