#pragma once

#include "contract/curve_reader.hpp"
#include "forward/implied.hpp"
#include "forward/market.hpp"

#include <optional>

namespace forwright::contract {

/// Whether the value is a curve implied by quoted forwards, `"kind": "forwards"`.
[[nodiscard]] bool quotesForwards(const Value& value);

/// What is quoted: points or outrights of a pair, prices of listed contracts (always outright) of another
/// asset. Nothing where it is at fault.
[[nodiscard]] std::optional<forward::QuotedForwards>
readForwards(const Value& value, const CurveContext& context, const forward::Asset& asset);

/// Puts the curves that the forwards imply into the market that was read without them; faults are told where
/// they stand, below `at`. Whether it could be done.
[[nodiscard]] bool implyFrom(const forward::QuotedForwards& quoted, const std::string& at, Findings& findings,
                             forward::Market& market);

} // namespace forwright::contract
