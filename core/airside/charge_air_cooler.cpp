// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/airside/charge_air_cooler.h"

#include "core/input_check.h"

#include <cmath>

namespace evenstroke {
namespace {

constexpr double furthest_flow = 2.0; // factor between two flows for the square law

constexpr char air_in[] = "the air temperature before the cooler";
constexpr char air_out[] = "the air temperature after the cooler";
constexpr char coolant_in[] = "the coolant temperature into the air cooler";
constexpr char coolant_out[] = "the coolant temperature out of the air cooler";

void check_state(InputCheck& inputs, const FlowState& state)
{
    inputs.above_zero(state.pressure, "the air pressure").above_zero(state.temperature, "the air temperature");
    inputs.above_zero(state.flow ? std::optional(Ratio(*state.flow)) : std::nullopt, "the air flow");
}

} // namespace

Result<Ratio> cooler_effectiveness(const CoolerTemperatures& at)
{
    InputCheck inputs("the effectiveness of the air cooler");
    inputs.above_zero(at.air_in, air_in).above_zero(at.air_out, air_out).above_zero(at.coolant_in, coolant_in);
    if (!inputs.passed())
        return inputs.problem();
    if (!(*at.air_in > *at.coolant_in && *at.air_out >= *at.coolant_in && *at.air_out <= *at.air_in))
        return invalid_input("The effectiveness of the air cooler is not known: air of " + shown(*at.air_in) +
                                 " before it, " + shown(*at.air_out) + " after it and coolant of " +
                                 shown(*at.coolant_in) + " cannot stand together.",
                             "Check the three temperatures.");
    return Ratio((*at.air_in - *at.air_out) / (*at.air_in - *at.coolant_in));
}

Result<TemperatureDifference> cooler_approach(const CoolerTemperatures& at)
{
    InputCheck inputs("the temperature of the air over the coolant");
    inputs.above_zero(at.air_out, air_out).above_zero(at.coolant_in, coolant_in);
    if (!inputs.passed())
        return inputs.problem();
    return *at.air_out - *at.coolant_in;
}

Result<TemperatureDifference> coolant_rise(const CoolerTemperatures& at)
{
    InputCheck inputs("the rise of the coolant's temperature");
    inputs.above_zero(at.coolant_in, coolant_in).above_zero(at.coolant_out, coolant_out);
    if (!inputs.passed())
        return inputs.problem();
    return *at.coolant_out - *at.coolant_in;
}

Result<TemperatureDifference> mean_temperature_difference(const CoolerTemperatures& at)
{
    InputCheck inputs("the mean temperature difference of the air cooler");
    inputs.above_zero(at.air_in, air_in).above_zero(at.air_out, air_out);
    inputs.above_zero(at.coolant_in, coolant_in).above_zero(at.coolant_out, coolant_out);
    if (!inputs.passed())
        return inputs.problem();
    const double hot = at.air_in->value() - at.coolant_out->value();
    const double cold = at.air_out->value() - at.coolant_in->value();
    if (!(hot > 0.0 && cold > 0.0))
        return invalid_input("The air cooler has " + shown(*at.air_in) + " to " + shown(*at.air_out) +
                                 " of air against " + shown(*at.coolant_in) + " to " + shown(*at.coolant_out) +
                                 " of coolant, and the air is not the warmer at both ends.",
                             "Check the four temperatures.");
    // Near equal ends the quotient is 0/0; there (hot - cold)/ln(hot/cold) is their mean to 1e-12.
    if (std::abs(hot - cold) < 1e-6 * (hot + cold))
        return kelvin_difference(0.5 * (hot + cold));
    return kelvin_difference((hot - cold) / std::log(hot / cold));
}

Result<PressureDifference> drop_at_reference_flow(std::optional<PressureDifference> drop, const FlowState& now,
                                                  const FlowState& reference)
{
    InputCheck inputs("the pressure drop at reference flow");
    inputs.not_negative(drop, "the pressure drop");
    check_state(inputs, now);
    check_state(inputs, reference);
    if (!inputs.passed())
        return inputs.problem();
    const double flow = *reference.flow / *now.flow;
    if (!(flow <= furthest_flow && flow >= 1.0 / furthest_flow))
        return invalid_input("The pressure drop at reference flow is not known from " +
                                 shown(Ratio(100.0 / flow)) + " % of it.",
                             "Use readings between half and twice the reference flow.");
    const double density = now.pressure->value() / now.temperature->value() /
                           (reference.pressure->value() / reference.temperature->value());
    return *drop * density * flow * flow;
}

Result<double> flow_figure(std::optional<AbsolutePressure> scavenge, std::optional<Temperature> before_turbine)
{
    InputCheck inputs("the air flow");
    inputs.above_zero(scavenge, "the scavenge pressure").above_zero(before_turbine, "the exhaust temperature before the turbine");
    if (!inputs.passed())
        return inputs.problem();
    return scavenge->value() / std::sqrt(before_turbine->value());
}

} // namespace evenstroke
