#include "numeric/normal.hpp"

#include "numeric/elementary.hpp"

#include <array>
#include <cmath>

namespace forwright::numeric {

namespace {

constexpr double inverseRootOfTwoPi = 0.398942280401432677939946;

double density(double z) {
    return inverseRootOfTwoPi * exp(-0.5 * z * z);
}

/// Φ(z) − ½ = φ(z)·(z + z³/3 + z⁵/(3·5) + …): terms of one sign.
double centralPart(double z) {
    const double square = z * z;
    double term = z;
    double sum = z;
    for (double odd = 3.0; std::fabs(term) > 1e-17 * std::fabs(sum); odd += 2.0) {
        term *= square / odd;
        sum += term;
    }
    return density(z) * sum;
}

/// 1 − Φ(z) for z ≥ 3: φ(z)/(z + 1/(z + 2/(z + 3/(z + …)))), 60 levels deep.
double tail(double z) {
    double below = z;
    for (double level = 60.0; level >= 1.0; level -= 1.0) {
        below = z + level / below;
    }
    return density(z) / below;
}

/// (a₀ + a₁x + …)/(1 + b₁x + …)
double rational(const std::array<double, 8>& above, const std::array<double, 8>& below, double x) {
    double numerator = above[7];
    double denominator = below[7];
    for (std::size_t i = 7; i-- > 0;) {
        numerator = numerator * x + above[i];
        denominator = denominator * x + below[i];
    }
    return numerator / denominator;
}

// The coefficients of PPND16 as printed in the paper.
constexpr std::array<double, 8> centralAbove{
    3.3871328727963666080e0,  1.3314166789178437745e+2, 1.9715909503065514427e+3, 1.3731693765509461125e+4,
    4.5921953931549871457e+4, 6.7265770927008700853e+4, 3.3430575583588128105e+4, 2.5090809287301226727e+3};
constexpr std::array<double, 8> centralBelow{1.0,
                                             4.2313330701600911252e+1,
                                             6.8718700749205790830e+2,
                                             5.3941960214247511077e+3,
                                             2.1213794301586595867e+4,
                                             3.9307895800092710610e+4,
                                             2.8729085735721942674e+4,
                                             5.2264952788528545610e+3};
constexpr std::array<double, 8> nearTailAbove{1.42343711074968357734e0,  4.63033784615654529590e0,
                                              5.76949722146069140550e0,  3.64784832476320460504e0,
                                              1.27045825245236838258e0,  2.41780725177450611770e-1,
                                              2.27238449892691845833e-2, 7.74545014278341407640e-4};
constexpr std::array<double, 8> nearTailBelow{1.0,
                                              2.05319162663775882187e0,
                                              1.67638483018380384940e0,
                                              6.89767334985100004550e-1,
                                              1.48103976427480074590e-1,
                                              1.51986665636164571966e-2,
                                              5.47593808499534494600e-4,
                                              1.05075007164441684324e-9};
constexpr std::array<double, 8> farTailAbove{6.65790464350110377720e0,  5.46378491116411436990e0,
                                             1.78482653991729133580e0,  2.96560571828504891230e-1,
                                             2.65321895265761230930e-2, 1.24266094738807843860e-3,
                                             2.71155556874348757815e-5, 2.01033439929228813265e-7};
constexpr std::array<double, 8> farTailBelow{1.0,
                                             5.99832206555887937690e-1,
                                             1.36929880922735805310e-1,
                                             1.48753612908506148525e-2,
                                             7.86869131145613259100e-4,
                                             1.84631831751005468180e-5,
                                             1.42151175831644588870e-7,
                                             2.04426310338993978564e-15};

} // namespace

double normalProbability(double z) {
    if (z < -3.0) {
        return tail(-z);
    }
    if (z > 3.0) {
        return 1.0 - tail(z);
    }
    return 0.5 + centralPart(z);
}

double normalQuantile(double probability) {
    const double fromMiddle = probability - 0.5;
    if (std::fabs(fromMiddle) <= 0.425) {
        return fromMiddle * rational(centralAbove, centralBelow, 0.180625 - fromMiddle * fromMiddle);
    }
    const double smaller = fromMiddle < 0.0 ? probability : 1.0 - probability;
    const double r = std::sqrt(-log(smaller));
    const double z = r <= 5.0 ? rational(nearTailAbove, nearTailBelow, r - 1.6)
                              : rational(farTailAbove, farTailBelow, r - 5.0);
    return fromMiddle < 0.0 ? -z : z;
}

} // namespace forwright::numeric
