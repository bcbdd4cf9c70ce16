#include "discounting/curve.hpp"

#include "dates/date.hpp"
#include "numeric/elementary.hpp"

#include <cmath>

namespace forwright::discounting {

std::optional<double> RandomDiscount::standardError(std::span<const Date> /*dates*/,
                                                    std::span<const double> /*weights*/) const {
    return std::nullopt;
}

outcome::Outcome<std::vector<Quantile>>
RandomDiscount::quantiles(Date u, std::span<const double> probabilities) const {
    const outcome::Outcome<LogLawPtr> known = law(u);
    if (!known.ok()) {
        return known.faults();
    }
    std::vector<Quantile> result;
    result.reserve(probabilities.size());
    for (const double probability : probabilities) {
        const double factor = numeric::exp(known.value()->quantile(probability));
        if (!std::isfinite(factor) || factor <= 0.0) {
            return outcome::Fault{
                "", "not-finite",
                "A quantile of the discount factor for " + dates::toIso(u) +
                    " is beyond what a number holds; use a smaller volatility or a nearer date."};
        }
        result.push_back({probability, factor});
    }
    return result;
}

double Curve::factor(Date u) const {
    return numeric::exp(logFactor(u));
}

} // namespace forwright::discounting
