#pragma once

#include <span>
#include <string_view>

namespace forwright::contract {

/// A code that errors or notices carry, and what it says. Codes are kept for good: programs go by them.
struct CatalogueEntry {
    std::string_view code;
    bool isError;  ///< it stops the calculation
    bool isNotice; ///< it does not
    std::string_view meaning;
};

/// Every code that any answer may carry, in alphabetical order. The tests hold it against the sources and
/// against the list that people read.
[[nodiscard]] std::span<const CatalogueEntry> catalogue();

} // namespace forwright::contract
