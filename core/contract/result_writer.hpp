#pragma once

#include "contract/writer.hpp"
#include "income/income.hpp"

#include <optional>
#include <string_view>

namespace forwright::contract {

/// A member {"bid", "offer"}; a side without a value is null.
template <class T> void writeTwoWay(Writer& writer, std::string_view name, const T& bid, const T& offer) {
    writer.key(name).beginObject();
    writer.member("bid", bid);
    writer.member("offer", offer);
    writer.endObject();
}

/// A member that is a list, each row written by `write`.
template <class Rows, class Write>
void writeList(Writer& writer, std::string_view name, const Rows& rows, Write write) {
    writer.key(name).beginList();
    for (const auto& row : rows) {
        write(row);
    }
    writer.endList();
}

} // namespace forwright::contract
