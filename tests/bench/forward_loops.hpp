#pragma once

#include "discounting/curves.hpp"
#include "forward/carry_table.hpp"
#include "forward/price.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <string>
#include <utility>
#include <vector>

/// Many forwards on one market with shared curves, as the native and the module's benchmark both time them.
namespace forwright::bench {

inline constexpr long forwards = 100'000;
inline constexpr int dividends = 20;
inline constexpr int pillarCount = 20;
inline constexpr int lastDay = 3650;
inline const dates::Date today{std::chrono::year{2026} / std::chrono::December / 1};

/// Day and continuous zero rate of a pillar.
inline std::pair<int, double> pillarAt(int index) {
    return {lastDay * (index + 1) / pillarCount, 0.02 + 0.0005 * index};
}

/// Ex day, pay day and amount of a dividend.
struct Dividend {
    int ex, pay;
    double amount;
};
inline Dividend dividendAt(int index) {
    const int ex = lastDay * (index + 1) / (dividends + 1);
    return {ex, ex + 14, 0.5 + 0.01 * index};
}

inline int maturityAt(long index) {
    return 30 + static_cast<int>(index * 7919 % (lastDay - 60));
}

inline forward::Market sharedMarket() {
    forward::Market market;
    market.asOf = today;
    market.asset.currency = "EUR";
    market.asset.settlementLag = {{dates::earliest, 0}};
    market.spot = {100.0, 100.0};
    discounting::Pillars points;
    for (int index = 0; index < pillarCount; ++index) {
        const auto [day, rate] = pillarAt(index);
        points.pillars.push_back({today + std::chrono::days{day}, rate});
    }
    market.funding.curve = discounting::pillars(today, points).value();
    market.discount = market.funding.curve;
    for (int index = 0; index < dividends; ++index) {
        const Dividend dividend = dividendAt(index);
        market.income.cash.push_back({"",
                                      today + std::chrono::days{dividend.ex},
                                      today + std::chrono::days{dividend.pay},
                                      {dividend.amount, dividend.amount, dividend.amount}});
    }
    return market;
}

/// The sum of all forwards by the table that the carry path is drawn with; making the table counts.
inline double batch() {
    static const forward::Market market = sharedMarket();
    forward::Schedule longest;
    longest.asOf = longest.spot = longest.holdFrom = today;
    longest.maturity = longest.settlement = today + std::chrono::days{lastDay};
    const forward::CarryTable table(market, longest, forward::Side::fair);
    double sum = 0.0;
    for (long index = 0; index < forwards; ++index) {
        const dates::Date maturity = today + std::chrono::days{maturityAt(index)};
        sum += table.forward(maturity, maturity);
    }
    return sum;
}

/// The same by a loop over the dividends of each forward, with a binary search and an exp for each look-up.
inline double batchPlain() {
    struct Point {
        double years, logFactor;
    };
    static const std::vector<Point> points = [] {
        std::vector<Point> made{{0.0, 0.0}};
        for (int index = 0; index < pillarCount; ++index) {
            const auto [day, rate] = pillarAt(index);
            made.push_back({day / 365.0, -rate * day / 365.0});
        }
        return made;
    }();
    const auto factor = [&](int day) {
        const double years = day / 365.0;
        auto right = std::upper_bound(points.begin(), points.end(), years,
                                      [](double at, const Point& point) { return at < point.years; });
        right = right == points.end() ? std::prev(right) : right;
        const Point& high = *right;
        const Point& low = *std::prev(right);
        const double share = (years - low.years) / (high.years - low.years);
        return std::exp(low.logFactor + share * (high.logFactor - low.logFactor));
    };
    double sum = 0.0;
    for (long index = 0; index < forwards; ++index) {
        const int maturity = maturityAt(index);
        double value = 100.0;
        for (int row = 0; row < dividends; ++row) {
            const Dividend dividend = dividendAt(row);
            if (dividend.ex <= maturity) {
                value -= dividend.amount * factor(dividend.pay);
            }
        }
        sum += value / factor(maturity);
    }
    return sum;
}

} // namespace forwright::bench
