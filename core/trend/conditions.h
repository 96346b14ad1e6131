// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/baseline.h"
#include "core/reading/reading.h"

#include <optional>
#include <string>
#include <string_view>

namespace evenstroke {

/// One typed value brought to its quantity's own unit and kind: `own = scale * typed + shift`.
struct OwnValue
{
    double value = 0.0;
    double scale = 1.0; ///< change of the own value per unit of the typed number; 0 where no straight line leads there (wind force)
    double shift = 0.0;
    bool outside_hard = false;
};

/// What a reading was taken under. A condition that was not taken, or cannot be (outside its hard range),
/// is not there; it is never replaced by a guess, but for the barometer, where methods in use take 1 bar.
struct Conditions
{
    std::optional<double> load_percent; ///< as typed; from shaft power over rated power where none was typed
    bool load_from_power = false;
    std::string mode;
    std::optional<double> inlet_air;      ///< °C, mean over turbochargers
    std::optional<double> cooler_coolant; ///< °C, mean over coolers
    std::optional<double> barometer;      ///< bar absolute
    std::optional<double> heating_value;  ///< MJ/kg
    std::optional<double> fuel_density_15, fuel_temperature; ///< kg/m³, °C
    std::optional<double> shaft_power;    ///< kW

    double barometer_or_one_bar() const { return barometer.value_or(1.0); }
};

Conditions find_conditions(const Engine& engine, const Reading& reading);

/// Brings a typed value to its quantity's own unit and kind with the reading's barometer (1 bar where none
/// was entered). Nothing where there is no number, or a volume flow has no density to become a mass flow.
std::optional<OwnValue> own_value(const Value& value, const Conditions& conditions);

/// The engine's value of a quantity: the engine's own where typed, else the mean over its places; values
/// outside the hard range are left out.
std::optional<double> engine_mean(const Reading& reading, std::string_view quantity, const Conditions& conditions);

} // namespace evenstroke
