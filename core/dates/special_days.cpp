#include "dates/special_days.hpp"

#include <string>

namespace forwright::dates {

std::optional<ThirdDay> parseThirdDay(std::string_view text) {
    constexpr std::string_view wednesday = "third-wednesday ";
    constexpr std::string_view friday = "third-friday ";
    const bool isFriday = text.starts_with(friday);
    if (!isFriday && !text.starts_with(wednesday)) {
        return std::nullopt;
    }
    const std::string_view month = text.substr(isFriday ? friday.size() : wednesday.size());
    const std::optional<Date> first = parseIso(std::string(month) + "-01");
    if (!first) {
        return std::nullopt;
    }
    const std::chrono::year_month_day day{*first};
    return ThirdDay{day.year() / day.month(), isFriday};
}

Date easterSunday(std::chrono::year year) {
    const int y = static_cast<int>(year);
    const int goldenNumber = y % 19 + 1;
    const int century = y / 100 + 1;
    const int leapYearsDropped = 3 * century / 4 - 12;
    const int moonCorrection = (8 * century + 5) / 25 - 5;
    int epact = (11 * goldenNumber + 20 + moonCorrection - leapYearsDropped) % 30;
    if (epact < 0) {
        epact += 30;
    }
    if ((epact == 25 && goldenNumber > 11) || epact == 24) {
        ++epact;
    }
    // The full moon as a day of March; before the 21st it is the next one.
    int fullMoon = 44 - epact;
    if (fullMoon < 21) {
        fullMoon += 30;
    }
    const Date moon = Date{year / std::chrono::March / 1} + std::chrono::days{fullMoon - 1};
    const std::chrono::days toSunday = std::chrono::Sunday - std::chrono::weekday{moon};
    return moon + (toSunday.count() == 0 ? std::chrono::days{7} : toSunday);
}

} // namespace forwright::dates
