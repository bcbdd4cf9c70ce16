#pragma once

#include "contract/reader.hpp"
#include "income/income.hpp"

#include <optional>
#include <string_view>

namespace forwright::contract {

/// One number for both sides, or `bid` and `offer`; `what` is it in words ("a spot price").
[[nodiscard]] std::optional<income::TwoWay<double>> readTwoWay(const Value& value, const Range& range,
                                                               std::string_view what);

} // namespace forwright::contract
