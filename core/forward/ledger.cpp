#include "forward/ledger.hpp"

#include <algorithm>
#include <string>

namespace forwright::forward {
namespace {

/// Something that happens on a date, before interest is known.
struct Entry {
    Date date;
    const char* code;
    std::string text;
    double units = 0.0;
    double cash = 0.0;
};

/// Collects what the side does; +1 where it is long of the asset, −1 where it is short.
class Diary {
  public:
    Diary(const Market& market, const Schedule& schedule, const SideInputs& inputs, const Price& price)
        : market_(market), schedule_(schedule), inputs_(inputs), price_(price),
          sign_(inputs.side == Side::bid ? -1.0 : 1.0) {}

    [[nodiscard]] double sign() const { return sign_; }
    [[nodiscard]] bool isLong() const { return sign_ > 0.0; }

    /// Everything up to delivery but interest, in the order of its dates.
    [[nodiscard]] std::vector<Entry> entries() && {
        deal();
        if (market_.base && schedule_.settlement < schedule_.spot) {
            bridge();
        } else if (market_.base) {
            accrue(schedule_.settlement, 1.0, "deposit-base",
                   isLong() ? "interest on the base currency deposited"
                            : "interest owed on the base currency borrowed");
        } else {
            grow();
        }
        for (const CashInPrice& cash : price_.cash) {
            distribute(cash);
        }
        std::stable_sort(entries_.begin(), entries_.end(),
                         [](const Entry& one, const Entry& other) { return one.date < other.date; });
        return std::move(entries_);
    }

  private:
    void deal() {
        entries_.push_back({schedule_.holdFrom, isLong() ? "buy" : "sell-short",
                            isLong() ? "buy the units to hold" : "borrow the units and sell them",
                            sign_ * price_.units, 0.0});
        entries_.push_back({schedule_.spot, isLong() ? "pay-for-units" : "proceeds-of-sale",
                            isLong() ? "pay for the units, with borrowed money"
                                     : "receive the price of the units and lend it",
                            0.0, -sign_ * price_.units * price_.spot});
        held_ = price_.units;
    }

    /// A delivery before the spot date: the unit is borrowed for it, or lent from it, and comes back out of
    /// what is dealt for spot.
    void bridge() {
        entries_.push_back(
            {schedule_.settlement, "borrow-base",
             isLong() ? "borrow the unit until the spot date" : "lend the unit until the spot date", sign_,
             0.0});
        entries_.push_back(
            {schedule_.spot, "repay-base",
             isLong() ? "repay the unit with its interest" : "the unit comes back with its interest",
             -sign_ * price_.units, 0.0});
    }

    /// Units come to `target` by `date`, whatever they were.
    void accrue(Date date, double target, const char* code, const std::string& text) {
        if (target != held_) {
            entries_.push_back({date, code, text, sign_ * (target - held_), 0.0});
            held_ = target;
        }
    }

    void grow() {
        const std::string accrued = isLong() ? "yield and lending fee received, reinvested in units"
                                             : "yield and lending fee owed, in units";
        const auto& reinvestments = inputs_.units.reinvestments();
        for (std::size_t i = 0; i < reinvestments.size(); ++i) {
            // Distributions of one day follow one another: after this one, the later ones of the day are
            // still to come.
            double after = inputs_.units.after(reinvestments[i].ex);
            for (std::size_t later = reinvestments.size(); --later > i;) {
                if (reinvestments[later].ex == reinvestments[i].ex) {
                    after = reinvestments[later].kept * after;
                }
            }
            accrue(reinvestments[i].ex, reinvestments[i].kept * after, "yield-and-fee", accrued);
            accrue(reinvestments[i].ex, after, "proportional",
                   isLong() ? "distribution received, reinvested in units" : "distribution owed, in units");
        }
        accrue(schedule_.maturity, 1.0, "yield-and-fee", accrued);
    }

    void distribute(const CashInPrice& cash) {
        const Date pay = market_.income.cash[cash.row].pay;
        const double amount = sign_ * cash.passed * cash.units;
        if (pay <= schedule_.settlement) {
            entries_.push_back(
                {pay, "distribution",
                 isLong() ? "distribution received" : "distribution owed to the lender of the units", 0.0,
                 amount});
        } else {
            entries_.push_back({schedule_.settlement, "receivable",
                                isLong() ? "distribution still to come, sold for what it is worth now"
                                         : "distribution still to pay, settled for what it is worth now",
                                0.0, amount * cash.factor / price_.settlementFactor});
        }
    }

    const Market& market_;
    const Schedule& schedule_;
    const SideInputs& inputs_;
    const Price& price_;
    double sign_;
    double held_ = 0.0;
    std::vector<Entry> entries_;
};

} // namespace

Ledger ledger(const Market& market, const Schedule& schedule, const SideInputs& inputs, const Price& price) {
    Diary diary(market, schedule, inputs, price);
    const double sign = diary.sign();
    const bool isLong = diary.isLong();

    Ledger ledger;
    ledger.side = inputs.side;
    ledger.forward = price.forward;
    ledger.obligation = sign;

    double held = 0.0;
    double balance = 0.0;
    Date carriedTo = schedule.asOf;
    const auto record = [&](const Entry& entry) {
        held += entry.units;
        balance += entry.cash;
        ledger.rows.push_back({entry.date, entry.code, entry.text, entry.units, held, entry.cash, balance});
    };
    const auto carryTo = [&](Date date) {
        if (balance != 0.0 && date > carriedTo) {
            const double interest =
                balance * (inputs.funding->factor(carriedTo) / inputs.funding->factor(date) - 1.0);
            if (interest != 0.0) {
                record({date, "interest",
                        balance < 0.0 ? "interest on what is borrowed" : "interest on what is lent", 0.0,
                        interest});
            }
        }
        carriedTo = std::max(carriedTo, date);
    };

    std::vector<Entry> entries = std::move(diary).entries();
    const Entry delivery{schedule.settlement, "delivery",
                         isLong ? "deliver one unit, receive the forward price"
                                : "take one unit, pay the forward price",
                         -sign, sign * price.forward};
    // Delivery comes after everything of its day; what is paid later still (a lag that shortens) follows it.
    const auto afterDelivery =
        std::upper_bound(entries.begin(), entries.end(), schedule.settlement,
                         [](Date date, const Entry& entry) { return date < entry.date; });
    entries.insert(afterDelivery, delivery);
    for (const Entry& entry : entries) {
        if (entry.code == delivery.code) {
            ledger.closingUnits = held;
        }
        if (entry.cash != 0.0) {
            carryTo(entry.date);
        }
        record(entry);
    }
    ledger.closingCash = balance;
    return ledger;
}

} // namespace forwright::forward
