#pragma once

#include <array>
#include <cstddef>
#include <cstdint>

/// Points that fill the cube evenly, and a way to scramble them so that they stay even and become random: the
/// mean over a scrambled set is unbiased, and independent scramblings tell its error.
namespace forwright::numeric {

/// How many coordinates there are.
inline constexpr std::size_t sobolDimensions = 48;

/// A coordinate of a Sobol point as a fraction of 2³²: points in their natural order from 0, which is the
/// origin. The n-th point of an engine in Gray-code order is that of index n XOR n/2. (Sobol 1967; directions
/// of Joe and Kuo, SIAM J. Sci. Comput. 30 (2008) 2635–2654.)
[[nodiscard]] std::uint32_t sobolPoint(std::size_t dimension, std::uint32_t index);

/// A random nested scrambling of one coordinate (Owen, in: Niederreiter and Shiue (eds.), Monte Carlo and
/// Quasi-Monte Carlo Methods, 1995): which half of an interval comes first is drawn anew for every interval.
/// Drawn by hashing, as Laine and Karras do (Computer Graphics Forum 30 (2011)): seen from the most
/// significant bit down each bit changes with those before it only. Their form of the hash, with constants
/// drawn for each coordinate.
class OwenScrambling {
  public:
    /// `number` distinguishes scramblings of one seed.
    OwenScrambling(std::uint64_t seed, std::size_t dimension, std::uint32_t number);
    [[nodiscard]] std::uint32_t operator()(std::uint32_t fraction) const;

    /// The scrambled coordinate of the points first … first + count − 1.
    void points(std::size_t dimension, std::uint32_t first, std::size_t count, std::uint32_t* to) const;

  private:
    /// The same of bits in reverse order, the most significant lowest.
    [[nodiscard]] std::uint32_t mixed(std::uint32_t reversed) const;

    struct Round {
        std::uint32_t added = 0;
        std::uint32_t factor = 0; ///< even, so that a bit changes those above it only
    };
    std::array<Round, 6> rounds_{};
};

} // namespace forwright::numeric
