// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <optional>

/// Water in the engine's air. Ideal mixture of dry air and steam; the saturation line is that of IAPWS-IF97
/// (Revised Release on the IAPWS Industrial Formulation 1997, region 4, equations 30 and 31).
///
/// Validity everywhere: 273.15 K to 647.096 K (no ice). Air below freezing is "not known", never
/// extrapolated.
namespace evenstroke {

/// Mass of a mole of water over that of dry air: 18.01528 / 28.96559 (40 CFR 1065.1005).
inline constexpr double molar_mass_ratio = 18.01528 / 28.96559;

/// Pressure at which water boils at this temperature. @par Problems invalid_input: outside the validity
Result<AbsolutePressure> saturation_pressure(Temperature temperature);

/// Temperature at which water boils at this pressure.
/// @par Problems invalid_input: outside 611.213 Pa to 22.064 MPa
Result<Temperature> saturation_temperature(AbsolutePressure pressure);

/// Partial pressure of the steam in air of this temperature. @param relative_humidity 0 to 1
/// @par Problems invalid_input: humidity outside 0 to 1, temperature outside the validity
Result<AbsolutePressure> vapour_pressure(Temperature air, Ratio relative_humidity);

/// Water per dry air, kg/kg, from the partial pressure of its steam: M e / (p - e) with M the molar mass
/// ratio (form of 40 CFR 1066.615). @par Problems invalid_input: e negative or not below p
Result<Ratio> mixing_ratio(AbsolutePressure vapour, AbsolutePressure air);
Result<Ratio> mixing_ratio(Temperature air, Ratio relative_humidity, AbsolutePressure barometer);

/// Temperature at which air with this much water, at this pressure, begins to drip.
/// @par Problems invalid_input: no water, or a dew point outside the validity
Result<Temperature> dew_point(Ratio mixing_ratio, AbsolutePressure air);

/// What becomes of the inlet air's water once it is compressed and cooled. All kg/kg dry air.
struct ChargeAirWater
{
    Ratio drawn_in{};                     ///< with the inlet air
    Ratio saturated{};                    ///< what the scavenge air can carry
    Ratio condensate{};                   ///< the rest: an upper bound, a perfect separator assumed
    std::optional<Temperature> dew_point; ///< at scavenge pressure; empty where it lies below 0 °C
};

/// Condensate after the charge-air cooler. A dry drain while this expects water may be a blocked drain
/// (common practice), so a screen must call it "expected, upper bound".
/// @par Problems invalid_input: any of the two temperatures outside the validity, humidity outside 0 to 1,
///      a pressure not above that of the steam in it
Result<ChargeAirWater> charge_air_water(Temperature inlet_air, Ratio relative_humidity,
                                        AbsolutePressure barometer, Temperature scavenge_air,
                                        AbsolutePressure scavenge_pressure);

} // namespace evenstroke
