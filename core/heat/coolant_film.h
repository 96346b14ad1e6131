// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/heat_types.h"

#include <string_view>

/// The water side of the cylinder wall: forced flow without boiling, and small bubbles at the wall (nucleate
/// boiling) where it is hotter than the saturation temperature of the water.
namespace evenstroke {

/// Water without bubbles, at its mean temperature.
struct LiquidProperties
{
    Density density{};
    ThermalConductivity conductivity{};
    DynamicViscosity viscosity{};
    double prandtl = 0.0;
};

/// Reynolds number: ρ w d / μ. @par Problems invalid_input: a property, velocity or diameter not above 0
Result<double> reynolds_number(const LiquidProperties& liquid, Velocity velocity, Length diameter);

/// Dittus-Boelter, for a wall that heats the liquid: Nu = h d / λ = 0.023 Re^0.8 Pr^0.4.
///
/// Validity: turbulent flow in a long passage, Re 1e4 to 1e7, Pr 0.6 to 160, length over 10 diameters (the
/// last is not checked); wall and liquid not far apart. Within ±25 % at best; a cooling jacket is no pipe, so
/// the value is for ratios to the baseline.
/// @param diameter hydraulic: 4 x area / wetted edge
/// @par Problems not_found: Re or Pr outside the validity; as reynolds_number
/// @par Source F. W. Dittus, L. M. K. Boelter (1930); constants and limits of Incropera and DeWitt,
///      Fundamentals of Heat and Mass Transfer, chapter 8 (limits from memory)
Result<HeatTransferCoefficient> dittus_boelter_film(const LiquidProperties& liquid, Velocity velocity,
                                                    Length diameter);

/// A number that a formula gives, with whether it was fitted there.
template <typename Quantity> struct BoilingValue
{
    Quantity value{};
    bool extrapolated = false; ///< below 7 bar abs, where cooling water of engines is: show it with this said
};

/// Jens and Lottes: by how much the wall is hotter than saturation at this flux, ΔT = 25 q^(1/4) exp(-p/62)
/// K, q in MW/m², p in bar abs.
///
/// Validity: water, fitted from 7 to 172 bar abs and up to 12.5 MW/m² (the flux from memory). From 1 to 7 bar
/// abs the value is given and marked as extrapolated; outside that it is not known.
/// @par Problems not_found: outside the validity; invalid_input: flux negative or no number
/// @par Source W. H. Jens, P. A. Lottes, ANL-4627 (1951), constants from memory
Result<BoilingValue<TemperatureDifference>> jens_lottes_superheat(HeatFlux flux, AbsolutePressure pressure);

/// The same solved for the flux. 0 at a wall that is not hotter than saturation.
/// @param superheat up to 47 K, where the formula's flux limit lies at low pressure
Result<BoilingValue<HeatFlux>> jens_lottes_flux(TemperatureDifference superheat, AbsolutePressure pressure);

/// Water and its steam at saturation, and the wall.
struct BoilingProperties
{
    DynamicViscosity viscosity{}; ///< of the liquid
    SpecificEnergy heat_of_vaporisation{};
    Density liquid{}, steam{};
    SurfaceTension surface_tension{};
    SpecificHeat specific_heat{};  ///< of the liquid
    double prandtl = 0.0;          ///< of the liquid
    double surface_factor = 0.013; ///< C_sf: 0.013 common for water on steel (common practice)
    double prandtl_exponent = 1.0; ///< n: 1 for water
};

/// Rohsenow: q = μ h_fg [g (ρ_l - ρ_v)/σ]^(1/2) [c_p ΔT / (C_sf h_fg Pr^n)]³.
///
/// Validity: still (pool) liquid at saturation, clean wall, superheat up to 30 K (common practice: beyond it
/// the critical flux may be passed). A result within a factor 2, since C_sf goes in by its cube.
/// @param gravity 9.80665 m/s² unless a published example has another
/// @par Problems not_found: superheat above 30 K; invalid_input: a property not above 0, the steam not
///      lighter than the liquid, superheat negative
/// @par Source W. M. Rohsenow (1952), in the form of any textbook
Result<HeatFlux> rohsenow_flux(const BoilingProperties& water, TemperatureDifference superheat,
                               double gravity = 9.80665);

} // namespace evenstroke
