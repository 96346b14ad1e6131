// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/scenario.h"
#include "sample_vessel/sheet.h"

namespace evenstroke::sample {

/// Puts one slip of the pen into the sheet it belongs to.
void make_slip(Sheet& sheet, const TypingError& error);

/// The point one place further left, as when a digit was left out: "152.3" becomes "15.23", "28950" "2895".
std::string with_lost_place(const std::string& typed);
/// The pair of neighbouring digits whose exchange changes the number most, exchanged: "352" becomes "532".
std::string with_digits_exchanged(const std::string& typed);

} // namespace evenstroke::sample
