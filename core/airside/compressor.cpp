// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/airside/compressor.h"

#include "core/input_check.h"

#include <cmath>

namespace evenstroke {

Result<Ratio> compressor_pressure_ratio(std::optional<AbsolutePressure> inlet, std::optional<AbsolutePressure> outlet)
{
    InputCheck inputs("the pressure ratio of the compressor");
    inputs.above_zero(inlet, "the pressure before the compressor");
    inputs.above_zero(outlet, "the pressure after the compressor");
    if (!inputs.passed())
        return inputs.problem();
    return Ratio(outlet->value() / inlet->value());
}

Result<Ratio> compressor_efficiency(std::optional<Temperature> inlet, std::optional<Temperature> outlet,
                                    std::optional<Ratio> pressure_ratio, double exponent)
{
    InputCheck inputs("the efficiency of the compressor");
    inputs.above_zero(inlet, "the inlet air temperature").above_zero(outlet, "the air temperature after the compressor");
    inputs.above_zero(pressure_ratio, "the pressure ratio of the compressor");
    if (!inputs.passed())
        return inputs.problem();
    if (!(pressure_ratio->value() > 1.0))
        return invalid_input("The efficiency of the compressor is not known at a pressure ratio of " +
                                 shown(*pressure_ratio) + ", which is not above 1.",
                             "Check the scavenge pressure and whether it is gauge or absolute.");
    if (!(*outlet > *inlet))
        return invalid_input("The air after the compressor has " + shown(*outlet) + ", which is not above the " +
                                 shown(*inlet) + " before it.",
                             "Check the two temperatures.");
    const double ideal = inlet->value() * (std::pow(pressure_ratio->value(), exponent) - 1.0);
    const double efficiency = ideal / (outlet->value() - inlet->value());
    if (!(efficiency <= 1.0))
        return invalid_input("The efficiency of the compressor would be " + shown(Ratio(efficiency)) +
                                 ", and it cannot be above 1.",
                             "Check the air temperature after the compressor and the pressures.");
    return Ratio(efficiency);
}

} // namespace evenstroke
