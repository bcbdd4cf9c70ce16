#pragma once

#include "contract/place.hpp"
#include "outcome/outcome.hpp"

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace forwright::contract {

/// A default that was used, and what it is as JSON.
struct Assumption {
    std::string at;
    std::string json;
};

/// What reading and answering a request brings to light beside its result. Faults beyond the first
/// `mostFaults` are counted, not kept.
class Findings {
  public:
    static constexpr std::size_t mostFaults = 1000;

    void fault(const Place& at, std::string_view code, std::string message);
    /// Faults whose pointers are seen from `at`.
    void faults(const Place& at, outcome::Faults more);
    void notice(const Place& at, std::string_view code, std::string message);
    void notices(const Place& at, outcome::Notices more);
    void assume(const Place& at, std::string json) {
        assumptions_.push_back({at.pointer(), std::move(json)});
    }

    /// No fault yet.
    [[nodiscard]] bool ok() const { return faults_.empty(); }
    /// The faults kept, and one more that says how many there are beside them.
    [[nodiscard]] outcome::Faults allFaults() const;
    [[nodiscard]] const outcome::Notices& allNotices() const { return notices_; }
    [[nodiscard]] const std::vector<Assumption>& assumptions() const { return assumptions_; }

  private:
    void keep(outcome::Fault fault);

    outcome::Faults faults_;
    std::size_t faultsNotKept_ = 0;
    outcome::Notices notices_;
    std::vector<Assumption> assumptions_;
};

} // namespace forwright::contract
