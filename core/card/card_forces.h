// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

namespace evenstroke::indicator {

/// From the mean cycle with dead centre and zero taken out. Below the piston of a two-stroke stands the scavenge pressure,
/// below that of a four-stroke about 1 bar (the crankcase breathes to the engine room; common practice).
/// @return nothing where the card has gaps, or the scavenge pressure of a two-stroke is not known
std::optional<CardForces> card_forces(const Engine& engine, const Conditions& conditions, const Evaluation& card);

} // namespace evenstroke::indicator
