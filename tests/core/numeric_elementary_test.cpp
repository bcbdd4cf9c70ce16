#include "numeric/elementary.hpp"
#include "numeric/lanes.hpp"

#include <doctest/doctest.h>

#include <array>
#include <cmath>
#include <cstdint>
#include <cstring>
#include <limits>
#include <vector>

// What must hold exactly, in every build: special values, order around the breakpoints of the tables, a few
// values to the last bit, and one hash over the results of 100,000 arguments for each function. The hashes
// are the same number in the native test program and in the one for the module, which is how the two are seen
// to give the same bits. The size of the error is measured in numeric_elementary_boost_test.cpp.

namespace numeric = forwright::numeric;

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double notANumber = std::numeric_limits<double>::quiet_NaN();
constexpr double smallestNormal = std::numeric_limits<double>::min();
constexpr double smallest = std::numeric_limits<double>::denorm_min();
constexpr double greatest = std::numeric_limits<double>::max();

std::uint64_t bitsOf(double x) {
    std::uint64_t bits = 0;
    std::memcpy(&bits, &x, sizeof bits);
    return bits;
}

bool same(double a, double b) {
    return bitsOf(a) == bitsOf(b);
}
bool isPlusZero(double x) {
    return same(x, 0.0);
}
bool isMinusZero(double x) {
    return same(x, -0.0);
}

/// splitmix64: Steele, Lea and Flood, "Fast splittable pseudorandom number generators" (2014), from memory.
class Arguments {
  public:
    explicit Arguments(std::uint64_t seed) : state_(seed) {}

    std::uint64_t bits() {
        state_ += 0x9E37'79B9'7F4A'7C15;
        std::uint64_t z = state_;
        z = (z ^ (z >> 30U)) * 0xBF58'476D'1CE4'E5B9;
        z = (z ^ (z >> 27U)) * 0x94D0'49BB'1331'11EB;
        return z ^ (z >> 31U);
    }
    double between(double low, double high) {
        return low + (high - low) * (static_cast<double>(bits() >> 11U) * 0x1p-53);
    }
    /// Any positive finite number, all bit patterns alike.
    double positive() {
        const std::uint64_t pattern = bits() % 0x7FF0'0000'0000'0000;
        double x = 0.0;
        std::memcpy(&x, &pattern, sizeof x);
        return x;
    }

  private:
    std::uint64_t state_;
};

/// Fowler, Noll and Vo's hash (FNV-1a, 64 bits, RFC 9923) over the bits of a sequence of numbers, lowest byte
/// first.
class Hash {
  public:
    void add(double x) {
        const std::uint64_t bits = bitsOf(x);
        for (unsigned shift = 0; shift < 64; shift += 8) {
            state_ = (state_ ^ ((bits >> shift) & 0xFFU)) * 0x0000'0100'0000'01B3;
        }
    }
    [[nodiscard]] std::uint64_t value() const { return state_; }

  private:
    std::uint64_t state_ = 0xCBF2'9CE4'8422'2325;
};

constexpr int argumentCount = 100'000;

/// The hash of f over arguments of which every second is drawn from a range and every second by bit pattern.
template <class Function> std::uint64_t hashOf(std::uint64_t seed, double low, double high, Function f) {
    Arguments from(seed);
    Hash hash;
    for (int i = 0; i < argumentCount / 2; ++i) {
        hash.add(f(from.between(low, high)));
        hash.add(f(from.positive()));
    }
    return hash.value();
}

/// f never decreases over the numbers that follow one another around x.
template <class Function> bool risesAround(double x, Function f) {
    for (int i = 0; i < 20; ++i) {
        x = std::nextafter(x, -infinity);
    }
    double before = f(x);
    for (int i = 0; i < 40; ++i) {
        x = std::nextafter(x, infinity);
        const double value = f(x);
        if (value < before) {
            return false;
        }
        before = value;
    }
    return true;
}

} // namespace

TEST_CASE("exp of special values") {
    CHECK(same(numeric::exp(0.0), 1.0));
    CHECK(same(numeric::exp(-0.0), 1.0));
    CHECK(same(numeric::exp(smallest), 1.0));
    CHECK(same(numeric::exp(-smallest), 1.0));
    CHECK(numeric::exp(infinity) == infinity);
    CHECK(isPlusZero(numeric::exp(-infinity)));
    CHECK(std::isnan(numeric::exp(notANumber)));
    CHECK(numeric::exp(greatest) == infinity);
    CHECK(isPlusZero(numeric::exp(-greatest)));
}

TEST_CASE("exp at the ends of its range") {
    // ln of the greatest number and of half the smallest, to 20 digits by mpmath: 709.78271289338399673,
    // -745.13321910194120762
    CHECK(numeric::exp(709.782712893384) < infinity);
    CHECK(numeric::exp(709.7827128933841) == infinity);
    CHECK(numeric::exp(-745.1332191019411) == smallest);
    CHECK(isPlusZero(numeric::exp(-745.1332191019413)));
    CHECK(numeric::exp(-708.3964185322641) == doctest::Approx(smallestNormal));
    CHECK(numeric::exp(-720.0) > 0.0);
    CHECK(numeric::exp(-720.0) < smallestNormal);
}

TEST_CASE("values to the last bit") {
    // The nearest doubles, by mpmath.
    CHECK(same(numeric::exp(1.0), 0x1.5bf0a8b145769p+1));
    CHECK(same(numeric::exp(-1.0), 0x1.78b56362cef38p-2));
    CHECK(same(numeric::exp(0.5), 0x1.a61298e1e069cp+0));
    CHECK(same(numeric::log(2.0), 0x1.62e42fefa39efp-1));
    CHECK(same(numeric::log(10.0), 0x1.26bb1bbb55516p+1));
    CHECK(same(numeric::log(0x1p-1074), -0x1.74385446d71c3p+9));
    CHECK(same(numeric::expm1(1.0), 0x1.b7e151628aed3p+0));
    CHECK(same(numeric::log1p(1.0), 0x1.62e42fefa39efp-1));
    CHECK(same(numeric::argument(1.0, 1.0), 0x1.921fb54442d18p-1));
}

TEST_CASE("log of special values") {
    CHECK(isPlusZero(numeric::log(1.0)));
    CHECK(numeric::log(0.0) == -infinity);
    CHECK(numeric::log(-0.0) == -infinity);
    CHECK(numeric::log(infinity) == infinity);
    CHECK(std::isnan(numeric::log(-smallest)));
    CHECK(std::isnan(numeric::log(-1.0)));
    CHECK(std::isnan(numeric::log(-infinity)));
    CHECK(std::isnan(numeric::log(notANumber)));
    CHECK(numeric::log(greatest) == doctest::Approx(709.782712893384));
    CHECK(numeric::log(smallestNormal) == doctest::Approx(-708.3964185322641));
    for (int n = -1074; n <= 1023;
         ++n) { // n ln 2, ln 2 in two parts by mpmath, so that only the sum is rounded
        CAPTURE(n);
        CHECK(same(numeric::log(std::ldexp(1.0, n)), n * 0x1.62e42ffp-1 + n * -0x1.718432a1b0e26p-35));
    }
}

TEST_CASE("log next to 1 is the series") {
    // ln(1 + h) = h − h²/2 + h³/3 − …, of which h³ is out of sight here
    for (const double h : {0x1p-52, -0x1p-53, 0x1.8p-40, -0x1.4p-40, 0x1p-30, -0x1p-30}) {
        CAPTURE(h);
        CHECK(same(numeric::log(1.0 + h), h - h * h / 2.0));
    }
}

TEST_CASE("expm1 and log1p of special values") {
    CHECK(isPlusZero(numeric::expm1(0.0)));
    CHECK(isMinusZero(numeric::expm1(-0.0)));
    CHECK(isPlusZero(numeric::log1p(0.0)));
    CHECK(isMinusZero(numeric::log1p(-0.0)));
    for (const double tiny : {smallest, -smallest, smallestNormal, -smallestNormal, 0x1p-60, -0x1p-60}) {
        CAPTURE(tiny);
        CHECK(same(numeric::expm1(tiny), tiny));
        CHECK(same(numeric::log1p(tiny), tiny));
    }
    CHECK(numeric::expm1(infinity) == infinity);
    CHECK(numeric::expm1(greatest) == infinity);
    CHECK(numeric::expm1(-infinity) == -1.0);
    CHECK(numeric::expm1(-greatest) == -1.0);
    CHECK(std::isnan(numeric::expm1(notANumber)));
    CHECK(numeric::log1p(infinity) == infinity);
    CHECK(numeric::log1p(greatest) == numeric::log(greatest));
    CHECK(numeric::log1p(-1.0) == -infinity);
    CHECK(std::isnan(numeric::log1p(std::nextafter(-1.0, -2.0))));
    CHECK(std::isnan(numeric::log1p(-infinity)));
    CHECK(std::isnan(numeric::log1p(notANumber)));
}

TEST_CASE("no step back where one row of a table meets the next") {
    for (int i = -64 * 8; i <= 64 * 8; ++i) { // halfway between multiples of ln 2 / 64
        const double x = (i + 0.5) * 0x1.62e42fefa39efp-1 / 64.0;
        CAPTURE(x);
        CHECK(risesAround(x, numeric::exp));
        CHECK(risesAround(x, numeric::expm1));
    }
    for (int i = 128; i <= 512; ++i) {
        const double x = i / 256.0;
        CAPTURE(x);
        CHECK(risesAround(x, numeric::log));
        CHECK(risesAround(x - 1.0, numeric::log1p));
    }
    for (const double x : {-708.0, 708.0, -709.0, -720.0, -745.0}) {
        CAPTURE(x);
        CHECK(risesAround(x, numeric::exp));
    }
    for (const double x : {-40.0, -0.125, 0.0, 0.125, 40.0}) {
        CAPTURE(x);
        CHECK(risesAround(x, numeric::expm1));
    }
    for (const double x : {-0x1p-8, 0.0, 0x1p-7, 0x1p54}) {
        CAPTURE(x);
        CHECK(risesAround(x, numeric::log1p));
    }
    for (const double x : {smallestNormal, 0x1p-1060, 1.0}) {
        CAPTURE(x);
        CHECK(risesAround(x, numeric::log));
    }
}

TEST_CASE("sine and cosine") {
    CHECK(isPlusZero(numeric::sineCosine(0.0).sine));
    CHECK(isMinusZero(numeric::sineCosine(-0.0).sine));
    CHECK(numeric::sineCosine(0.0).cosine == 1.0);
    CHECK(numeric::sineCosine(smallest).sine == smallest);
    CHECK(std::isfinite(numeric::sineCosine(0x1p20).sine));
    for (const double outside : {std::nextafter(0x1p20, infinity), infinity, -infinity, notANumber}) {
        CHECK(std::isnan(numeric::sineCosine(outside).sine));
        CHECK(std::isnan(numeric::sineCosine(outside).cosine));
    }
    Arguments from(5);
    for (int i = 0; i < 10'000; ++i) {
        const double x = from.between(-100.0, 100.0);
        CAPTURE(x);
        const numeric::SineCosine there = numeric::sineCosine(x);
        const numeric::SineCosine mirrored = numeric::sineCosine(-x);
        CHECK(std::fabs(there.sine * there.sine + there.cosine * there.cosine - 1.0) <= 5e-16);
        CHECK(same(mirrored.sine, -there.sine));
        CHECK(same(mirrored.cosine, there.cosine));
    }
}

TEST_CASE("the argument of a complex number") {
    constexpr double pi = 0x1.921fb54442d18p+1;
    CHECK(numeric::argument(0.0, 0.0) == 0.0);
    CHECK(numeric::argument(-0.0, -0.0) == 0.0);
    CHECK(numeric::argument(0.0, 2.0) == 0.0);
    CHECK(numeric::argument(2.0, 0.0) == pi / 2.0);
    CHECK(numeric::argument(-2.0, 0.0) == -pi / 2.0);
    CHECK(numeric::argument(0.0, -2.0) == pi);
    CHECK(numeric::argument(-0.0, -2.0) == pi); // the cut belongs to the upper half
    CHECK(numeric::argument(3.0, -3.0) == 0x1.2d97c7f3321d2p+1);
    CHECK(numeric::argument(-3.0, -3.0) == -0x1.2d97c7f3321d2p+1);
    CHECK(numeric::argument(smallest, greatest) == 0.0);
    CHECK(numeric::argument(greatest, smallest) == pi / 2.0);
    CHECK(numeric::argument(infinity, 1.0) == pi / 2.0);
    CHECK(numeric::argument(1.0, -infinity) == pi);
    CHECK(numeric::argument(infinity, infinity) == pi / 4.0);
    CHECK(std::isnan(numeric::argument(notANumber, 1.0)));
    CHECK(std::isnan(numeric::argument(1.0, notANumber)));
    for (int i = 0; i <= 64; ++i) { // where the multiple of 1/32 changes
        const double tangent = i / 64.0;
        CAPTURE(tangent);
        CHECK(risesAround(tangent, [](double y) { return numeric::argument(y, 1.0); }));
    }
    Arguments from(6);
    for (int i = 0; i < 10'000; ++i) { // and back again
        const double angle = from.between(-3.141, 3.141);
        CAPTURE(angle);
        const numeric::SineCosine there = numeric::sineCosine(angle);
        CHECK(std::fabs(numeric::argument(there.sine, there.cosine) - angle) <= 1e-15);
    }
}

TEST_CASE("four lanes give the bits of one") {
    Arguments from(7);
    const std::array<double, 12> special{0.0,   -0.0,   1.0,    -1.0,     infinity, -infinity,
                                         709.0, -745.0, 2000.0, smallest, greatest, 0x1p-1030};
    const auto compare = [](const std::array<double, 4>& x) {
        std::array<double, 4> result{};
        numeric::lanes::store(numeric::lanes::exp(numeric::lanes::load(x.data())), result.data());
        bool agree = true;
        for (std::size_t i = 0; i < 4; ++i) {
            agree = agree && same(result[i], numeric::exp(x[i]));
        }
        numeric::lanes::store(numeric::lanes::log(numeric::lanes::load(x.data())), result.data());
        for (std::size_t i = 0; i < 4; ++i) {
            const double expected = numeric::log(x[i]);
            agree = agree && (std::isnan(expected) ? std::isnan(result[i]) : same(result[i], expected));
        }
        return agree;
    };
    bool agree = true;
    for (int i = 0; i < 25'000; ++i) {
        std::array<double, 4> x{};
        for (double& lane : x) {
            lane = from.between(-5.0, 5.0);
        }
        agree = agree && compare(x);
        for (double& lane : x) {
            lane = from.positive();
        }
        agree = agree && compare(x);
        x = {from.between(0.9, 1.1), special[static_cast<std::size_t>(i) % special.size()],
             from.between(-707.9, 707.9), from.between(1e-9, 1e9)};
        agree = agree && compare(x);
    }
    CHECK(agree);
    CHECK(numeric::lanes::exp(numeric::lanes::all(1.0))[3] == numeric::exp(1.0));
}

TEST_CASE("the same bits in every build") {
    CHECK(hashOf(1, -746.0, 711.0, numeric::exp) == 0x238C'1911'3198'81DF);
    CHECK(hashOf(2, 0.5, 2.0, numeric::log) == 0x732D'9B4C'8BC8'98FD);
    CHECK(hashOf(3, -2.0, 2.0, numeric::expm1) == 0xF31E'FCAE'1DC3'F88D);
    CHECK(hashOf(4, -0.999, 3.0, numeric::log1p) == 0xA96D'6B06'5195'F750);
    Arguments from(5);
    Hash circle;
    Hash angles;
    for (int i = 0; i < argumentCount; ++i) {
        const double range = i % 2 == 0 ? 10.0 : 0x1p20;
        const numeric::SineCosine both = numeric::sineCosine(from.between(-range, range));
        circle.add(both.sine);
        circle.add(both.cosine);
        const double y = from.between(-1.0, 1.0);
        angles.add(numeric::argument(y, from.between(-1.0, 1.0)));
    }
    CHECK(circle.value() == 0x4D90'DC81'6529'6F68);
    CHECK(angles.value() == 0x4111'56FE'15F6'513C);
}
