// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/fuel.h"

#include "core/plain_text.h"

#include <cmath>

namespace evenstroke {
namespace {

constexpr double lightest = 653.0, heaviest = 1075.0; // kg/m³
constexpr double coldest = -18.0;                     // °C

/// Expansion at 15 °C in 1/K; groups and constants of tables 53B/54B (1980), ISO 91-1.
double expansion_at_15(double density)
{
    if (density <= 770.5) { // gasolines
        return (346.4228 + 0.4388 * density) / (density * density);
    }
    if (density < 787.5) { // between gasolines and jet fuels
        return -0.00336312 + 2680.3206 / (density * density);
    }
    if (density < 838.5) { // jet fuels and kerosenes
        return 594.5418 / (density * density);
    }
    return (186.9696 + 0.4862 * density) / (density * density); // gas oils and fuel oils
}

/// Highest temperature of the tables for this density, °C (from memory).
double hottest(double density)
{
    return density < 778.5 ? 95.0 : density < 824.0 ? 125.0 : 150.0;
}

} // namespace

Result<Density> density_at_temperature(Density at_15, Temperature temperature)
{
    const double density = at_15.value();
    const double celsius_degrees = in_celsius(temperature);
    if (!(density >= lightest && density <= heaviest)) {
        return invalid_input(
            "A fuel density of " + short_number_text(density) +
                " kg/m³ at 15 °C is outside 653 to 1075 kg/m³, for which its expansion is known.",
            "Check the density on the bunker delivery note and its unit.");
    }
    if (!(celsius_degrees >= coldest && celsius_degrees <= hottest(density))) {
        return invalid_input("The density of this fuel at " + short_number_text(celsius_degrees) +
                                 " °C is not known; the tables go from -18 to " +
                                 short_number_text(hottest(density)) + " °C.",
                             "Check the temperature at the fuel meter and its unit.");
    }
    const double expansion = expansion_at_15(density) * (celsius_degrees - 15.0);
    return at_15 * std::exp(-expansion * (1.0 + 0.8 * expansion));
}

Result<MassFlow> fuel_mass_flow(VolumeFlow metered, Density at_15, Temperature temperature)
{
    if (!(metered.value() >= 0.0 && std::isfinite(metered.value()))) {
        return invalid_input("A fuel flow of " + short_number_text(metered.value() * 3.6e6) +
                                 " l/h cannot be.",
                             "Check the meter readings and the time between them.");
    }
    const Result<Density> density = density_at_temperature(at_15, temperature);
    if (!density) {
        return density.error();
    }
    return MassFlow::from_value(metered.value() * density.value().value());
}

Result<SpecificConsumption> specific_fuel_consumption(MassFlow fuel, Power power)
{
    if (!(fuel.value() >= 0.0 && std::isfinite(fuel.value()))) {
        return invalid_input("A fuel flow of " + short_number_text(fuel.value() * 3600.0) +
                                 " kg/h cannot be.",
                             "Check the meter readings and the time between them.");
    }
    if (!(power.value() > 0.0 && std::isfinite(power.value()))) {
        return invalid_input("The specific consumption is not known at a power of " +
                                 short_number_text(power.value() / 1000.0) + " kW.",
                             "Enter the power of the engine during the fuel measurement.");
    }
    return SpecificConsumption::from_value(fuel.value() / power.value());
}

SpecificEnergy usual_heating_value()
{
    return megajoules_per_kilogram(42.7);
}

Result<SpecificConsumption> at_usual_heating_value(SpecificConsumption consumption,
                                                   SpecificEnergy lower_heating_value)
{
    const double value = lower_heating_value.value();
    if (!(value >= 10e6 && value <= 130e6)) {
        return invalid_input("A lower heating value of " + short_number_text(value / 1e6) +
                                 " MJ/kg is outside 10 to 130 MJ/kg, so it is no fuel's.",
                             "Check the heating value and its unit.");
    }
    return SpecificConsumption::from_value(consumption.value() * (value / usual_heating_value().value()));
}

Result<Corrected<SpecificConsumption>>
at_usual_heating_value(const Corrected<SpecificConsumption>& consumption, SpecificEnergy lower_heating_value)
{
    const Result<SpecificConsumption> value = at_usual_heating_value(consumption.value, lower_heating_value);
    if (!value) {
        return value.error();
    }
    return Corrected<SpecificConsumption>{value.value(), consumption.applied, consumption.extrapolated};
}

} // namespace evenstroke
