#include "numeric/philox.hpp"

namespace forwright::numeric {
namespace {

// The paper's multipliers and the steps of the key (the golden ratio and √3 − 1, in 32 bits).
constexpr std::uint32_t multiplierA = 0xD2511F53;
constexpr std::uint32_t multiplierC = 0xCD9E8D57;
constexpr std::uint32_t keyStep0 = 0x9E3779B9;
constexpr std::uint32_t keyStep1 = 0xBB67AE85;
constexpr int rounds = 10;

constexpr std::uint32_t high(std::uint64_t product) {
    return static_cast<std::uint32_t>(product >> 32U);
}

#ifdef __wasm__
/// In the module a product of two 64-bit numbers costs less than a vector of them, which clang would make of
/// two.
constexpr std::size_t together = 1;
inline std::uint64_t alone(std::uint64_t product) {
    __asm__("" : "+r"(product));
    return product;
}
#else
constexpr std::size_t together = philoxBatch;
inline std::uint64_t alone(std::uint64_t product) {
    return product;
}
#endif

/// Counters side by side, one word of each in an array, so that a compiler can take several at once.
template <std::size_t Count> struct Batch {
    using Word = std::array<std::uint32_t, Count>;
    Word a, b, c, d;

    void scramble(PhiloxKey key) {
        for (int round = 0; round < rounds; ++round) {
            for (std::size_t i = 0; i < Count; ++i) {
                const std::uint64_t productA = alone(std::uint64_t{multiplierA} * a[i]);
                const std::uint64_t productC = std::uint64_t{multiplierC} * c[i];
                a[i] = high(productC) ^ b[i] ^ key[0];
                b[i] = static_cast<std::uint32_t>(productC);
                c[i] = high(productA) ^ d[i] ^ key[1];
                d[i] = static_cast<std::uint32_t>(productA);
            }
            key[0] += keyStep0;
            key[1] += keyStep1;
        }
    }
};

} // namespace

std::array<std::uint32_t, 4> philox(const PhiloxCounter& counter, const PhiloxKey& key) {
    Batch<1> one{{counter[0]}, {counter[1]}, {counter[2]}, {counter[3]}};
    one.scramble(key);
    return {one.a[0], one.b[0], one.c[0], one.d[0]};
}

void philoxWords(const PhiloxCounter& first, const PhiloxKey& key, std::size_t groups, std::uint32_t* to) {
    for (std::size_t group = 0; group < groups; group += together) {
        Batch<together> batch{};
        for (std::size_t i = 0; i < together; ++i) {
            batch.a[i] = first[0] + static_cast<std::uint32_t>(group + i);
            batch.b[i] = first[1];
            batch.c[i] = first[2];
            batch.d[i] = first[3];
        }
        batch.scramble(key);
        for (std::size_t i = 0; i < together; ++i) {
            to[0] = batch.a[i];
            to[1] = batch.b[i];
            to[2] = batch.c[i];
            to[3] = batch.d[i];
            to += 4;
        }
    }
}

} // namespace forwright::numeric
