#pragma once

#include <array>
#include <cstddef>
#include <cstdint>

/// Random words by counting: the n-th is a function of n and a key alone, so that whoever shares the work
/// needs no state handed over. Integers only: the same words in every build.
namespace forwright::numeric {

using PhiloxCounter = std::array<std::uint32_t, 4>;
using PhiloxKey = std::array<std::uint32_t, 2>;

/// Philox4x32-10: four random words for each counter and key (Salmon, Moraes, Dror and Shaw, Parallel random
/// numbers: as easy as 1, 2, 3, 2011).
[[nodiscard]] std::array<std::uint32_t, 4> philox(const PhiloxCounter& counter, const PhiloxKey& key);

/// The two halves of a 64-bit seed.
[[nodiscard]] constexpr PhiloxKey philoxKey(std::uint64_t seed) {
    return {static_cast<std::uint32_t>(seed), static_cast<std::uint32_t>(seed >> 32U)};
}

/// Of the counters {group, b, c, d}, group = first … first + groups − 1, the words one after another: 4 ·
/// groups of them. `groups` is a multiple of `philoxBatch`.
void philoxWords(const PhiloxCounter& first, const PhiloxKey& key, std::size_t groups, std::uint32_t* to);
inline constexpr std::size_t philoxBatch = 32;

} // namespace forwright::numeric
