#include "contract/currencies.hpp"

namespace forwright::contract {

namespace {

constexpr std::string_view codes = "AED AFN ALL AMD ANG AOA ARS AUD AWG AZN BAM BBD BDT BGN BHD BIF BMD BND "
                                   "BOB BRL BSD BTN BWP BYN BZD CAD CDF "
                                   "CHF CLF CLP CNH CNY COP CRC CUP CVE CZK DJF DKK DOP DZD EGP ERN ETB EUR "
                                   "FJD FKP GBP GEL GHS GIP GMD GNF GTQ "
                                   "GYD HKD HNL HTG HUF IDR ILS INR IQD IRR ISK JMD JOD JPY KES KGS KHR KMF "
                                   "KPW KRW KWD KYD KZT LAK LBP LKR LRD "
                                   "LSL LYD MAD MDL MGA MKD MMK MNT MOP MRU MUR MVR MWK MXN MYR MZN NAD NGN "
                                   "NIO NOK NPR NZD OMR PAB PEN PGK PHP "
                                   "PKR PLN PYG QAR RON RSD RUB RWF SAR SBD SCR SDG SEK SGD SHP SLE SOS SRD "
                                   "SSP STN SVC SYP SZL THB TJS TMT TND "
                                   "TOP TRY TTD TWD TZS UAH UGX USD UYU UZS VES VND VUV WST XAF XAG XAU XCD "
                                   "XCG XDR XOF XPD XPF XPT YER ZAR ZMW "
                                   "ZWG ";

} // namespace

bool isCurrency(std::string_view code) {
    constexpr std::size_t width = 4; // a code and the space after it
    if (code.size() != width - 1) {
        return false;
    }
    for (std::size_t at = 0; at < codes.size(); at += width) {
        if (codes.substr(at, width - 1) == code) {
            return true;
        }
    }
    return false;
}

} // namespace forwright::contract
