#include "dates/date.hpp"

namespace forwright::dates {
namespace {

/// The number that `text` writes in decimal digits alone.
std::optional<unsigned> digits(std::string_view text) {
    unsigned number = 0;
    for (const char c : text) {
        if (c < '0' || c > '9') {
            return std::nullopt;
        }
        number = 10 * number + static_cast<unsigned>(c - '0');
    }
    return number;
}

std::string padded(unsigned number, std::size_t width) {
    std::string text = std::to_string(number);
    return text.size() < width ? std::string(width - text.size(), '0') + text : text;
}

} // namespace

std::optional<Date> parseIso(std::string_view text) {
    if (text.size() != 10 || text[4] != '-' || text[7] != '-') {
        return std::nullopt;
    }
    const auto year = digits(text.substr(0, 4));
    const auto month = digits(text.substr(5, 2));
    const auto day = digits(text.substr(8, 2));
    if (!year || !month || !day) {
        return std::nullopt;
    }
    const auto date =
        std::chrono::year{static_cast<int>(*year)} / std::chrono::month{*month} / std::chrono::day{*day};
    if (!date.ok() || Date{date} < earliest || Date{date} > latest) {
        return std::nullopt;
    }
    return Date{date};
}

std::string toIso(Date date) {
    const std::chrono::year_month_day day{date};
    return padded(static_cast<unsigned>(static_cast<int>(day.year())), 4) + '-' +
           padded(static_cast<unsigned>(day.month()), 2) + '-' + padded(static_cast<unsigned>(day.day()), 2);
}

} // namespace forwright::dates
