// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace evenstroke::sample {

/// Air and burnt gas in a cylinder as one real gas: p = rho R T (1 + B rho). SI units.
struct GasState
{
    double temperature_k = 0.0;
    double isentropic_exponent = 0.0; ///< -(d ln p / d ln V) without heat
    double pressure_rise = 0.0;       ///< V dp/dU at constant volume
};

/// State of gas of this density and pressure, with this share of burnt gas (0 to 1).
/// Valid 250 to 3000 K, up to about 250 bar.
GasState gas_state(double pressure_pa, double density, double burnt_share);
/// Density at pressure and temperature.
double gas_density(double pressure_pa, double temperature_k);

} // namespace evenstroke::sample
