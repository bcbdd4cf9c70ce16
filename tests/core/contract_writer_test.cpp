#include "contract/writer.hpp"

#include <doctest/doctest.h>

#include <cmath>
#include <cstdint>
#include <cstdlib>
#include <limits>
#include <random>

using namespace forwright;
using contract::Writer;

namespace {

/// Emscripten's library has no std::bit_cast yet.
std::uint64_t bitsOf(double value) {
    return __builtin_bit_cast(std::uint64_t, value);
}

} // namespace

TEST_SUITE("contract writer") {
    TEST_CASE("a number is read back to the same bits") {
        std::mt19937_64 dice{20261201};
        for (int i = 0; i < 200'000; ++i) {
            const auto value = __builtin_bit_cast(double, std::uint64_t{dice()});
            if (!std::isfinite(value)) {
                continue;
            }
            const std::string text = contract::numberText(value);
            CAPTURE(text);
            REQUIRE(bitsOf(std::strtod(text.c_str(), nullptr)) == bitsOf(value));
            REQUIRE(text.size() <= 24);
        }
    }

    TEST_CASE("numbers people write are written as they write them") {
        CHECK(contract::numberText(0.1) == "0.1");
        CHECK(contract::numberText(-0.0) == "0");
        CHECK(contract::numberText(100.0) == "100");
        CHECK(contract::numberText(10000000.0) == "10000000");
        CHECK(contract::numberText(99.95) == "99.95");
        CHECK(contract::numberText(-0.0025) == "-0.0025");
        CHECK(contract::numberText(5e-324) == "5e-324");
        CHECK(contract::numberText(std::numeric_limits<double>::max()) == "1.7976931348623157e+308");
    }

    TEST_CASE("text is escaped where RFC 8259 asks for it and nowhere else") {
        CHECK(contract::quotedText("a\"b\\c/é😀\x7f") == "\"a\\\"b\\\\c/é😀\x7f\"");
        CHECK(contract::quotedText(std::string_view{"\n\t\0\x1f", 4}) == "\"\\u000a\\u0009\\u0000\\u001f\"");
    }

    TEST_CASE("commas come by themselves") {
        Writer writer;
        writer.beginObject();
        writer.member("a", 1.5);
        writer.key("b").beginList();
        writer.value(1);
        writer.beginObject();
        writer.endObject();
        writer.beginList();
        writer.endList();
        writer.value(true);
        writer.value("x");
        writer.value(std::optional<double>{});
        writer.endList();
        writer.memberIfAny("c", std::optional<double>{});
        writer.memberIfAny("d", std::optional<double>{2.0});
        writer.member("e", dates::Date{std::chrono::year{2026} / 12 / 1});
        writer.key("f").raw("[]");
        writer.endObject();
        CHECK(writer.notFinite().empty());
        CHECK(writer.take() == R"({"a":1.5,"b":[1,{},[],true,"x",null],"d":2,"e":"2026-12-01","f":[]})");
    }

    TEST_CASE("a number that is not finite is told by the member that was to hold it") {
        Writer writer;
        writer.beginObject();
        writer.member("fine", 1.0);
        writer.member("first", std::numeric_limits<double>::infinity());
        writer.member("second", std::nan(""));
        writer.endObject();
        CHECK(writer.notFinite() == "first");
    }
}
