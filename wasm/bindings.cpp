// The core as JavaScript sees it: a request as text in, its answer as text out. Nothing is computed here.
#include "contract/answer.hpp"

#include <emscripten/bind.h>

#include <string>

namespace {

std::string answer(const std::string& request) {
    return forwright::contract::answer(request).text;
}

std::string schema() {
    return std::string{forwright::contract::schema()};
}

std::string version() {
    return std::string{forwright::contract::version()};
}

} // namespace

EMSCRIPTEN_BINDINGS(forwright) {
    emscripten::function("answer", &answer);
    emscripten::function("schema", &schema);
    emscripten::function("version", &version);
}
