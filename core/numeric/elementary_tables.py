#!/usr/bin/env python3
"""Writes elementary_tables.hpp: every constant of elementary.cpp, computed with 60 digits by mpmath.

Run it from this folder: python3 elementary_tables.py > elementary_tables.hpp

Polynomials are found by interpolation at the Chebyshev nodes of the interval in which they are used, which comes
within a small factor of the best polynomial of the same degree; next to each the script prints its greatest error,
once the coefficients have been rounded.
"""

from fractions import Fraction

import mpmath as mp

mp.mp.dps = 60


def exact(x):
    """The double nearest to x, as a number of mpmath."""
    return mp.mpf(float(x))


def rounded(x, unit_exponent):
    """The multiple of 2^unit_exponent nearest to x."""
    return mp.ldexp(mp.nint(mp.ldexp(x, -unit_exponent)), unit_exponent)


def hexadecimal(x):
    value = float(x)
    assert mp.mpf(value) == x, "not a double"
    text = value.hex()
    mantissa, exponent = text.split("p")
    if "." in mantissa:
        mantissa = mantissa.rstrip("0").rstrip(".")
    return f"{mantissa}p{exponent}"


def pair(x):
    """x as the sum of two doubles."""
    high = exact(x)
    return high, exact(x - high)


def polynomial(function, low, high, degree):
    """Coefficients, lowest first, rounded to doubles; and the greatest error over the interval."""
    low, high = mp.mpf(low), mp.mpf(high)
    count = degree + 1
    nodes = [
        (low + high) / 2 + (high - low) / 2 * mp.cos(mp.pi * (2 * k + 1) / (2 * count)) for k in range(count)
    ]
    matrix = mp.matrix(count, count)
    values = mp.matrix(count, 1)
    for row, node in enumerate(nodes):
        for column in range(count):
            matrix[row, column] = node**column
        values[row] = function(node)
    solution = mp.lu_solve(matrix, values)
    coefficients = [exact(solution[i]) for i in range(count)]
    worst = mp.mpf(0)
    for i in range(1001):
        x = low + (high - low) * mp.mpf(i) / 1000
        worst = max(worst, abs(mp.polyval(coefficients[::-1], x) - function(x)))
    return coefficients, worst


def series(terms):
    """The function with these Taylor coefficients (a callable of the index); 40 terms."""
    cached = [terms(k) for k in range(40)]

    def function(x):
        return mp.polyval(cached[::-1], x)

    return function


def print_polynomial(name, comment, coefficients, worst):
    print(f"/// {comment}")
    print(f"/// Greatest error of the polynomial itself: {mp.nstr(worst, 2)}.")
    print(f"inline constexpr std::array<double, {len(coefficients)}> {name}{{")
    print_columns([hexadecimal(c) for c in coefficients])
    print("};\n")


def print_columns(words):
    line = "   "
    for word in words:
        if len(line) + len(word) + 2 > 110:
            print(line)
            line = "   "
        line += f" {word},"
    print(line)


def print_constant(name, comment, value):
    print(f"/// {comment}")
    print(f"inline constexpr double {name} = {hexadecimal(value)};\n")


def print_exp():
    steps = 64
    step = mp.log(2) / steps
    print_constant("stepsPerUnit", "64 / ln 2.", exact(1 / step))
    high = rounded(step, -42)
    print_constant(
        "stepHigh", "ln 2 / 64 to a multiple of 2^-42: 36 bits, so its product with up to 17 bits is exact.", high
    )
    print_constant("stepLow", "ln 2 / 64 less stepHigh.", exact(step - high))

    print("/// 2^(i/64) as the sum of two doubles.")
    print("struct Root {\n    double high;\n    double low;\n};")
    print(f"inline constexpr std::array<Root, {steps}> roots{{{{")
    words = []
    for i in range(steps):
        root_high, root_low = pair(mp.power(2, mp.mpf(i) / steps))
        words.append(f"{{{hexadecimal(root_high)}, {hexadecimal(root_low)}}}")
    print_columns(words)
    print("}};\n")

    half_step = step / 2 * (1 + mp.mpf(2) ** -20)
    print_polynomial(
        "exponentialTail",
        "(e^r - 1 - r) / r^2 for |r| <= ln 2 / 128.",
        *polynomial(series(lambda k: 1 / mp.factorial(k + 2)), -half_step, half_step, 3),
    )
    print_polynomial(
        "exponentialTailWide",
        "(e^x - 1 - x) / x^2 for |x| <= 1/8.",
        *polynomial(series(lambda k: 1 / mp.factorial(k + 2)), -0.125, 0.125, 8),
    )


def print_log():
    # The significand m runs over [11/16, 11/8), in 128 steps of equal distance between bit patterns: 80 of width
    # 2^-8 below 1 and 48 of width 2^-7 from 1 on.
    bins = [(Fraction(176 + i, 256), Fraction(177 + i, 256)) for i in range(80)]
    bins += [(Fraction(128 + i, 128), Fraction(129 + i, 128)) for i in range(48)]
    rows, lowest, highest = [], Fraction(0), Fraction(0)
    for low, high in bins:
        inverse = Fraction(round(512 / ((low + high) / 2)), 512)
        if low == 1 or high == 1:
            inverse = Fraction(1)
        lowest = min(lowest, low * inverse - 1)
        highest = max(highest, high * inverse - 1)
        logarithm = -mp.log(mp.mpf(inverse.numerator) / inverse.denominator)
        log_high = rounded(logarithm, -42)
        inverse = mp.mpf(inverse.numerator) / inverse.denominator
        rows.append((inverse, log_high, exact(logarithm - log_high)))
    print("/// For each of the 128 steps of the significand m in [11/16, 11/8): a multiple of 2^-9 near 1/m, and minus")
    print("/// its logarithm as a multiple of 2^-42 and a rest. Next to 1, on both sides, the inverse is 1 itself.")
    print(f"/// Over all steps m * inverse - 1 lies in [{float(lowest):.5f}, {float(highest):.5f}].")
    print("struct Inverse {\n    double inverse;\n    double logHigh;\n    double logLow;\n};")
    print(f"inline constexpr std::array<Inverse, {len(rows)}> inverses{{{{")
    print_columns([f"{{{', '.join(hexadecimal(x) for x in row)}}}" for row in rows])
    print("}};\n")

    high = rounded(mp.log(2), -42)
    print_constant("ln2High", "ln 2 to a multiple of 2^-42: its product with any exponent is exact.", high)
    print_constant("ln2Low", "ln 2 less ln2High.", exact(mp.log(2) - high))
    assert -mp.mpf(2) ** -7 <= lowest.numerator / mp.mpf(lowest.denominator)
    assert highest <= Fraction(1, 128)
    print_polynomial(
        "logarithmTail",
        "(ln(1 + r) - r) / r^2 for -0.0053 <= r <= 2^-7.",
        *polynomial(series(lambda k: (-1) ** (k + 1) / mp.mpf(k + 2)), -0.0053, 0.0078125, 5),
    )


def print_circle():
    print_constant("quartersPerRadian", "2 / pi.", exact(2 / mp.pi))
    quarter = mp.pi / 2
    first = rounded(quarter, -32)
    second = rounded(quarter - first, -65)
    print_constant("quarterFirst", "pi / 2 to a multiple of 2^-32: exact when multiplied by up to 20 bits.", first)
    print_constant("quarterSecond", "The next bits of pi / 2, to a multiple of 2^-65: exact likewise.", second)
    print_constant("quarterThird", "The rest of pi / 2.", exact(quarter - first - second))
    edge = (mp.pi / 4 * (1 + mp.mpf(2) ** -20)) ** 2
    print_polynomial(
        "sineTail",
        "(sin r / r - 1) / r^2 as a polynomial in r^2, for |r| <= pi / 4.",
        *polynomial(series(lambda k: (-1) ** (k + 1) / mp.factorial(2 * k + 3)), 0, edge, 5),
    )
    print_polynomial(
        "cosineTail",
        "(cos r - 1 + r^2 / 2) / r^4 as a polynomial in r^2, for |r| <= pi / 4.",
        *polynomial(series(lambda k: (-1) ** k / mp.factorial(2 * k + 4)), 0, edge, 5),
    )

    print("/// An angle as the sum of two doubles.")
    print("struct Angle {\n    double high;\n    double low;\n};")
    for name, comment, value in (("halfTurn", "pi.", mp.pi), ("quarterTurn", "pi / 2.", quarter)):
        high, low = pair(value)
        print(f"/// {comment}")
        print(f"inline constexpr Angle {name}{{{hexadecimal(high)}, {hexadecimal(low)}}};\n")
    steps = 32
    print("/// The angles whose tangents are i / 32.")
    print(f"inline constexpr std::array<Angle, {steps + 1}> angles{{{{")
    words = []
    for i in range(steps + 1):
        high, low = pair(mp.atan(mp.mpf(i) / steps))
        words.append(f"{{{hexadecimal(high)}, {hexadecimal(low)}}}")
    print_columns(words)
    print("}};\n")
    print_polynomial(
        "arcTangentTail",
        "(atan d / d - 1) / d^2 as a polynomial in d^2, for |d| <= 1/64.",
        *polynomial(series(lambda k: (-1) ** (k + 1) / mp.mpf(2 * k + 3)), 0, mp.mpf(2) ** -12, 3),
    )


print("#pragma once\n")
print("// Written by elementary_tables.py, which says how each constant is made. Do not edit by hand.")
print("// clang-format off\n")
print("#include <array>\n")
print("/// The constants of the elementary functions.")
print("namespace forwright::numeric::tables {\n")
print_exp()
print_log()
print_circle()
print("} // namespace forwright::numeric::tables")
