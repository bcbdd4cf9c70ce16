#include "desk/futures.hpp"

#include "discounting/mean_reversion.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <cmath>

namespace forwright::desk {
namespace {

using forward::Market;

outcome::Outcome<FuturesRow> rowOf(const Market& market, const FuturesAsked& asked,
                                   const discounting::NormalRate& rate, std::size_t index,
                                   outcome::Notices& notices) {
    const auto schedule = forward::schedule(market, asked.maturities[index], asked.places[index]);
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
    FuturesRow row;
    row.schedule = schedule.value();
    row.forward = price.value().forward;
    const double years = dates::years(market.asOf, row.schedule.settlement);
    row.covariance = asked.correlation * asked.volatility * rate.volatility *
                     discounting::reversionGap(rate.meanReversion, years);
    row.convexity = discounting::integralVariance(rate.meanReversion, rate.volatility, years);
    row.ratio = numeric::exp(row.covariance + row.convexity);
    row.futures = row.forward * row.ratio;
    row.difference = row.forward * numeric::expm1(row.covariance + row.convexity);
    row.covarianceInPrice = row.forward * numeric::expm1(row.covariance);
    row.convexityInPrice = row.forward * numeric::exp(row.covariance) * numeric::expm1(row.convexity);
    row.onQuantity = asked.quantity * row.difference;
    if (!std::isfinite(row.futures) || !std::isfinite(row.onQuantity) ||
        !std::isfinite(row.covarianceInPrice) || !std::isfinite(row.convexityInPrice)) {
        return outcome::Fault{
            asked.places[index], "not-finite",
            "The futures price is too large to be a number: volatilities this high over so long a time "
            "give no price."};
    }
    outcome::append(notices, "", std::move(found.notices));
    if (!price.value().cash.empty()) {
        notices.push_back(
            {market.at + "/income/cash", "cash-income",
             "The ratio of futures to forward holds for the asset without its fixed cash distributions; with "
             "them it is near, as they are small beside the price."});
    }
    return row;
}

void keepOnce(outcome::Notices& notices) {
    outcome::Notices kept;
    for (outcome::Notice& notice : notices) {
        const bool known = std::any_of(kept.begin(), kept.end(), [&](const outcome::Notice& had) {
            return had.at == notice.at && had.code == notice.code && had.message == notice.message;
        });
        if (!known) {
            kept.push_back(std::move(notice));
        }
    }
    notices = std::move(kept);
}

} // namespace

outcome::Outcome<Futures> futures(const Market& market, const FuturesAsked& asked) {
    discounting::NormalRate rate;
    if (const discounting::RandomDiscount* random = market.funding.curve->random(); random != nullptr) {
        const auto normal = random->normalRate();
        if (!normal) {
            return outcome::Fault{
                market.at + "/funding/curve", "no-closed-form",
                "Futures are priced where funding is Vasicek, Ho–Lee or Hull–White, or not random: for "
                "other random curves there is no closed form."};
        }
        rate = *normal;
    }
    Futures result;
    outcome::Faults faults;
    for (std::size_t i = 0; i < asked.maturities.size(); ++i) {
        outcome::Outcome<FuturesRow> row = rowOf(market, asked, rate, i, result.notices);
        if (row) {
            result.rows.push_back(std::move(row).value());
        } else {
            outcome::append(faults, "", row.faults());
        }
    }
    if (!faults.empty()) {
        keepOnce(faults);
        return faults;
    }
    keepOnce(result.notices);
    return result;
}

} // namespace forwright::desk
