#pragma once

#include "numeric/elementary.hpp"
#include "numeric/elementary_kernels.hpp"

#include <cstddef>
#include <cstdint>

/// Four numbers side by side, for loops over many: vectors of the compiler, which it maps to what the machine
/// has (two pairs with SSE2 and in the module, four at once with AVX2). Arithmetic operators work lane by
/// lane. exp and log give the same bits as their namesakes of one number.
namespace forwright::numeric::lanes {

/// How many stand side by side.
inline constexpr std::size_t count = 4;

/// Aligned like a pair, so that it is passed alike with and without AVX.
using Lanes = double __attribute__((vector_size(32), aligned(16)));
using LaneBits = std::uint64_t __attribute__((vector_size(32), aligned(16)));

/// The same number in every lane.
[[nodiscard, gnu::always_inline]] inline Lanes all(double x) {
    return Lanes{x, x, x, x};
}

/// Four numbers that follow one another in memory, at any alignment.
[[nodiscard, gnu::always_inline]] inline Lanes load(const double* from) {
    return Lanes{from[0], from[1], from[2], from[3]};
}

[[gnu::always_inline]] inline void store(Lanes x, double* to) {
    __builtin_memcpy(to, &x, sizeof x);
}

/// Whether the highest bit is set in any lane. Ranges are checked with it, in integers, because g++ takes a
/// comparison of four doubles apart into single ones where the machine has pairs only.
[[nodiscard, gnu::always_inline]] inline bool anyHighest(LaneBits bits) {
    return ((bits[0] | bits[1] | bits[2] | bits[3]) >> 63U) != 0;
}

/// The tables, looked up for each lane.
struct FourLanes {
    using Real = Lanes;
    using Bits = LaneBits;
    struct Root {
        Lanes high;
        Lanes low;
    };
    struct Inverse {
        Lanes inverse;
        Lanes logHigh;
        Lanes logLow;
    };

    [[gnu::always_inline]] static Root root(Bits index) {
        const tables::Root& a = tables::roots[static_cast<std::size_t>(index[0])];
        const tables::Root& b = tables::roots[static_cast<std::size_t>(index[1])];
        const tables::Root& c = tables::roots[static_cast<std::size_t>(index[2])];
        const tables::Root& d = tables::roots[static_cast<std::size_t>(index[3])];
        return {.high = Lanes{a.high, b.high, c.high, d.high}, .low = Lanes{a.low, b.low, c.low, d.low}};
    }

    [[gnu::always_inline]] static Inverse inverse(Bits index) {
        const tables::Inverse& a = tables::inverses[static_cast<std::size_t>(index[0])];
        const tables::Inverse& b = tables::inverses[static_cast<std::size_t>(index[1])];
        const tables::Inverse& c = tables::inverses[static_cast<std::size_t>(index[2])];
        const tables::Inverse& d = tables::inverses[static_cast<std::size_t>(index[3])];
        return {.inverse = Lanes{a.inverse, b.inverse, c.inverse, d.inverse},
                .logHigh = Lanes{a.logHigh, b.logHigh, c.logHigh, d.logHigh},
                .logLow = Lanes{a.logLow, b.logLow, c.logLow, d.logLow}};
    }
};

/// eˣ in every lane, as exp of one number.
[[nodiscard, gnu::always_inline]] inline Lanes exp(Lanes x) {
    constexpr std::uint64_t size = 0x7FFF'FFFF'FFFF'FFFF;
    constexpr std::uint64_t limit = 0x4086'2000'0000'0000; // 708
    const LaneBits bits = __builtin_bit_cast(LaneBits, x);
    if (!anyHighest(limit - 1 - (bits & size))) {
        return kernels::exp<FourLanes>(x);
    }
    return Lanes{numeric::exp(x[0]), numeric::exp(x[1]), numeric::exp(x[2]), numeric::exp(x[3])};
}

/// ln x in every lane, as log of one number.
[[nodiscard, gnu::always_inline]] inline Lanes log(Lanes x) {
    constexpr std::uint64_t smallestNormal = 0x0010'0000'0000'0000;
    constexpr std::uint64_t infinity = 0x7FF0'0000'0000'0000;
    constexpr std::uint64_t highest = 0x8000'0000'0000'0000;
    const LaneBits bits = __builtin_bit_cast(LaneBits, x);
    const LaneBits above = bits - smallestNormal; // wraps below
    if (!anyHighest(above | (above + (highest - (infinity - smallestNormal))))) {
        return kernels::logarithm(kernels::scaled<FourLanes>(bits));
    }
    return Lanes{numeric::log(x[0]), numeric::log(x[1]), numeric::log(x[2]), numeric::log(x[3])};
}

} // namespace forwright::numeric::lanes
