#include "discounting/mean_reversion.hpp"

#include "discounting/decay.hpp"

namespace forwright::discounting {

double reversionTime(double meanReversion, double years) {
    return years * detail::decayMean(meanReversion * years);
}

double reversionGap(double meanReversion, double years) {
    return years * years * detail::decayGap(meanReversion * years);
}

double integralVariance(double meanReversion, double volatility, double years) {
    return volatility * volatility * years * years * years * detail::decayVariance(meanReversion * years);
}

} // namespace forwright::discounting
