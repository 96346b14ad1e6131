// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/card_review.h"

namespace evenstroke::indicator {

/// What stands for the barometer where none was read, and how far it may be off at 95 % (common practice, no source).
inline constexpr double usual_barometer = 1.013, usual_barometer_half_width = 0.03; // bar abs

/// The results of a card that a reading has a place for, in the unit and kind of the quantity.
std::vector<CardValue> card_values(const Engine& engine, const Reading& reading, int cylinder, const Evaluation& card);

} // namespace evenstroke::indicator
