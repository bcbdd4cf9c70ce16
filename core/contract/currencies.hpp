#pragma once

#include <string_view>

namespace forwright::contract {

/// Whether ISO 4217 has that code in use (its table A.1 with amendments to 2025, precious metals and SDR
/// included; from memory), so that a misspelt code is not taken for a currency.
[[nodiscard]] bool isCurrency(std::string_view code);

} // namespace forwright::contract
