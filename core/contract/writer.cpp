#include "contract/writer.hpp"

#include <nlohmann/json.hpp>

#include <array>
#include <charconv>
#include <cmath>

namespace forwright::contract {

namespace {

using NumberBuffer = std::array<char, 64>;

/// The text of a finite number, in `buffer`. The library's own algorithm (Grisu2) is called as its serializer
/// calls it, without the two buffers that its public `dump` allocates for every single number; the standard
/// library of the module has no `to_chars` for doubles.
std::string_view write(double value, NumberBuffer& buffer) {
    if (value == 0.0) {
        return "0";
    }
    const char* end = nlohmann::detail::to_chars(buffer.data(), buffer.data() + buffer.size(), value);
    std::string_view text{buffer.data(), static_cast<std::size_t>(end - buffer.data())};
    if (text.ends_with(".0")) {
        text.remove_suffix(2);
    }
    return text;
}

void appendQuoted(std::string& out, std::string_view text) {
    constexpr std::string_view digits = "0123456789abcdef";
    out += '"';
    for (const char c : text) {
        if (c == '"' || c == '\\') {
            out += '\\';
            out += c;
        } else if (static_cast<unsigned char>(c) < 0x20) {
            const auto code = static_cast<unsigned char>(c);
            out += "\\u00";
            out += digits[code >> 4U];
            out += digits[code & 15U];
        } else {
            out += c;
        }
    }
    out += '"';
}

} // namespace

std::string numberText(double value) {
    NumberBuffer buffer;
    return std::string{write(value, buffer)};
}

std::string quotedText(std::string_view text) {
    std::string quoted;
    appendQuoted(quoted, text);
    return quoted;
}

void Writer::separate() {
    if (!separated_) {
        out_ += ',';
    }
    separated_ = false;
}

void Writer::beginObject() {
    separate();
    out_ += '{';
    separated_ = true;
}

void Writer::endObject() {
    out_ += '}';
    separated_ = false;
}

void Writer::beginList() {
    separate();
    out_ += '[';
    separated_ = true;
}

void Writer::endList() {
    out_ += ']';
    separated_ = false;
}

Writer& Writer::key(std::string_view name) {
    separate();
    out_ += '"';
    out_ += name;
    out_ += "\":";
    separated_ = true;
    key_ = name;
    return *this;
}

void Writer::value(double number) {
    separate();
    if (!std::isfinite(number)) {
        if (notFinite_.empty()) {
            notFinite_ = key_;
        }
        out_ += "null";
        return;
    }
    NumberBuffer buffer;
    out_ += write(number, buffer);
}

void Writer::integer(long long number) {
    separate();
    std::array<char, 24> buffer;
    const auto written = std::to_chars(buffer.data(), buffer.data() + buffer.size(), number);
    out_.append(buffer.data(), written.ptr);
}

void Writer::value(bool truth) {
    raw(truth ? "true" : "false");
}

void Writer::value(std::string_view text) {
    separate();
    appendQuoted(out_, text);
}

void Writer::value(dates::Date date) {
    separate();
    out_ += '"';
    out_ += dates::toIso(date);
    out_ += '"';
}

void Writer::raw(std::string_view json) {
    separate();
    out_ += json;
}

} // namespace forwright::contract
