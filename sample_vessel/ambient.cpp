// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/ambient.h"

#include <cmath>

namespace evenstroke::sample {
namespace {

constexpr double zero_celsius_k = 273.15;
constexpr double reference_heating_value_mj_kg = 42.7;

} // namespace

double correction_factor(const Coefficients& coefficients, const Surroundings& surroundings)
{
    return 1.0 + coefficients.per_inlet_air * (surroundings.inlet_air_c - reference_inlet_air_c) +
           coefficients.per_coolant * (surroundings.coolant_c - reference_coolant_c);
}

double pressure_as_read(double at_reference, const Coefficients& coefficients,
                        const Surroundings& surroundings)
{
    const double barometer_bar = surroundings.barometer_mbar / 1000.0;
    return (at_reference + barometer_bar) / correction_factor(coefficients, surroundings) - barometer_bar;
}

double temperature_as_read(double at_reference, const Coefficients& coefficients,
                           const Surroundings& surroundings)
{
    return (at_reference + zero_celsius_k) / correction_factor(coefficients, surroundings) - zero_celsius_k;
}

double turbocharger_speed_as_read(double at_reference, const Surroundings& surroundings)
{
    return at_reference *
           std::sqrt((surroundings.inlet_air_c + zero_celsius_k) / (reference_inlet_air_c + zero_celsius_k));
}

double scavenge_temperature_as_read(double at_reference, const Surroundings& surroundings)
{
    return at_reference + surroundings.coolant_c - reference_coolant_c;
}

double consumption_as_read(double at_reference, double mechanical_efficiency, double heating_value_mj_kg,
                           const Surroundings& surroundings)
{
    const double k = std::pow(surroundings.barometer_mbar / reference_barometer_mbar, 0.7) *
                     std::pow(298.0 / (surroundings.inlet_air_c + zero_celsius_k), 1.2) *
                     (298.0 / (surroundings.coolant_c + zero_celsius_k));
    const double alpha = k - 0.7 * (1.0 - k) * (1.0 / mechanical_efficiency - 1.0);
    return at_reference * (k / alpha) * reference_heating_value_mj_kg / heating_value_mj_kg;
}

} // namespace evenstroke::sample
