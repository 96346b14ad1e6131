// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/units/quantity_types.h"

/// The types of heat transfer at the public edges of the core; SI.
namespace evenstroke {

using HeatFlux = decltype(Power{} / Area{});                                    ///< W/m²
using HeatTransferCoefficient = decltype(HeatFlux{} / TemperatureDifference{}); ///< W/(m² K)
using ThermalConductivity = decltype(HeatTransferCoefficient{} * Length{});     ///< W/(m K)
using HeatFlowPerLength = decltype(Power{} / Length{});                    ///< W/m of a cylinder's length
using DynamicViscosity = Measured<si::dynamic_viscosity>;                  ///< Pa s
using SurfaceTension = Measured<si::surface_tension>;                      ///< N/m
using SpecificHeat = decltype(SpecificEnergy{} / TemperatureDifference{}); ///< J/(kg K)

inline HeatTransferCoefficient film_coefficient(double watts_per_square_metre_kelvin)
{
    return HeatTransferCoefficient::from_value(watts_per_square_metre_kelvin);
}
inline ThermalConductivity conductivity(double watts_per_metre_kelvin)
{
    return ThermalConductivity::from_value(watts_per_metre_kelvin);
}
inline HeatFlux megawatts_per_square_metre(double flux)
{
    return HeatFlux::from_value(flux * 1e6);
}

} // namespace evenstroke
