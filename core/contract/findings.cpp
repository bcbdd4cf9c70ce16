#include "contract/findings.hpp"

namespace forwright::contract {

void Findings::keep(outcome::Fault fault) {
    if (faults_.size() < mostFaults) {
        faults_.push_back(std::move(fault));
    } else {
        ++faultsNotKept_;
    }
}

void Findings::fault(const Place& at, std::string_view code, std::string message) {
    if (faults_.size() < mostFaults) {
        faults_.push_back({at.pointer(), std::string{code}, std::move(message)});
    } else {
        ++faultsNotKept_;
    }
}

void Findings::faults(const Place& at, outcome::Faults more) {
    const std::string place = at.pointer();
    for (outcome::Fault& fault : more) {
        keep(outcome::under(place, std::move(fault)));
    }
}

void Findings::notice(const Place& at, std::string_view code, std::string message) {
    notices_.push_back({at.pointer(), std::string{code}, std::move(message)});
}

void Findings::notices(const Place& at, outcome::Notices more) {
    outcome::append(notices_, at.pointer(), std::move(more));
}

outcome::Faults Findings::allFaults() const {
    outcome::Faults all = faults_;
    if (faultsNotKept_ > 0) {
        all.push_back({"", "more-errors",
                       std::to_string(faultsNotKept_) + " more errors are not listed; mend these first."});
    }
    return all;
}

} // namespace forwright::contract
