// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/ambient.h"
#include "sample_vessel/calendar.h"
#include "sample_vessel/chance.h"
#include "sample_vessel/scenario.h"

/// Where the ship is, what the weather does and when the readings are taken. Weather is always by chance;
/// only the engine values can be made free of it.
namespace evenstroke::sample {

/// One occasion on which the bridge writes down what all engines share.
struct ShipDay
{
    std::string name; ///< of the ship's own reading: "2023-03", "2023-03-b"
    int month = 0;
    bool second = false; ///< the later or earlier day on which the second auxiliary engine is read
    ShipTime time;
    double latitude = 0.0, longitude = 0.0;
    double course = 0.0, draught_forward = 0.0, draught_aft = 0.0, water_depth = 0.0;
    double wind_kn = 0.0, wind_off_bow = 0.0, sea_state = 0.0;
    double sea_water_c = 0.0, outside_air_c = 0.0, barometer_mbar = 0.0, humidity_percent = 0.0;
};

ShipDay ship_day(const Scenario& scenario, const Chance& chance, int month, bool second);

/// When an engine is read: the main engine and the first auxiliary engine one after the other on the same
/// day, the second auxiliary engine on its own day.
ShipTime reading_time(const ShipDay& day, const Chance& chance, int engine);

/// What the engine breathes and is cooled with; rounded as its thermometers show.
Surroundings surroundings_of(const ShipDay& day, const Chance& chance, int engine);

/// Load of the engine in percent of its rating, as it truly is.
double load_of(const Chance& chance, int engine, int month);

} // namespace evenstroke::sample
