// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/reading_conditions.h"

#include "core/trend/conditions.h"

namespace evenstroke::indicator {

Conditions conditions_at(const Engine& engine, const Reading& reading)
{
    const evenstroke::Conditions read = find_conditions(engine, reading);
    Conditions conditions;
    if (const auto speed = engine_mean(reading, "speed", read))
        conditions.speed = per_minute(*speed);
    if (const auto gauge = engine_mean(reading, "scavenge_pressure", read)) {
        conditions.scavenge_pressure = bar_absolute(*gauge + read.barometer_or_one_bar());
        conditions.barometer_assumed = !read.barometer;
    }
    if (const auto air = engine_mean(reading, "scavenge_temperature", read))
        conditions.charge_temperature = celsius(*air + usual_pick_up);
    return conditions;
}

} // namespace evenstroke::indicator
