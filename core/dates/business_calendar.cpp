#include "dates/business_calendar.hpp"

#include "dates/centres.hpp"

#include <algorithm>
#include <array>
#include <bit>
#include <cassert>
#include <cstdint>
#include <utility>

namespace forwright::dates {
namespace {

using std::chrono::days;

constexpr std::size_t dayCount = static_cast<std::size_t>(daysBetween(earliest, latest)) + 1;
constexpr std::size_t wordBits = 64;
constexpr std::size_t wordCount = (dayCount + wordBits - 1) / wordBits;

/// The good days from `earliest` to `latest`, one bit a day.
class GoodDays {
  public:
    /// Monday to Friday.
    GoodDays() {
        for (std::size_t day = 0; day < dayCount; ++day) {
            setAt(day, isWeekday(earliest + days{static_cast<int>(day)}));
        }
    }

    [[nodiscard]] static bool covers(Date date) { return date >= earliest && date <= latest; }

    [[nodiscard]] bool has(Date date) const {
        const std::size_t day = indexOf(date);
        return (words_[day / wordBits] >> (day % wordBits) & 1U) != 0;
    }

    void set(Date date, bool good) {
        if (covers(date)) {
            setAt(indexOf(date), good);
        }
    }

    /// Keeps the days that are good in `other` too.
    void keep(const GoodDays& other) {
        for (std::size_t word = 0; word < wordCount; ++word) {
            words_[word] &= other.words_[word];
        }
    }

    /// The good days in [from, to), both in [earliest, latest + 1], `from` not after `to`.
    [[nodiscard]] int between(Date from, Date to) const {
        const std::size_t first = indexOf(from);
        const std::size_t end = indexOf(to);
        // Whole words up to the end, less the days of the first word before the start.
        int count = -std::popcount(lowBits(first));
        for (std::size_t word = first / wordBits; word < end / wordBits; ++word) {
            count += std::popcount(words_[word]);
        }
        return count + std::popcount(lowBits(end));
    }

  private:
    [[nodiscard]] static std::size_t indexOf(Date date) {
        return static_cast<std::size_t>(daysBetween(earliest, date));
    }

    /// The bits of the word of `day` that lie before it.
    [[nodiscard]] std::uint64_t lowBits(std::size_t day) const {
        const std::size_t bits = day % wordBits;
        return bits == 0 ? 0 : words_[day / wordBits] << (wordBits - bits);
    }

    void setAt(std::size_t day, bool good) {
        const std::uint64_t bit = std::uint64_t{1} << (day % wordBits);
        std::uint64_t& word = words_[day / wordBits];
        word = good ? word | bit : word & ~bit;
    }

    std::array<std::uint64_t, wordCount> words_{};
};

const GoodDays& weekdays() {
    static const GoodDays good;
    return good;
}

GoodDays goodDaysByRule(std::size_t centre) {
    GoodDays good = weekdays();
    const int first = static_cast<int>(std::chrono::year_month_day{earliest}.year());
    const int last = static_cast<int>(std::chrono::year_month_day{latest}.year());
    for (int year = first; year <= last; ++year) {
        const holidays::Closings closings = holidays::closingsOf(holidays::rulesOf(centre), year);
        for (const holidays::Closing& closing : closings.all()) {
            good.set(closing.date, false);
        }
    }
    return good;
}

/// The table of a centre: a constant, worked out when first asked for.
template <std::size_t centre> const GoodDays& goodDaysOf() {
    static const GoodDays good = goodDaysByRule(centre);
    return good;
}

const GoodDays& goodDaysOf(std::size_t centre) {
    static constexpr auto tables = []<std::size_t... centres>(std::index_sequence<centres...>) {
        return std::array<const GoodDays& (*)(), sizeof...(centres)>{&goodDaysOf<centres>...};
    }
    (std::make_index_sequence<holidays::centreCount>{});
    return tables[centre]();
}

bool inOneMonth(Date one, Date other) {
    const std::chrono::year_month_day a{one};
    const std::chrono::year_month_day b{other};
    return a.year() == b.year() && a.month() == b.month();
}

/// Monday to Friday in [from, to), `from` not after `to`.
int weekdaysBetween(Date from, Date to) {
    const int count = daysBetween(from, to);
    int weekdayCount = count / 7 * 5;
    for (Date date = to - days{count % 7}; date < to; date += days{1}) {
        weekdayCount += isWeekday(date) ? 1 : 0;
    }
    return weekdayCount;
}

} // namespace

struct BusinessCalendar::Tables {
    std::vector<std::string> centres;
    GoodDays good = weekdays();
};

BusinessCalendar::BusinessCalendar() {
    static const auto weekendsOnly = std::make_shared<const Tables>();
    tables_ = weekendsOnly;
}

BusinessCalendar::BusinessCalendar(std::span<const std::string> centres, std::span<const Date> holidays,
                                   std::span<const Date> openDays) {
    auto tables = std::make_shared<Tables>();
    tables->centres.assign(centres.begin(), centres.end());
    for (const std::string& code : centres) {
        const Centre* centre = findCentre(code);
        assert(centre != nullptr);
        if (centre != nullptr) {
            tables->good.keep(goodDaysOf(static_cast<std::size_t>(centre - knownCentres().data())));
        }
    }
    for (const Date date : holidays) {
        tables->good.set(date, false);
    }
    for (const Date date : openDays) {
        tables->good.set(date, true);
    }
    tables_ = std::move(tables);
}

bool BusinessCalendar::isBusinessDay(Date date) const {
    return GoodDays::covers(date) ? tables_->good.has(date) : isWeekday(date);
}

Date BusinessCalendar::following(Date date) const {
    while (!isBusinessDay(date)) {
        date += days{1};
    }
    return date;
}

Date BusinessCalendar::preceding(Date date) const {
    while (!isBusinessDay(date)) {
        date -= days{1};
    }
    return date;
}

Date BusinessCalendar::modifiedFollowing(Date date) const {
    const Date next = following(date);
    return inOneMonth(date, next) ? next : preceding(date);
}

Date BusinessCalendar::advance(Date date, int count) const {
    assert(count >= -100'000 && count <= 100'000);
    for (; count > 0; --count) {
        date = following(date + days{1});
    }
    for (; count < 0; ++count) {
        date = preceding(date - days{1});
    }
    return date;
}

int BusinessCalendar::businessDaysBetween(Date from, Date to) const {
    if (to < from) {
        return -businessDaysBetween(to, from);
    }
    const Date end = latest + days{1};
    const Date insideFrom = std::clamp(from, earliest, end);
    const Date insideTo = std::clamp(to, earliest, end);
    const int before = from < earliest ? weekdaysBetween(from, std::min(to, earliest)) : 0;
    const int after = to > end ? weekdaysBetween(std::max(from, end), to) : 0;
    return before + tables_->good.between(insideFrom, insideTo) + after;
}

bool BusinessCalendar::isLastOfMonth(Date date) const {
    return isBusinessDay(date) && !inOneMonth(date, following(date + days{1}));
}

const std::vector<std::string>& BusinessCalendar::centres() const {
    return tables_->centres;
}

} // namespace forwright::dates
