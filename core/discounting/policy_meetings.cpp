#include "dates/date.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "discounting/laws.hpp"
#include "discounting/path_makers.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <cmath>
#include <cstdint>

namespace forwright::discounting {

namespace {

/// A meeting, its moves in columns. The odds are divided by their sum, which differs from 1 by rounding only.
struct Meeting {
    Date date;
    std::vector<double> moves;
    std::vector<double> odds;
    double meanMove = 0.0;
    double varianceMove = 0.0;
    double largestMove = 0.0;

    explicit Meeting(const PolicyMeeting& meeting) : date(meeting.date) {
        double total = 0.0;
        for (const RateMove& move : meeting.moves) {
            total += move.probability;
        }
        for (const RateMove& move : meeting.moves) {
            moves.push_back(move.by);
            odds.push_back(move.probability / total);
            meanMove += odds.back() * move.by;
            largestMove = std::max(largestMove, std::fabs(move.by));
        }
        for (std::size_t m = 0; m < moves.size(); ++m) {
            varianceMove += odds[m] * (moves[m] - meanMove) * (moves[m] - meanMove);
        }
    }

    /// How long its move is in force by u, years; 0 before the meeting.
    [[nodiscard]] double inForce(Date u) const { return u > date ? dates::years(date, u) : 0.0; }

    /// What it adds to ln P(u).
    [[nodiscard]] double logOfExpectation(Date u) const {
        return detail::logOfMean(odds, moves, -inForce(u));
    }
};

/// One word a meeting.
class MeetingPaths final : public PathMaker {
  public:
    MeetingPaths(Date asOf, double overnight, std::span<const Meeting> meetings, std::span<const Date> dates)
        : years_(dates.size()), overnight_(overnight) {
        Date from = asOf;
        for (std::size_t i = 0; i < dates.size(); ++i) {
            years_[i] = dates::years(from, dates[i]);
            from = dates[i];
        }
        for (const Meeting& meeting : meetings) {
            const auto next = std::upper_bound(dates.begin(), dates.end(), meeting.date);
            Decision decision{
                static_cast<std::size_t>(next - dates.begin()), meeting.inForce(*next), meeting.moves, {}};
            double sum = 0.0;
            for (const double odds : meeting.odds) {
                sum += odds;
                decision.upTo.push_back(sum);
            }
            decision.upTo.back() = 1.0;
            decisions_.push_back(std::move(decision));
        }
    }

    [[nodiscard]] std::size_t numbers() const override { return decisions_.size(); }
    [[nodiscard]] double work() const override {
        return 3.0 * static_cast<double>(decisions_.size() + years_.size());
    }

    void make(const std::uint32_t* words, std::size_t count, double* logFactors) const override {
        for (std::size_t path = 0; path < count; ++path) {
            double rate = overnight_;
            double log = 0.0;
            std::size_t decision = 0;
            for (std::size_t date = 0; date < years_.size(); ++date) {
                log -= rate * years_[date];
                for (; decision < decisions_.size() && decisions_[decision].before == date; ++decision) {
                    const double move =
                        decisions_[decision].moveOf(detail::evenly(words[decision * tilePaths + path]));
                    log -= move * decisions_[decision].inForce;
                    rate += move;
                }
                logFactors[date * tilePaths + path] = log;
            }
        }
    }

  private:
    struct Decision {
        std::size_t before = 0; ///< the first date after it
        double inForce = 0.0;   ///< years from it to that date
        std::vector<double> moves;
        std::vector<double> upTo; ///< the probability of each move and those before it

        [[nodiscard]] double moveOf(double probability) const {
            const auto found = std::lower_bound(upTo.begin(), upTo.end(), probability);
            return moves[static_cast<std::size_t>(found - upTo.begin())];
        }
    };

    std::vector<double> years_; ///< from the date before
    std::vector<Decision> decisions_;
    double overnight_;
};

/// Rates nearer to each other than this are one level: moves that add up to the same differ by rounding only.
constexpr double oneLevel = 1e-12;

/// Where a meeting leads from these levels.
RateLevels afterMeeting(const std::vector<RateLevel>& before, const Meeting& meeting) {
    RateLevels after{meeting.date, {}, {}};
    for (const RateLevel& level : before) {
        for (const double move : meeting.moves) {
            after.levels.push_back({level.rate + move, 0.0});
        }
    }
    const auto byRate = [](const RateLevel& one, const RateLevel& other) {
        return one.rate < other.rate;
    };
    std::sort(after.levels.begin(), after.levels.end(), byRate);
    after.levels.erase(std::unique(after.levels.begin(), after.levels.end(),
                                   [](const RateLevel& one, const RateLevel& other) {
                                       return other.rate - one.rate < oneLevel;
                                   }),
                       after.levels.end());
    for (std::size_t from = 0; from < before.size(); ++from) {
        for (std::size_t m = 0; m < meeting.moves.size(); ++m) {
            const RateLevel reached{before[from].rate + meeting.moves[m] + oneLevel, 0.0};
            const auto past = std::upper_bound(after.levels.begin(), after.levels.end(), reached, byRate);
            const auto to = static_cast<std::size_t>(past - after.levels.begin()) - 1;
            after.levels[to].probability += before[from].probability * meeting.odds[m];
            after.branches.push_back({from, to, meeting.moves[m], meeting.odds[m]});
        }
    }
    return after;
}

class PolicyMeetingsCurve final : public Curve, public RandomDiscount {
  public:
    PolicyMeetingsCurve(Date asOf, double overnight, const std::vector<PolicyMeeting>& meetings)
        : Curve(asOf), overnight_(overnight), meetings_(meetings.begin(), meetings.end()) {}

    [[nodiscard]] double logFactor(Date u) const override {
        return sumBefore(u, [u](const Meeting& meeting) { return meeting.logOfExpectation(u); });
    }

    [[nodiscard]] std::vector<Parameter> parameters() const override {
        std::vector<Parameter> all{{"/overnight", Parameter::Kind::model, overnight_}};
        for (std::size_t k = 0; k < meetings_.size(); ++k) {
            const std::string moves = detail::place("/meetings", k) + "/moves";
            for (std::size_t m = 0; m < meetings_[k].moves.size(); ++m) {
                all.push_back(
                    {detail::place(moves, m) + "/by", Parameter::Kind::model, meetings_[k].moves[m]});
            }
        }
        return all;
    }

    [[nodiscard]] std::vector<double> logFactorGradient(Date u) const override {
        std::vector<double> gradient{-dates::years(asOf(), u)};
        for (const Meeting& meeting : meetings_) {
            const double years = meeting.inForce(u);
            const double log = meeting.logOfExpectation(u);
            for (std::size_t m = 0; m < meeting.moves.size(); ++m) {
                const double odds = meeting.odds[m];
                gradient.push_back(odds > 0.0 ? -years * odds * numeric::exp(-meeting.moves[m] * years - log)
                                              : 0.0);
            }
        }
        return gradient;
    }

    [[nodiscard]] outcome::Review review(Date last) const override {
        double bound = std::fabs(overnight_) * dates::years(asOf(), last);
        for (const Meeting& meeting : meetings_) {
            bound += meeting.largestMove * meeting.inForce(last);
        }
        return detail::finiteReview(*this, last, bound);
    }

    [[nodiscard]] std::string convention() const override {
        return "overnight rate continuous ACT/365.FIXED with " + std::to_string(meetings_.size()) +
               (meetings_.size() == 1 ? " policy meeting" : " policy meetings") +
               ", expected discount factor";
    }

    [[nodiscard]] std::vector<RateLevels> rateTree() const override {
        std::vector<RateLevels> tree{{asOf(), {{overnight_, 1.0}}, {}}};
        for (const Meeting& meeting : meetings_) {
            RateLevels next = afterMeeting(tree.back().levels, meeting);
            if (next.levels.size() > mostRateLevels) {
                return {};
            }
            tree.push_back(std::move(next));
        }
        return tree;
    }

    [[nodiscard]] const RandomDiscount* random() const override { return this; }

    [[nodiscard]] double meanLog(Date u) const override {
        return sumBefore(u, [u](const Meeting& meeting) { return -meeting.meanMove * meeting.inForce(u); });
    }

    [[nodiscard]] std::optional<double> varianceLog(Date u) const override {
        double sum = 0.0;
        for (const Meeting& meeting : meetings_) {
            sum += meeting.varianceMove * meeting.inForce(u) * meeting.inForce(u);
        }
        return sum;
    }

    /// The meetings go into two halves of about the same number of outcomes; each is listed whole, their sums
    /// are not.
    [[nodiscard]] outcome::Outcome<LogLawPtr> law(Date u) const override {
        std::vector<detail::Outcomes> effects;
        for (const Meeting& meeting : meetings_) {
            if (meeting.date < u) {
                detail::Outcomes effect{meeting.moves, meeting.odds};
                for (double& value : effect.values) {
                    value *= -meeting.inForce(u);
                }
                effects.push_back(detail::sorted(std::move(effect)));
            }
        }
        std::stable_sort(effects.begin(), effects.end(),
                         [](const auto& a, const auto& b) { return a.values.size() > b.values.size(); });
        detail::Outcomes one{{-overnight_ * dates::years(asOf(), u)}, {1.0}};
        detail::Outcomes other{{0.0}, {1.0}};
        for (const detail::Outcomes& effect : effects) {
            detail::Outcomes& half = one.values.size() <= other.values.size() ? one : other;
            if (half.values.size() * std::uint64_t{effect.values.size()} > mostInHalf) {
                return outcome::Fault{
                    "/meetings", "too-many-outcomes",
                    "The meetings before " + dates::toIso(u) +
                        " have too many outcomes for their quantiles; use fewer meetings or moves (24 "
                        "meetings of 3 moves are possible)."};
            }
            half = everySum(half, effect);
        }
        return detail::sumLaw(std::move(one), std::move(other));
    }

    [[nodiscard]] outcome::Outcome<PathMakerPtr> pathMaker(std::span<const Date> dates,
                                                           std::size_t /*target*/) const override {
        const auto after =
            std::partition_point(meetings_.begin(), meetings_.end(),
                                 [&](const Meeting& meeting) { return meeting.date < dates.back(); });
        return PathMakerPtr(std::make_shared<MeetingPaths>(
            asOf(), overnight_,
            std::span(meetings_).first(static_cast<std::size_t>(after - meetings_.begin())), dates));
    }

  private:
    static constexpr std::uint64_t mostInHalf = 1U << 20U;

    /// −overnight·t and a term for each meeting before u.
    template <class Term> [[nodiscard]] double sumBefore(Date u, Term term) const {
        double sum = -overnight_ * dates::years(asOf(), u);
        for (const Meeting& meeting : meetings_) {
            if (meeting.date >= u) {
                break;
            }
            sum += term(meeting);
        }
        return sum;
    }

    static detail::Outcomes everySum(const detail::Outcomes& half, const detail::Outcomes& effect) {
        detail::Outcomes sums;
        sums.values.reserve(half.values.size() * effect.values.size());
        sums.odds.reserve(half.values.size() * effect.values.size());
        for (std::size_t m = 0; m < effect.values.size(); ++m) {
            for (std::size_t i = 0; i < half.values.size(); ++i) {
                sums.values.push_back(half.values[i] + effect.values[m]);
                sums.odds.push_back(half.odds[i] * effect.odds[m]);
            }
        }
        return detail::sorted(std::move(sums));
    }

    double overnight_;
    std::vector<Meeting> meetings_;
};

void checkMoves(outcome::Faults& faults, const std::string& at, const std::vector<RateMove>& moves) {
    if (moves.empty()) {
        faults.push_back(
            {at, "empty-list", "A meeting needs at least one outcome; no change is a move by 0."});
        return;
    }
    const std::size_t before = faults.size();
    double sum = 0.0;
    for (std::size_t m = 0; m < moves.size(); ++m) {
        const std::string move = detail::place(at, m);
        detail::requireWithin(faults, move + "/by", moves[m].by, -10.0, 10.0, "A move of the overnight rate");
        detail::requireWithin(faults, move + "/probability", moves[m].probability, 0.0, 1.0, "A probability");
        sum += moves[m].probability;
    }
    if (faults.size() == before) {
        detail::requireSumOne(faults, at, sum, "The probabilities of a meeting");
    }
}

} // namespace

Outcome<CurvePtr> policyMeetings(Date asOf, double overnight, const std::vector<PolicyMeeting>& meetings) {
    outcome::Faults faults;
    detail::requireWithin(faults, "/overnight", overnight, -0.99, 10.0, "The overnight rate");
    for (std::size_t k = 0; k < meetings.size(); ++k) {
        const std::string at = detail::place("/meetings", k);
        const auto previous = k == 0 ? std::nullopt : std::optional<Date>(meetings[k - 1].date);
        detail::requireLater(faults, at + "/date", meetings[k].date, asOf, previous, "A meeting's date");
        checkMoves(faults, at + "/moves", meetings[k].moves);
    }
    if (!faults.empty()) {
        return faults;
    }
    return CurvePtr(std::make_shared<PolicyMeetingsCurve>(asOf, overnight, meetings));
}

} // namespace forwright::discounting
