#include "discounting/laws.hpp"

#include "numeric/normal.hpp"

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <numeric>

namespace forwright::discounting::detail {

namespace {

class NormalLaw final : public LogLaw {
  public:
    NormalLaw(double mean, double deviation) : mean_(mean), deviation_(deviation) {}

    [[nodiscard]] double probabilityAtMost(double x) const override {
        return numeric::normalProbability((x - mean_) / deviation_);
    }
    [[nodiscard]] double quantile(double probability) const override {
        return mean_ + deviation_ * numeric::normalQuantile(probability);
    }
    [[nodiscard]] bool isContinuous() const override { return true; }

  private:
    double mean_;
    double deviation_;
};

class PointLaw final : public LogLaw {
  public:
    explicit PointLaw(double at) : at_(at) {}

    [[nodiscard]] double probabilityAtMost(double x) const override { return x < at_ ? 0.0 : 1.0; }
    [[nodiscard]] double quantile(double /*probability*/) const override { return at_; }

  private:
    double at_;
};

class SumLaw final : public LogLaw {
  public:
    SumLaw(Outcomes one, Outcomes other) : one_(sorted(std::move(one))), other_(sorted(std::move(other))) {
        otherUpTo_.resize(other_.odds.size() + 1, 0.0);
        std::partial_sum(other_.odds.begin(), other_.odds.end(), otherUpTo_.begin() + 1);
    }

    [[nodiscard]] double probabilityAtMost(double x) const override { return sumsUpTo(x).probability; }

    [[nodiscard]] double quantile(double probability) const override {
        const double wanted = probability - probabilityRounding;
        double low = one_.values.front() + other_.values.front();
        double high = one_.values.back() + other_.values.back();
        UpTo atLow = sumsUpTo(low);
        UpTo atHigh = sumsUpTo(high);
        if (atLow.probability >= wanted) {
            return low;
        }
        if (atHigh.probability < wanted) {
            return high; // the odds sum to a little less than 1
        }
        // From here on P(≤ low) < wanted ≤ P(≤ high): halve until the sums in between are few enough to be
        // listed.
        while (atHigh.count - atLow.count > fewSums) {
            const double middle = low + (high - low) / 2.0;
            if (!(middle > low && middle < high)) {
                return high;
            }
            const UpTo atMiddle = sumsUpTo(middle);
            if (atMiddle.probability >= wanted) {
                high = middle;
                atHigh = atMiddle;
            } else {
                low = middle;
                atLow = atMiddle;
            }
        }
        return firstReaching(low, high, atLow.probability, wanted);
    }

    [[nodiscard]] double work() const override {
        return 1.0 + static_cast<double>(one_.values.size() + other_.values.size()) / 100.0;
    }

  private:
    static constexpr std::int64_t fewSums = 4096;

    /// How many sums are at most x, and their probability.
    struct UpTo {
        double probability = 0.0;
        std::int64_t count = 0;
    };

    /// As the one number rises through its values, the other's last partner falls.
    [[nodiscard]] UpTo sumsUpTo(double x) const {
        UpTo result;
        std::size_t partners = other_.values.size();
        for (std::size_t i = 0; i < one_.values.size(); ++i) {
            while (partners > 0 && one_.values[i] + other_.values[partners - 1] > x) {
                --partners;
            }
            if (partners == 0) {
                break;
            }
            result.probability += one_.odds[i] * otherUpTo_[partners];
            result.count += static_cast<std::int64_t>(partners);
        }
        return result;
    }

    /// The smallest of the sums in (low, high] with which the probability reaches `wanted`, it being `below`
    /// at low.
    [[nodiscard]] double firstReaching(double low, double high, double below, double wanted) const {
        std::vector<std::pair<double, double>> sums;
        std::size_t upTo = other_.values.size();
        std::size_t upToLow = other_.values.size();
        for (std::size_t i = 0; i < one_.values.size(); ++i) {
            while (upTo > 0 && one_.values[i] + other_.values[upTo - 1] > high) {
                --upTo;
            }
            while (upToLow > 0 && one_.values[i] + other_.values[upToLow - 1] > low) {
                --upToLow;
            }
            for (std::size_t j = upToLow; j < upTo; ++j) {
                sums.emplace_back(one_.values[i] + other_.values[j], one_.odds[i] * other_.odds[j]);
            }
        }
        std::sort(sums.begin(), sums.end());
        double reached = below;
        for (const auto& [sum, odds] : sums) {
            reached += odds;
            if (reached >= wanted) {
                return sum;
            }
        }
        return sums.empty() ? high : sums.back().first;
    }

    Outcomes one_;
    Outcomes other_;
    std::vector<double> otherUpTo_; ///< the odds of the first n values of `other_`
};

class MixtureLaw final : public LogLaw {
  public:
    MixtureLaw(std::vector<double> weights, std::vector<LogLawPtr> parts)
        : weights_(std::move(weights)), parts_(std::move(parts)) {}

    [[nodiscard]] double probabilityAtMost(double x) const override {
        double sum = 0.0;
        for (std::size_t i = 0; i < parts_.size(); ++i) {
            sum += weights_[i] * parts_[i]->probabilityAtMost(x);
        }
        return sum;
    }

    /// Between the smallest and the largest of the parts' own quantiles, halved down to neighbouring numbers.
    [[nodiscard]] double quantile(double probability) const override {
        double low = parts_.front()->quantile(probability);
        double high = low;
        for (const LogLawPtr& part : parts_) {
            const double at = part->quantile(probability);
            low = std::min(low, at);
            high = std::max(high, at);
        }
        const double wanted = probability - probabilityRounding;
        if (probabilityAtMost(low) >= wanted) {
            return low;
        }
        for (int halvings = 0; halvings < 200; ++halvings) {
            const double middle = low + (high - low) / 2.0;
            if (!(middle > low && middle < high)) {
                break;
            }
            (probabilityAtMost(middle) >= wanted ? high : low) = middle;
        }
        return high;
    }

    [[nodiscard]] bool isContinuous() const override {
        return std::all_of(parts_.begin(), parts_.end(),
                           [](const LogLawPtr& part) { return part->isContinuous(); });
    }
    [[nodiscard]] double work() const override {
        double sum = 0.0;
        for (const LogLawPtr& part : parts_) {
            sum += part->work();
        }
        return sum;
    }

  private:
    std::vector<double> weights_;
    std::vector<LogLawPtr> parts_;
};

} // namespace

LogLawPtr normalLaw(double mean, double variance) {
    const double deviation = std::sqrt(variance);
    return deviation > 0.0 ? LogLawPtr(std::make_shared<NormalLaw>(mean, deviation)) : pointLaw(mean);
}

LogLawPtr pointLaw(double at) {
    return std::make_shared<PointLaw>(at);
}

LogLawPtr sumLaw(Outcomes one, Outcomes other) {
    return std::make_shared<SumLaw>(std::move(one), std::move(other));
}

outcome::Outcome<LogLawPtr> mixtureLaw(std::vector<double> weights, std::vector<LogLawPtr> parts) {
    auto mixture = std::make_shared<const MixtureLaw>(std::move(weights), std::move(parts));
    if (mixture->work() > mostWork) {
        return outcome::Fault{
            "", "too-many-outcomes",
            "The quantiles of so many random curves together would take too long; use fewer of them."};
    }
    return LogLawPtr(std::move(mixture));
}

Outcomes sorted(Outcomes outcomes) {
    std::vector<std::size_t> order(outcomes.values.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::sort(order.begin(), order.end(),
              [&](std::size_t a, std::size_t b) { return outcomes.values[a] < outcomes.values[b]; });
    Outcomes result;
    result.values.reserve(order.size());
    result.odds.reserve(order.size());
    for (const std::size_t i : order) {
        if (outcomes.odds[i] <= 0.0) {
            continue;
        }
        if (!result.values.empty() && result.values.back() == outcomes.values[i]) {
            result.odds.back() += outcomes.odds[i];
        } else {
            result.values.push_back(outcomes.values[i]);
            result.odds.push_back(outcomes.odds[i]);
        }
    }
    return result;
}

} // namespace forwright::discounting::detail
