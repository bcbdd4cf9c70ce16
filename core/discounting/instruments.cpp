#include "dates/date.hpp"
#include "discounting/calibration.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numeric>

namespace forwright::discounting {

namespace {

constexpr std::array<std::string_view, 3> instrumentNames{"deposit", "fra", "overnight-swap"};

/// Years of the turn that lie before u.
double yearsOf(const Turn& turn, Date u) {
    return u <= turn.from ? 0.0 : dates::years(turn.from, std::min(u, turn.to));
}

/// What turns take off ln P(u).
double takenBy(std::span<const Turn> turns, Date u) {
    double taken = 0.0;
    for (const Turn& turn : turns) {
        taken += turn.spread * yearsOf(turn, u);
    }
    return taken;
}

bool isSwap(const Instrument& instrument) {
    return instrument.type == InstrumentType::overnightSwap;
}

/// Where an instrument looks at the curve: its start, then its payments, of which the last is its end.
std::vector<Date> datesOf(const Instrument& instrument) {
    std::vector<Date> all{instrument.start};
    if (isSwap(instrument)) {
        all.insert(all.end(), instrument.payments.begin(), instrument.payments.end());
    } else {
        all.push_back(instrument.end);
    }
    return all;
}

std::vector<double> fractionsOf(const Instrument& instrument) {
    const std::vector<Date> all = datesOf(instrument);
    std::vector<double> fractions;
    for (std::size_t i = 1; i < all.size(); ++i) {
        fractions.push_back(dates::yearFraction(instrument.dayCount, all[i - 1], all[i]));
    }
    return fractions;
}

/// P(start) = P(end)·(1 + r·τ), as ln P(start) − ln P(end) − ln(1 + r·τ); of a swap r·Σ τ·P/P(start) +
/// P(end)/P(start) − 1.
double missOf(const Instrument& instrument, std::span<const double> fractions, std::span<const double> logs,
              std::span<double> byLogs) {
    if (!isSwap(instrument)) {
        byLogs[0] = 1.0;
        byLogs[1] = -1.0;
        return logs[0] - logs[1] - numeric::log1p(instrument.rate * fractions[0]);
    }
    double miss = -1.0;
    for (std::size_t i = 1; i < logs.size(); ++i) {
        const double relative = numeric::exp(logs[i] - logs[0]);
        const double paid = instrument.rate * fractions[i - 1] + (i + 1 == logs.size() ? 1.0 : 0.0);
        miss += paid * relative;
        byLogs[i] = paid * relative;
        byLogs[0] -= paid * relative;
    }
    return miss;
}

/// ∂ miss / ∂ rate.
double missByRate(const Instrument& instrument, std::span<const double> fractions,
                  std::span<const double> logs) {
    if (!isSwap(instrument)) {
        return -fractions[0] / (1.0 + instrument.rate * fractions[0]);
    }
    double annuity = 0.0;
    for (std::size_t i = 1; i < logs.size(); ++i) {
        annuity += fractions[i - 1] * numeric::exp(logs[i] - logs[0]);
    }
    return annuity;
}

/// The rate that the curve makes of it.
double repricedOn(const Instrument& instrument, std::span<const double> fractions,
                  std::span<const double> logs) {
    if (!isSwap(instrument)) {
        return numeric::expm1(logs[0] - logs[1]) / fractions[0];
    }
    return -numeric::expm1(logs.back() - logs[0]) / missByRate(instrument, fractions, logs);
}

class InstrumentCurve final : public Curve {
  public:
    /// `order[i]` is the instrument whose end is the i-th pillar of `calibrated`.
    InstrumentCurve(Date asOf, Instruments given, std::vector<std::size_t> order, Calibrated calibrated)
        : Curve(asOf), given_(std::move(given)), order_(std::move(order)),
          curve_(std::move(calibrated.curve)) {
        const std::size_t count = order_.size();
        const std::size_t turns = given_.turns.size();
        zerosBy_.assign(count * (count + turns), 0.0);
        for (std::size_t condition = 0; condition < count; ++condition) {
            const Instrument& instrument = given_.items[order_[condition]];
            const std::vector<Date> dates = datesOf(instrument);
            const std::vector<double> logs = logsAt(dates);
            const std::vector<double> fractions = fractionsOf(instrument);
            std::vector<double> byLogs(logs.size(), 0.0);
            (void)missOf(instrument, fractions, logs, byLogs);
            const double byRate = missByRate(instrument, fractions, logs);
            for (std::size_t pillar = 0; pillar < count; ++pillar) {
                const double follow = calibrated.follow[pillar * count + condition];
                zeroBy(pillar, order_[condition]) -= follow * byRate;
                for (std::size_t turn = 0; turn < turns; ++turn) {
                    for (std::size_t i = 0; i < dates.size(); ++i) {
                        zeroBy(pillar, count + turn) +=
                            follow * byLogs[i] * yearsOf(given_.turns[turn], dates[i]);
                    }
                }
            }
        }
    }

    [[nodiscard]] double logFactor(Date u) const override {
        return curve_->logFactor(u) - takenBy(given_.turns, u);
    }

    [[nodiscard]] std::vector<Parameter> parameters() const override {
        std::vector<Parameter> all;
        for (std::size_t i = 0; i < given_.items.size(); ++i) {
            all.push_back(
                {detail::place("/items", i) + "/rate", Parameter::Kind::pillar, given_.items[i].rate});
        }
        for (std::size_t i = 0; i < given_.turns.size(); ++i) {
            all.push_back(
                {detail::place("/turns", i) + "/spread", Parameter::Kind::model, given_.turns[i].spread});
        }
        return all;
    }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        const std::vector<double> byZero = curve_->logFactorGradient(u);
        const std::size_t count = order_.size();
        std::vector<double> gradient(count + given_.turns.size(), 0.0);
        for (std::size_t pillar = 0; pillar < count; ++pillar) {
            for (std::size_t parameter = 0; parameter < gradient.size(); ++parameter) {
                gradient[parameter] += byZero[pillar] * zerosBy_[pillar * gradient.size() + parameter];
            }
        }
        for (std::size_t turn = 0; turn < given_.turns.size(); ++turn) {
            gradient[count + turn] -= yearsOf(given_.turns[turn], u);
        }
        return gradient;
    }

    [[nodiscard]] outcome::Review review(Date last) const override {
        outcome::Review review = curve_->review(last);
        for (outcome::Fault& fault : review.faults) {
            fault.at = "/items";
        }
        for (outcome::Notice& notice : review.notices) {
            notice.at = detail::place("/items", order_.back());
        }
        if (review.faults.empty() && !(std::fabs(logFactor(last)) <= largestLogFactor)) {
            review.faults.push_back(
                {"/turns", "not-finite", "These turns take the factor beyond what a number holds."});
        }
        return review;
    }

    [[nodiscard]] std::string convention() const override {
        const std::size_t count = given_.items.size();
        const std::size_t turns = given_.turns.size();
        return "from " + std::to_string(count) + (count == 1 ? " instrument, " : " instruments, ") +
               std::string(nameOf(given_.interpolation)) +
               (turns == 0   ? ""
                : turns == 1 ? ", one turn"
                             : ", " + std::to_string(turns) + " turns");
    }

    [[nodiscard]] std::vector<Date> jumps() const override {
        std::vector<Date> all;
        for (const Turn& turn : given_.turns) {
            all.push_back(turn.from);
            all.push_back(turn.to);
        }
        for (const Instrument& item : given_.items) {
            all.push_back(item.end);
        }
        return all;
    }

    [[nodiscard]] std::vector<RepricedInstrument> instruments() const override {
        std::vector<RepricedInstrument> all;
        for (std::size_t i = 0; i < given_.items.size(); ++i) {
            const Instrument& item = given_.items[i];
            all.push_back({detail::place("/items", i), std::string(nameOf(item.type)), item.start, item.end,
                           item.rate, repricedOn(item, fractionsOf(item), logsAt(datesOf(item)))});
        }
        return all;
    }

  private:
    [[nodiscard]] std::vector<double> logsAt(const std::vector<Date>& dates) const {
        std::vector<double> logs;
        for (const Date date : dates) {
            logs.push_back(logFactor(date));
        }
        return logs;
    }
    [[nodiscard]] double& zeroBy(std::size_t pillar, std::size_t parameter) {
        return zerosBy_[pillar * (order_.size() + given_.turns.size()) + parameter];
    }

    Instruments given_;
    std::vector<std::size_t> order_;
    CurvePtr curve_;              ///< without the turns
    std::vector<double> zerosBy_; ///< ∂ zero rate of a pillar / ∂ parameter, pillar by pillar
};

/// A zero rate to begin with: the rate compounded by the length of a period.
double guessFrom(const Instrument& item, double period) {
    const double growth = item.rate * period;
    return growth > -0.9 ? numeric::log1p(growth) / period : -0.9;
}

std::string inWords(const Instruments& given, std::size_t index) {
    const Instrument& item = given.items[index];
    return "the " + std::string(nameOf(item.type)) + " from " + dates::toIso(item.start) + " to " +
           dates::toIso(item.end);
}

void checkTurns(outcome::Faults& faults, Date asOf, const Instruments& given) {
    for (std::size_t i = 0; i < given.turns.size(); ++i) {
        const Turn& turn = given.turns[i];
        const std::string at = detail::place("/turns", i);
        if (turn.from < asOf) {
            faults.push_back({at + "/from", "not-after-as-of",
                              "A turn begins on the market's date, " + dates::toIso(asOf) +
                                  ", or later; it is " + dates::toIso(turn.from) + "."});
        }
        if (turn.to <= turn.from) {
            faults.push_back({at + "/to", "not-rising",
                              "A turn ends after it begins, " + dates::toIso(turn.from) + "; it is " +
                                  dates::toIso(turn.to) + "."});
        }
        detail::requireWithin(faults, at + "/spread", turn.spread, -10.0, 10.0, "A turn's spread");
    }
}

/// Indices by end, or what stands against them.
std::vector<std::size_t> orderOf(outcome::Faults& faults, Date asOf, const Instruments& given) {
    std::vector<std::size_t> order(given.items.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(), [&given](std::size_t one, std::size_t other) {
        return given.items[one].end < given.items[other].end;
    });
    for (std::size_t i = 0; i < order.size(); ++i) {
        const Instrument& item = given.items[order[i]];
        const std::string at = detail::place("/items", order[i]);
        const std::size_t before = faults.size();
        detail::requireWithin(faults, at + "/rate", item.rate, -0.99, 10.0, "A rate");
        if (item.start < asOf || item.end <= item.start) {
            faults.push_back({at, "not-rising",
                              "An instrument ends after it begins; this one runs from " +
                                  dates::toIso(item.start) + " to " + dates::toIso(item.end) + "."});
        }
        if (i > 0 && given.items[order[i - 1]].end == item.end) {
            faults.push_back({at, "same-end",
                              "It ends on the day on which " + inWords(given, order[i - 1]) +
                                  " ends: one of the two has to go."});
        }
        const Date known = i == 0 ? asOf : given.items[order[i - 1]].end;
        if (item.type == InstrumentType::fra && item.start > known) {
            faults.push_back(
                {at, "gap",
                 "It begins on " + dates::toIso(item.start) +
                     (i == 0 ? ", and no instrument ends before it: the rate until then is not known."
                             : ", but the instruments before it reach only to " + dates::toIso(known) +
                                   ": give one that fills the gap.")});
        }
        if (faults.size() != before) {
            continue;
        }
        for (const double fraction : fractionsOf(item)) {
            if (!(fraction > 0.0)) {
                faults.push_back(
                    {at + "/dayCount", "no-solution", "Its period counts no days in this convention."});
                break;
            }
            if (!isSwap(item) && !(1.0 + item.rate * fraction > 0.0)) {
                faults.push_back({at + "/rate", "rate-too-low",
                                  "At this rate money is worth nothing at the end of its period."});
            }
        }
    }
    return order;
}

} // namespace

std::optional<InstrumentType> parseInstrumentType(std::string_view name) {
    for (std::size_t i = 0; i < instrumentNames.size(); ++i) {
        if (instrumentNames[i] == name) {
            return static_cast<InstrumentType>(i);
        }
    }
    return std::nullopt;
}

std::string_view nameOf(InstrumentType type) {
    return instrumentNames[static_cast<std::size_t>(type)];
}

Outcome<CurvePtr> instruments(Date asOf, Instruments given) {
    outcome::Faults faults;
    if (given.items.empty()) {
        faults.push_back({"/items", "empty-list", "A curve needs at least one instrument."});
    }
    if (given.items.size() > mostInstruments) {
        return outcome::Fault{"/items", "too-many-rows",
                              "A curve may have " + std::to_string(mostInstruments) + " instruments."};
    }
    checkTurns(faults, asOf, given);
    std::vector<std::size_t> order = orderOf(faults, asOf, given);
    if (!faults.empty()) {
        return faults;
    }
    std::vector<Date> ends;
    std::vector<double> guess;
    std::vector<Condition> conditions;
    for (const std::size_t index : order) {
        const Instrument& item = given.items[index];
        ends.push_back(item.end);
        Condition condition{datesOf(item), {}, 0.0};
        std::vector<double> shifts;
        for (const Date date : condition.dates) {
            shifts.push_back(-takenBy(given.turns, date));
        }
        std::vector<double> fractions = fractionsOf(item);
        guess.push_back(guessFrom(item, fractions.back()));
        condition.tolerance =
            5e-13 * std::accumulate(fractions.begin(), fractions.end(), 0.0) * (isSwap(item) ? 0.05 : 0.5);
        condition.miss = [&item, fractions, shifts](std::span<const double> logs, std::span<double> byLogs) {
            std::vector<double> moved(logs.begin(), logs.end());
            for (std::size_t i = 0; i < moved.size(); ++i) {
                moved[i] += shifts[i];
            }
            return missOf(item, fractions, moved, byLogs);
        };
        conditions.push_back(std::move(condition));
    }
    std::variant<Calibrated, std::size_t> found =
        calibrate(asOf, given.interpolation, ends, conditions, guess);
    if (const std::size_t* failed = std::get_if<std::size_t>(&found)) {
        const std::size_t index = order[*failed];
        return outcome::Fault{
            detail::place("/items", index), "no-solution",
            "No discount factor satisfies " + inWords(given, index) +
                " together with the instruments before it: look at its rate and at theirs."};
    }
    return CurvePtr(std::make_shared<InstrumentCurve>(asOf, std::move(given), std::move(order),
                                                      std::get<Calibrated>(std::move(found))));
}

} // namespace forwright::discounting
