#include "numeric/sobol.hpp"

#include "numeric/philox.hpp"

#include <bit>

namespace forwright::numeric {
namespace {

constexpr std::size_t bits = 32;

/// A primitive polynomial over two elements, its coefficients as bits, and the first direction numbers that
/// go with it, one for each degree.
struct Start {
    std::uint16_t polynomial;
    std::array<std::uint8_t, 8> directions;
};

// The dimensions after the first.
constexpr std::array<Start, sobolDimensions - 1> starts{{
    {3, {1}},
    {7, {1, 3}},
    {11, {1, 3, 1}},
    {13, {1, 1, 1}},
    {19, {1, 1, 3, 3}},
    {25, {1, 3, 5, 13}},
    {37, {1, 1, 5, 5, 17}},
    {41, {1, 1, 5, 5, 5}},
    {47, {1, 1, 7, 11, 19}},
    {55, {1, 1, 5, 1, 1}},
    {59, {1, 1, 1, 3, 11}},
    {61, {1, 3, 5, 5, 31}},
    {67, {1, 3, 3, 9, 7, 49}},
    {91, {1, 1, 1, 15, 21, 21}},
    {97, {1, 3, 1, 13, 27, 49}},
    {103, {1, 1, 1, 15, 7, 5}},
    {109, {1, 3, 1, 15, 13, 25}},
    {115, {1, 1, 5, 5, 19, 61}},
    {131, {1, 3, 7, 11, 23, 15, 103}},
    {137, {1, 3, 7, 13, 13, 15, 69}},
    {143, {1, 1, 3, 13, 7, 35, 63}},
    {145, {1, 3, 5, 9, 1, 25, 53}},
    {157, {1, 3, 1, 13, 9, 35, 107}},
    {167, {1, 3, 1, 5, 27, 61, 31}},
    {171, {1, 1, 5, 11, 19, 41, 61}},
    {185, {1, 3, 5, 3, 3, 13, 69}},
    {191, {1, 1, 7, 13, 1, 19, 1}},
    {193, {1, 3, 7, 5, 13, 19, 59}},
    {203, {1, 1, 3, 9, 25, 29, 41}},
    {211, {1, 3, 5, 13, 23, 1, 55}},
    {213, {1, 3, 7, 3, 13, 59, 17}},
    {229, {1, 3, 1, 3, 5, 53, 69}},
    {239, {1, 1, 5, 5, 23, 33, 13}},
    {241, {1, 1, 7, 7, 1, 61, 123}},
    {247, {1, 1, 7, 9, 13, 61, 49}},
    {253, {1, 3, 3, 5, 3, 55, 33}},
    {285, {1, 3, 1, 15, 31, 13, 49, 245}},
    {299, {1, 3, 5, 15, 31, 59, 63, 97}},
    {301, {1, 3, 1, 11, 11, 11, 77, 249}},
    {333, {1, 3, 1, 11, 27, 43, 71, 9}},
    {351, {1, 1, 7, 15, 21, 11, 81, 45}},
    {355, {1, 3, 7, 3, 25, 31, 65, 79}},
    {357, {1, 3, 1, 1, 19, 11, 3, 205}},
    {361, {1, 1, 5, 9, 19, 21, 29, 157}},
    {369, {1, 3, 7, 11, 1, 33, 89, 185}},
    {391, {1, 3, 3, 3, 15, 9, 79, 71}},
    {397, {1, 3, 7, 11, 15, 39, 119, 27}},
}};

constexpr std::uint32_t reversed(std::uint32_t word) {
    word = ((word >> 1U) & 0x55555555U) | ((word & 0x55555555U) << 1U);
    word = ((word >> 2U) & 0x33333333U) | ((word & 0x33333333U) << 2U);
    word = ((word >> 4U) & 0x0F0F0F0FU) | ((word & 0x0F0F0F0FU) << 4U);
    word = ((word >> 8U) & 0x00FF00FFU) | ((word & 0x00FF00FFU) << 8U);
    return (word >> 16U) | (word << 16U);
}

/// What each bit of an index adds (exclusively) to a coordinate.
using Directions = std::array<std::uint32_t, bits>;

/// The recurrence of Bratley and Fox (ACM Transactions on Mathematical Software 14 (1988) 88–100).
Directions directionsOf(const Start& start) {
    const auto degree = static_cast<std::size_t>(std::bit_width(unsigned{start.polynomial}) - 1);
    Directions directions{};
    for (std::size_t i = 0; i < bits; ++i) {
        if (i < degree) {
            directions[i] = std::uint32_t{start.directions[i]} << (bits - 1 - i);
            continue;
        }
        std::uint32_t next = directions[i - degree] ^ (directions[i - degree] >> degree);
        for (std::size_t k = 1; k < degree; ++k) {
            if (((unsigned{start.polynomial} >> (degree - k)) & 1U) != 0) {
                next ^= directions[i - k];
            }
        }
        directions[i] = next;
    }
    return directions;
}

/// Of every dimension, made once.
const std::array<Directions, sobolDimensions>& allDirections() {
    static const std::array<Directions, sobolDimensions> all = [] {
        std::array<Directions, sobolDimensions> made{};
        for (std::size_t i = 0; i < bits; ++i) {
            made[0][i] = std::uint32_t{1} << (bits - 1 - i);
        }
        for (std::size_t dimension = 1; dimension < sobolDimensions; ++dimension) {
            made[dimension] = directionsOf(starts[dimension - 1]);
        }
        return made;
    }();
    return all;
}

} // namespace

std::uint32_t sobolPoint(std::size_t dimension, std::uint32_t index) {
    const Directions& directions = allDirections()[dimension];
    std::uint32_t point = 0;
    for (std::size_t i = 0; index != 0; ++i, index >>= 1U) {
        if ((index & 1U) != 0) {
            point ^= directions[i];
        }
    }
    return point;
}

OwenScrambling::OwenScrambling(std::uint64_t seed, std::size_t dimension, std::uint32_t number) {
    // Words that philoxWords of a path never takes: their last word of the counter is 0.
    for (std::uint32_t half = 0; half < rounds_.size() / 2; ++half) {
        const auto words = philox({half, static_cast<std::uint32_t>(dimension), number, 1}, philoxKey(seed));
        rounds_[std::size_t{2} * half] = {words[0], words[1] & ~1U};
        rounds_[std::size_t{2} * half + 1] = {words[2], words[3] & ~1U};
    }
}

std::uint32_t OwenScrambling::mixed(std::uint32_t word) const {
    for (const Round& round : rounds_) {
        word += round.added;
        word ^= word * round.factor;
    }
    return word;
}

std::uint32_t OwenScrambling::operator()(std::uint32_t fraction) const {
    return reversed(mixed(reversed(fraction)));
}

void OwenScrambling::points(std::size_t dimension, std::uint32_t first, std::size_t count,
                            std::uint32_t* to) const {
    // From one index to the next the lowest bits change, up to the first 0: what they add together.
    Directions changes = allDirections()[dimension];
    for (std::size_t i = 1; i < bits; ++i) {
        changes[i] ^= changes[i - 1];
    }
    std::uint32_t point = sobolPoint(dimension, first);
    for (std::size_t i = 0; i < count; ++i) {
        to[i] = point;
        const auto next = first + static_cast<std::uint32_t>(i) + 1;
        point ^= changes[static_cast<std::size_t>(std::countr_zero(next)) % bits];
    }
    for (std::size_t i = 0; i < count; ++i) {
        to[i] = (*this)(to[i]);
    }
}

} // namespace forwright::numeric
