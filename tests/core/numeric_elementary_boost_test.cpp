#include "numeric/elementary.hpp"

#include <boost/multiprecision/cpp_bin_float.hpp>
#include <doctest/doctest.h>

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <limits>
#include <random>
#include <string>
#include <vector>

// The error of every elementary function in units of the last place, against Boost.Multiprecision's binary
// floating point of 50 decimal digits: random arguments from fixed seeds, spread over the range and crowded
// where it is hard.

namespace numeric = forwright::numeric;

namespace {

using Wide = boost::multiprecision::cpp_bin_float_50;

/// Distance from the true value in units of the last place which a double of that size has (2⁻¹⁰⁷⁴ where
/// subnormal).
double ulps(double computed, const Wide& truth) {
    if (truth == 0) {
        return computed == 0.0 ? 0.0 : std::numeric_limits<double>::infinity();
    }
    int exponent = 0;
    frexp(truth, &exponent); // in [1/2, 1) · 2^exponent
    const Wide unit = ldexp(Wide(1), std::max(exponent - 53, -1074));
    return std::fabs(static_cast<double>((Wide(computed) - truth) / unit));
}

class Arguments {
  public:
    explicit Arguments(std::uint64_t seed) : engine_(seed) {}

    double between(double low, double high) { return low + (high - low) * unit(); }
    /// A number of random significand, sign and exponent, |exponent| running over the given span.
    double spread(int lowExponent, int highExponent, bool negative) {
        const auto span = static_cast<std::uint64_t>(highExponent - lowExponent + 1);
        const int exponent = lowExponent + static_cast<int>(engine_() % span);
        const double size = std::ldexp(1.0 + unit(), exponent);
        return negative && (engine_() & 1U) != 0 ? -size : size;
    }

  private:
    double unit() { return static_cast<double>(engine_() >> 11U) * 0x1p-53; }
    std::mt19937_64 engine_; // its stream is fixed by the C++ standard
};

struct Worst {
    double error = 0.0;
    double at = 0.0;

    void see(double seen, double argument) {
        if (!(seen <= error)) {
            error = seen;
            at = argument;
        }
    }
};

template <class Function, class Truth>
Worst measure(const std::vector<double>& arguments, Function function, Truth truth) {
    Worst worst;
    for (const double x : arguments) {
        worst.see(ulps(function(x), truth(x)), x);
    }
    return worst;
}

void report(const std::string& what, std::uint64_t seed, std::size_t count, const Worst& worst) {
    MESSAGE(what << ": worst " << worst.error << " ulp at " << worst.at << ", seed " << seed << ", " << count
                 << " arguments");
}

template <class Draw> std::vector<double> draw(std::size_t count, Draw next) {
    std::vector<double> all(count);
    std::generate(all.begin(), all.end(), next);
    return all;
}

#ifndef FORWRIGHT_ULP_ARGUMENTS
#define FORWRIGHT_ULP_ARGUMENTS 4000 // for each range; raise it for the figures of the header
#endif
constexpr std::size_t perRange = FORWRIGHT_ULP_ARGUMENTS;

constexpr double ln2 = 0.6931471805599453;

} // namespace

TEST_CASE("exp is within 1 ulp") {
    constexpr std::uint64_t seed = 20101;
    Arguments from(seed);
    const auto truth = [](double x) {
        return Wide(exp(Wide(x)));
    };
    const auto check = [&](const std::string& where, const std::vector<double>& arguments, double bound) {
        const Worst worst = measure(arguments, numeric::exp, truth);
        report("exp, " + where, seed, arguments.size(), worst);
        CHECK(worst.error <= bound);
    };
    check("normal results", draw(perRange, [&] { return from.between(-708.39, 709.78); }), 0.55);
    check("-2 to 2", draw(perRange, [&] { return from.between(-2.0, 2.0); }), 0.55);
    check("near 0", draw(perRange, [&] { return from.spread(-60, -1, true); }), 0.55);
    check("halfway between the table's points",
          draw(perRange, [&] { return (std::floor(from.between(-60000.0, 60000.0)) + 0.5) * ln2 / 64.0; }),
          0.55);
    check("the upper end", draw(perRange, [&] { return from.between(708.0, 709.782712893383973); }), 0.55);
    check("subnormal results", draw(perRange, [&] { return from.between(-745.2, -708.39); }), 0.8);
}

TEST_CASE("log is within 1 ulp") {
    constexpr std::uint64_t seed = 20102;
    Arguments from(seed);
    const auto truth = [](double x) {
        return Wide(log(Wide(x)));
    };
    const auto check = [&](const std::string& where, const std::vector<double>& arguments) {
        const Worst worst = measure(arguments, numeric::log, truth);
        report("log, " + where, seed, arguments.size(), worst);
        CHECK(worst.error <= 0.53);
    };
    check("normal numbers", draw(perRange, [&] { return from.spread(-1022, 1023, false); }));
    check("1/2 to 2", draw(perRange, [&] { return from.between(0.5, 2.0); }));
    check("15/16 to 17/16", draw(perRange, [&] { return from.between(0.9375, 1.0625); }));
    check("near 1", draw(perRange, [&] { return 1.0 + from.spread(-53, -4, true); }));
    check("steps of the table", draw(perRange, [&] {
              return std::floor(from.between(128.0, 384.0)) / 256.0 * (1.0 + from.spread(-53, -40, true));
          }));
    check("subnormal numbers", draw(perRange, [&] { return from.spread(-1074, -1023, false); }));
}

TEST_CASE("expm1 is within 2 ulp") {
    constexpr std::uint64_t seed = 20103;
    Arguments from(seed);
    const auto truth = [](double x) {
        return Wide(expm1(Wide(x)));
    };
    const auto check = [&](const std::string& where, const std::vector<double>& arguments) {
        const Worst worst = measure(arguments, numeric::expm1, truth);
        report("expm1, " + where, seed, arguments.size(), worst);
        CHECK(worst.error <= 0.75);
    };
    check("-45 to 45", draw(perRange, [&] { return from.between(-45.0, 45.0); }));
    check("to the upper end", draw(perRange, [&] { return from.between(40.0, 709.78); }));
    check("-1 to 1", draw(perRange, [&] { return from.between(-1.0, 1.0); }));
    check("-1/8 to 1/8", draw(perRange, [&] { return from.between(-0.125, 0.125); }));
    check("next to 1/8",
          draw(perRange, [&] { return (from.between(-1.0, 1.0) < 0 ? -1 : 1) * from.between(0.12, 0.14); }));
    check("near 0", draw(perRange, [&] { return from.spread(-1074, -3, true); }));
}

TEST_CASE("log1p is within 2 ulp") {
    constexpr std::uint64_t seed = 20104;
    Arguments from(seed);
    const auto truth = [](double x) {
        return Wide(log1p(Wide(x)));
    };
    const auto check = [&](const std::string& where, const std::vector<double>& arguments) {
        const Worst worst = measure(arguments, numeric::log1p, truth);
        report("log1p, " + where, seed, arguments.size(), worst);
        CHECK(worst.error <= 0.75);
    };
    check("up to the greatest", draw(perRange, [&] { return from.spread(-1074, 1023, false); }));
    check("-1/2 to 2", draw(perRange, [&] { return from.between(-0.5, 2.0); }));
    check("-1/64 to 1/64", draw(perRange, [&] { return from.between(-0.015625, 0.015625); }));
    check("near -1", draw(perRange, [&] { return -1.0 + from.spread(-53, -1, false); }));
    check("near 0", draw(perRange, [&] { return from.spread(-1074, -8, true); }));
    check("to where 1 is lost", draw(perRange, [&] { return from.spread(0, 60, false); }));
}

TEST_CASE("sine and cosine are within their bound") {
    constexpr std::uint64_t seed = 20105;
    Arguments from(seed);
    const auto check = [&](const std::string& where, const std::vector<double>& arguments) {
        Worst worst;
        for (const double x : arguments) {
            const numeric::SineCosine both = numeric::sineCosine(x);
            worst.see(std::fabs(static_cast<double>(Wide(both.sine) - sin(Wide(x)))), x);
            worst.see(std::fabs(static_cast<double>(Wide(both.cosine) - cos(Wide(x)))), x);
        }
        MESSAGE("sine and cosine, " << where << ": worst error " << worst.error << " at " << worst.at
                                    << ", seed " << seed << ", " << arguments.size() << " arguments");
        CHECK(worst.error <= 1.0e-16);
    };
    check("one turn", draw(perRange, [&] { return from.between(-6.3, 6.3); }));
    check("the whole range", draw(perRange, [&] { return from.between(-0x1p20, 0x1p20); }));
    check("near quarter turns", draw(perRange, [&] {
              return std::floor(from.between(-600000.0, 600000.0)) * 1.5707963267948966 +
                     from.between(-1e-9, 1e-9);
          }));
    check("near odd eighths of a turn", draw(perRange, [&] {
              return (std::floor(from.between(-600.0, 600.0)) + 0.5) * 1.5707963267948966 +
                     from.between(-1e-4, 1e-4);
          }));
}

TEST_CASE("the sine keeps its relative precision next to the multiples of pi") {
    constexpr std::uint64_t seed = 20106;
    Arguments from(seed);
    const std::vector<double> arguments =
        draw(perRange, [&] { return std::floor(from.between(-300000.0, 300000.0)) * 3.14159265358979324; });
    const Worst worst = measure(
        arguments, [](double x) { return numeric::sineCosine(x).sine; },
        [](double x) { return Wide(sin(Wide(x))); });
    report("sine next to multiples of pi", seed, arguments.size(), worst);
    CHECK(worst.error <= 1.0);
}

TEST_CASE("the argument is within 2 ulp") {
    constexpr std::uint64_t seed = 20107;
    Arguments from(seed);
    const auto check = [&](const std::string& where, auto next) {
        Worst worst;
        for (std::size_t i = 0; i < perRange; ++i) {
            const double y = next();
            const double x = next();
            worst.see(ulps(numeric::argument(y, x), atan2(Wide(y), Wide(x))), y / x);
        }
        report("argument, y / x, " + where, seed, perRange, worst);
        CHECK(worst.error <= 1.7);
    };
    check("a square", [&] { return from.between(-1.0, 1.0); });
    check("near the diagonals",
          [&] { return (from.between(-1.0, 1.0) < 0 ? -1 : 1) * from.between(1.0, 1.1); });
    check("all sizes", [&] { return from.spread(-300, 300, true); });
    check("within 2^8", [&] { return from.spread(-4, 4, true); });
}
