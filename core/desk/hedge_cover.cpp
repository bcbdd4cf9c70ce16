#include "desk/hedge_cover.hpp"

#include "numeric/elementary.hpp"
#include "numeric/normal.hpp"

#include <array>
#include <cmath>

namespace forwright::desk {
namespace {

constexpr std::array probabilities{0.01, 0.05, 0.25, 0.50, 0.75, 0.95, 0.99};

/// The price itself at maturity: lognormal.
struct PriceLaw {
    double mean = 0.0;
    double logDeviation = 0.0; ///< s√t

    [[nodiscard]] double deviation() const {
        return mean * std::sqrt(numeric::expm1(logDeviation * logDeviation));
    }
    [[nodiscard]] double quantile(double probability) const {
        return mean *
               numeric::exp(logDeviation * (numeric::normalQuantile(probability) - logDeviation / 2.0));
    }
    /// P(price < level); there is a deviation.
    [[nodiscard]] double probabilityBelow(double level) const {
        if (level <= 0.0) {
            return 0.0;
        }
        return numeric::normalProbability(numeric::log(level / mean) / logDeviation + logDeviation / 2.0);
    }
    /// P(price > level); there is a deviation.
    [[nodiscard]] double probabilityAbove(double level) const {
        if (level <= 0.0) {
            return 1.0;
        }
        return numeric::normalProbability(-(numeric::log(level / mean) / logDeviation + logDeviation / 2.0));
    }
};

CoverAt coverAt(double share, double fair, const PriceLaw& law, double loading) {
    const double open = 1.0 - share;
    CoverAt cover;
    cover.share = share;
    if (open == 0.0) {
        cover.sell = fair;
        cover.buy = fair;
    } else {
        cover.deviation = open * law.deviation();
        const double middle = fair + open * (law.mean - fair);
        cover.sell = middle + loading * cover.deviation;
        const double buy = middle - loading * cover.deviation;
        if (buy > 0.0) {
            cover.buy = buy;
        }
    }
    for (const double probability : probabilities) {
        // Sold, the result falls as the price rises; bought, it rises with it.
        const double left = open == 0.0 ? 0.0 : open * (fair - law.quantile(1.0 - probability));
        cover.quantiles.push_back({probability, (cover.sell - fair) + left});
        if (cover.buy) {
            const double gained = open == 0.0 ? 0.0 : open * (law.quantile(probability) - fair);
            cover.buyQuantiles.push_back({probability, (fair - *cover.buy) + gained});
        }
    }
    // Without a deviation the result is zero for certain, which is no loss.
    if (cover.deviation == 0.0) {
        cover.buyLossProbability = 0.0;
        return cover;
    }
    // Where the result is zero the price stands so far from F that the charge is used up.
    cover.lossProbability = law.probabilityAbove(fair + (cover.sell - fair) / open);
    if (cover.buy) {
        cover.buyLossProbability = law.probabilityBelow(fair - (fair - *cover.buy) / open);
    }
    return cover;
}

bool isFinite(const CoverAt& cover) {
    return std::isfinite(cover.deviation) && std::isfinite(cover.sell) &&
           std::isfinite(cover.quantiles.front().result) && std::isfinite(cover.quantiles.back().result);
}

} // namespace

outcome::Outcome<HedgeCover> hedgeCover(const forward::Market& market, const HedgeCoverAsked& asked) {
    const auto schedule = forward::schedule(market, asked.maturity, "/maturity");
    if (!schedule) {
        return schedule.faults();
    }
    outcome::Review found = forward::review(market, schedule.value());
    if (!found.faults.empty()) {
        return found.faults;
    }
    const auto price = forward::checked(market, forward::price(market, schedule.value(), forward::Side::fair),
                                        forward::Side::fair);
    if (!price) {
        return price.faults();
    }
    HedgeCover result;
    result.schedule = schedule.value();
    result.notices = std::move(found.notices);
    result.fair = price.value().forward;
    const double years = dates::years(market.asOf, result.schedule.maturity);
    const PriceLaw law{forward::mid(market.spot) * numeric::exp(asked.growth * years),
                       asked.volatility * std::sqrt(years)};
    result.expected = law.mean;
    result.asked = coverAt(asked.share, result.fair, law, asked.loading);
    bool finite = std::isfinite(law.mean) && isFinite(result.asked);
    for (const double share : asked.shares) {
        result.shares.push_back(coverAt(share, result.fair, law, asked.loading));
        finite = finite && isFinite(result.shares.back());
    }
    if (!finite) {
        return outcome::Fault{
            "", "not-finite",
            "Growth and volatility this high over so long a time give no number: take them smaller, or a "
            "nearer maturity."};
    }
    result.onQuantity.sell = asked.quantity * (result.asked.sell - result.fair);
    result.onQuantity.deviation = asked.quantity * result.asked.deviation;
    if (result.asked.buy) {
        result.onQuantity.buy = asked.quantity * (result.fair - *result.asked.buy);
    }
    if (!std::isfinite(result.onQuantity.sell) || !std::isfinite(result.onQuantity.deviation)) {
        return outcome::Fault{
            "/quantity", "not-finite",
            "On this quantity the figures are too large to be numbers: take a smaller one."};
    }
    if (!result.asked.buy) {
        return outcome::Fault{
            "/loading", "not-a-price",
            "With this loading the dealer would buy at no price above zero: take a smaller one, or a "
            "larger hedged share."};
    }
    return result;
}

} // namespace forwright::desk
