#pragma once

#include "contract/findings.hpp"
#include "contract/reader.hpp"
#include "contract/writer.hpp"

#include <functional>
#include <span>
#include <string_view>

namespace forwright::contract {

/// A request that was read without fault, ready to be worked out. Writes the value of `result`; where it adds
/// a fault, nothing written counts.
using Calculation = std::function<void(Findings&, Writer& result)>;

/// Something that can be asked for by one name.
struct Task {
    std::string_view name;
    /// Reads what stands in the request beside `format` and `task`. Faults go to the reader's findings; where
    /// there are any, the calculation is not run and may be empty.
    Calculation (*read)(Reader& request);
};

/// Every task there is. Adding one: its file in tasks/, its line in tasks/registry.cpp, its shapes in the
/// schema.
[[nodiscard]] std::span<const Task> tasks();

} // namespace forwright::contract
