#include "desk/tenors.hpp"

#include "discounting/curves.hpp"

#include <algorithm>
#include <string>

namespace forwright::desk {
namespace {

using forward::Market;
using forward::Side;

TenorRow rowOf(const forward::Quote& quote) {
    return {quote.schedule.maturity,
            quote.schedule.settlement,
            quote.fair.forward,
            {quote.bid.forward, quote.offer.forward},
            quote.quotedBid,
            quote.quotedOffer,
            quote.fair.forward - quote.fair.spot,
            quote.annualised};
}

/// The same remark made of the market for every maturity is made once.
void addOnce(outcome::Notices& all, const outcome::Notices& more) {
    for (const outcome::Notice& notice : more) {
        const bool known = std::any_of(all.begin(), all.end(), [&notice](const outcome::Notice& had) {
            return had.at == notice.at && had.code == notice.code && had.message == notice.message;
        });
        if (!known) {
            all.push_back(notice);
        }
    }
}

Market moved(const Market& market, double spotMove, double fundingMove) {
    Market result = market;
    result.spot = {market.spot.bid * (1.0 + spotMove), market.spot.offer * (1.0 + spotMove)};
    result.funding.curve = discounting::withSpread(market.funding.curve, fundingMove);
    return result;
}

outcome::Outcome<std::vector<std::vector<double>>> gridOf(const Market& market, const GridAsked& asked) {
    const outcome::Outcome<forward::Schedule> schedule =
        forward::schedule(market, asked.maturity, "/grid/maturity");
    if (!schedule) {
        return schedule.faults();
    }
    outcome::Review found = forward::review(market, schedule.value());
    if (!found.faults.empty()) {
        return found.faults;
    }
    std::vector<std::vector<double>> grid;
    for (std::size_t i = 0; i < asked.spot.size(); ++i) {
        std::vector<double>& row = grid.emplace_back();
        for (std::size_t j = 0; j < asked.funding.size(); ++j) {
            const Market there = moved(market, asked.spot[i], asked.funding[j]);
            const outcome::Outcome<forward::Price> price =
                forward::checked(there, forward::price(there, schedule.value(), Side::fair), Side::fair);
            if (!price) {
                const outcome::Fault why = price.faults().front();
                return outcome::Fault{"/grid/spot/" + std::to_string(i), why.code,
                                      "With funding moved by entry " + std::to_string(j) + ": " +
                                          why.message};
            }
            row.push_back(price.value().forward);
        }
    }
    return grid;
}

double workOf(const Market& market, const TenorsAsked& asked) {
    const double rows =
        10.0 + static_cast<double>(market.income.cash.size() + market.income.proportional.size());
    const double cells = asked.grid ? static_cast<double>(asked.grid->spot.size()) *
                                          static_cast<double>(asked.grid->funding.size())
                                    : 0.0;
    return rows * (3.0 * static_cast<double>(asked.maturities.size()) + cells);
}

} // namespace

outcome::Outcome<Tenors> tenors(const Market& market, const TenorsAsked& asked) {
    if (workOf(market, asked) > mostWork) {
        return outcome::Fault{"", "too-much-work",
                              "So many maturities or grid cells over so many income rows take too long: ask "
                              "for fewer at a time"};
    }
    Tenors result;
    outcome::Faults faults;
    for (std::size_t i = 0; i < asked.maturities.size(); ++i) {
        forward::Inquiry inquiry = asked.inquiry;
        inquiry.maturity = asked.maturities[i];
        const forward::Places places{"/maturities/" + std::to_string(i), "/inquiry/margin"};
        const outcome::Outcome<forward::Quote> quote = forward::quote(market, inquiry, false, places);
        if (quote) {
            result.rows.push_back(rowOf(quote.value()));
            addOnce(result.notices, quote.value().notices);
        } else {
            addOnce(faults, quote.faults());
        }
    }
    if (asked.grid) {
        outcome::Outcome<std::vector<std::vector<double>>> grid = gridOf(market, *asked.grid);
        if (grid) {
            result.grid = std::move(grid).value();
        } else {
            addOnce(faults, grid.faults());
        }
    }
    if (!faults.empty()) {
        return faults;
    }
    return result;
}

} // namespace forwright::desk
