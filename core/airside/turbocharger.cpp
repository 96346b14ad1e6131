// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/airside/turbocharger.h"

#include "core/input_check.h"

#include <cmath>

namespace evenstroke {
namespace {

constexpr double air_heat_capacity = 1.005, gas_heat_capacity = 1.09; // kJ/(kg K), common practice
constexpr double largest_fuel_air_ratio = 0.07;

Result<Ratio> at_most_one(double efficiency, const std::string& of, const std::string& what_to_do)
{
    if (efficiency <= 1.0)
        return Ratio(efficiency);
    return invalid_input("The efficiency of the " + of + " would be " + shown(Ratio(efficiency)) +
                             ", and it cannot be above 1.",
                         what_to_do);
}

} // namespace

Result<Ratio> air_over_gas_heat_flow(Ratio fuel_air_ratio)
{
    const double fuel = fuel_air_ratio.value();
    if (!(fuel >= 0.0 && fuel <= largest_fuel_air_ratio))
        return invalid_input("A fuel to air ratio of " + shown(fuel_air_ratio) + " is outside 0 to 0.07.",
                             "Check the fuel consumption and the air flow.");
    return Ratio(air_heat_capacity / gas_heat_capacity / (1.0 + fuel));
}

Result<Ratio> turbocharger_efficiency(const TurbochargerState& state, Ratio heat_flow)
{
    InputCheck inputs("the efficiency of the turbocharger");
    inputs.above_zero(state.inlet_air, "the inlet air temperature");
    inputs.above_zero(state.compressor_ratio, "the pressure ratio of the compressor");
    inputs.above_zero(state.before_turbine, "the exhaust temperature before the turbine");
    inputs.above_zero(state.receiver, "the exhaust receiver pressure");
    inputs.above_zero(state.outlet, "the back pressure after the turbine");
    inputs.above_zero(std::optional(heat_flow), "the heat capacity flow of the air over that of the gas");
    if (!inputs.passed())
        return inputs.problem();
    if (!(state.compressor_ratio->value() > 1.0))
        return invalid_input("The efficiency of the turbocharger is not known at a pressure ratio of " +
                                 shown(*state.compressor_ratio) + ", which is not above 1.",
                             "Check the scavenge pressure and whether it is gauge or absolute.");
    if (!(*state.receiver > *state.outlet))
        return invalid_input("The exhaust receiver has " + shown(*state.receiver) + ", which is not above the " +
                                 shown(*state.outlet) + " after the turbine.",
                             "Check the two pressures and whether they are gauge or absolute.");
    const double expansion = state.outlet->value() / state.receiver->value();
    const double taken = state.inlet_air->value() * (std::pow(state.compressor_ratio->value(), usual_air_exponent) - 1.0);
    const double given = state.before_turbine->value() * (1.0 - std::pow(expansion, usual_gas_exponent));
    return at_most_one(heat_flow.value() * taken / given, "turbocharger",
                       "Check the exhaust temperature before the turbine and the pressures.");
}

Result<Ratio> turbine_efficiency(std::optional<Ratio> turbocharger, std::optional<Ratio> compressor)
{
    InputCheck inputs("the efficiency of the turbine");
    inputs.above_zero(turbocharger, "the efficiency of the turbocharger");
    inputs.above_zero(compressor, "the efficiency of the compressor");
    if (!inputs.passed())
        return inputs.problem();
    return at_most_one(*turbocharger / *compressor, "turbine", "Check the temperatures and pressures of the turbocharger.");
}

} // namespace evenstroke
