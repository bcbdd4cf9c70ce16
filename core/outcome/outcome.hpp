#pragma once

#include <cassert>
#include <iterator>
#include <string>
#include <utility>
#include <variant>
#include <vector>

/// What a calculation that can be refused gives back: a value, or every reason why there is none.
namespace forwright::outcome {

/// A remark tied to a place of the request. As a fault it stopped the calculation; as a notice the person
/// should know it although it did not.
struct Remark {
    std::string
        at; ///< RFC 6901 pointer of the member concerned, relative to whoever reports it; "" is the whole
    std::string code;    ///< stable, lower-case-with-hyphens; the catalogue stands in DEVELOPERS.md
    std::string message; ///< one sentence: what is wrong and what would be right
};

using Fault = Remark;
using Faults = std::vector<Fault>;
using Notice = Remark;
using Notices = std::vector<Notice>;

/// What a check of an input over a span of dates found.
struct Review {
    Faults faults;
    Notices notices;
};

/// The same remark seen from the enclosing object: `place` is put before its pointer.
[[nodiscard]] inline Remark under(const std::string& place, Remark remark) {
    remark.at = place + remark.at;
    return remark;
}

/// All of `more`, each seen from the enclosing object, added to the end of `all`.
inline void append(std::vector<Remark>& all, const std::string& place, std::vector<Remark> more) {
    for (Remark& remark : more) {
        all.push_back(under(place, std::move(remark)));
    }
}

/// A value of T, or at least one fault.
template <class T> class Outcome {
  public:
    Outcome(T value) : state_(std::move(value)) {} // NOLINT(google-explicit-constructor): reads as a return
    Outcome(Fault fault) : state_(Faults{std::move(fault)}) {} // NOLINT(google-explicit-constructor)
    Outcome(Faults faults) : state_(std::move(faults)) {       // NOLINT(google-explicit-constructor)
        assert(!std::get<Faults>(state_).empty());
    }

    [[nodiscard]] bool ok() const { return std::holds_alternative<T>(state_); }
    explicit operator bool() const { return ok(); }

    /// The value; asking for it where there is none is a programmer's mistake.
    [[nodiscard]] const T& value() const& {
        assert(ok());
        return *std::get_if<T>(&state_);
    }
    [[nodiscard]] T&& value() && {
        assert(ok());
        return std::move(*std::get_if<T>(&state_));
    }
    /// The reasons; empty where there is a value.
    [[nodiscard]] Faults faults() const { return ok() ? Faults{} : *std::get_if<Faults>(&state_); }

  private:
    std::variant<T, Faults> state_;
};

} // namespace forwright::outcome
