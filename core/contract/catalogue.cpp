#include "contract/catalogue.hpp"

#include <array>

namespace forwright::contract {

std::span<const CatalogueEntry> catalogue() {
    static constexpr std::array entries{
        CatalogueEntry{"after-maturity", false, true, "A distribution goes ex after the maturity and is left out."},
        CatalogueEntry{"as-of-not-a-business-day", false, true, "The market's date is no business day of the asset."},
        CatalogueEntry{"before-hold", false, true, "A distribution goes ex before the hedge is held and is left out."},
        CatalogueEntry{"before-spot", true, false, "The maturity is before the first day on which the asset can be delivered."},
        CatalogueEntry{"beyond-last-date", false, true, "Samples are needed past their last date; the last forward rate is held."},
        CatalogueEntry{"beyond-last-pillar", false, true, "A curve is needed past its last pillar; its end is held."},
        CatalogueEntry{"bid-above-offer", true, true, "A bid is above its offer: an error of spot, a notice of a lending fee."},
        CatalogueEntry{"calendar-years", false, true, "A calendar is needed in years for which its holidays are not sourced."},
        CatalogueEntry{"different-conventions", true, false, "The bid and the offer of a rate are in two conventions."},
        CatalogueEntry{"duplicate-member", true, false, "An object has a member more than once."},
        CatalogueEntry{"empty-list", true, false, "A list that needs a row has none."},
        CatalogueEntry{"in-the-past", true, false, "The maturity is before the market's date."},
        CatalogueEntry{"maturity-moved", false, true, "The maturity was no business day and was moved by its roll."},
        CatalogueEntry{"missing", true, false, "A member that is needed is not there."},
        CatalogueEntry{"more-errors", true, false, "There are more errors than an answer lists."},
        CatalogueEntry{"negative", true, false, "A number that has to be at least 0 is below it."},
        CatalogueEntry{"not-a-business-day", true, false, "The maturity is no business day and has no roll."},
        CatalogueEntry{"not-a-date", true, false, "Text is no day that exists, as YYYY-MM-DD, from 1900-01-01 to 2199-12-31."},
        CatalogueEntry{"not-a-date-or-tenor", true, false, "Text is neither a date nor a tenor."},
        CatalogueEntry{"not-a-price", true, false, "A forward, or a bid after its margin, is not above 0."},
        CatalogueEntry{"not-after-as-of", true, false, "A date of a curve is not after the market's date."},
        CatalogueEntry{"not-applicable", true, false, "A member has no meaning for this kind of asset."},
        CatalogueEntry{"not-finite", true, false, "A figure is too large to be a number."},
        CatalogueEntry{"not-json", true, false, "The request is no JSON text."},
        CatalogueEntry{"not-one-of", true, false, "A name or number is none of those that are known here."},
        CatalogueEntry{"not-positive", true, false, "A number that has to be above 0 is not."},
        CatalogueEntry{"not-rising", true, false, "Dates of a list do not rise."},
        CatalogueEntry{"not-used", false, true, "A member is well-formed but of no use here."},
        CatalogueEntry{"not-whole", true, false, "A number has to be whole."},
        CatalogueEntry{"out-of-order", true, false, "The low end is above the amount, or the high end below it."},
        CatalogueEntry{"out-of-range", true, false, "A number is outside of its limits."},
        CatalogueEntry{"pay-before-ex", true, false, "A distribution is paid before it goes ex."},
        CatalogueEntry{"random-fit", true, false, "A model is fitted to a curve that is random itself."},
        CatalogueEntry{"rate-too-low", true, false, "At this rate money is worth nothing at the end of a period."},
        CatalogueEntry{"row-length", true, false, "A path of samples has not one factor for each date."},
        CatalogueEntry{"same-currency", true, false, "A pair's two currencies are the same."},
        CatalogueEntry{"sum-not-one", true, false, "Probabilities or weights do not sum to 1."},
        CatalogueEntry{"too-deep", true, false, "Objects and lists are nested deeper than 32."},
        CatalogueEntry{"too-far", true, false, "A date is more than 100 years ahead or after 2199-12-31."},
        CatalogueEntry{"too-large", true, false, "The request has more than 64 MB or 5,000,000 values."},
        CatalogueEntry{"too-long", true, false, "A name has more than 200 characters."},
        CatalogueEntry{"too-many", true, false, "There are more than 2,000,000 sample factors."},
        CatalogueEntry{"too-many-outcomes", false, true, "Quantiles are left out, since there are too many outcomes."},
        CatalogueEntry{"too-many-rows", true, false, "A list has more rows than it may."},
        CatalogueEntry{"too-much-work", true, false, "The request would take minutes; ask for less at once."},
        CatalogueEntry{"unknown-calendar", true, false, "A business centre is not known."},
        CatalogueEntry{"unknown-currency", true, false, "A code is no currency in use by ISO 4217."},
        CatalogueEntry{"unknown-format", true, false, "The request speaks another contract."},
        CatalogueEntry{"unknown-member", true, false, "A member is not known; the nearest known one is named."},
        CatalogueEntry{"unknown-task", true, false, "There is no task of that name."},
        CatalogueEntry{"unusual-sign", false, true, "A spread has the sign that gains the dealer something."},
        CatalogueEntry{"wrong-type", true, false, "A value is of another JSON type than is wanted."},
    };
    return entries;
}

} // namespace forwright::contract
