// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/fresh_water.h"

#include "core/plain_text.h"

#include <cmath>

namespace evenstroke {
namespace {

/// Pa s; IAPWS SR6-08(2011), equation 7.
double water_viscosity(double kelvin)
{
    const double tau = kelvin / 300.0;
    return 1e-6 * (280.68 * std::pow(tau, -1.9) + 511.45 * std::pow(tau, -7.7) +
                   61.131 * std::pow(tau, -19.6) + 0.45903 * std::pow(tau, -40.0));
}

/// W/(m K); IAPWS SR6-08(2011), equation 8.
double water_conductivity(double kelvin)
{
    const double tau = kelvin / 300.0;
    return 1.6630 * std::pow(tau, -1.15) - 1.7781 * std::pow(tau, -3.4) + 1.1567 * std::pow(tau, -6.0) -
           0.432115 * std::pow(tau, -7.6);
}

/// kg/m³ at 1 atm; Kell 1975.
double water_density(double t)
{
    const double above =
        999.83952 +
        t * (16.945176 + t * (-7.9870401e-3 + t * (-46.170461e-6 + t * (105.56302e-9 - t * 280.54253e-12))));
    return above / (1.0 + 16.879850e-3 * t);
}

/// J/(kg K); polynomial fitted to IF97 at 4 bar abs from 10 to 110 °C, within 0.012 %.
double water_specific_heat(double t)
{
    return 1000.0 * (4.208885984 + t * (-1.822844676e-3 +
                                        t * (3.398294299e-5 + t * (-2.330282284e-7 + t * 8.235537144e-10))));
}

} // namespace

Result<LiquidProperties> fresh_water(Temperature temperature)
{
    const double t = in_celsius(temperature);
    if (!(t >= 10.0 && t <= 110.0)) {
        return Problem{Problem::Kind::not_found,
                       "The properties of water at " + short_number_text(t) +
                           " °C are not known; they are worked out from 10 to 110 °C.",
                       "Check the coolant temperature, or enter the film coefficient itself."};
    }
    const double viscosity = water_viscosity(temperature.value());
    const double conducts = water_conductivity(temperature.value());
    return LiquidProperties{Density::from_value(water_density(t)), conductivity(conducts),
                            DynamicViscosity::from_value(viscosity),
                            viscosity * water_specific_heat(t) / conducts};
}

} // namespace evenstroke
