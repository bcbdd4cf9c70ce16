#pragma once

#include "contract/reader.hpp"
#include "forward/quote.hpp"

#include <optional>

namespace forwright::contract {

/// `client`, `quantity` and `margin` of an object that may have more; the maturity is left as it is made.
[[nodiscard]] forward::Inquiry readTerms(Reader& object);

/// `maturity` and `roll` of an object that may have more.
[[nodiscard]] std::optional<forward::Maturity> readMaturity(Reader& object);

/// An inquiry: terms and maturity.
[[nodiscard]] std::optional<forward::Inquiry> readInquiry(const Value& value);

/// `roll`, which a tenor has no use for (`not-used`): `forDate` says whether there is a date.
[[nodiscard]] std::optional<dates::Roll> readRoll(Reader& object, bool forDate);

} // namespace forwright::contract
