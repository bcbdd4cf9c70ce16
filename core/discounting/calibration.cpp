#include "discounting/calibration.hpp"

#include "numeric/elementary.hpp"

#include <algorithm>
#include <cmath>
#include <optional>

namespace forwright::discounting {

namespace {

/// A square matrix, row by row.
class Matrix {
  public:
    explicit Matrix(std::size_t size) : size_(size), cells_(size * size, 0.0) {}
    [[nodiscard]] double& at(std::size_t row, std::size_t column) { return cells_[row * size_ + column]; }
    [[nodiscard]] std::size_t size() const { return size_; }
    [[nodiscard]] std::vector<double>& cells() { return cells_; }

    void swapRows(std::size_t one, std::size_t other) {
        for (std::size_t column = 0; column < size_; ++column) {
            std::swap(at(one, column), at(other, column));
        }
    }

  private:
    std::size_t size_;
    std::vector<double> cells_;
};

/// Elimination with the largest pivot of each column, the same done to every column of `right`; what is left
/// there is the solution. False where the matrix is singular.
bool solve(Matrix left, Matrix& right) {
    const std::size_t size = left.size();
    for (std::size_t pivot = 0; pivot < size; ++pivot) {
        std::size_t largest = pivot;
        for (std::size_t row = pivot + 1; row < size; ++row) {
            if (std::fabs(left.at(row, pivot)) > std::fabs(left.at(largest, pivot))) {
                largest = row;
            }
        }
        if (!(std::fabs(left.at(largest, pivot)) > 0.0) || !std::isfinite(left.at(largest, pivot))) {
            return false;
        }
        left.swapRows(pivot, largest);
        right.swapRows(pivot, largest);
        for (std::size_t row = 0; row < size; ++row) {
            const double factor = left.at(row, pivot) / left.at(pivot, pivot);
            if (row == pivot || factor == 0.0) {
                continue;
            }
            for (std::size_t column = pivot; column < size; ++column) {
                left.at(row, column) -= factor * left.at(pivot, column);
            }
            for (std::size_t column = 0; column < size; ++column) {
                right.at(row, column) -= factor * right.at(pivot, column);
            }
        }
    }
    for (std::size_t row = 0; row < size; ++row) {
        for (std::size_t column = 0; column < size; ++column) {
            right.at(row, column) /= left.at(row, row);
        }
    }
    return true;
}

/// A curve that was tried, and how it misses.
struct Trial {
    CurvePtr curve;
    std::vector<double> misses;
    double worst = 0.0; ///< largest miss in its tolerances
};

class Search {
  public:
    Search(Date asOf, Interpolation interpolation, std::span<const Date> pillars,
           std::span<const Condition> conditions)
        : asOf_(asOf), pillars_(pillars), conditions_(conditions) {
        points_.interpolation = interpolation;
        points_.quote = PillarQuote::factor; // zero rates have limits of their own
        for (const Date pillar : pillars) {
            points_.pillars.push_back({pillar, 0.0});
        }
    }

    [[nodiscard]] std::optional<Calibrated> run(std::vector<double> zeros) {
        std::optional<Trial> here = tried(zeros);
        for (int step = 0; here && step < mostSteps; ++step) {
            Matrix inverse = identity();
            if (!solve(slopes(*here->curve), inverse)) {
                return std::nullopt;
            }
            std::optional<Trial> next = nearer(*here, zeros, inverse);
            if (!next) { // as near as numbers come
                return here->worst <= 1.0 ? std::optional{Calibrated{here->curve, inverse.cells()}}
                                          : std::nullopt;
            }
            here = std::move(next);
        }
        return std::nullopt;
    }

  private:
    static constexpr int mostSteps = 100;
    static constexpr int mostHalvings = 30;

    [[nodiscard]] Matrix identity() const {
        Matrix unit(conditions_.size());
        for (std::size_t i = 0; i < conditions_.size(); ++i) {
            unit.at(i, i) = 1.0;
        }
        return unit;
    }

    [[nodiscard]] double missOf(const Condition& condition, const Curve& curve,
                                std::vector<double>& byLogs) const {
        std::vector<double> logs;
        for (const Date date : condition.dates) {
            logs.push_back(curve.logFactor(date));
        }
        byLogs.assign(logs.size(), 0.0);
        return condition.miss(logs, byLogs);
    }

    /// Nothing where these are no zero rates, or no condition can be looked at.
    [[nodiscard]] std::optional<Trial> tried(const std::vector<double>& zeros) {
        for (std::size_t i = 0; i < zeros.size(); ++i) {
            points_.pillars[i].value = numeric::exp(-zeros[i] * dates::years(asOf_, pillars_[i]));
        }
        Outcome<CurvePtr> curve = discounting::pillars(asOf_, points_);
        if (!curve) {
            return std::nullopt;
        }
        Trial trial{std::move(curve).value(), {}, 0.0};
        std::vector<double> byLogs;
        for (const Condition& condition : conditions_) {
            trial.misses.push_back(missOf(condition, *trial.curve, byLogs));
            if (!std::isfinite(trial.misses.back())) {
                return std::nullopt;
            }
            trial.worst = std::max(trial.worst, std::fabs(trial.misses.back()) / condition.tolerance);
        }
        return trial;
    }

    /// ∂ miss / ∂ zero rate.
    [[nodiscard]] Matrix slopes(const Curve& curve) const {
        Matrix slopes(conditions_.size());
        std::vector<double> byLogs;
        for (std::size_t row = 0; row < conditions_.size(); ++row) {
            (void)missOf(conditions_[row], curve, byLogs);
            for (std::size_t date = 0; date < byLogs.size(); ++date) {
                const std::vector<double> gradient = curve.logFactorGradient(conditions_[row].dates[date]);
                for (std::size_t column = 0; column < gradient.size(); ++column) {
                    slopes.at(row, column) += byLogs[date] * gradient[column];
                }
            }
        }
        return slopes;
    }

    /// The next curve along Newton's step that misses by less, and its zero rates; nothing where none does.
    [[nodiscard]] std::optional<Trial> nearer(const Trial& here, std::vector<double>& zeros,
                                              Matrix& inverse) {
        std::vector<double> step(zeros.size(), 0.0);
        for (std::size_t row = 0; row < step.size(); ++row) {
            for (std::size_t column = 0; column < step.size(); ++column) {
                step[row] -= inverse.at(row, column) * here.misses[column];
            }
        }
        double share = 1.0;
        for (int halving = 0; halving < mostHalvings; ++halving, share *= 0.5) {
            std::vector<double> moved = zeros;
            for (std::size_t i = 0; i < moved.size(); ++i) {
                moved[i] += share * step[i];
            }
            std::optional<Trial> trial = tried(moved);
            if (trial && trial->worst < here.worst) {
                zeros = std::move(moved);
                return trial;
            }
            if (here.worst <= 1.0) { // good enough: only the whole step could better it
                return std::nullopt;
            }
        }
        return std::nullopt;
    }

    Date asOf_;
    std::span<const Date> pillars_;
    std::span<const Condition> conditions_;
    Pillars points_;
};

} // namespace

std::variant<Calibrated, std::size_t> calibrate(Date asOf, Interpolation interpolation,
                                                std::span<const Date> pillars,
                                                std::span<const Condition> conditions,
                                                std::span<const double> guess) {
    const auto upTo = [&](std::size_t count) {
        return Search(asOf, interpolation, pillars.first(count), conditions.first(count))
            .run({guess.begin(), guess.begin() + static_cast<std::ptrdiff_t>(count)});
    };
    if (auto found = upTo(conditions.size())) {
        return std::move(*found);
    }
    std::size_t count = 1;
    while (count < conditions.size() && upTo(count)) {
        ++count;
    }
    return count - 1;
}

} // namespace forwright::discounting
