// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/chance.h"
#include "sample_vessel/engine_values.h"
#include "sample_vessel/scenario.h"
#include "sample_vessel/sheet.h"

#include <vector>

namespace evenstroke::sample {

/// All readings of one engine in order of time, as they were typed, slips included.
std::vector<Sheet> engine_sheets(const Scenario& scenario, std::uint64_t seed, int engine);
/// What the cylinders of one engine truly were at one reading: no scatter of gauges and hands, no slips.
SheetInputs true_inputs(const Scenario& scenario, const Chance& weather, const Chance& chance, int engine,
                        const std::string& reading);
/// What the bridge wrote down for all engines, in order of time.
std::vector<Sheet> ship_sheets(const Scenario& scenario, std::uint64_t seed);
/// Running hours of the engine's counter at the end of a day.
double running_hours(int engine, Day when);

} // namespace evenstroke::sample
