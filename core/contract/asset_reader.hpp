#pragma once

#include "contract/reader.hpp"
#include "forward/market.hpp"

#include <optional>

namespace forwright::contract {

/// Reads what is dealt into `asset`, as far as it is without fault. The kind is handed back apart: whether it could be read decides what else the
/// market may have.
[[nodiscard]] std::optional<forward::AssetKind> readAsset(const Value& value, forward::Asset& asset);

} // namespace forwright::contract
