#pragma once

#include "discounting/curve.hpp"
#include "forward/price.hpp"

#include <optional>
#include <string>
#include <vector>

namespace forwright::forward {

/// Change of the fair forward when one number that a curve was made from rises by a basis point.
struct ParameterSensitivity {
    discounting::Parameter parameter;
    double change = 0.0; ///< 1e-4 · ∂F/∂parameter
};
struct CurveSensitivity {
    double parallel = 0.0; ///< per +1 bp of every continuous zero rate
    std::vector<ParameterSensitivity> parameters;
};
struct CashSensitivity {
    std::string at;      ///< pointer of its row
    double change = 0.0; ///< ∂F/∂amount
};

/// Exact derivatives of the fair forward, a unit; no bumps but `day`. What quoted forwards imply, a base
/// curve or a yield, is held where anything else moves, and its own numbers are the zero rates implied. They
/// agree with finite differences to 1e-8·F.
struct Sensitivities {
    double spot = 0.0; ///< ∂F/∂S
    CurveSensitivity funding;
    std::optional<CurveSensitivity> base;
    double fee = 0.0;                           ///< per +1 bp
    double yield = 0.0;                         ///< per +1 bp
    std::optional<CurveSensitivity> yieldCurve; ///< where the yield is a curve; its `parallel` is `yield`
    std::vector<CashSensitivity> cash;
    std::optional<double> day; ///< F when `asOf` is one business day on, maturity, spot and zero rates by
                               ///< time held, less F; none where that is past maturity
};
[[nodiscard]] Sensitivities sensitivities(const Market& market, const Schedule& schedule,
                                          const SideInputs& fair, const Price& price);

} // namespace forwright::forward
