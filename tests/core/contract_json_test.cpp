#include "contract/json.hpp"
#include "contract/place.hpp"

#include <doctest/doctest.h>

#include <string>
#include <vector>

using namespace forwright::contract;

namespace {

/// The code of the only fault, and its pointer.
std::string refused(std::string_view text) {
    const auto parsed = parse(text);
    REQUIRE_FALSE(parsed.ok());
    REQUIRE(parsed.faults().size() == 1);
    return parsed.faults()[0].code + " at '" + parsed.faults()[0].at + "'";
}

std::string message(std::string_view text) {
    return parse(text).faults()[0].message;
}

std::vector<std::string> duplicates(std::string_view text) {
    const auto parsed = parse(text);
    REQUIRE(parsed.ok());
    std::vector<std::string> all;
    for (const auto& fault : parsed.value().duplicates) {
        CHECK(fault.code == "duplicate-member");
        all.push_back(fault.at);
    }
    return all;
}

} // namespace

TEST_SUITE("contract json") {
    TEST_CASE("values stand where they were written") {
        const auto parsed = parse(R"({"a":[1,-2.5,"x",null,true,{"b":{}}],"c":"é😀","d":1e3})");
        REQUIRE(parsed.ok());
        const Json root = parsed.value().document.root();
        CHECK(root.isObject());
        CHECK(root.size() == 3);
        const Json list = *root.find("a");
        CHECK(list.size() == 6);
        std::vector<Json> items;
        for (const Json item : list.items()) {
            items.push_back(item);
        }
        REQUIRE(items.size() == 6);
        CHECK(items[0].number() == 1.0);
        CHECK(items[1].number() == -2.5);
        CHECK(items[2].text() == "x");
        CHECK(items[3].kind() == Json::Kind::null);
        CHECK(items[4].boolean());
        CHECK(items[5].find("b")->size() == 0);
        CHECK(root.find("c")->text() == "é😀");
        CHECK(root.find("d")->number() == 1000.0);
        CHECK_FALSE(root.find("e").has_value());
        CHECK_FALSE(items[5].find("a").has_value());
    }

    TEST_CASE("escapes are read as RFC 8259 has them, a pair of surrogates as one character") {
        const auto parsed = parse(R"(["\"\\\/\b\f\n\r\t\u00e9\ud83d\ude00\u0000"])");
        REQUIRE(parsed.ok());
        const Json text = *parsed.value().document.root().items().begin();
        CHECK(text.text() == std::string_view{"\"\\/\b\f\n\r\té😀\0", 15});
    }

    TEST_CASE("text that is not JSON is refused as a whole") {
        for (const std::string_view text :
             {"",        " ",      "nul",   "NaN", "[NaN]",     "Infinity", "[-Infinity]", "01",
              "+1",      ".5",     "1.",    "1e",  "0x10",      "[1,]",     "{\"a\":1,}",  "{a:1}",
              "'a'",     "[1 2]",  "[",     "]",   "{",         "\"",       "\"\n\"",      "\"\\x\"",
              "// c\n1", "1 // c", "{} {}", "1 2", "true false"}) {
            CAPTURE(text);
            CHECK(refused(text) == "not-json at ''");
        }
    }

    TEST_CASE("half a surrogate pair and bytes that are not UTF-8 are refused") {
        for (const std::string_view text :
             {R"("\ud800")", R"("\udc00")", R"("\ud800\ud800")", R"("\ud800x")", "\"\xff\"", "\"\xc0\x80\"",
              "\"\xed\xa0\x80\"", "\"\xf4\x90\x80\x80\"", "\"\xe2\x82\""}) {
            CHECK(refused(text) == "not-json at ''");
        }
    }

    TEST_CASE("a number beyond the range of a double is refused, one below it is 0") {
        CHECK(refused("1e309") == "not-json at ''");
        CHECK(refused("[-1e999]") == "not-json at ''");
        CHECK(parse("1e-999").value().document.root().number() == 0.0);
        CHECK(parse("1.7976931348623157e308").value().document.root().number() == 1.7976931348623157e308);
        CHECK(parse("18446744073709551616").value().document.root().number() == 18446744073709551616.0);
    }

    TEST_CASE("a zero byte does not end the text") {
        CHECK(refused(std::string_view{"{}\0{}", 5}) == "not-json at ''");
        CHECK(refused(std::string_view{"1\0", 2}) == "not-json at ''");
    }

    TEST_CASE("the sentence says where and near what, in characters fit to print") {
        CHECK(message("{\n  \"a\": nan\n}").find("line 2, column 9") != std::string::npos);
        const std::string near = message("[\"\x01\xff");
        for (const char c : near) {
            CHECK((c >= ' ' && c <= '~'));
        }
    }

    TEST_CASE("nesting reaches to 32 and no further, and the pointer says where") {
        const auto nested = [](std::size_t depth) {
            return std::string(depth, '[') + std::string(depth, ']');
        };
        CHECK(parse(nested(deepestNesting)).ok());
        CHECK(refused(nested(deepestNesting + 1)).starts_with("too-deep at '/0/0/"));
        CHECK(refused("{\"a\":[1," + nested(deepestNesting) + "]}").starts_with("too-deep at '/a/1/0"));
        CHECK(refused(std::string(1'000'000, '[')).starts_with("too-deep"));
    }

    TEST_CASE("more than 64 MB are refused") {
        const std::string full(largestRequest, ' ');
        CHECK(refused(full) == "not-json at ''");
        CHECK(refused(full + " ") == "too-large at ''");
    }

    TEST_CASE("more values than any request needs are refused") {
        std::string many = "[1";
        for (std::size_t i = 1; i < mostValues; ++i) {
            many += ",1";
        }
        CHECK(refused(many + "]") == "too-large at ''");
    }

    TEST_CASE("every member that stands twice is told once, with its pointer") {
        CHECK(duplicates(R"({"a":1,"b":2})").empty());
        CHECK(duplicates(R"({"a":1,"b":{"a":1}})").empty());
        CHECK(duplicates(R"({"a":1,"a":2,"a":3})") == std::vector<std::string>{"/a"});
        CHECK(duplicates(R"([{"x":{"b/c":1,"d":0,"b/c":1}},{"a":{},"a":[]}])") ==
              std::vector<std::string>{"/0/x/b~1c", "/1/a"});
        CHECK(duplicates(R"({"\u0061":1,"a":2})") == std::vector<std::string>{"/a"});
    }

    TEST_CASE("pointers escape as RFC 6901 has it") {
        const Place whole;
        const Place a = whole.member("a/b");
        const Place b = a.row(3);
        const Place c = b.member("m~n");
        CHECK(whole.pointer().empty());
        CHECK(c.pointer() == "/a~1b/3/m~0n");
        CHECK(whole.member("").pointer() == "/");
    }
}
