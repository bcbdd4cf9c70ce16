#pragma once

#include "dates/chinese_festivals.hpp"
#include "dates/date.hpp"

#include <array>
#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <string_view>

/// The language in which `centres.cpp` states the closing days of a centre, and what turns a statement into
/// dates. Used by this folder only; the rest of the core sees `BusinessCalendar`.
namespace forwright::dates::holidays {

/// Where in a year a holiday lies before it is moved.
struct Place {
    enum class Kind : std::uint8_t {
        fixed,
        nthWeekday,
        lastWeekday,
        weekdayUntil,
        easter,
        vernalEquinox,
        autumnalEquinox,
        chinese
    };
    Kind kind{};
    unsigned month = 0; ///< fixed, nthWeekday, lastWeekday, weekdayUntil
    int number = 0; ///< day of the month, or which weekday, or days from Easter Sunday or from the festival
    std::chrono::weekday weekday{}; ///< nthWeekday, lastWeekday, weekdayUntil
    Festival festival{};            ///< chinese
};

[[nodiscard]] constexpr Place on(unsigned month, int day) {
    return {Place::Kind::fixed, month, day};
}
[[nodiscard]] constexpr Place nth(int number, std::chrono::weekday weekday, unsigned month) {
    return {Place::Kind::nthWeekday, month, number, weekday};
}
[[nodiscard]] constexpr Place last(std::chrono::weekday weekday, unsigned month) {
    return {Place::Kind::lastWeekday, month, 0, weekday};
}
/// The last such weekday that is not after that day.
[[nodiscard]] constexpr Place until(std::chrono::weekday weekday, unsigned month, int day) {
    return {Place::Kind::weekdayUntil, month, day, weekday};
}
[[nodiscard]] constexpr Place easter(int days) {
    return {Place::Kind::easter, 0, days};
}
[[nodiscard]] constexpr Place chinese(Festival festival, int days = 0) {
    return {Place::Kind::chinese, 0, days, {}, festival};
}
inline constexpr Place vernalEquinox{Place::Kind::vernalEquinox};
inline constexpr Place autumnalEquinox{Place::Kind::autumnalEquinox};

/// What becomes of a holiday on a weekend.
enum class Moves : std::uint8_t {
    never,
    sundayToMonday,
    toNearestWeekday,        ///< Saturday to Friday, Sunday to Monday
    weekendToNextFree,       ///< to the next weekday on which there is no other holiday
    sundayToNextFree,        ///< the same from a Sunday only
    sundayOrTwiceToNextFree, ///< the same, also where another holiday lies on that day
};

inline constexpr int always = 9999;

struct Rule {
    std::string_view name;
    Place place;
    Moves moves = Moves::never;
    int firstYear = 0;
    int lastYear = always;
};

/// A holiday of one year only.
struct SingleDay {
    std::string_view name;
    std::chrono::year_month_day date;
};

struct RuleSet {
    std::span<const Rule> rules;
    std::span<const SingleDay> singleDays{};
    std::span<const std::chrono::year_month_day>
        dropped{}; ///< days on which a rule would put a holiday that was not held, or held elsewhere
    int betweenFrom = always; ///< from this year a day between two holidays is one
};

struct Closing {
    Date date;
    std::string_view name;
};

/// The closing days of one year. No year of any centre has half as many.
class Closings {
  public:
    void add(const Closing& closing);
    [[nodiscard]] bool holds(Date date) const;
    [[nodiscard]] std::span<const Closing> all() const& { return {closings_.data(), count_}; }
    std::span<const Closing> all() const&& = delete; // would outlive them

  private:
    std::array<Closing, 64> closings_{};
    std::size_t count_ = 0;
};

/// The closing days that `sets` put into `year`, in no order, those on a weekend that are not moved included.
[[nodiscard]] Closings closingsOf(std::span<const RuleSet> sets, int year);

} // namespace forwright::dates::holidays
