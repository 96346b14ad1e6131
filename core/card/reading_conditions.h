// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"
#include "core/reading/reading.h"

namespace evenstroke::indicator {

/// What fresh charge picks up between the receiver and the closing of the cylinder: common practice, no source (with
/// 42 °C in the receiver it gives the usual 345 K).
inline constexpr double usual_pick_up = 30.0; // K

/// What a reading says beside its cards: speed, scavenge pressure, temperature of the charge when the cylinder closes.
/// What was not read stays unknown; without a barometer a gauge pressure is taken over 1 bar and marked as such.
Conditions conditions_at(const Engine& engine, const Reading& reading);

} // namespace evenstroke::indicator
