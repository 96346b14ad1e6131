// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/reading_conditions.h"

#include "core/trend/conditions.h"

namespace evenstroke::indicator {

namespace {

/// Heat of the fuel that one cylinder burns in a cycle, all cylinders alike.
std::optional<Energy> fuel_heat_of(const Engine& engine, const Reading& reading, const evenstroke::Conditions& read)
{
    constexpr double usual_heating_value = 42.7, minutes_an_hour = 60.0; // MJ/kg of distillate: residual fuel has less
    const auto fuel = engine_mean(reading, "fuel_consumption", read);   // kg/h
    const auto speed = engine_mean(reading, "speed", read);             // r/min
    if (!fuel || !speed || !(*fuel > 0.0) || !(*speed > 0.0) || engine.cylinders < 1)
        return std::nullopt;
    const double cycles = *speed * minutes_an_hour / (engine.two_stroke() ? 1.0 : 2.0) * engine.cylinders;
    return *fuel / cycles * read.heating_value.value_or(usual_heating_value) * 1e6 * si::joules;
}

} // namespace

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
    conditions.fuel_heat = fuel_heat_of(engine, reading, read);
    return conditions;
}

} // namespace evenstroke::indicator
