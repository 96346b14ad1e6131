// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace evenstroke::sample {

/// A number as an instrument shows it: rounded half away from zero to `decimals` places, decimal point,
/// the same text whatever the locale.
std::string decimal_text(double value, int decimals);
/// The same rounding as a number.
double rounded(double value, int decimals);

} // namespace evenstroke::sample
