#include "numeric/normal_words.hpp"

#include "numeric/normal.hpp"

namespace forwright::numeric {
namespace {

constexpr std::size_t count = 6;

/// The zeros of the Chebyshev polynomial of the sixth degree: cos((2k + 1)π/12).
constexpr std::array<double, count> nodes{0.96592582628906829,  0.70710678118654752,  0.25881904510252076,
                                          -0.25881904510252076, -0.70710678118654752, -0.96592582628906829};

/// The coefficients of the polynomial through `values` at the nodes: Newton's divided differences, multiplied
/// out.
std::array<double, count> interpolated(std::array<double, count> values) {
    for (std::size_t order = 1; order < count; ++order) {
        for (std::size_t i = count - 1; i >= order; --i) {
            values[i] = (values[i] - values[i - 1]) / (nodes[i] - nodes[i - order]);
        }
    }
    std::array<double, count> coefficients{};
    for (std::size_t i = count; i-- > 0;) {
        for (std::size_t power = count - 1; power > 0; --power) {
            coefficients[power] = coefficients[power - 1] - nodes[i] * coefficients[power];
        }
        coefficients[0] = values[i] - nodes[i] * coefficients[0];
    }
    return coefficients;
}

} // namespace

NormalWords::NormalWords() {
    constexpr double half = 1.0 / (2U << pieceBits);
    for (std::size_t piece = 0; piece < pieces; ++piece) {
        const std::uint64_t start = (piece + firstPiece) << piecesShift;
        const double from = __builtin_bit_cast(double, start);
        const double stretch = __builtin_bit_cast(double, start&(std::uint64_t{0x7FF} << 52U));
        std::array<double, coefficients> values{};
        for (std::size_t i = 0; i < coefficients; ++i) {
            values[i] = normalQuantile((from + stretch * half * (1.0 + nodes[i])) * 0x1p-33);
        }
        rows_[piece] = interpolated(values);
    }
}

const NormalWords& normalWords() {
    static const NormalWords table;
    return table;
}

} // namespace forwright::numeric
