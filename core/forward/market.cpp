#include "forward/market.hpp"

#include <algorithm>
#include <array>

namespace forwright::forward {
namespace {

struct KindName {
    AssetKind kind;
    std::string_view name;
};

constexpr std::array kindNames{
    KindName{AssetKind::share, "share"},
    KindName{AssetKind::index, "index"},
    KindName{AssetKind::currencyPair, "currency-pair"},
    KindName{AssetKind::commodity, "commodity"},
};

} // namespace

std::optional<AssetKind> parseAssetKind(std::string_view name) {
    for (const KindName& entry : kindNames) {
        if (entry.name == name) {
            return entry.kind;
        }
    }
    return std::nullopt;
}

std::string_view nameOf(AssetKind kind) {
    return kindNames[static_cast<std::size_t>(kind)].name;
}

bool isByDelivery(AssetKind kind) {
    return kind == AssetKind::currencyPair || kind == AssetKind::commodity;
}

double mid(const TwoWay<double>& both) {
    return 0.5 * (both.bid + both.offer);
}

discounting::Rate mid(const TwoWay<discounting::Rate>& both) {
    discounting::Rate rate = both.bid;
    rate.value = 0.5 * (both.bid.value + both.offer.value);
    return rate;
}

int lagOn(const Asset& asset, Date dealing) {
    const auto later = std::upper_bound(asset.settlementLag.begin(), asset.settlementLag.end(), dealing,
                                        [](Date date, const LagFrom& entry) { return date < entry.from; });
    return later == asset.settlementLag.begin() ? asset.settlementLag.front().lag : std::prev(later)->lag;
}

} // namespace forwright::forward
