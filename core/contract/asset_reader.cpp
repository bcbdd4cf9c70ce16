#include "contract/asset_reader.hpp"

#include "contract/calendar_reader.hpp"
#include "contract/currencies.hpp"
#include "dates/business_calendar.hpp"

#include <algorithm>
#include <utility>
#include <vector>

namespace forwright::contract {

using dates::BusinessCalendar;
using dates::Date;
using forward::Asset;
using forward::AssetKind;

namespace {

constexpr int longestLag = 30;
constexpr int usualLag = 2;

std::vector<forward::LagFrom> readLagsByDate(const Value& list) {
    std::vector<forward::LagFrom> lags;
    list.rows([&lags](const Value& row, std::size_t /*index*/) {
        Reader entry{row};
        const Value fromValue = entry.required("from", "the dealing date from which the lag holds");
        const std::optional<Date> from = fromValue.date();
        const std::optional<int> lag =
            entry.required("lag", "the lag in business days").integer(0, longestLag);
        if (from && !lags.empty() && *from <= lags.back().from) {
            fromValue.fault("not-rising", "This date has to be after the one before it, " +
                                              dates::toIso(lags.back().from) + ".");
        }
        if (from && lag) {
            lags.push_back({*from, *lag});
        }
    });
    if (list.json().size() == 0) {
        list.fault("empty-list", "A settlement lag needs at least one row.");
    }
    return lags;
}

std::vector<forward::LagFrom> readLag(const Value& value) {
    if (value.isList()) {
        return readLagsByDate(value);
    }
    if (value.present() && !value.isNumber()) {
        value.wrongType("a settlement lag (a number of business days, or a list of {from, lag})");
        return {};
    }
    return {{dates::earliest, value.integer(0, longestLag).value_or(usualLag)}};
}

std::string asJson(const std::vector<std::string>& texts) {
    Writer writer;
    writer.beginList();
    for (const std::string& text : texts) {
        writer.value(text);
    }
    writer.endList();
    return writer.take();
}

void readCalendars(Reader& object, Asset& asset) {
    const std::vector<std::string> centres = readCentres(object.optional("calendars", "[]"));
    const Value lagValue = object.optional("lagCalendars", asJson(centres));
    const std::vector<Date> holidays = readDates(object.optional("holidays"));
    const std::vector<Date> openDays = readDates(object.optional("openDays"));
    asset.calendar = BusinessCalendar{centres, holidays, openDays};
    asset.lagCalendar =
        lagValue.present() ? BusinessCalendar{readCentres(lagValue), holidays, openDays} : asset.calendar;
}

/// The base currency, which a pair has and nothing else.
void readBase(Reader& object, Asset& asset) {
    if (asset.kind != AssetKind::currencyPair) {
        object.forbid("base", "Only a currency pair has a base currency.");
        return;
    }
    const Value value = object.required("base", "the currency that is bought or sold, by its ISO 4217 code");
    asset.base = readCurrency(value);
    if (!asset.base.empty() && asset.base == asset.currency) {
        value.fault("same-currency", "The base currency has to be another one than the quote currency, " +
                                         asset.currency + ".");
    }
}

} // namespace

std::string readCurrency(const Value& value) {
    const std::optional<std::string_view> code = value.text();
    if (code && !isCurrency(*code)) {
        value.fault("unknown-currency",
                    shownText(*code) + " is no currency in use: give its ISO 4217 code, as in EUR.");
    }
    return std::string{code.value_or("")};
}

std::string readName(const Value& value) {
    const std::string_view name = value.text().value_or("");
    const auto characters = static_cast<std::size_t>(std::count_if(
        name.begin(), name.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U; }));
    if (characters > longestName) {
        value.fault("too-long", "A name may have " + std::to_string(longestName) +
                                    " characters; this one has " + std::to_string(characters) + ".");
    }
    return std::string{name};
}

std::optional<AssetKind> readAsset(const Value& value, Asset& asset) {
    Reader object{value};
    const std::optional<AssetKind> kind =
        object.required("kind", "share, index, currency-pair or commodity")
            .choice({AssetKind::share, AssetKind::index, AssetKind::currencyPair, AssetKind::commodity});
    asset.name = readName(object.optional("name"));
    asset.currency = readCurrency(
        object.required("currency", "the currency that prices are quoted in, by its ISO 4217 code"));
    asset.settlementLag = readLag(object.optional("settlementLag", std::to_string(usualLag)));
    readCalendars(object, asset);
    asset.tick = object.optional("tick").number(positive);
    if (kind) {
        asset.kind = *kind;
        readBase(object, asset);
    } else {
        (void)object.optional("base");
    }
    return kind;
}

} // namespace forwright::contract
