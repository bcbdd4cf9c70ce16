// The golden table through the core itself. Read from the sources, so native only; program and module are
// held to it in tests/module.
#ifndef __EMSCRIPTEN__
#include "contract/catalogue.hpp"
#include "contract_fixtures.hpp"

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <set>
#include <sstream>

using namespace contract_tests;

namespace {

const std::filesystem::path root = std::filesystem::path{__FILE__}.parent_path().parent_path().parent_path();

std::string textOf(const std::filesystem::path& file) {
    std::ifstream stream{file};
    REQUIRE(stream.good());
    std::ostringstream text;
    text << stream.rdbuf();
    return text.str();
}

std::vector<json> goldenCases() {
    std::vector<json> all;
    for (const auto& entry : std::filesystem::directory_iterator{root / "tests/golden"}) {
        if (entry.path().extension() == ".json") {
            const json table = read(textOf(entry.path()));
            REQUIRE(table.is_object());
            all.insert(all.end(), table["cases"].begin(), table["cases"].end());
        }
    }
    return all;
}

void checkExpectation(const json& answer, const json& expected) {
    const json::json_pointer at{expected["at"].get<std::string>()};
    const json& value = expected["value"];
    CAPTURE(expected.dump());
    if (value.is_object() && value.contains("absent")) {
        CHECK_FALSE(answer.contains(at));
        return;
    }
    REQUIRE(answer.contains(at));
    const json& actual = answer[at];
    CAPTURE(actual.dump());
    if (value.is_number()) {
        REQUIRE(actual.is_number());
        CHECK(std::fabs(actual.get<double>() - value.get<double>()) <= expected.value("tolerance", 0.0));
    } else {
        CHECK(actual == value);
    }
}

/// What stands in quotes from `begin` on, where it is a code: small letters and hyphens, and a comma after
/// it.
std::string codeAt(const std::string& sources, std::size_t begin) {
    const std::size_t end = sources.find_first_not_of("abcdefghijklmnopqrstuvwxyz-", begin);
    const bool isCode = end != begin && end != std::string::npos && sources.compare(end, 2, "\",") == 0;
    return isCode ? sources.substr(begin, end - begin) : "";
}

/// Whether a sentence of a fault or notice begins at `begin`: a capital in quotes, or a text that is put
/// together.
bool isSentence(const std::string& sources, std::size_t begin) {
    begin = sources.find_first_not_of(" \n", begin);
    const bool isText = sources[begin] == '"' && sources[begin + 1] >= 'A' && sources[begin + 1] <= 'Z';
    return isText || sources.compare(begin, 11, "std::string") == 0 ||
           sources.compare(begin, 7, "dates::") == 0;
}

/// Every code that stands right before its sentence, in a statement that makes a fault or a notice.
std::vector<std::string> codesBeforeSentences(const std::string& sources) {
    std::vector<std::string> codes;
    for (std::size_t quote = sources.find('"'); quote != std::string::npos;
         quote = sources.find('"', quote + 1)) {
        const std::string code = codeAt(sources, quote + 1);
        if (code.empty() || !isSentence(sources, quote + code.size() + 3)) {
            continue;
        }
        const std::size_t begin = sources.rfind(';', quote) + 1;
        const std::string statement = sources.substr(begin, quote - begin);
        for (const char* maker : {"fault", "Fault", "notice", "Notice", "push_back"}) {
            if (statement.find(maker) != std::string::npos) {
                codes.push_back(code);
                break;
            }
        }
    }
    return codes;
}

} // namespace

TEST_SUITE("contract golden") {
    TEST_CASE("every case of the golden table holds") {
        const std::vector<json> cases = goldenCases();
        CHECK(cases.size() >= 100);
        for (const json& row : cases) {
            CAPTURE(row["name"].get<std::string>());
            REQUIRE_FALSE(row["source"].get<std::string>().empty());
            REQUIRE_FALSE(row["expect"].empty());
            const Answered answered =
                askText(row.contains("text") ? row["text"].get<std::string>() : row["request"].dump());
            for (const json& expected : row["expect"]) {
                checkExpectation(answered.body, expected);
            }
        }
    }

    TEST_CASE(
        "every code of the sources is in the catalogue, and every code of the catalogue in the sources") {
        std::string sources;
        for (const auto& entry : std::filesystem::recursive_directory_iterator{root / "core"}) {
            if (entry.path().extension() == ".cpp" && entry.path().filename() != "catalogue.cpp") {
                sources += textOf(entry.path());
            }
        }
        std::set<std::string> known;
        for (const auto& entry : forwright::contract::catalogue()) {
            known.insert(std::string{entry.code});
            CHECK_MESSAGE(sources.find('"' + std::string{entry.code} + '"') != std::string::npos, entry.code);
        }
        const std::vector<std::string> used = codesBeforeSentences(sources);
        for (const std::string& code : used) {
            CHECK_MESSAGE(known.count(code) == 1, "core/contract/catalogue.cpp lacks: " << code);
        }
        CHECK(used.size() >= 20);
    }

    TEST_CASE("the list of codes that people read is the catalogue") {
        // The table's columns are filled up with spaces, so that it reads well as text.
        std::string list = textOf(root / "DEVELOPERS.md");
        list.erase(std::unique(list.begin(), list.end(),
                               [](char one, char next) { return one == ' ' && next == ' '; }),
                   list.end());
        for (const auto& entry : forwright::contract::catalogue()) {
            const std::string what = !entry.isNotice ? "error" : entry.isError ? "error, notice" : "notice";
            const std::string row =
                "| `" + std::string{entry.code} + "` | " + what + " | " + std::string{entry.meaning} + " |";
            CHECK_MESSAGE(list.find(row) != std::string::npos, "DEVELOPERS.md lacks: " << row);
        }
    }
}
#endif
