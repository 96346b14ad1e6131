// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/airside/compressor.h"

/// The turbocharger as a whole, and its turbine. The speed at reference inlet air is correct_turbocharger_speed
/// of core/reference.
/// Problems everywhere: not_found: an input is missing (named). invalid_input: one cannot be.
namespace evenstroke {

/// (κ - 1)/κ of exhaust gas, κ about 1.36 (common practice).
inline constexpr double usual_gas_exponent = 0.265;
/// Fuel over air by mass where the air flow is not known (common practice).
inline constexpr double usual_fuel_air_ratio = 0.02;

/// Heat capacity flow of the air over that of the gas: (1.005/1.09)/(1 + f).
/// @param fuel_air_ratio by mass, 0 to 0.07 (0.07 is about where no air is left over; common practice)
Result<Ratio> air_over_gas_heat_flow(Ratio fuel_air_ratio = Ratio(usual_fuel_air_ratio));

/// What one turbocharger was read under.
struct TurbochargerState
{
    std::optional<Temperature> inlet_air;      ///< T1
    std::optional<Ratio> compressor_ratio;     ///< R1, outlet over inlet
    std::optional<Temperature> before_turbine; ///< T3
    std::optional<AbsolutePressure> receiver;  ///< p3, before the turbine
    std::optional<AbsolutePressure> outlet;    ///< p4, after it
};

/// Total efficiency: η = c T1 (R1^0.286 - 1) / [T3 (1 - R2^0.265)], R2 = p4/p3, c as above.
///
/// Contains compressor, turbine and bearings. All exhaust is taken to go through the turbine: with an open
/// by-pass it comes out too low.
/// @par Source definitions of CIMAC Recommendation 27 (2007), "Turbocharging efficiencies"; exponents and heat
///      capacities common practice
/// @par Validity R1 above 1, p3 above p4, a result of at most 1
Result<Ratio> turbocharger_efficiency(const TurbochargerState& state, Ratio heat_flow);

/// η_T = η_TC / η_C, the mechanical losses included. @par Validity a result of at most 1
Result<Ratio> turbine_efficiency(std::optional<Ratio> turbocharger, std::optional<Ratio> compressor);

} // namespace evenstroke
