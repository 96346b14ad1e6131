// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/decimal_text.h"

#include <cmath>

namespace evenstroke::sample {
namespace {

double power_of_ten(int exponent)
{
    double power = 1.0;
    for (int i = 0; i < exponent; ++i)
        power *= 10.0;
    return power;
}

} // namespace

std::string decimal_text(double value, int decimals)
{
    const long long steps = std::llround(value * power_of_ten(decimals));
    std::string digits = std::to_string(steps < 0 ? -steps : steps);
    const auto places = static_cast<std::size_t>(decimals);
    if (digits.size() <= places)
        digits.insert(0, places + 1 - digits.size(), '0');
    if (places > 0)
        digits.insert(digits.size() - places, 1, '.');
    return steps < 0 ? "-" + digits : digits;
}

double rounded(double value, int decimals)
{
    const double power = power_of_ten(decimals);
    return static_cast<double>(std::llround(value * power)) / power;
}

} // namespace evenstroke::sample
