#include "contract/inquiry_reader.hpp"

namespace forwright::contract {

using dates::Date;
using dates::Roll;
using forward::Client;
using forward::Inquiry;
using forward::Margin;
using forward::MarginUnit;
using forward::Maturity;

namespace {

Margin readMargin(const Value& value) {
    Reader object{value};
    const MarginUnit unit = object.choice(
        "unit", {MarginUnit::price, MarginUnit::bpOfSpot, MarginUnit::bpPerYear}, MarginUnit::price);
    return {unit, object.number("amount", notNegative, 0.0)};
}

} // namespace

Inquiry readTerms(Reader& object) {
    Inquiry inquiry;
    inquiry.client = object.choice("client", {Client::buys, Client::sells, Client::twoWay}, Client::twoWay);
    inquiry.quantity = object.number("quantity", positive, 1.0);
    inquiry.margin = readMargin(object.optional("margin"));
    return inquiry;
}

std::optional<Roll> readRoll(Reader& object, bool forDate) {
    const Value value = object.optional("roll");
    const auto roll = value.choice({Roll::following, Roll::modifiedFollowing, Roll::preceding});
    if (roll && !forDate) {
        object.findings().notice(value.place(), "not-used",
                                 "A tenor has a roll of its own; this one is not used.");
    }
    return roll;
}

std::optional<Maturity> readMaturity(Reader& object) {
    const auto at = object.required("maturity", "a date or a tenor").maturity();
    const std::optional<Roll> roll = readRoll(object, !at || std::holds_alternative<Date>(*at));
    return at ? std::optional{Maturity{*at, roll}} : std::nullopt;
}

std::optional<Inquiry> readInquiry(const Value& value) {
    Reader object{value};
    Inquiry inquiry = readTerms(object);
    const std::optional<Maturity> maturity = readMaturity(object);
    if (!maturity) {
        return std::nullopt;
    }
    inquiry.maturity = *maturity;
    return inquiry;
}

} // namespace forwright::contract
