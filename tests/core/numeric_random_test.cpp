#include "numeric/normal.hpp"
#include "numeric/normal_words.hpp"
#include "numeric/philox.hpp"
#include "numeric/sobol.hpp"

#include <doctest/doctest.h>

#include <cmath>
#include <set>
#include <vector>

using namespace forwright::numeric;

TEST_SUITE("numeric: random numbers") {
    TEST_CASE("Philox4x32-10 gives the known answers of its authors (Random123, kat_vectors)") {
        using Words = std::array<std::uint32_t, 4>;
        constexpr std::uint32_t ones = 0xffffffff;
        CHECK(philox({0, 0, 0, 0}, {0, 0}) == Words{0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8});
        CHECK(philox({ones, ones, ones, ones}, {ones, ones}) ==
              Words{0x408f276d, 0x41c83b0e, 0xa20bc7c6, 0x6d5451fd});
        CHECK(philox({0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344}, {0xa4093822, 0x299f31d0}) ==
              Words{0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1});
    }

    TEST_CASE("many Philox words at once are those of one counter after the other") {
        const PhiloxCounter first{0xfffffff8, 7, 3, 0};
        const PhiloxKey key = philoxKey(0x123456789abcdef0);
        CHECK(key == PhiloxKey{0x9abcdef0, 0x12345678});
        std::vector<std::uint32_t> words(4 * philoxBatch);
        philoxWords(first, key, philoxBatch, words.data());
        for (std::uint32_t group = 0; group < philoxBatch; ++group) {
            const auto one = philox({first[0] + group, 7, 3, 0}, key);
            for (std::size_t i = 0; i < 4; ++i) {
                CHECK(words[std::size_t{4} * group + i] == one[i]);
            }
        }
    }

    TEST_CASE(
        "normal numbers from words are the law's quantiles, opposite for complements, alike four at once") {
        const NormalWords& normal = normalWords();
        double worst = 0.0;
        const auto check = [&](std::uint32_t word) {
            const double exact = normalQuantile((word + 0.5) * 0x1p-32);
            worst = std::fmax(worst, std::fabs(normal(word) - exact));
            REQUIRE(normal(~word) == -normal(word));
        };
        for (std::uint32_t word = 0; word < 5000; ++word) {
            check(word);
        }
        // Steps that meet every piece, and the ends of each.
        for (std::uint64_t word = 0; word < 0x1'0000'0000; word += 20'011) {
            check(static_cast<std::uint32_t>(word));
        }
        for (unsigned bit = 0; bit < 32; ++bit) {
            for (std::uint32_t piece = 16; piece < 32; ++piece) {
                const auto edge = static_cast<std::uint32_t>((std::uint64_t{piece} << bit) >> 5U);
                check(edge);
                check(edge - 1);
            }
        }
        MESSAGE("worst error of a normal number: " << worst);
        CHECK(worst < 2e-12);
        CHECK(normal(0xffffffff) < 6.34);
        CHECK(normal(0xffffffff) > 6.2);

        std::vector<std::uint32_t> words(400);
        philoxWords({1, 0, 0, 0}, {11, 0}, 96, words.data());
        words[0] = 0;
        words[1] = 0xffffffff;
        words[2] = 0x7fffffff;
        words[3] = 0x80000000;
        for (std::size_t i = 0; i < 384; i += 4) {
            const lanes::Lanes four = normal.four(&words[i]);
            for (std::size_t lane = 0; lane < 4; ++lane) {
                REQUIRE(four[lane] == normal(words[i + lane]));
            }
        }
    }

    TEST_CASE(
        "the first Sobol points (Bratley and Fox 1988, from memory: 0, ½, ¼ and ¾ in other orders, …)") {
        CHECK(sobolPoint(0, 0) == 0);
        CHECK(sobolPoint(0, 1) == 0x80000000);
        CHECK(sobolPoint(0, 2) == 0x40000000);
        CHECK(sobolPoint(0, 3) == 0xc0000000);
        CHECK(sobolPoint(1, 2) == 0xc0000000);
        CHECK(sobolPoint(1, 3) == 0x40000000);
    }

    TEST_CASE("a scrambled coordinate still has one point in each of 2ᵏ intervals, and depends on earlier "
              "bits only") {
        for (const std::size_t dimension :
             {std::size_t{0}, std::size_t{1}, std::size_t{13}, sobolDimensions - 1}) {
            const OwenScrambling scrambling(2011, dimension, 3);
            std::vector<std::uint32_t> points(1024);
            scrambling.points(dimension, 0, points.size(), points.data());
            std::set<std::uint32_t> intervals;
            for (std::uint32_t i = 0; i < points.size(); ++i) {
                REQUIRE(points[i] == scrambling(sobolPoint(dimension, i)));
                intervals.insert(points[i] >> 22U);
            }
            CHECK(intervals.size() == 1024);
            std::vector<std::uint32_t> later(100);
            scrambling.points(dimension, 512, later.size(), later.data());
            CHECK(std::equal(later.begin(), later.end(), points.begin() + 512));
        }
        const OwenScrambling scrambling(5, 2, 0);
        for (unsigned bit = 0; bit < 32; ++bit) {
            const std::uint32_t change = 0x80000000U >> bit;
            const std::uint32_t difference = scrambling(0x5bd1e995) ^ scrambling(0x5bd1e995 ^ change);
            CHECK((difference & change) != 0);             // the bit itself changes
            CHECK(difference < 2 * std::uint64_t{change}); // and none before it
        }
    }

    TEST_CASE("over scramblings each bit is 1 half the time, whatever the bits before it were (a χ² of each "
              "within 5 deviations)") {
        constexpr std::uint32_t draws = 4096;
        for (const std::uint32_t point : {0U, 0x80000000U, 0x12345678U, 0xffffffffU}) {
            std::array<std::uint32_t, 32> ones{};
            std::array<std::uint32_t, 32>
                changes{}; // of a bit when the one before it in the point is flipped
            for (std::uint32_t draw = 0; draw < draws; ++draw) {
                const OwenScrambling scrambling(77, 4, draw);
                const std::uint32_t here = scrambling(point);
                for (unsigned bit = 0; bit < 32; ++bit) {
                    ones[bit] += (here >> bit) & 1U;
                }
                const std::uint32_t there = here ^ scrambling(point ^ 0x80000000U);
                for (unsigned bit = 0; bit < 31; ++bit) {
                    changes[bit] += (there >> bit) & 1U;
                }
            }
            const double deviation = std::sqrt(draws / 4.0);
            for (unsigned bit = 0; bit < 32; ++bit) {
                CHECK(std::fabs(ones[bit] - draws / 2.0) < 5.0 * deviation);
                CHECK_MESSAGE((bit == 31 || std::fabs(changes[bit] - draws / 2.0) < 5.0 * deviation),
                              "bit " << bit << ": " << changes[bit]);
            }
        }
    }
}
