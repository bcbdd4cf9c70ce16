#pragma once

#include "contract/reader.hpp"
#include "forward/market.hpp"

#include <optional>
#include <string>

namespace forwright::contract {

/// Reads what is dealt into `asset`, as far as it is without fault. The kind is handed back apart: whether it
/// could be read decides what else the market may have.
[[nodiscard]] std::optional<forward::AssetKind> readAsset(const Value& value, forward::Asset& asset);

/// A name that people give something; at most `longestName` characters (`too-long`).
/// An ISO 4217 code; what is none is told (`unknown-currency`) and given all the same.
[[nodiscard]] std::string readCurrency(const Value& value);
[[nodiscard]] std::string readName(const Value& value);

} // namespace forwright::contract
