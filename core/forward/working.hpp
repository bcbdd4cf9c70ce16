#pragma once

#include "dates/date.hpp"

#include <optional>
#include <string>
#include <variant>
#include <vector>

namespace forwright::forward {

/// A number or date put into a formula.
struct Given {
    std::string symbol; ///< as it stands in the formula
    std::variant<double, dates::Date> value;
    std::string unit; ///< "" where it has none
};

/// One figure of a price, told as it is made.
struct Step {
    std::string code;    ///< stable: `spot-factor`, `units`, …
    std::string side;    ///< `dates`, `fair`, `bid`, `offer`
    std::string name;    ///< what it is, in plain words
    std::string formula; ///< in the symbols of the contract
    std::vector<Given> given;
    std::variant<double, dates::Date> result;
    std::string unit;
    std::string convention; ///< by what rule: day count, compounding, calendar, rounding
    std::optional<double>
        effect; ///< what it adds to the forward, quote currency a unit, where that can be said
};

/// Where the code that prices tells its figures. Nothing is kept, and no text made, unless somebody listens.
class Steps {
  public:
    /// Nobody listens.
    Steps() = default;
    /// What is told is added to `kept`.
    explicit Steps(std::vector<Step>& kept) : kept_(&kept) {}

    /// Passes `figure` on after telling it; `describe(figure)` makes the step and is called only where
    /// somebody listens.
    template <class Figure, class Describe> Figure tell(Figure figure, Describe describe) {
        if (kept_ != nullptr) {
            kept_->push_back(describe(figure));
        }
        return figure;
    }
    [[nodiscard]] bool heard() const { return kept_ != nullptr; }

  private:
    std::vector<Step>* kept_ = nullptr;
};

} // namespace forwright::forward
