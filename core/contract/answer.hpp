#pragma once

#include "contract/json.hpp"

#include <string>
#include <string_view>

/// JSON in, JSON out: the contract `forwright/1` that program, module and page speak. Its shape is
/// forwright-1.schema.json.
namespace forwright::contract {

struct Answer {
    std::string text; ///< one JSON text without line ends
    bool ok = false;  ///< whether it holds a result
};

/// The answer to a request, whatever the text: a result, or every error with its place. Nothing is kept from
/// one call to the next.
[[nodiscard]] Answer answer(std::string_view request);

/// The JSON Schema of requests and answers.
[[nodiscard]] std::string_view schema();

/// The version of the project.
[[nodiscard]] std::string_view version();

} // namespace forwright::contract
