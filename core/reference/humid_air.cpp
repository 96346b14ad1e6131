// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reference/humid_air.h"

#include "core/plain_text.h"

#include <cmath>

namespace evenstroke {
namespace {

// IAPWS-IF97, table 34.
constexpr double n1 = 0.11670521452767e4, n2 = -0.72421316703206e6, n3 = -0.17073846940092e2,
                 n4 = 0.12020824702470e5, n5 = -0.32325550322333e7, n6 = 0.14915108613530e2,
                 n7 = -0.48232657361591e4, n8 = 0.40511340542057e6, n9 = -0.23855557567849,
                 n10 = 0.65017534844798e3;

constexpr double coldest = 273.15, hottest = 647.096;  // K, ends of region 4
constexpr double lowest = 611.213, highest = 22.064e6; // Pa, the same ends

/// IF97 equation 30; K to Pa. @pre inside the validity
double saturation_pascal(double kelvin)
{
    const double theta = kelvin + n9 / (kelvin - n10);
    const double a = (theta + n1) * theta + n2;
    const double b = (n3 * theta + n4) * theta + n5;
    const double c = (n6 * theta + n7) * theta + n8;
    const double root = 2.0 * c / (-b + std::sqrt(b * b - 4.0 * a * c));
    return 1e6 * root * root * root * root;
}

/// IF97 equation 31; Pa to K. @pre inside the validity
double saturation_kelvin(double pascal)
{
    const double beta = std::sqrt(std::sqrt(pascal / 1e6));
    const double e = (beta + n3) * beta + n6;
    const double f = (n1 * beta + n4) * beta + n7;
    const double g = (n2 * beta + n5) * beta + n8;
    const double d = 2.0 * g / (-f - std::sqrt(f * f - 4.0 * e * g));
    return 0.5 * (n10 + d - std::sqrt((n10 + d) * (n10 + d) - 4.0 * (n9 + n10 * d)));
}

} // namespace

Result<AbsolutePressure> saturation_pressure(Temperature temperature)
{
    const double kelvin = temperature.value();
    if (!(kelvin >= coldest && kelvin <= hottest)) {
        return invalid_input("The saturation pressure of water at " +
                                 short_number_text(in_celsius(temperature)) +
                                 " °C is not known; it is worked out from 0 °C to 373.946 °C.",
                             "Check the temperature and its unit.");
    }
    return AbsolutePressure::from_value(saturation_pascal(kelvin));
}

Result<Temperature> saturation_temperature(AbsolutePressure pressure)
{
    const double pascal = pressure.value();
    if (!(pascal >= lowest && pascal <= highest)) {
        return invalid_input("The saturation temperature of water at " + short_number_text(in_bar(pressure)) +
                                 " bar abs is not known; it is worked out from 0.00611213 to 220.64 bar abs.",
                             "Check the pressure and its unit.");
    }
    return Temperature::from_value(saturation_kelvin(pascal));
}

Result<AbsolutePressure> vapour_pressure(Temperature air, Ratio relative_humidity)
{
    const double humidity = relative_humidity.value();
    if (!(humidity >= 0.0 && humidity <= 1.0)) {
        return invalid_input("A relative humidity of " + short_number_text(100.0 * humidity) + "% cannot be.",
                             "Enter a humidity from 0 to 100%.");
    }
    const Result<AbsolutePressure> saturated = saturation_pressure(air);
    if (!saturated) {
        return saturated.error();
    }
    return AbsolutePressure::from_value(humidity * saturated.value().value());
}

Result<Ratio> mixing_ratio(AbsolutePressure vapour, AbsolutePressure air)
{
    const double steam = vapour.value(), all = air.value();
    if (!(steam >= 0.0 && steam < all && std::isfinite(all))) {
        return invalid_input("Air of " + short_number_text(all / 100.0) + " mbar abs cannot hold steam of " +
                                 short_number_text(steam / 100.0) + " mbar.",
                             "Check the pressure, whether it is gauge or absolute, and the temperature.");
    }
    return Ratio(molar_mass_ratio * steam / (all - steam));
}

Result<Ratio> mixing_ratio(Temperature air, Ratio relative_humidity, AbsolutePressure barometer)
{
    const Result<AbsolutePressure> vapour = vapour_pressure(air, relative_humidity);
    if (!vapour) {
        return vapour.error();
    }
    return mixing_ratio(vapour.value(), barometer);
}

Result<Temperature> dew_point(Ratio mixing_ratio, AbsolutePressure air)
{
    const double water = mixing_ratio.value();
    if (!(water > 0.0 && std::isfinite(water))) {
        return invalid_input("Air with " + short_number_text(1000.0 * water) +
                                 " g water per kg has no dew point.",
                             "Check the humidity.");
    }
    return saturation_temperature(
        AbsolutePressure::from_value(air.value() * water / (molar_mass_ratio + water)));
}

Result<ChargeAirWater> charge_air_water(Temperature inlet_air, Ratio relative_humidity,
                                        AbsolutePressure barometer, Temperature scavenge_air,
                                        AbsolutePressure scavenge_pressure)
{
    const Result<Ratio> drawn_in = mixing_ratio(inlet_air, relative_humidity, barometer);
    if (!drawn_in) {
        return drawn_in.error();
    }
    const Result<Ratio> saturated = mixing_ratio(scavenge_air, Ratio(1.0), scavenge_pressure);
    if (!saturated) {
        return saturated.error();
    }
    ChargeAirWater water;
    water.drawn_in = drawn_in.value();
    water.saturated = saturated.value();
    if (water.drawn_in > water.saturated) {
        water.condensate = water.drawn_in - water.saturated;
    }
    const Result<Temperature> dripping = dew_point(water.drawn_in, scavenge_pressure);
    if (dripping) { // without one the air is too dry to drip above 0 °C: a fact, not a fault
        water.dew_point = dripping.value();
    }
    return water;
}

} // namespace evenstroke
