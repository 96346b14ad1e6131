// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/reading.h"

#include <string>

namespace evenstroke {

/// Whether the engine had settled: judged from the quick lines before and after the walk.
enum class Steadiness { not_judged, steady, usable_with_care, unsteady };
std::string steadiness_word(Steadiness steadiness); ///< "usable with care"

struct SteadinessVerdict
{
    Steadiness verdict = Steadiness::not_judged;
    std::string sentence; ///< which criterion decided, with both values; what is missing where not judged
};

/// Compares the values of phase `before` and `after` with the criteria of common practice (speed, power or
/// fuel index, turbocharger speed, scavenge pressure, mean exhaust temperature, jacket water, scavenge
/// temperature, settled minutes, sea). A criterion whose values are not there is left out; with no pair of
/// values at all the verdict is not_judged.
/// @param generating_set true for sets on the ship's grid, whose load may move more
SteadinessVerdict judge_steadiness(const Reading& reading, bool generating_set);

} // namespace evenstroke
