#pragma once

#include "dates/special_days.hpp"
#include "dates/tenor.hpp"
#include "forward/market.hpp"
#include "outcome/outcome.hpp"

#include <optional>
#include <string>
#include <variant>
#include <vector>

namespace forwright::forward {

/// When a forward ends, as the client says it. `ON`, `TN` and `SN` are the ends of those periods, for pairs
/// and commodities; a third Wednesday on which no business is done goes to the next business day, a third
/// Friday to the one before (common practice).
struct Maturity {
    std::variant<Date, dates::Tenor, dates::ShortPeriod, dates::ThirdDay> at;
    std::optional<dates::Roll>
        roll; ///< where a date that is no business day goes; without it such a date is refused
};

/// How one date was come to.
struct Resolution {
    std::string code; ///< `spot`, `maturity`, `settlement`, `hold-from`
    Date date;
    std::string rule; ///< in plain words: "2026-12-01 plus 2 business days (EUTA)"
};

/// The dates of a forward.
struct Schedule {
    Date asOf;
    Date spot;     ///< t_s: what is dealt today is paid and delivered
    Date holdFrom; ///< h: the hedge is held from here; `asOf` for shares and indices, the spot date for pairs
                   ///< and commodities
    Date maturity; ///< T: the dealing date (shares, indices) or the delivery date (pairs, commodities)
    Date settlement; ///< T_s: the forward is paid and delivered
    int days = 0;    ///< maturity − asOf
    std::vector<Resolution> resolutions;
    outcome::Notices
        notices; ///< a maturity moved off a holiday; `asOf` on no business day; pointers are the request's
};

/// The day what is dealt on `dealing` settles: its lag in business days of the lag's calendars, then on to a
/// day good in all calendars.
[[nodiscard]] Date settlementOf(const Asset& asset, Date dealing);

/// All dates of a forward dealt on the market's `asOf`; `at` is where the maturity stands in the request.
/// A pair may end before its spot date, for value today or tomorrow: the same line prices it. Refused: a date
/// that is no business day and has no roll (`not-a-business-day`, naming its neighbours), one before the
/// earliest possible (`before-spot`, `in-the-past`), one more than 100 years ahead or beyond the last date
/// known (`too-far`).
[[nodiscard]] outcome::Outcome<Schedule> schedule(const Market& market, const Maturity& maturity,
                                                  const std::string& at);

} // namespace forwright::forward
