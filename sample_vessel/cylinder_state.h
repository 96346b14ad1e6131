// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/chance.h"
#include "sample_vessel/scenario.h"

namespace evenstroke::sample {

/// What one engine is like at one reading, before the surroundings act on it.
struct EngineMoment
{
    const Scenario* scenario = nullptr;
    const EngineDesign* engine = nullptr;
    const Chance* chance = nullptr; ///< of the engine values
    int month = 0;
    ShipTime time;
    double load_percent = 0.0;
    bool unsteady = false;
    double scatter = 1.0; ///< of the cylinder values; 0: as the cylinders truly were, before gauges and hands
};

/// Months since the newest of the named kinds of work on the engine, or since before the first reading.
double months_since_work(const EngineMoment& moment, const std::string& kind, double before_first_reading);

/// Value of a cylinder at reference conditions: the engine's own curve at this load, the cylinder's
/// lasting difference, what work did to it, a developing fault, what all cylinders share, and scatter.
double cylinder_value(const EngineMoment& moment, const std::string& quantity, int cylinder);

/// The same for a value of the whole engine: curve, slow dirt and scatter.
double engine_value(const EngineMoment& moment, const std::string& quantity);

/// Share by which the propeller turns faster than the trial curve: a clean hull is light, a grown one heavy.
double light_running(const EngineMoment& moment);

} // namespace evenstroke::sample
