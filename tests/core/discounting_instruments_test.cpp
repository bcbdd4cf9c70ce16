#include "discounting/money_market.hpp"
#include "discounting_fixtures.hpp"

#include <algorithm>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
using forwright::dates::BusinessCalendar;
using forwright::dates::DayCount;
using forwright::dates::DayCountRule;
using forwright::dates::Tenor;
using forwright::dates::TenorUnit;

namespace {

constexpr Interpolation everyInterpolation[] = {Interpolation::logLinear, Interpolation::linearZero,
                                                Interpolation::monotoneCubic};

const DayCountRule act360{DayCount::act360};
const DayCountRule act365{DayCount::act365Fixed};
const MoneyMarket today{BusinessCalendar{}, 0};

Tenor months(int count) {
    return {count, TenorUnit::month};
}
Tenor years(int count) {
    return {count, TenorUnit::year};
}

/// Deposits, forward rate agreements and swaps out to thirty years, and a turn.
Instruments market(Interpolation interpolation) {
    const MoneyMarket spot{BusinessCalendar{std::vector<std::string>{"EUTA"}}, 2};
    Instruments all{interpolation, {}, {{asOf + std::chrono::days{30}, asOf + std::chrono::days{34}, 0.003}}};
    all.items = {deposit(asOf, spot, forwright::dates::ShortPeriod::overnight, 0.0201, act360),
                 deposit(asOf, spot, months(1), 0.0205, act360),
                 deposit(asOf, spot, months(3), 0.0210, act360),
                 forwardRateAgreement(asOf, spot, months(3), months(6), 0.0215, act360),
                 forwardRateAgreement(asOf, spot, months(6), months(9), 0.0218, act360),
                 overnightSwap(asOf, spot, years(1), 0.0217, act360, Payments::annual),
                 overnightSwap(asOf, spot, months(18), 0.0222, act360, Payments::annual),
                 overnightSwap(asOf, spot, years(2), 0.0225, act360, Payments::semiannual),
                 overnightSwap(asOf, spot, years(5), 0.0245, act360, Payments::annual),
                 overnightSwap(asOf, spot, years(10), 0.0271, act360, Payments::quarterly),
                 overnightSwap(asOf, spot, years(30), 0.0280, act360, Payments::annual)};
    return all;
}

CurvePtr curveOf(const Instruments& given) {
    return made(instruments(asOf, given));
}

} // namespace

TEST_SUITE("discounting: instruments") {
    TEST_CASE("a deposit and a swap by hand, from the definitions") {
        // A year at 2 % simple over 365 days, then a two-year swap that pays 3 % each year.
        const auto first = deposit(asOf, today, years(1), 0.02, act365);
        const auto second = overnightSwap(asOf, today, years(2), 0.03, act365, Payments::annual);
        const CurvePtr curve = curveOf({Interpolation::logLinear, {first, second}, {}});
        const double tau1 = forwright::dates::years(asOf, first.end);
        const double tau2 = forwright::dates::years(second.payments[0], second.end);
        const double p1 = 1.0 / (1.0 + 0.02 * tau1);
        checkRelative(curve->factor(first.end), p1, 1e-14);
        checkRelative(curve->factor(second.end), (1.0 - 0.03 * tau1 * p1) / (1.0 + 0.03 * tau2), 1e-14);
    }

    TEST_CASE("every instrument reprices to 1e-12, and 1e-13 here, in every interpolation") {
        for (const Interpolation interpolation : everyInterpolation) {
            CAPTURE(nameOf(interpolation));
            const CurvePtr curve = curveOf(market(interpolation));
            const auto all = curve->instruments();
            REQUIRE(all.size() == 11);
            for (const RepricedInstrument& item : all) {
                CAPTURE(item.at);
                CHECK(std::fabs(item.repriced - item.quote) < 1e-13);
            }
            CHECK(curve->factor(asOf) == 1.0);
        }
    }

    TEST_CASE("log-linear is the curve that halving finds, instrument by instrument") {
        Instruments given = market(Interpolation::logLinear);
        given.turns.clear();
        const CurvePtr curve = curveOf(given);
        std::vector<Instrument> items = given.items;
        std::sort(items.begin(), items.end(),
                  [](const Instrument& one, const Instrument& other) { return one.end < other.end; });
        std::vector<Pillar> known;
        for (const Instrument& item : items) {
            double low = 0.0, high = 1.5;
            const auto with = [&](double factor) {
                std::vector<Pillar> pillarsNow = known;
                pillarsNow.push_back({item.end, factor});
                Pillars points;
                points.quote = PillarQuote::factor;
                points.pillars = pillarsNow;
                return made(pillars(asOf, points));
            };
            for (int i = 0; i < 60; ++i) {
                const double factor = 0.5 * (low + high);
                const CurvePtr tried = with(factor);
                double paid = tried->factor(item.end);
                Date from = item.start;
                for (const Date date : item.payments.empty() ? std::vector<Date>{item.end} : item.payments) {
                    paid += item.rate * forwright::dates::yearFraction(item.dayCount, from, date) *
                            tried->factor(date);
                    from = date;
                }
                (paid > tried->factor(item.start) ? high : low) = factor;
            }
            known.push_back({item.end, low});
            checkRelative(curve->factor(item.end), low, 1e-13);
        }
    }

    TEST_CASE("a turn lowers factors by its days only, and what lies after it is as without it") {
        Instruments given = market(Interpolation::logLinear);
        const CurvePtr with = curveOf(given);
        const Turn turn = given.turns[0];
        const auto overnight = [](const Curve& curve, Date date) {
            return (curve.logFactor(date) - curve.logFactor(date + std::chrono::days{1})) * 365.0;
        };
        const double before = overnight(*with, turn.from - std::chrono::days{1});
        CHECK(overnight(*with, turn.from) - before == doctest::Approx(turn.spread).epsilon(1e-9));
        CHECK(overnight(*with, turn.to - std::chrono::days{1}) - before ==
              doctest::Approx(turn.spread).epsilon(1e-9));
        // Dealt from today, the instrument across it has its factor from its quote alone.
        const Instrument across = deposit(asOf, today, months(3), 0.02, act360);
        const Instruments plain{Interpolation::linearZero, {across}, {}};
        const Instruments turned{Interpolation::linearZero, {across}, {turn}};
        checkRelative(curveOf(turned)->factor(across.end), curveOf(plain)->factor(across.end), 1e-14);
        CHECK(curveOf(turned)->factor(turn.to) < curveOf(plain)->factor(turn.to));
    }

    TEST_CASE("derivatives by quotes and turns are those of finite differences") {
        for (const Interpolation interpolation : everyInterpolation) {
            CAPTURE(nameOf(interpolation));
            const Instruments given = market(interpolation);
            const CurvePtr curve = curveOf(given);
            const auto parameters = curve->parameters();
            REQUIRE(parameters.size() == 12);
            CHECK(parameters[2].at == "/items/2/rate");
            CHECK(parameters[2].value == 0.0210);
            CHECK(parameters[11].at == "/turns/0/spread");
            for (const int days : {20, 33, 200, 700, 2000, 9000, 12000}) {
                const std::vector<double> gradient = curve->logFactorGradient(afterDays(days));
                for (std::size_t i = 0; i < parameters.size(); ++i) {
                    CAPTURE(days);
                    CAPTURE(parameters[i].at);
                    const double step = 2e-5;
                    const auto moved = [&](double by) {
                        Instruments other = given;
                        (i < 11 ? other.items[i].rate : other.turns[0].spread) += by;
                        return curveOf(other)->logFactor(afterDays(days));
                    };
                    const double seen = centralDifference(moved, 0.0, step);
                    CHECK(std::fabs(gradient[i] - seen) < 1e-8 * std::max(1.0, std::fabs(seen)));
                }
            }
        }
    }

    TEST_CASE("the order in which instruments stand does not matter") {
        Instruments given = market(Interpolation::monotoneCubic);
        const CurvePtr one = curveOf(given);
        std::reverse(given.items.begin(), given.items.end());
        const CurvePtr other = curveOf(given);
        for (const int days : {1, 50, 400, 4000}) {
            CHECK(one->logFactor(afterDays(days)) == other->logFactor(afterDays(days)));
        }
        CHECK(other->instruments().front().at == "/items/0");
        CHECK(other->instruments().front().quote == 0.0280);
    }

    TEST_CASE("steep, inverted and negative rates are met as well") {
        for (const Interpolation interpolation : everyInterpolation) {
            for (const double slope : {-0.004, 0.0, 0.01}) {
                for (const double level : {-0.02, 0.0, 0.05, 0.15}) {
                    Instruments given{interpolation, {}, {}};
                    given.items.push_back(deposit(asOf, today, months(6), level, act360));
                    for (int year = 1; year <= 10; ++year) {
                        given.items.push_back(overnightSwap(asOf, today, years(year),
                                                            level + slope * std::sqrt(year), act360,
                                                            Payments::annual));
                    }
                    CAPTURE(slope);
                    CAPTURE(level);
                    CAPTURE(nameOf(interpolation));
                    for (const RepricedInstrument& item : curveOf(given)->instruments()) {
                        CHECK(std::fabs(item.repriced - item.quote) < 1e-12);
                    }
                }
            }
        }
    }

    TEST_CASE("what cannot be is refused and named") {
        const auto oneYear = deposit(asOf, today, years(1), 0.02, act365);
        const auto refused = [](std::vector<Instrument> items, std::vector<Turn> turns = {}) {
            return codes(instruments(asOf, {Interpolation::logLinear, std::move(items), std::move(turns)}));
        };
        CHECK(refused({}) == "/items empty-list");
        CHECK(refused({oneYear, overnightSwap(asOf, today, years(1), 0.03, act365, Payments::annual)}) ==
              "/items/1 same-end");
        CHECK(refused({forwardRateAgreement(asOf, today, months(3), months(6), 0.02, act360)}) ==
              "/items/0 gap");
        CHECK(refused({oneYear, forwardRateAgreement(asOf, today, months(18), months(24), 0.02, act360)}) ==
              "/items/1 gap");
        // A unit in a year is worth ten today, so the first payment alone is worth more than all.
        CHECK(refused({deposit(asOf, today, years(1), -0.9, act365),
                       overnightSwap(asOf, today, years(2), 0.2, act365, Payments::annual),
                       overnightSwap(asOf, today, years(3), 0.01, act365, Payments::annual)}) ==
              "/items/1 no-solution");
        CHECK(refused({deposit(asOf, today, years(2), -0.6, act365)}) == "/items/0/rate rate-too-low");
        CHECK(refused({forwardRateAgreement(asOf, today, months(6), months(3), 0.02, act360)}) ==
              "/items/0 not-rising /items/0 gap");
        CHECK(refused({oneYear}, {{asOf, asOf, 0.0}}) == "/turns/0/to not-rising");
        CHECK(refused({oneYear}, {{asOf - std::chrono::days{1}, afterDays(1), std::nan("")}}) ==
              "/turns/0/from not-after-as-of /turns/0/spread out-of-range");
        CHECK(refused(std::vector<Instrument>(201, oneYear)) == "/items too-many-rows");
    }

    TEST_CASE("past its last instrument the curve says so, at that instrument") {
        const CurvePtr curve = curveOf(market(Interpolation::logLinear));
        const auto notices = curve->review(afterYears(40)).notices;
        REQUIRE(notices.size() == 1);
        CHECK(notices[0].code == "beyond-last-pillar");
        CHECK(notices[0].at == "/items/10");
    }

    TEST_CASE("dates: a short period first where the tenor is no multiple; days and weeks pay once") {
        const auto swap = overnightSwap(asOf, today, months(18), 0.02, act360, Payments::annual);
        REQUIRE(swap.payments.size() == 2);
        CHECK(swap.payments[0] == forwright::dates::advanceTenor(asOf, months(6), BusinessCalendar{}, true));
        CHECK(overnightSwap(asOf, today, {6, TenorUnit::week}, 0.02, act360, Payments::monthly)
                  .payments.size() == 1);
        CHECK(overnightSwap(asOf, today, years(2), 0.02, act360, Payments::monthly).payments.size() == 24);
        CHECK(overnightSwap(asOf, today, years(2), 0.02, act360, Payments::atEnd).payments.size() == 1);
    }
}
