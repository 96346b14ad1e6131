// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <optional>

namespace evenstroke::indicator {

/// What a cylinder's mean indicated pressure is measured against before it is believed.
struct UsualMeanIndicated
{
    double bar = 0.0;
    bool of_baseline = false; ///< at the reading's load; else the middle one of the other cylinders
};

/// Nothing where neither the baseline speaks at this load nor another cylinder was read.
std::optional<UsualMeanIndicated> usual_mean_indicated(const Engine& engine, const Reading& reading,
                                                       int cylinder);

/// Below half or above twice the usual: a spring or an area that was written wrong, and no cylinder that
/// still runs with the others (common practice, no source).
bool far_from(const UsualMeanIndicated& usual, double bar);

} // namespace evenstroke::indicator
