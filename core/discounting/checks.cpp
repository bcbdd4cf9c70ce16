#include "discounting/checks.hpp"

#include "dates/date.hpp"
#include "numeric/elementary.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>
#include <limits>

namespace forwright::discounting::detail {

std::string place(std::string_view list, std::size_t index) {
    return std::string(list) + "/" + std::to_string(index);
}

std::string toText(double value) {
    std::array<char, 32> text{};
    std::snprintf(text.data(), text.size(), "%.6g", value);
    return text.data();
}

void requireWithin(outcome::Faults& faults, std::string_view at, double value, double low, double high,
                   std::string_view what) {
    if (value >= low && value <= high) {
        return;
    }
    faults.push_back({std::string(at), "out-of-range",
                      std::string(what) + " has to be from " + toText(low) + " to " + toText(high) + "."});
}

void requireLater(outcome::Faults& faults, std::string_view at, Date date, Date asOf,
                  std::optional<Date> previous, std::string_view what) {
    if (date <= asOf) {
        faults.push_back(
            {std::string(at), "not-after-as-of",
             std::string(what) + " has to be after " + dates::toIso(asOf) + ", the date of the market."});
    } else if (previous && date <= *previous) {
        faults.push_back(
            {std::string(at), "not-rising",
             std::string(what) + " has to be after the one before it, " + dates::toIso(*previous) + "."});
    }
}

void requireSumOne(outcome::Faults& faults, std::string_view at, double sum, std::string_view what) {
    if (std::fabs(sum - 1.0) <= 1e-9) {
        return;
    }
    faults.push_back({std::string(at), "sum-not-one",
                      std::string(what) + " have to sum to 1; they sum to " + toText(sum) + "."});
}

std::optional<outcome::Fault> notFinite(const Curve& curve, Date last, double bound) {
    if (bound <= largestLogFactor) {
        return std::nullopt;
    }
    for (Date day = last; day > curve.asOf(); day -= std::chrono::days{1}) {
        const double log = curve.logFactor(day);
        if (std::fabs(log) > largestLogFactor) {
            return outcome::Fault{
                "", "not-finite",
                "The discount factor for " + dates::toIso(day) + " would be e^" + toText(log) +
                    ", beyond what a number holds; use smaller rates, a smaller volatility or a "
                    "nearer date."};
        }
    }
    return std::nullopt;
}

outcome::Review finiteReview(const Curve& curve, Date last, double bound) {
    outcome::Review review;
    if (auto fault = notFinite(curve, last, bound)) {
        review.faults.push_back(std::move(*fault));
    }
    return review;
}

double logOfMean(std::span<const double> weights, std::span<const double> values, double scale) {
    double total = 0.0;
    double largest = -std::numeric_limits<double>::infinity();
    for (std::size_t i = 0; i < values.size(); ++i) {
        total += weights[i];
        if (weights[i] > 0.0) {
            largest = std::max(largest, scale * values[i]);
        }
    }
    if (!std::isfinite(largest)) {
        return largest;
    }
    const auto sumOf = [&](auto part) {
        double sum = 0.0;
        for (std::size_t i = 0; i < values.size(); ++i) {
            if (weights[i] > 0.0) {
                sum += weights[i] * part(scale * values[i]);
            }
        }
        return sum / total;
    };
    if (std::fabs(largest) <= 1.0) {
        const double excess = sumOf([](double log) { return numeric::expm1(log); });
        // An excess near −1 has lost its digits; what is left is the sum of the factors themselves.
        if (excess > -0.5) {
            return numeric::log1p(excess);
        }
    }
    return largest + numeric::log(sumOf([largest](double log) { return numeric::exp(log - largest); }));
}

} // namespace forwright::discounting::detail
