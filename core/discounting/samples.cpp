#include "dates/date.hpp"
#include "discounting/checks.hpp"
#include "discounting/curves.hpp"
#include "discounting/path_makers.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>

namespace forwright::discounting {

namespace {

/// A sum that keeps what rounding would lose (Kahan).
class Sum {
  public:
    void add(double term) {
        const double corrected = term - lost_;
        const double next = sum_ + corrected;
        lost_ = (next - sum_) - corrected;
        sum_ = next;
    }
    [[nodiscard]] double value() const { return sum_; }

  private:
    double sum_ = 0.0;
    double lost_ = 0.0;
};

/// The values sorted; between neighbours of n values the probability rises by 1/(n − 1), evenly in D.
class SampleLaw final : public LogLaw {
  public:
    explicit SampleLaw(std::vector<double> logs) : logs_(std::move(logs)) {
        std::sort(logs_.begin(), logs_.end());
    }

    [[nodiscard]] double probabilityAtMost(double x) const override {
        if (x < logs_.front()) {
            return 0.0;
        }
        if (x >= logs_.back()) {
            return 1.0;
        }
        const auto above = std::upper_bound(logs_.begin(), logs_.end(), x);
        const double lower = *(above - 1);
        const double share = numeric::expm1(x - lower) / numeric::expm1(*above - lower);
        return (static_cast<double>(above - logs_.begin() - 1) + share) / intervals();
    }

    [[nodiscard]] double quantile(double probability) const override {
        const double position = probability * intervals();
        const auto index = std::min(static_cast<std::size_t>(position), logs_.size() - 1);
        if (index + 1 == logs_.size()) {
            return logs_.back();
        }
        const double share = position - static_cast<double>(index);
        return logs_[index] + numeric::log1p(share * numeric::expm1(logs_[index + 1] - logs_[index]));
    }

  private:
    [[nodiscard]] double intervals() const { return static_cast<double>(logs_.size() - 1); }

    std::vector<double> logs_;
};

/// A date's place among the columns: `share` of the way from column `left` to `right`, more than 1 past the
/// last. The start, where every factor is 1, is no column.
struct Place {
    static constexpr std::size_t start = static_cast<std::size_t>(-1);
    std::size_t left = start;
    std::size_t right = 0;
    double share = 0.0;
};

/// One word a path: which of the given paths it is.
class ResampledPaths final : public PathMaker {
  public:
    /// `logs` lies path by path.
    ResampledPaths(std::vector<double> logs, std::size_t dates) : logs_(std::move(logs)), dates_(dates) {}

    [[nodiscard]] std::size_t numbers() const override { return 1; }
    [[nodiscard]] double work() const override { return 2.0 * static_cast<double>(dates_); }
    void make(const std::uint32_t* words, std::size_t count, double* logFactors) const override {
        const std::uint64_t given = logs_.size() / dates_;
        for (std::size_t path = 0; path < count; ++path) {
            const auto row = static_cast<std::size_t>((words[path] * given) >> 32U);
            for (std::size_t date = 0; date < dates_; ++date) {
                logFactors[date * tilePaths + path] = logs_[row * dates_ + date];
            }
        }
    }

  private:
    std::vector<double> logs_;
    std::size_t dates_;
};

class SampleCurve final : public Curve, public RandomDiscount {
  public:
    SampleCurve(Date asOf, SamplePaths paths)
        : Curve(asOf), paths_(std::move(paths)), count_(paths_.factors.size() / paths_.dates.size()) {
        const double each = 1.0 / static_cast<double>(count_);
        for (std::size_t column = 0; column < paths_.dates.size(); ++column) {
            Sum mean;
            Sum meanLog;
            for (std::size_t path = 0; path < count_; ++path) {
                mean.add(factorAt(path, column) * each);
                meanLog.add(numeric::log(factorAt(path, column)) * each);
            }
            means_.push_back(mean.value());
            logMeans_.push_back(numeric::log(mean.value()));
            meanLogs_.push_back(meanLog.value());
        }
        if (paths_.against != nullptr) {
            compare(*paths_.against);
        }
    }

    [[nodiscard]] double logFactor(Date u) const override { return between(logMeans_, placeOf(u)); }
    [[nodiscard]] std::vector<Parameter> parameters() const override { return {}; }
    [[nodiscard]] std::vector<double> logFactorGradient(Date /*u*/) const override { return {}; }

    [[nodiscard]] outcome::Review review(Date last) const override {
        double bound = std::fabs(logFactor(last));
        for (const double log : logMeans_) {
            bound = std::max(bound, std::fabs(log));
        }
        outcome::Review review = detail::finiteReview(*this, last, bound);
        if (last > paths_.dates.back()) {
            review.notices.push_back({detail::place("/dates", paths_.dates.size() - 1), "beyond-last-date",
                                      "The samples end on " + dates::toIso(paths_.dates.back()) +
                                          " and are needed to " + dates::toIso(last) +
                                          "; their last forward rate is held."});
        }
        noticeDisagreement(review);
        return review;
    }

    [[nodiscard]] std::vector<SampleColumn> againstCurve() const override { return against_; }

    [[nodiscard]] std::string convention() const override {
        return "mean of " + std::to_string(count_) + (count_ == 1 ? " simulated path" : " simulated paths") +
               ", log-linear";
    }

    [[nodiscard]] const RandomDiscount* random() const override { return this; }

    [[nodiscard]] double meanLog(Date u) const override { return between(meanLogs_, placeOf(u)); }
    [[nodiscard]] std::optional<double> varianceLog(Date /*u*/) const override { return std::nullopt; }
    [[nodiscard]] long paths() const override { return static_cast<long>(count_); }

    [[nodiscard]] outcome::Outcome<LogLawPtr> law(Date u) const override {
        return LogLawPtr(std::make_shared<SampleLaw>(pathLogs(u)));
    }

    /// Paths are drawn from those given, each as likely as the other. Between two columns ln D of a path is
    /// linear in t like the curve's, and all paths are moved alike so that their mean is the curve's there
    /// too.
    [[nodiscard]] outcome::Outcome<PathMakerPtr> pathMaker(std::span<const Date> dates,
                                                           std::size_t /*target*/) const override {
        if (std::uint64_t{dates.size()} * count_ > mostDrawnFrom) {
            return outcome::Fault{
                "/factors", "too-much-work",
                "So many paths over so many dates are too much to draw from; use fewer paths."};
        }
        std::vector<double> all(dates.size() * count_);
        const std::vector<double> alike(count_, 1.0);
        for (std::size_t date = 0; date < dates.size(); ++date) {
            const std::vector<double> logs = pathLogs(dates[date]);
            const double shift = logFactor(dates[date]) - detail::logOfMean(alike, logs);
            for (std::size_t path = 0; path < count_; ++path) {
                all[path * dates.size() + date] = logs[path] + shift;
            }
        }
        return PathMakerPtr(std::make_shared<ResampledPaths>(std::move(all), dates.size()));
    }

    /// A path moves P(u) = e^((1−w) ln m₁ + w ln m₂), m the columns' means, by P(u)·((1−w)·x₁/m₁ + w·x₂/m₂)/n
    /// to first order: the standard error is that of the mean of these numbers.
    [[nodiscard]] std::optional<double> standardError(std::span<const Date> dates,
                                                      std::span<const double> weights) const override {
        if (count_ < 2) {
            return std::nullopt;
        }
        std::vector<double> byColumn(paths_.dates.size(), 0.0);
        for (std::size_t i = 0; i < dates.size(); ++i) {
            const Place place = placeOf(dates[i]);
            const double weighted = weights[i] * factor(dates[i]);
            byColumn[place.right] += weighted * place.share;
            if (place.left != Place::start) {
                byColumn[place.left] += weighted * (1.0 - place.share);
            }
        }
        Sum squares;
        for (std::size_t path = 0; path < count_; ++path) {
            double deviation = 0.0;
            for (std::size_t column = 0; column < byColumn.size(); ++column) {
                deviation += byColumn[column] * (factorAt(path, column) / means_[column] - 1.0);
            }
            squares.add(deviation * deviation);
        }
        const double n = static_cast<double>(count_);
        return std::sqrt(squares.value() / (n * (n - 1.0)));
    }

  private:
    void compare(const Curve& curve) {
        for (std::size_t i = 0; i < paths_.dates.size(); ++i) {
            const Date date = paths_.dates[i];
            SampleColumn column{date, means_[i], {}, curve.factor(date), {}};
            column.standardError = standardError(std::span{&date, 1}, std::array{1.0});
            if (column.standardError && *column.standardError > 0.0 && std::isfinite(column.factor)) {
                column.errors = (column.mean - column.factor) / *column.standardError;
            }
            against_.push_back(column);
        }
    }

    void noticeDisagreement(outcome::Review& review) const {
        std::size_t apart = 0;
        const SampleColumn* worst = nullptr;
        for (const SampleColumn& column : against_) {
            if (!column.errors || std::fabs(*column.errors) < samplesDisagreeFrom) {
                continue;
            }
            ++apart;
            if (worst == nullptr || std::fabs(*column.errors) > std::fabs(*worst->errors)) {
                worst = &column;
            }
        }
        if (worst == nullptr) {
            return;
        }
        review.notices.push_back(
            {"/factors", "samples-disagree",
             "The samples disagree with the market's curve on " + std::to_string(apart) + " of " +
                 std::to_string(against_.size()) + " dates: on " + dates::toIso(worst->date) +
                 " their mean is " + detail::toText(worst->mean) + " and the curve's factor " +
                 detail::toText(worst->factor) + ", " + detail::toText(std::fabs(*worst->errors)) +
                 " standard errors apart. They may come from another day or another curve."});
    }

    static constexpr std::uint64_t mostDrawnFrom = 8'000'000;

    /// ln D(u) of every path.
    [[nodiscard]] std::vector<double> pathLogs(Date u) const {
        const Place place = placeOf(u);
        std::vector<double> logs(count_);
        for (std::size_t path = 0; path < count_; ++path) {
            const double right = place.share == 0.0 ? 0.0 : numeric::log(factorAt(path, place.right));
            const double left = place.share == 1.0 || place.left == Place::start
                                    ? 0.0
                                    : numeric::log(factorAt(path, place.left));
            logs[path] = (1.0 - place.share) * left + place.share * right;
        }
        return logs;
    }

    [[nodiscard]] double factorAt(std::size_t path, std::size_t column) const {
        return paths_.factors[path * paths_.dates.size() + column];
    }

    [[nodiscard]] Place placeOf(Date u) const {
        const auto found = std::lower_bound(paths_.dates.begin(), paths_.dates.end() - 1, u);
        const auto right = static_cast<std::size_t>(found - paths_.dates.begin());
        const Date from = right == 0 ? asOf() : paths_.dates[right - 1];
        const double share = dates::years(from, u) / dates::years(from, paths_.dates[right]);
        return {right == 0 ? Place::start : right - 1, right, share};
    }

    [[nodiscard]] static double between(const std::vector<double>& logs, const Place& place) {
        const double left = place.left == Place::start ? 0.0 : logs[place.left];
        return (1.0 - place.share) * left + place.share * logs[place.right];
    }

    SamplePaths paths_;
    std::size_t count_;
    std::vector<double> means_;
    std::vector<double> logMeans_;
    std::vector<double> meanLogs_;
    std::vector<SampleColumn> against_;
};

constexpr std::size_t mostNumbers = 2'000'000;
constexpr std::size_t mostNamed = 100; ///< so many wrong factors are named one by one

void checkFactors(outcome::Faults& faults, const SamplePaths& paths) {
    const std::size_t columns = paths.dates.size();
    std::size_t wrong = 0;
    for (std::size_t i = 0; i < paths.factors.size(); ++i) {
        if (std::isfinite(paths.factors[i]) && paths.factors[i] > 0.0) {
            continue;
        }
        if (++wrong <= mostNamed) {
            faults.push_back({detail::place(detail::place("/factors", i / columns), i % columns),
                              "not-positive", "A discount factor has to be a positive number."});
        }
    }
    if (wrong > mostNamed) {
        faults.push_back({"/factors", "not-positive",
                          std::to_string(wrong) + " factors are not positive numbers; the first " +
                              std::to_string(mostNamed) + " of them are named."});
    }
}

} // namespace

Outcome<CurvePtr> samples(Date asOf, SamplePaths paths) {
    outcome::Faults faults;
    if (paths.dates.empty()) {
        faults.push_back({"/dates", "empty-list", "Samples need at least one date."});
    }
    if (paths.factors.empty()) {
        faults.push_back({"/factors", "empty-list", "Samples need at least one path."});
    }
    for (std::size_t i = 0; i < paths.dates.size(); ++i) {
        const auto previous = i == 0 ? std::nullopt : std::optional<Date>(paths.dates[i - 1]);
        detail::requireLater(faults, detail::place("/dates", i), paths.dates[i], asOf, previous,
                             "A date of the samples");
    }
    if (paths.factors.size() > mostNumbers) {
        faults.push_back(
            {"/factors", "too-many", "At most 2,000,000 factors are taken; use fewer paths or dates."});
    } else if (!paths.dates.empty()) {
        if (paths.factors.size() % paths.dates.size() != 0) {
            faults.push_back({"/factors", "row-length", "Every path needs one factor for each date."});
        }
        checkFactors(faults, paths);
    }
    if (paths.against != nullptr && paths.against->random() != nullptr) {
        faults.push_back(
            {"/against", "random-fit", "The curve that samples are held against must not be random itself."});
    } else if (paths.against != nullptr && !paths.dates.empty() && faults.empty()) {
        outcome::append(faults, "/against", paths.against->review(paths.dates.back()).faults);
    }
    if (!faults.empty()) {
        return faults;
    }
    return CurvePtr(std::make_shared<SampleCurve>(asOf, std::move(paths)));
}

} // namespace forwright::discounting
