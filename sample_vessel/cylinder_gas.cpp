// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/cylinder_gas.h"

#include <algorithm>

namespace evenstroke::sample {
namespace {

constexpr double gas_constant = 8.314462618 / 0.0289656; // J/(kg K), of air; burnt gas differs by 0.2 %

/// cp/R as a polynomial in T, below and above 1000 K: NASA polynomials of the species (public GRI-Mech 3.0
/// file), mixed for dry air and for the products of burning CH1.86 without excess air.
struct HeatCapacity
{
    double below[5], above[5];
};
constexpr HeatCapacity air{{3.392215, 4.754254e-4, -1.034616e-6, 2.377974e-9, -1.22956e-12},
                           {2.997598, 1.474286e-3, -6.035425e-7, 1.22929e-10, -9.83183e-15}};
constexpr HeatCapacity products{{3.27729, 1.985085e-3, -3.046376e-6, 3.776735e-9, -1.588354e-12},
                                {3.061454, 1.954358e-3, -7.344439e-7, 1.322076e-10, -9.194274e-15}};

double at_constant_pressure(const HeatCapacity& gas, double t)
{
    const double* a = t < 1000.0 ? gas.below : gas.above;
    return a[0] + t * (a[1] + t * (a[2] + t * (a[3] + t * a[4])));
}

/// Second virial coefficient of air and its derivatives, m³/kg: a smooth fit from memory.
struct Virial
{
    double value, first, second;
};

Virial virial(double t)
{
    constexpr double mole = 0.028965, b0 = 39.5e-6 / mole, b1 = 1.0e-2 / mole, b2 = 1.084 / mole;
    return {b0 - b1 / t - b2 / (t * t), b1 / (t * t) + 2.0 * b2 / (t * t * t),
            -2.0 * b1 / (t * t * t) - 6.0 * b2 / (t * t * t * t)};
}

} // namespace

double gas_density(double pressure_pa, double temperature_k)
{
    double density = pressure_pa / (gas_constant * temperature_k);
    for (int step = 0; step < 20; ++step)
        density =
            pressure_pa / (gas_constant * temperature_k * (1.0 + virial(temperature_k).value * density));
    return density;
}

GasState gas_state(double pressure_pa, double density, double burnt_share)
{
    GasState state;
    state.temperature_k = pressure_pa / (gas_constant * density);
    for (int step = 0; step < 4; ++step)
        state.temperature_k =
            pressure_pa / (gas_constant * density * (1.0 + virial(state.temperature_k).value * density));
    const double t = std::clamp(state.temperature_k, 250.0, 3000.0);
    const Virial b = virial(t);
    const double cp =
        (1.0 - burnt_share) * at_constant_pressure(air, t) + burnt_share * at_constant_pressure(products, t);
    const double cv = gas_constant * (cp - 1.0 - density * (2.0 * t * b.first + t * t * b.second));
    const double by_temperature = density * gas_constant * (1.0 + density * (b.value + t * b.first)); // dp/dT
    const double by_density = gas_constant * t * (1.0 + 2.0 * b.value * density); // dp/drho
    state.isentropic_exponent =
        density / pressure_pa * (by_density + t * by_temperature * by_temperature / (density * density * cv));
    state.pressure_rise = by_temperature / (density * cv);
    return state;
}

} // namespace evenstroke::sample
