// What closes each centre. Above every rule set stands where it was taken from; "from memory" says that no
// copy of the source was read when it was written. Outside the years of validity the rules are applied as
// they stand.

#include "dates/centres.hpp"

#include <algorithm>
#include <array>

namespace forwright::dates {
namespace holidays {
namespace {

using namespace std::chrono; // NOLINT(google-build-using-namespace): weekdays, months and 2020y/May/8 are
                             // this file's words

// The eurozone's large-value payment system. European Central Bank, notices of TARGET closing days: long-term
// calendar from 2002 on; 1999, 2000 and 2001 (the last from memory) had their own.
constexpr std::array eurosystem{
    Rule{"New Year's Day", on(1, 1)}, Rule{"Good Friday", easter(-2)},   Rule{"Easter Monday", easter(1)},
    Rule{"Labour Day", on(5, 1)},     Rule{"Christmas Day", on(12, 25)}, Rule{"26 December", on(12, 26)},
};
constexpr std::array eurosystemSingle{
    SingleDay{"31 December", 1999y / 12 / 31},
    SingleDay{"31 December", 2001y / 12 / 31},
};
constexpr std::array eurosystemDropped{1999y / 4 / 2, 1999y / 4 / 5, 1999y / 5 / 1, 1999y / 12 / 26};
constexpr std::array eurosystemSets{RuleSet{eurosystem, eurosystemSingle, eurosystemDropped}};

// Federal Reserve Banks. 5 U.S.C. 6103(a), with the Reserve Banks' own rule: a holiday on a Saturday is not
// moved, one on a Sunday goes to Monday. Martin Luther King Day since 1986 (Pub. L. 98-144), Juneteenth since
// 2021 (Pub. L. 117-17).
constexpr std::array reserveBanks{
    Rule{"New Year's Day", on(1, 1), Moves::sundayToMonday},
    Rule{"Martin Luther King Day", nth(3, Monday, 1), Moves::never, 1986},
    Rule{"Washington's Birthday", nth(3, Monday, 2)},
    Rule{"Memorial Day", last(Monday, 5)},
    Rule{"Juneteenth", on(6, 19), Moves::sundayToMonday, 2021},
    Rule{"Independence Day", on(7, 4), Moves::sundayToMonday},
    Rule{"Labor Day", nth(1, Monday, 9)},
    Rule{"Columbus Day", nth(2, Monday, 10)},
    Rule{"Veterans Day", on(11, 11), Moves::sundayToMonday},
    Rule{"Thanksgiving Day", nth(4, Thursday, 11)},
    Rule{"Christmas Day", on(12, 25), Moves::sundayToMonday},
};

// New York Stock Exchange. Rule 7.2: a holiday on a Saturday is kept on Friday unless that ends an accounting
// period (so New Year's Day is not), one on a Sunday on Monday. Martin Luther King Day since 1998, Juneteenth
// since 2022. Single days: the exchange's historical list of closings. (From memory.)
constexpr std::array newYorkExchange{
    Rule{"New Year's Day", on(1, 1), Moves::sundayToMonday},
    Rule{"Martin Luther King Day", nth(3, Monday, 1), Moves::never, 1998},
    Rule{"Washington's Birthday", nth(3, Monday, 2)},
    Rule{"Good Friday", easter(-2)},
    Rule{"Memorial Day", last(Monday, 5)},
    Rule{"Juneteenth", on(6, 19), Moves::toNearestWeekday, 2022},
    Rule{"Independence Day", on(7, 4), Moves::toNearestWeekday},
    Rule{"Labor Day", nth(1, Monday, 9)},
    Rule{"Thanksgiving Day", nth(4, Thursday, 11)},
    Rule{"Christmas Day", on(12, 25), Moves::toNearestWeekday},
};
constexpr std::array newYorkExchangeSingle{
    SingleDay{"Closed after the attacks of 11 September", 2001y / 9 / 11},
    SingleDay{"Closed after the attacks of 11 September", 2001y / 9 / 12},
    SingleDay{"Closed after the attacks of 11 September", 2001y / 9 / 13},
    SingleDay{"Closed after the attacks of 11 September", 2001y / 9 / 14},
    SingleDay{"Mourning for President Reagan", 2004y / 6 / 11},
    SingleDay{"Mourning for President Ford", 2007y / 1 / 2},
    SingleDay{"Hurricane Sandy", 2012y / 10 / 29},
    SingleDay{"Hurricane Sandy", 2012y / 10 / 30},
    SingleDay{"Mourning for President George H. W. Bush", 2018y / 12 / 5},
    SingleDay{"Mourning for President Carter", 2025y / 1 / 9},
};
constexpr std::array reserveBankSets{RuleSet{reserveBanks}};
constexpr std::array newYorkExchangeSets{RuleSet{newYorkExchange, newYorkExchangeSingle}};
// Settlement of United States shares wants exchange and banks both open: on Columbus Day and Veterans Day
// shares are dealt but do not settle. National Association of Securities Dealers, Notices to Members 88-82,
// 95-77 and 99-83.
constexpr std::array securitiesSets{newYorkExchangeSets[0], reserveBankSets[0]};

// Bank holidays in England. Banking and Financial Dealings Act 1971, schedule 1, and the yearly proclamations
// under section 1; single days and days moved: the government's published list of bank holidays (before 2012
// from memory).
constexpr std::array england{
    Rule{"New Year's Day", on(1, 1), Moves::weekendToNextFree},
    Rule{"Good Friday", easter(-2)},
    Rule{"Easter Monday", easter(1)},
    Rule{"Early May bank holiday", nth(1, Monday, 5), Moves::never, 1978},
    Rule{"Spring bank holiday", last(Monday, 5)},
    Rule{"Summer bank holiday", last(Monday, 8)},
    Rule{"Christmas Day", on(12, 25), Moves::weekendToNextFree},
    Rule{"Boxing Day", on(12, 26), Moves::weekendToNextFree},
};
constexpr std::array englandSingle{
    SingleDay{"Wedding of the Prince of Wales", 1981y / 7 / 29},
    SingleDay{"Early May bank holiday, moved", 1995y / 5 / 8},
    SingleDay{"Millennium bank holiday", 1999y / 12 / 31},
    SingleDay{"Golden Jubilee", 2002y / 6 / 3},
    SingleDay{"Spring bank holiday, moved", 2002y / 6 / 4},
    SingleDay{"Wedding of the Duke of Cambridge", 2011y / 4 / 29},
    SingleDay{"Spring bank holiday, moved", 2012y / 6 / 4},
    SingleDay{"Diamond Jubilee", 2012y / 6 / 5},
    SingleDay{"Early May bank holiday, moved", 2020y / 5 / 8},
    SingleDay{"Spring bank holiday, moved", 2022y / 6 / 2},
    SingleDay{"Platinum Jubilee", 2022y / 6 / 3},
    SingleDay{"State funeral of Queen Elizabeth II", 2022y / 9 / 19},
    SingleDay{"Coronation of King Charles III", 2023y / 5 / 8},
};
constexpr std::array englandDropped{1995y / 5 / 1, 2002y / 5 / 27, 2012y / 5 / 28, 2020y / 5 / 4,
                                    2022y / 5 / 30};
constexpr std::array englandSets{RuleSet{england, englandSingle, englandDropped}};

// Japan. Act on National Holidays (Act No. 178 of 1948) as amended: a holiday on a Sunday goes to the next
// day that is none (art. 3(2)), a day between two holidays is one (art. 3(3)). Moved for the games of 2020
// and 2021 by the special measures acts for them; 2019 by Act No. 99 of 2018; 1990 and 1993 by their own
// acts. Banks also close on 31 December and 2 and 3 January: Order for Enforcement of the Banking Act,
// art. 5. (From memory, 2026 checked against the published list.)
constexpr Moves japan = Moves::sundayToNextFree;
constexpr std::array japanNational{
    Rule{"New Year's Day", on(1, 1), japan},
    Rule{"Coming of Age Day", on(1, 15), japan, 0, 1999},
    Rule{"Coming of Age Day", nth(2, Monday, 1), japan, 2000},
    Rule{"National Foundation Day", on(2, 11), japan},
    Rule{"Emperor's Birthday", on(2, 23), japan, 2020},
    Rule{"Vernal Equinox Day", vernalEquinox, japan},
    Rule{"Greenery Day", on(4, 29), japan, 0, 2006},
    Rule{"Showa Day", on(4, 29), japan, 2007},
    Rule{"Constitution Day", on(5, 3), japan},
    Rule{"Greenery Day", on(5, 4), japan, 2007},
    Rule{"Children's Day", on(5, 5), japan},
    Rule{"Marine Day", on(7, 20), japan, 1996, 2002},
    Rule{"Marine Day", nth(3, Monday, 7), japan, 2003},
    Rule{"Mountain Day", on(8, 11), japan, 2016},
    Rule{"Respect for the Aged Day", on(9, 15), japan, 0, 2002},
    Rule{"Respect for the Aged Day", nth(3, Monday, 9), japan, 2003},
    Rule{"Autumnal Equinox Day", autumnalEquinox, japan},
    Rule{"Sports Day", on(10, 10), japan, 0, 1999},
    Rule{"Sports Day", nth(2, Monday, 10), japan, 2000},
    Rule{"Culture Day", on(11, 3), japan},
    Rule{"Labour Thanksgiving Day", on(11, 23), japan},
    Rule{"Emperor's Birthday", on(12, 23), japan, 1989, 2018},
};
constexpr std::array japanSingle{
    SingleDay{"Enthronement ceremony", 1990y / 11 / 12},
    SingleDay{"Wedding of the Crown Prince", 1993y / 6 / 9},
    SingleDay{"Accession of the Emperor", 2019y / 5 / 1},
    SingleDay{"Enthronement ceremony", 2019y / 10 / 22},
    SingleDay{"Marine Day, moved", 2020y / 7 / 23},
    SingleDay{"Sports Day, moved", 2020y / 7 / 24},
    SingleDay{"Mountain Day, moved", 2020y / 8 / 10},
    SingleDay{"Marine Day, moved", 2021y / 7 / 22},
    SingleDay{"Sports Day, moved", 2021y / 7 / 23},
    SingleDay{"Mountain Day, moved", 2021y / 8 / 9}, // from Sunday the 8th
};
constexpr std::array japanDropped{2020y / 7 / 20, 2020y / 8 / 11, 2020y / 10 / 12,
                                  2021y / 7 / 19, 2021y / 8 / 11, 2021y / 10 / 11};
constexpr std::array japanBanks{
    Rule{"Bank holiday", on(1, 2)},
    Rule{"Bank holiday", on(1, 3)},
    Rule{"Bank holiday", on(12, 31)},
};
constexpr std::array japanSets{RuleSet{japanNational, japanSingle, japanDropped, 1986}, RuleSet{japanBanks}};

// Zurich, banks and exchange. The days are from memory; 1 August by the Federal Constitution, art. 110(3),
// since 1994. 1 May closes the exchange, not every bank. None is moved. 24 and 31 December, on which the
// exchange alone is closed, are open here.
constexpr std::array zurich{
    Rule{"New Year's Day", on(1, 1)},  Rule{"Berchtold's Day", on(1, 2)},
    Rule{"Good Friday", easter(-2)},   Rule{"Easter Monday", easter(1)},
    Rule{"Labour Day", on(5, 1)},      Rule{"Ascension Day", easter(39)},
    Rule{"Whit Monday", easter(50)},   Rule{"National Day", on(8, 1), Moves::never, 1994},
    Rule{"Christmas Day", on(12, 25)}, Rule{"Saint Stephen's Day", on(12, 26)},
};
constexpr std::array zurichSets{RuleSet{zurich}};

// Toronto, banks. The days that banks in Ontario publish as closed (a large bank's list of 2024 was read),
// those of a weekend on the next weekdays. Family Day since 2008 (Ontario); National Day for Truth and
// Reconciliation since 2021 (S.C. 2021, c. 11). The exchange deals on that day and on Remembrance Day. (Years
// and moves from memory.)
constexpr std::array toronto{
    Rule{"New Year's Day", on(1, 1), Moves::weekendToNextFree},
    Rule{"Family Day", nth(3, Monday, 2), Moves::never, 2008},
    Rule{"Good Friday", easter(-2)},
    Rule{"Victoria Day", until(Monday, 5, 24)},
    Rule{"Canada Day", on(7, 1), Moves::weekendToNextFree},
    Rule{"Civic Holiday", nth(1, Monday, 8)},
    Rule{"Labour Day", nth(1, Monday, 9)},
    Rule{"National Day for Truth and Reconciliation", on(9, 30), Moves::weekendToNextFree, 2021},
    Rule{"Thanksgiving Day", nth(2, Monday, 10)},
    Rule{"Remembrance Day", on(11, 11), Moves::weekendToNextFree},
    Rule{"Christmas Day", on(12, 25), Moves::weekendToNextFree},
    Rule{"Boxing Day", on(12, 26), Moves::weekendToNextFree},
};
constexpr std::array torontoSets{RuleSet{toronto}};

// Sydney, banks. Public Holidays Act 2010 (New South Wales), sections 4 and 5 (from memory), and Retail
// Trading Act 2008, section 14B, which also closes banks on the first Monday in August (read); wholesale
// markets are open on that Monday, and who goes by them names it as an open day. Anzac Day is not moved; 2026
// and 2027 by the Public Holidays Amendment (Anzac Day) Order 2026 (read in the press); 2011, when it was
// Easter Monday, and 2022 from memory.
constexpr std::array sydney{
    Rule{"New Year's Day", on(1, 1), Moves::weekendToNextFree},
    Rule{"Australia Day", on(1, 26), Moves::weekendToNextFree},
    Rule{"Good Friday", easter(-2)},
    Rule{"Easter Monday", easter(1)},
    Rule{"Anzac Day", on(4, 25)},
    Rule{"King's Birthday", nth(2, Monday, 6)},
    Rule{"Bank Holiday", nth(1, Monday, 8)},
    Rule{"Labour Day", nth(1, Monday, 10)},
    Rule{"Christmas Day", on(12, 25), Moves::weekendToNextFree},
    Rule{"Boxing Day", on(12, 26), Moves::weekendToNextFree},
};
constexpr std::array sydneySingle{
    SingleDay{"Anzac Day, additional day", 2011y / 4 / 26},
    SingleDay{"National Day of Mourning for Queen Elizabeth II", 2022y / 9 / 22},
    SingleDay{"Anzac Day, additional day", 2026y / 4 / 27},
    SingleDay{"Anzac Day, additional day", 2027y / 4 / 26},
};
constexpr std::array sydneySets{RuleSet{sydney, sydneySingle}};

// Hong Kong. General Holidays Ordinance (Cap. 149), schedule (read): a holiday on a Sunday goes to the
// following day. Until 2011 the days of the Lunar New Year went to the day before it instead (which fell on a
// weekday in 2000 and 2003 only), since then to the fourth day: Amendment Ordinance 2011, in force 24
// February 2012 (read). Two on one day: the next day takes one of them (from memory). 31 December 1999: L.N.
// 191 of 1999 (read); 3 September 2015 from memory. Festivals: see `festivalDay`.
constexpr Moves hongKongMoves = Moves::sundayOrTwiceToNextFree;
constexpr std::array hongKong{
    Rule{"New Year's Day", on(1, 1), hongKongMoves},
    Rule{"Lunar New Year's Day", chinese(Festival::newYear), Moves::never, 0, 2011},
    Rule{"Second day of Lunar New Year", chinese(Festival::newYear, 1), Moves::never, 0, 2011},
    Rule{"Third day of Lunar New Year", chinese(Festival::newYear, 2), Moves::never, 0, 2011},
    Rule{"Lunar New Year's Day", chinese(Festival::newYear), hongKongMoves, 2012},
    Rule{"Second day of Lunar New Year", chinese(Festival::newYear, 1), hongKongMoves, 2012},
    Rule{"Third day of Lunar New Year", chinese(Festival::newYear, 2), hongKongMoves, 2012},
    Rule{"Good Friday", easter(-2)},
    Rule{"Day following Good Friday", easter(-1)},
    Rule{"Easter Monday", easter(1)},
    Rule{"Ching Ming Festival", chinese(Festival::chingMing), hongKongMoves},
    Rule{"Labour Day", on(5, 1), hongKongMoves},
    Rule{"Birthday of the Buddha", chinese(Festival::buddha), hongKongMoves},
    Rule{"Tuen Ng Festival", chinese(Festival::tuenNg), hongKongMoves},
    Rule{"Establishment Day", on(7, 1), hongKongMoves},
    Rule{"National Day", on(10, 1), hongKongMoves},
    Rule{"Day following the Mid-Autumn Festival", chinese(Festival::midAutumn, 1), Moves::never, 0, 2011},
    Rule{"Day following the Mid-Autumn Festival", chinese(Festival::midAutumn, 1), hongKongMoves, 2012},
    Rule{"Chung Yeung Festival", chinese(Festival::chungYeung), hongKongMoves},
    Rule{"Christmas Day", on(12, 25), hongKongMoves},
    Rule{"First weekday after Christmas Day", on(12, 26), hongKongMoves},
};
constexpr std::array hongKongSingle{
    SingleDay{"Additional holiday", 1999y / 12 / 31},
    SingleDay{"Day preceding Lunar New Year's Day", 2000y / 2 / 4},
    SingleDay{"Day preceding Lunar New Year's Day", 2003y / 1 / 31},
    SingleDay{"70th anniversary of the end of the war", 2015y / 9 / 3},
};
constexpr std::array hongKongSets{RuleSet{hongKong, hongKongSingle}};

/// No law bounds these rules: they hold until another is made, and the core's dates end first.
constexpr int untilChanged = 2199;

constexpr std::array<Centre, centreCount> centres{{
    {"AUSY", "Sydney, banks", 2011, untilChanged},
    {"CATO", "Toronto, banks", 2008, untilChanged},
    {"CHZU", "Zurich, banks and exchange", 1994, untilChanged},
    {"EUTA", "Eurozone, large-value payments (TARGET)", 1999, untilChanged},
    {"GBLO", "London, banks", 1978, untilChanged},
    {"HKHK", "Hong Kong, banks and exchange", 1999, 2056},
    {"JPTO", "Tokyo, banks and exchange", 1990, 2099},
    {"NYSE", "New York, share dealing", 1998, untilChanged},
    {"US-SECURITIES", "United States, settlement of securities", 1998, untilChanged},
    {"USNY", "New York, Federal Reserve Banks", 1978, untilChanged},
}};
constexpr std::array<std::span<const RuleSet>, centreCount> rules{
    sydneySets,   torontoSets, zurichSets,          eurosystemSets, englandSets,
    hongKongSets, japanSets,   newYorkExchangeSets, securitiesSets, reserveBankSets,
};

} // namespace

std::span<const RuleSet> rulesOf(std::size_t centre) {
    return rules[centre];
}

} // namespace holidays

std::span<const Centre> knownCentres() {
    return holidays::centres;
}

const Centre* findCentre(std::string_view code) {
    const auto* const place = std::find_if(holidays::centres.begin(), holidays::centres.end(),
                                           [code](const Centre& centre) { return centre.code == code; });
    return place == holidays::centres.end() ? nullptr : place;
}

std::string_view holidayName(std::string_view code, Date date) {
    const Centre* centre = findCentre(code);
    if (centre == nullptr) {
        return {};
    }
    const auto place = static_cast<std::size_t>(centre - holidays::centres.data());
    const int year = static_cast<int>(std::chrono::year_month_day{date}.year());
    const holidays::Closings closings = holidays::closingsOf(holidays::rulesOf(place), year);
    for (const holidays::Closing& closing : closings.all()) {
        if (closing.date == date) {
            return closing.name;
        }
    }
    return {};
}

} // namespace forwright::dates
