#ifndef __EMSCRIPTEN__

#include "discounting/money_market.hpp"
#include "discounting_fixtures.hpp"

#include <rapidcheck.h>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
using forwright::dates::BusinessCalendar;
using forwright::dates::DayCount;
using forwright::dates::DayCountRule;
using forwright::dates::ShortPeriod;
using forwright::dates::Tenor;
using forwright::dates::TenorUnit;

namespace {

constexpr Interpolation everyInterpolation[] = {Interpolation::logLinear, Interpolation::linearZero,
                                                Interpolation::monotoneCubic};

DayCountRule rule(DayCount kind) {
    DayCountRule made;
    made.kind = kind;
    return made;
}

/// A money market of deposits, agreements and swaps by rising end. Each rate is the one before it, moved by
/// up to `move` basis points, from one of up to `level`.
Instruments arbitraryMarket(Interpolation interpolation, int level, int move) {
    const std::vector<std::string> centres{"EUTA"};
    const MoneyMarket market{BusinessCalendar(centres), *rc::gen::inRange(0, 4)};
    const DayCountRule dayCount =
        rule(*rc::gen::element(DayCount::act360, DayCount::act365Fixed, DayCount::thirtyE360));
    const auto payments =
        *rc::gen::element(Payments::annual, Payments::semiannual, Payments::quarterly, Payments::monthly);
    Instruments given{interpolation, {}, {}};
    double rate = *rc::gen::inRange(-level / 4, level + 1) * 1e-4;
    const auto next = [&] {
        rate += *rc::gen::inRange(-move, move + 1) * 1e-4;
        return rate;
    };
    const auto maybe = [] {
        return *rc::gen::inRange(0, 3) != 0;
    };
    if (maybe()) {
        given.items.push_back(
            deposit(asOf, market, Tenor{1, TenorUnit::week}, next(), rule(DayCount::act360)));
    }
    given.items.push_back(deposit(asOf, market, Tenor{3, TenorUnit::month}, next(), rule(DayCount::act360)));
    for (const int start : {3, 6, 9}) {
        given.items.push_back(forwardRateAgreement(asOf, market, Tenor{start, TenorUnit::month},
                                                   Tenor{start + 3, TenorUnit::month}, next(),
                                                   rule(DayCount::act360)));
    }
    for (const int years : {2, 3, 4, 5, 7, 10, 15, 20, 30}) {
        if (maybe()) {
            given.items.push_back(
                overnightSwap(asOf, market, Tenor{years, TenorUnit::year}, next(), dayCount, payments));
        }
    }
    if (maybe()) {
        const int from = *rc::gen::inRange(1, 400);
        given.turns.push_back({afterDays(from), afterDays(from + *rc::gen::inRange(1, 8)),
                               *rc::gen::inRange(-300, 300) * 1e-4});
    }
    return given;
}

} // namespace

TEST_SUITE("discounting: properties of bootstrapped curves") {
    TEST_CASE("markets as they are quoted come back") {
        for (const Interpolation interpolation : everyInterpolation) {
            CHECK(rc::check("instruments come back", [interpolation] {
                const Instruments given = arbitraryMarket(interpolation, 800, 40);
                const auto curve = instruments(asOf, given);
                for (const auto& fault : curve.faults()) {
                    RC_LOG() << fault.at << " " << fault.code << " " << fault.message;
                }
                RC_ASSERT(curve.ok());
                for (const RepricedInstrument& item : curve.value()->instruments()) {
                    RC_ASSERT(std::fabs(item.repriced - item.quote) < 1e-12);
                }
            }));
        }
    }

    TEST_CASE("what one interpolation meets the others meet") {
        CHECK(rc::check("rough markets", [] {
            Instruments given = arbitraryMarket(Interpolation::logLinear, 1000, 100);
            RC_PRE(instruments(asOf, given).ok());
            for (const Interpolation interpolation : everyInterpolation) {
                given.interpolation = interpolation;
                const auto curve = instruments(asOf, given);
                for (const auto& fault : curve.faults()) {
                    RC_LOG() << nameOf(interpolation) << ": " << fault.at << " " << fault.message;
                }
                RC_ASSERT(curve.ok());
            }
        }));
    }

    TEST_CASE("any market is met or refused, and never by something that is no number") {
        for (const Interpolation interpolation : everyInterpolation) {
            CHECK(rc::check("any market", [interpolation] {
                const Instruments given = arbitraryMarket(interpolation, 20'000, 10'000);
                const auto curve = instruments(asOf, given);
                if (!curve.ok()) {
                    RC_ASSERT(!curve.faults().front().code.empty());
                    return;
                }
                for (const RepricedInstrument& item : curve.value()->instruments()) {
                    RC_ASSERT(std::fabs(item.repriced - item.quote) <
                              1e-12 * std::fmax(1.0, std::fabs(item.quote)));
                }
                for (const int days : {1, 50, 1000, 15'000}) {
                    RC_ASSERT(std::isfinite(curve.value()->logFactor(afterDays(days))));
                }
            }));
        }
    }
}

#endif
