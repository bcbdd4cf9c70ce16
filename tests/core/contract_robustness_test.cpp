#include "contract/catalogue.hpp"
#include "contract_fixtures.hpp"

#include <algorithm>
#include <cmath>
#include <random>

using namespace contract_tests;

namespace {

constexpr unsigned seed = 20261201;

/// A number from 0 to `size` − 1.
std::size_t below(std::mt19937& dice, std::size_t size) {
    return static_cast<std::size_t>(dice()) % size;
}

bool inCatalogue(const json& remark, bool isError) {
    const auto all = forwright::contract::catalogue();
    return std::any_of(all.begin(), all.end(), [&](const auto& entry) {
        return remark["code"] == entry.code && (isError ? entry.isError : entry.isNotice);
    });
}

/// An answer is a result, or at least one error with a place, a known code and a sentence.
void checkAnswer(const std::string& request) {
    CAPTURE(request.substr(0, 3000));
    const Answered answered = askText(request);
    if (answered.ok) {
        CHECK(answered.body["result"].is_object());
        for (const json& notice : answered.body["notices"]) {
            CHECK_MESSAGE(inCatalogue(notice, false), notice.dump());
        }
        return;
    }
    CHECK_FALSE(answered.body.contains("result"));
    REQUIRE_FALSE(answered.body["errors"].empty());
    for (const json& error : answered.body["errors"]) {
        CHECK(error["at"].is_string());
        CHECK_MESSAGE(inCatalogue(error, true), error.dump());
        CHECK(error["message"].get<std::string>().size() > 10);
    }
}

std::vector<json> startingPoints() {
    std::vector<json> all{shareRequest(), pairRequest()};
    for (const json& curve : randomCurves()) {
        json request = shareRequest();
        request["market"]["funding"]["curve"] = curve;
        all.push_back(request);
    }
    json bootstrapped = shareRequest();
    bootstrapped["market"]["funding"]["curve"] = read(
        R"({"kind":"instruments","interpolation":"monotone-cubic","calendars":["EUTA"],"items":[{"type":"deposit","tenor":"3M","rate":0.02},
        {"type":"fra","start":"3M","end":"6M","rate":0.021},{"type":"overnight-swap","tenor":"2Y","rate":0.024,"payments":"quarterly"}],
        "turns":[{"from":"2026-12-31","to":"2027-01-04","spread":0.002}]})");
    all.push_back(bootstrapped);
    bootstrapped.erase("want");
    bootstrapped.erase("inquiry");
    bootstrapped["task"] = "curve";
    all.push_back(bootstrapped);
    json quotedPair = pairRequest();
    quotedPair["market"]["base"]["curve"] = read(
        R"({"kind":"forwards","quoted":"points","interpolation":"linear-zero","rows":[{"at":"1M","value":{"bid":15.1,"offer":15.9}},{"at":"2027-06-18","value":90}],"against":0.02})");
    quotedPair["market"]["base"].erase("lendSpread");
    quotedPair["market"]["base"].erase("borrowSpread");
    all.push_back(quotedPair);
    json listed = shareRequest();
    listed["market"]["income"]["yield"] = read(
        R"({"kind":"forwards","rows":[{"at":"2027-03-19","value":{"bid":99,"offer":100}},{"at":"1Y","value":99}]})");
    all.push_back(listed);
    listed.erase("want");
    listed.erase("inquiry");
    listed["task"] = "curve";
    listed["which"] = "yield";
    listed["dates"] = json::array({"1M", "2027-06-18"});
    all.push_back(listed);
    json tenors = read(
        R"({"format":"forwright/1","task":"tenors","maturities":["1W","3M","2027-06-18"],"roll":"following",
        "grid":{"maturity":"1Y","spot":[-0.05,0],"funding":[0,0.01]}})");
    tenors["market"] = shareRequest()["market"];
    all.push_back(tenors);
    json path = shareRequest();
    path.erase("want");
    path["task"] = "path";
    all.push_back(path);
    return all;
}

/// Values at and beyond every limit.
std::vector<json> strangeValues() {
    return {nullptr,
            true,
            "",
            "x",
            "2027-06-19",
            "1900-01-01",
            "2199-12-31",
            "2026-12-01",
            "100Y",
            "0D",
            "5200W",
            "pillars",
            "random",
            0,
            -0.0,
            1,
            -1,
            0.5,
            -0.99,
            10,
            1e-300,
            5e-324,
            -5e-324,
            1e300,
            1e308,
            -1e308,
            30,
            31,
            1e-9,
            json::array(),
            json::array({1}),
            json::object(),
            json{{"rate", 10}, {"compounding", "simple"}},
            json{{"bid", 1}, {"offer", 1e300}}};
}

/// Some place in `value`, reached by going down at random.
json& somewhere(json& value, std::mt19937& dice) {
    json* here = &value;
    while (here->is_structured() && !here->empty() && below(dice, 8) != 0) {
        auto child = here->begin();
        std::advance(child, static_cast<std::ptrdiff_t>(below(dice, here->size())));
        here = &*child;
    }
    return *here;
}

void removeSomething(json& value, std::mt19937& dice) {
    json& place = somewhere(value, dice);
    if (place.is_object() && !place.empty()) {
        auto member = place.begin();
        std::advance(member, static_cast<std::ptrdiff_t>(below(dice, place.size())));
        place.erase(member);
    } else if (place.is_array() && !place.empty()) {
        place.erase(place.begin());
    }
}

} // namespace

TEST_SUITE("contract robustness") {
    TEST_CASE("requests with strange values in strange places are answered") {
        std::mt19937 dice{seed};
        const std::vector<json> starts = startingPoints();
        const std::vector<json> strange = strangeValues();
        for (int i = 0; i < 6'000; ++i) {
            json request = starts[static_cast<std::size_t>(i) % starts.size()];
            for (std::size_t changes = 1 + below(dice, 3); changes > 0; --changes) {
                if (below(dice, 5) == 0) {
                    removeSomething(request, dice);
                } else {
                    somewhere(request, dice) = strange[below(dice, strange.size())];
                }
            }
            checkAnswer(request.dump());
        }
    }

    TEST_CASE("numbers far out, all at once, are answered") {
        std::mt19937 dice{seed};
        std::uniform_real_distribution<double> exponent{-20.0, 300.0};
        const std::vector<json> starts = startingPoints();
        for (int i = 0; i < 3'000; ++i) {
            json request = starts[static_cast<std::size_t>(i) % starts.size()];
            for (int changes = 0; changes < 8; ++changes) {
                json& place = somewhere(request, dice);
                if (place.is_number()) {
                    const double sign = below(dice, 2) == 0 ? 1.0 : -1.0;
                    place = below(dice, 3) == 0 ? sign * std::pow(10.0, exponent(dice))
                                                : place.get<double>() * static_cast<double>(below(dice, 40));
                }
            }
            checkAnswer(request.dump());
        }
    }

    TEST_CASE("text with bytes changed, dropped and doubled is answered") {
        std::mt19937 dice{seed};
        const std::vector<json> starts = startingPoints();
        for (int i = 0; i < 4'000; ++i) {
            std::string text = starts[static_cast<std::size_t>(i) % starts.size()].dump();
            for (std::size_t changes = 1 + below(dice, 4); changes > 0; --changes) {
                const std::size_t at = below(dice, text.size());
                switch (below(dice, 4)) {
                case 0:
                    text[at] = static_cast<char>(dice());
                    break;
                case 1:
                    text.erase(at, 1 + below(dice, 20));
                    break;
                case 2:
                    text.insert(at, text.substr(below(dice, text.size()), below(dice, 40)));
                    break;
                default:
                    text[at] = "{}[],:\"0123456789.-eE\\"[below(dice, 22)];
                }
                if (text.empty()) {
                    text = "{";
                }
            }
            checkAnswer(text);
        }
    }
}
