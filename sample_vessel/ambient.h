// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/engine_design.h"

/// How the air and the coolant of the day change what the instruments show: the exact inverse of the
/// linear ambient correction, so that a corrected value is the reference value again.
namespace evenstroke::sample {

/// The conditions one engine breathes and is cooled under.
struct Surroundings
{
    double inlet_air_c = reference_inlet_air_c;
    double coolant_c = reference_coolant_c; ///< into the charge-air cooler
    double barometer_mbar = reference_barometer_mbar;
    double humidity_percent = 30.0;
};

/// 1 + a (inlet air - 25) + b (coolant - 25): what the correction multiplies with.
double correction_factor(const Coefficients& coefficients, const Surroundings& surroundings);

/// Gauge pressures in bar; the factor acts on the absolute pressure.
double pressure_as_read(double at_reference, const Coefficients& coefficients,
                        const Surroundings& surroundings);
/// °C; the factor acts on the absolute temperature.
double temperature_as_read(double at_reference, const Coefficients& coefficients,
                           const Surroundings& surroundings);
/// Similarity of turbomachines: speed goes with the root of the absolute inlet temperature.
double turbocharger_speed_as_read(double at_reference, const Surroundings& surroundings);
/// Charge air follows the coolant degree by degree.
double scavenge_temperature_as_read(double at_reference, const Surroundings& surroundings);
/// g/kWh: burns more in warm air after ISO 3046-1 (exponents 0.7, 1.2, 1 for turbocharged and charge-air
/// cooled engines, from memory) and by the heating value of the fuel against 42.7 MJ/kg.
double consumption_as_read(double at_reference, double mechanical_efficiency, double heating_value_mj_kg,
                           const Surroundings& surroundings);

} // namespace evenstroke::sample
