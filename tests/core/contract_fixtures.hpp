#pragma once

#include "contract/answer.hpp"

#include <doctest/doctest.h>
#include <nlohmann/json.hpp>

#include <string>
#include <string_view>
#include <utility>
#include <vector>

/// Requests to start from, and a short way to ask.
namespace contract_tests {

using nlohmann::json;

inline json read(std::string_view text) {
    return json::parse(text, nullptr, false);
}

/// A share with everything that a share can have.
inline json shareRequest() {
    return read(R"({"format":"forwright/1","task":"quote",
        "market":{"asOf":"2026-12-01",
            "asset":{"kind":"share","name":"Brackwater Mills","currency":"EUR","settlementLag":2,"calendars":["EUTA"],
                     "lagCalendars":["EUTA"],"holidays":["2027-06-03"],"openDays":["2027-05-01"],"tick":0.01},
            "spot":{"bid":99.95,"offer":100.05},
            "funding":{"curve":{"kind":"pillars","quote":"zero","compounding":"annual","dayCount":"ACT/365.FIXED",
                                "interpolation":"monotone-cubic",
                                "pillars":[{"at":"1M","value":0.021},{"at":"6M","value":0.022},{"at":"2Y","value":0.024}]},
                       "lendSpread":-0.001,"borrowSpread":0.002},
            "discount":0.02,
            "income":{"cash":[{"ex":"2027-03-10","pay":"2027-03-24","amount":1.2,"low":1.1,"high":1.3,"treatment":"in-price"},
                              {"ex":"2027-05-12","pay":"2027-05-12","amount":0.4,"low":0.4,"high":0.4,"treatment":"in-price"}],
                      "proportional":[{"ex":"2027-05-12","fraction":0.01,"low":0.009,"high":0.011}],
                      "yield":{"rate":0.001,"compounding":"simple","dayCount":"ACT/360"},
                      "passThrough":{"bid":1,"offer":0.85}},
            "lendingFee":{"bid":0.001,"offer":0.003},
            "hedgeCost":{"buy":0.001,"sell":0.0005}},
        "inquiry":{"client":"two-way","quantity":10000,"maturity":"2027-06-18","margin":{"unit":"bp-per-year","amount":10}},
        "want":["income","sensitivities","ledger","random","bridge","total","working"]})");
}

inline json pairRequest() {
    return read(R"({"format":"forwright/1","task":"quote",
        "market":{"asOf":"2026-12-01",
            "asset":{"kind":"currency-pair","currency":"USD","base":"EUR","settlementLag":[{"from":"2000-01-01","lag":2}],
                     "calendars":["EUTA","USNY"],"lagCalendars":["EUTA"],"tick":0.0001},
            "spot":{"bid":1.0998,"offer":1.1},
            "funding":{"curve":{"kind":"random","model":"hull-white","meanReversion":0.1,"volatility":0.01,"fit":0.04}},
            "base":{"curve":{"rate":0.02,"compounding":"simple","dayCount":"ACT/360"}}},
        "inquiry":{"client":"sells","quantity":1000000,"maturity":"6M"}})");
}

/// A request of every random model.
inline std::vector<json> randomCurves() {
    const char* const curves[] = {
        R"({"kind":"random","model":"vasicek","r0":0.02,"meanReversion":0.2,"longRun":0.03,"volatility":0.01})",
        R"({"kind":"random","model":"cox-ingersoll-ross","r0":0.02,"meanReversion":0.2,"longRun":0.03,"volatility":0.05})",
        R"({"kind":"random","model":"ho-lee","volatility":0.01,"fit":{"kind":"pillars","pillars":[{"at":"1Y","value":0.02}]}})",
        R"({"kind":"random","model":"policy-meetings","overnight":0.02,"meetings":[{"date":"2027-01-28","moves":[{"by":-0.0025,"probability":0.4},{"by":0,"probability":0.6}]}]})",
        R"({"kind":"random","model":"scenarios","scenarios":[{"weight":0.25,"curve":0.02},{"weight":0.75,"curve":{"kind":"random","model":"vasicek","r0":0.02,"meanReversion":0.2,"longRun":0.03,"volatility":0.01}}]})",
        R"({"kind":"random","model":"samples","dates":["2027-03-01","2027-09-01"],"factors":[[0.99,0.98],[0.985,0.975],[0.992,0.981]]})",
    };
    std::vector<json> all;
    for (const char* const curve : curves) {
        all.push_back(read(curve));
    }
    return all;
}

struct Answered {
    bool ok;
    json body;
};

inline Answered askText(std::string_view request) {
    const forwright::contract::Answer answer = forwright::contract::answer(request);
    json body = read(answer.text);
    REQUIRE_FALSE(body.is_discarded());
    REQUIRE(body.is_object());
    CHECK(body["ok"] == answer.ok);
    return {answer.ok, std::move(body)};
}

inline Answered ask(const json& request) {
    return askText(request.dump());
}

/// "at code" of every error.
inline std::vector<std::string> errorsOf(const Answered& answered) {
    std::vector<std::string> all;
    if (answered.body.contains("errors")) {
        for (const json& error : answered.body["errors"]) {
            all.push_back(error["at"].get<std::string>() + " " + error["code"].get<std::string>());
        }
    }
    return all;
}

} // namespace contract_tests
