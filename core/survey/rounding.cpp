// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/rounding.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <limits>

namespace evenstroke {
namespace {

double power_of_ten(int decimals)
{
    double power = 1.0;
    for (int i = 0; i < std::clamp(decimals, 0, 9); ++i)
        power *= 10.0;
    return power;
}

} // namespace

double rounded(double value, int decimals)
{
    const double power = power_of_ten(decimals);
    const double scaled = std::abs(value) * power;
    if (!(scaled < 1e15))
        return value; // no digits behind the decimal sign are left in a double of this size
    const double nudged = scaled * (1.0 + 4.0 * std::numeric_limits<double>::epsilon());
    return std::copysign(std::floor(nudged + 0.5) / power, value);
}

std::string rounded_text(double value, int decimals, Sign sign)
{
    const double number = rounded(value, decimals);
    char digits[350]; // the largest double has 309 digits before the decimal sign
    std::snprintf(digits, sizeof digits, "%.*f", std::clamp(decimals, 0, 9), std::abs(number));
    std::string text(digits);
    std::replace(text.begin(), text.end(), ',', '.'); // whatever the C locale of the process says
    if (number == 0.0)
        return text;
    if (number < 0.0)
        return "\u2212" + text;
    return sign == Sign::always ? "+" + text : text;
}

} // namespace evenstroke
