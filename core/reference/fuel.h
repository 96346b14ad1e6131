// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/reference/applied_correction.h"
#include "core/units/quantity_types.h"

/// Fuel: from the meter to the specific consumption.
namespace evenstroke {

/// Density at a temperature from the density at 15 °C, by tables 53B/54B of 1980 (API MPMS 11.1, ASTM D1250,
/// ISO 91-1; generalised petroleum products), without the tables' rounding:
///
///     α15 = (K0 + K1 ρ15) / ρ15²      ρ = ρ15 exp[-α15 Δt (1 + 0.8 α15 Δt)],  Δt = t - 15 °C
///
/// Validity: 653 to 1075 kg/m³; from -18 °C to 95 °C below 778.5, to 125 °C below 824, to 150 °C above
/// (limits from memory of the tables' range). Petroleum fuels only.
/// @par Problems invalid_input: outside the validity
Result<Density> density_at_temperature(Density at_15, Temperature temperature);

/// Mass flow through a volume meter. @param temperature of the fuel at the meter
/// @par Problems as density_at_temperature; a flow that is negative or not finite
Result<MassFlow> fuel_mass_flow(VolumeFlow metered, Density at_15, Temperature temperature);

/// Fuel over work: b = m / P. @par Problems invalid_input: power not above zero, flow negative, not finite
Result<SpecificConsumption> specific_fuel_consumption(MassFlow fuel, Power power);

/// The usual reference lower heating value of marine distillate, 42.7 MJ/kg (ISO 3046-1, from memory).
SpecificEnergy usual_heating_value();

/// What the engine would have used of fuel with the reference heating value for the same heat: b Q / Q_ref.
/// Keeps the ambient correction that the consumption has been through.
/// @param lower_heating_value 10 to 130 MJ/kg (hydrogen has 120), else it cannot be a fuel's
/// @par Problems invalid_input: heating value outside that range
Result<SpecificConsumption> at_usual_heating_value(SpecificConsumption consumption,
                                                   SpecificEnergy lower_heating_value);
Result<Corrected<SpecificConsumption>>
at_usual_heating_value(const Corrected<SpecificConsumption>& consumption, SpecificEnergy lower_heating_value);

} // namespace evenstroke
