#include "contract/answer.hpp"
#include "contract/catalogue.hpp"
#include "contract/findings.hpp"
#include "contract/reader.hpp"
#include "contract_fixtures.hpp"

#include <algorithm>
#include <set>

using namespace contract_tests;
using forwright::contract::catalogue;

namespace {

json::json_pointer to(const std::string& pointer) {
    return json::json_pointer{pointer};
}

bool hasError(const Answered& answered, const std::string& expected) {
    const std::vector<std::string> all = errorsOf(answered);
    return std::find(all.begin(), all.end(), expected) != all.end();
}

/// The request with what its answer assumed put in.
json filledIn(json request, const json& assumed) {
    for (const json& entry : assumed) {
        const std::string at = entry["at"];
        // Of the discount curve the answer names the curve that is used.
        request[to(at)] =
            at == "/market/discount" ? request[to(entry["value"].get<std::string>())] : entry["value"];
    }
    return request;
}

json leastRequest(const json& curve) {
    json request = read(R"({"format":"forwright/1","task":"quote",
        "market":{"asOf":"2026-12-01","asset":{"kind":"commodity","currency":"EUR"},"spot":80,
                  "income":{"cash":[{"ex":"2027-02-10","amount":-1.5}],"proportional":[{"ex":"2027-03-10","fraction":0.01}]}},
        "inquiry":{"maturity":"2027-06-18","margin":{"amount":0.1}}})");
    request["market"]["funding"]["curve"] = curve;
    return request;
}

} // namespace

TEST_SUITE("contract answer") {
    TEST_CASE("an answer echoes format and task, and has its parts in order") {
        const Answered answered = ask(shareRequest());
        REQUIRE(answered.ok);
        const std::string text = forwright::contract::answer(shareRequest().dump()).text;
        CHECK(text.starts_with(R"({"format":"forwright/1","task":"quote","ok":true,"result":{"dates":{)"));
        CHECK(text.find('\n') == std::string::npos);
        for (const char* block : {"income", "sensitivities", "ledger", "bridge", "total", "working"}) {
            CHECK(answered.body["result"].contains(block));
        }
        CHECK_FALSE(answered.body["result"].contains("random"));
        CHECK(answered.body["assumed"].empty());
    }

    TEST_CASE("the same request has the same answer, whatever was asked in between") {
        const std::string first = forwright::contract::answer(shareRequest().dump()).text;
        (void)ask(pairRequest());
        (void)askText("nonsense");
        CHECK(forwright::contract::answer(shareRequest().dump()).text == first);
    }

    TEST_CASE("white space and the order of members change nothing") {
        CHECK(forwright::contract::answer(shareRequest().dump(4)).text ==
              forwright::contract::answer(shareRequest().dump()).text);
    }

    TEST_CASE("what is assumed, put into the request, gives the same result and leaves nothing assumed") {
        std::vector<json> curves = randomCurves();
        curves.push_back(read(R"({"rate":0.03})"));
        curves.push_back(read(R"({"kind":"pillars","pillars":[{"at":"1Y","value":0.02}]})"));
        curves.push_back(0.02);
        for (const json& curve : curves) {
            const json request = leastRequest(curve);
            CAPTURE(curve.dump());
            const Answered answered = ask(request);
            REQUIRE(answered.ok);
            CHECK(answered.body["assumed"].size() >= 18);
            const Answered again = ask(filledIn(request, answered.body["assumed"]));
            REQUIRE(again.ok);
            CHECK(again.body["result"] == answered.body["result"]);
            CHECK(again.body["assumed"].empty());
        }
    }

    TEST_CASE("every place that a result or a notice names is in the request") {
        for (const json& request : {shareRequest(), pairRequest()}) {
            const Answered answered = ask(request);
            REQUIRE(answered.ok);
            const json& sensitivities = answered.body["result"]["sensitivities"];
            std::vector<json> places(sensitivities["cash"].begin(), sensitivities["cash"].end());
            for (const char* curve : {"funding", "base"}) {
                for (const char* list : {"pillars", "parameters"}) {
                    if (sensitivities.contains(curve) && sensitivities[curve].contains(list)) {
                        places.insert(places.end(), sensitivities[curve][list].begin(),
                                      sensitivities[curve][list].end());
                    }
                }
            }
            CHECK(places.size() >= 4);
            places.insert(places.end(), answered.body["notices"].begin(), answered.body["notices"].end());
            if (answered.body["result"].contains("income")) {
                places.insert(places.end(), answered.body["result"]["income"].begin(),
                              answered.body["result"]["income"].end());
            }
            for (const json& place : places) {
                CAPTURE(place.dump());
                CHECK(request.contains(to(place["at"])));
            }
        }
    }

    TEST_CASE("a block is in the result when it is wanted, and only then") {
        const std::vector<std::string> blocks{"income", "sensitivities", "ledger", "random",
                                              "bridge", "total",         "working"};
        json request = shareRequest();
        request["market"]["funding"]["curve"] = randomCurves()[0];
        for (const std::string& wanted : blocks) {
            request["want"] = json::array({wanted});
            const Answered answered = ask(request);
            REQUIRE(answered.ok);
            for (const std::string& block : blocks) {
                CHECK(answered.body["result"].contains(block) == (block == wanted));
            }
        }
    }

    TEST_CASE("a block says the same whichever others are wanted") {
        json request = shareRequest();
        request["market"]["funding"]["curve"] = randomCurves()[0];
        const json whole = ask(request).body["result"];
        for (const std::string block :
             {"income", "sensitivities", "ledger", "random", "bridge", "total", "working"}) {
            request["want"] = json::array({block});
            CHECK(ask(request).body["result"][block] == whole[block]);
        }
    }

    TEST_CASE("a misspelt member is told with the one that may be meant") {
        json request = shareRequest();
        request["market"]["lendingFees"] = request["market"]["lendingFee"];
        request["market"].erase("lendingFee");
        const Answered answered = ask(request);
        CHECK(errorsOf(answered) == std::vector<std::string>{"/market/lendingFees unknown-member"});
        CHECK(answered.body["errors"][0]["message"].get<std::string>().find("\"lendingFee\"") !=
              std::string::npos);
    }

    TEST_CASE("a member that nothing known is near to is told without a guess") {
        json request = shareRequest();
        request["market"]["quibble"] = 1;
        CHECK(ask(request).body["errors"][0]["message"].get<std::string>().find("may be meant") ==
              std::string::npos);
    }

    TEST_CASE("lists reach to 10,000 rows and no further") {
        json request = shareRequest();
        json& cash = request["market"]["income"]["cash"];
        cash = json::array();
        for (int i = 0; i < 10'000; ++i) {
            cash.push_back({{"ex", "2027-03-10"}, {"amount", 0.001}});
        }
        request["want"] = json::array();
        CHECK(ask(request).ok);
        cash.push_back(cash[0]);
        CHECK(errorsOf(ask(request)) == std::vector<std::string>{"/market/income/cash too-many-rows"});
    }

    TEST_CASE("samples reach to 2,000,000 numbers and no further") {
        std::string rows;
        for (int i = 0; i < 1'000'000; ++i) {
            rows += "[0.99,0.98],";
        }
        const auto request = [](const std::string& factors) {
            json least = leastRequest("CURVE");
            least["want"] = json::array();
            std::string text = least.dump();
            const std::string curve =
                R"({"kind":"random","model":"samples","dates":["2027-06-18","2027-12-01"],"factors":[)" +
                factors + "]}";
            return text.replace(text.find("\"CURVE\""), 7, curve);
        };
        const std::string full = rows.substr(0, rows.size() - 1);
        CHECK(askText(request(full)).ok);
        CHECK(errorsOf(askText(request(rows + "[0.99,0.98]"))) ==
              std::vector<std::string>{"/market/funding/curve/factors too-many"});
    }

    TEST_CASE("a name may have 200 characters, whatever bytes they take") {
        json request = shareRequest();
        std::string name;
        for (int i = 0; i < 200; ++i) {
            name += "😀";
        }
        request["market"]["asset"]["name"] = name;
        CHECK(ask(request).ok);
        request["market"]["asset"]["name"] = name + "x";
        CHECK(errorsOf(ask(request)) == std::vector<std::string>{"/market/asset/name too-long"});
    }

    TEST_CASE("of very many errors the first thousand are listed and the rest counted") {
        json request = shareRequest();
        json& cash = request["market"]["income"]["cash"];
        cash = json::array();
        for (int i = 0; i < 2'000; ++i) {
            cash.push_back({{"ex", "never"}, {"amount", 1}});
        }
        const Answered answered = ask(request);
        CHECK(answered.body["errors"].size() == 1'001);
        CHECK(answered.body["errors"][1'000]["code"] == "more-errors");
        CHECK(answered.body["errors"][1'000]["message"].get<std::string>().starts_with("1000 more"));
    }

    TEST_CASE("a request in which every member is wrong reports every member") {
        json request = shareRequest();
        request["market"]["asOf"] = 5;
        request["market"]["asset"]["tick"] = -1;
        request["market"]["funding"]["lendSpread"] = "x";
        request["market"]["income"]["yield"]["dayCount"] = "ACT/361";
        request["market"]["income"]["cash"][1]["ex"] = "2027-02-30";
        request["market"]["hedgeCost"] = 3;
        request["inquiry"]["margin"]["unit"] = "bp";
        request["surplus"] = 1;
        const Answered answered = ask(request);
        for (const char* expected :
             {"/market/asOf wrong-type", "/market/asset/tick not-positive",
              "/market/funding/lendSpread wrong-type", "/market/income/yield/dayCount not-one-of",
              "/market/income/cash/1/ex not-a-date", "/market/hedgeCost wrong-type",
              "/inquiry/margin/unit not-one-of", "/surplus unknown-member"}) {
            CHECK_MESSAGE(hasError(answered, expected), expected);
        }
        CHECK(answered.body["errors"].size() == 8);
    }

    TEST_CASE("without the market's date its curves are still read, and not blamed for it") {
        json request = shareRequest();
        request["market"].erase("asOf");
        request["market"]["funding"]["curve"]["pillars"][1]["value"] = "x";
        CHECK(errorsOf(ask(request)) ==
              std::vector<std::string>{"/market/asOf missing",
                                       "/market/funding/curve/pillars/1/value wrong-type"});
    }

    TEST_CASE("a member that stands twice is an error beside the others") {
        std::string text = shareRequest().dump();
        text.replace(text.find("\"spot\":"), 7, "\"asOf\":7,\"spot\":");
        CHECK(errorsOf(askText(text)) == std::vector<std::string>{"/market/asOf duplicate-member"});
        text.replace(text.find("\"two-way\""), 9, "\"both\"");
        CHECK(errorsOf(askText(text)).size() == 2);
    }

    TEST_CASE("BUS/252 counts on the asset's calendars") {
        json request = leastRequest(read(R"({"rate":0.1,"compounding":"simple","dayCount":"BUS/252"})"));
        request["market"]["asset"]["settlementLag"] = 0;
        request["market"].erase("income");
        const double fewer = [&] {
            json closed = request;
            closed["market"]["asset"]["holidays"] = json::array({"2027-01-05", "2027-01-06"});
            return ask(closed).body["result"]["fair"].get<double>();
        }();
        const double more = ask(request).body["result"]["fair"].get<double>();
        CHECK(more - fewer ==
              doctest::Approx(80 * 0.1 * 2 / 252).epsilon(1e-10)); // computed: two days of simple interest
    }

    TEST_CASE("own holidays and open days move the dates") {
        json request = leastRequest(0.02);
        request["market"]["asset"]["holidays"] = json::array({"2026-12-02"});
        CHECK(ask(request).body["result"]["dates"]["spot"] == "2026-12-04");
        request["market"]["asOf"] = "2026-12-04";
        request["market"]["asset"]["openDays"] = json::array({"2026-12-05"});
        CHECK(ask(request).body["result"]["dates"]["spot"] == "2026-12-07");
    }

    TEST_CASE("a calendar beyond the years its holidays are sourced for is told") {
        json request = shareRequest();
        request["market"]["asOf"] = "1901-01-07";
        request["market"]["income"] = json::object();
        request["inquiry"]["maturity"] = "1M";
        const Answered answered = ask(request);
        REQUIRE(answered.ok);
        CHECK(answered.body["notices"][0]["code"] == "calendar-years");
        CHECK(answered.body["notices"][0]["at"] == "/market/asset/calendars/0");
    }

    TEST_CASE("an unknown calendar's sentence lists those that are known") {
        json request = shareRequest();
        request["market"]["asset"]["calendars"] = json::array({"EUTX"});
        const std::string message = ask(request).body["errors"][0]["message"];
        for (const char* code : {"EUTA", "GBLO", "USNY"}) {
            CHECK(message.find(code) != std::string::npos);
        }
    }

    TEST_CASE("a distribution that is left out is told with the day that decides it") {
        json request = leastRequest(0.02);
        request["market"]["income"]["cash"] =
            read(R"([{"ex":"2026-12-03","amount":1},{"ex":"2027-06-19","amount":1}])");
        const json notices = ask(request).body["notices"];
        REQUIRE(notices.size() == 2);
        CHECK(notices[0]["code"] == "before-hold");
        CHECK(notices[0]["message"].get<std::string>().find("held, 2026-12-03") != std::string::npos);
        CHECK(notices[1]["code"] == "after-maturity");
        CHECK(notices[1]["message"].get<std::string>().find("maturity, 2027-06-18") != std::string::npos);
    }

    TEST_CASE("a grid has at most 10,000 cells") {
        json request = read(R"({"format":"forwright/1","task":"tenors","maturities":["1M"],
            "grid":{"maturity":"1Y","spot":[],"funding":[0]}})");
        request["market"] = leastRequest(0.02)["market"];
        for (int i = 0; i < 101; ++i) {
            request["grid"]["spot"].push_back(i * 0.001);
        }
        for (int i = 1; i < 100; ++i) {
            request["grid"]["funding"].push_back(i * 0.0001);
        }
        CHECK(errorsOf(ask(request)) == std::vector<std::string>{"/grid too-many-rows"});
        request["grid"]["spot"].erase(100);
        CHECK(ask(request).ok);
    }

    TEST_CASE("every tenor's row is that maturity's quote") {
        json request = shareRequest();
        json tenors =
            read(R"({"format":"forwright/1","task":"tenors","maturities":["1M","3M","2027-06-18","1Y"]})");
        tenors["market"] = request["market"];
        tenors["inquiry"] = request["inquiry"];
        tenors["inquiry"].erase("maturity");
        const Answered answered = ask(tenors);
        REQUIRE(answered.ok);
        for (std::size_t i = 0; i < tenors["maturities"].size(); ++i) {
            request["inquiry"]["maturity"] = tenors["maturities"][i];
            const json quote = ask(request).body["result"];
            const json& row = answered.body["result"]["rows"][i];
            CHECK(row["maturity"] == quote["dates"]["maturity"]);
            CHECK(row["settlement"] == quote["dates"]["settlement"]);
            for (const char* figure : {"fair", "breakEven", "quote", "annualised"}) {
                CHECK(row[figure] == quote[figure]);
            }
            CHECK(row["points"] == quote["carry"]["points"]);
        }
    }

    TEST_CASE("the schema that travels with the core is the one of this contract") {
        const json schema = read(forwright::contract::schema());
        REQUIRE(schema.is_object());
        CHECK(schema["$schema"] == "https://json-schema.org/draft/2020-12/schema");
        CHECK(schema["$defs"]["QuoteRequest"]["properties"]["format"]["const"] == "forwright/1");
        CHECK_FALSE(forwright::contract::version().empty());
    }

    TEST_CASE("the catalogue has every code once, in order, with a sentence") {
        std::string_view before;
        for (const auto& entry : catalogue()) {
            CHECK(before < entry.code);
            CHECK((entry.isError || entry.isNotice));
            CHECK(entry.meaning.ends_with("."));
            before = entry.code;
        }
    }
}
