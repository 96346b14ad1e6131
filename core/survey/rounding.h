// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace evenstroke {

enum class Sign { only_minus, always };

/// A number for print: fixed decimals, half away from zero, a point as decimal sign, U+2212 as minus.
///
/// Binary numbers hardly ever hold a decimal half exactly (2.675 is kept as 2.67499…); a number within a few
/// units of its last binary place of a half is taken for the half that was meant. Nothing is ever "-0.0".
/// @param decimals 0 to 9
std::string rounded_text(double value, int decimals, Sign sign = Sign::only_minus);

/// The same rounding as a number.
double rounded(double value, int decimals);

} // namespace evenstroke
