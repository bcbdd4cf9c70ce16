#include "contract/two_way_reader.hpp"

namespace forwright::contract {

using income::TwoWay;

std::optional<TwoWay<double>> readTwoWay(const Value& value, const Range& range, std::string_view what) {
    if (!value.isObject()) {
        if (value.present() && !value.isNumber()) {
            value.wrongType(std::string{what} +
                            " (a number for both sides, or an object with bid and offer)");
            return std::nullopt;
        }
        const std::optional<double> both = value.number(range);
        return both ? std::optional{TwoWay<double>{*both, *both}} : std::nullopt;
    }
    Reader object{value};
    const std::optional<double> bid = object.required("bid", std::string{what} + " on the bid").number(range);
    const std::optional<double> offer =
        object.required("offer", std::string{what} + " on the offer").number(range);
    return bid && offer ? std::optional{TwoWay<double>{*bid, *offer}} : std::nullopt;
}

} // namespace forwright::contract
