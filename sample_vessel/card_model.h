// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/engine_design.h"

#include <vector>

/// An indicator card that agrees with the values on the form: one zone, one burning law, wall loss.
namespace evenstroke::sample {

/// What the card must show. Pressures absolute, bar.
struct CardTarget
{
    double scavenge = 0.0, compression = 0.0, maximum = 0.0, mean_indicated = 0.0;
    double lost_by_leak = 0.0; ///< of the compression pressure, past the rings
    double speed_rpm = 0.0;
    double closing_temperature_k = 343.0;
};

inline constexpr double card_step_deg = 0.25;

/// True pressures, bar absolute, from -180° to just before +180° in steps of `card_step_deg`; firing top
/// dead centre is 0. Two-stroke engines only. Maximum, compression and mean indicated pressure meet the
/// target within 0.01 bar.
std::vector<double> card_pressures(const EngineDesign& engine, const CardTarget& target);

/// Cylinder volume at a crank angle, m³.
double cylinder_volume(const EngineDesign& engine, double angle_deg);
/// Work over one turn divided by the swept volume, bar.
double mean_indicated_pressure(const EngineDesign& engine, const std::vector<double>& pressures);

} // namespace evenstroke::sample
