// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/power.h"

#include "core/input_check.h"

#include <numbers>

namespace evenstroke {
namespace {

double working_strokes_a_revolution(EngineKind kind) { return kind == EngineKind::two_stroke ? 1.0 : 0.5; }

constexpr double radians_a_revolution = 2.0 * std::numbers::pi;

} // namespace

Result<Volume> swept_volume(std::optional<Length> bore, std::optional<Length> stroke)
{
    InputCheck inputs("the swept volume");
    inputs.above_zero(bore, "the bore").above_zero(stroke, "the stroke");
    if (!inputs.passed())
        return inputs.problem();
    return Volume(std::numbers::pi / 4.0 * *bore * *bore * *stroke);
}

Result<Power> indicated_power(EngineKind kind, std::optional<PressureDifference> mean_indicated_pressure,
                              std::optional<Volume> swept, std::optional<Frequency> speed)
{
    InputCheck inputs("the indicated power");
    inputs.finite(mean_indicated_pressure, "the mean indicated pressure").above_zero(swept, "the swept volume");
    inputs.above_zero(speed, "the speed");
    if (!inputs.passed())
        return inputs.problem();
    return Power::from_value(mean_indicated_pressure->value() * swept->value() * speed->value() *
                             working_strokes_a_revolution(kind));
}

Result<PressureDifference> mean_effective_pressure(EngineKind kind, std::optional<Power> shaft,
                                                   std::optional<Volume> swept, int cylinders,
                                                   std::optional<Frequency> speed)
{
    InputCheck inputs("the mean effective pressure");
    inputs.finite(shaft, "the shaft power").above_zero(swept, "the swept volume").above_zero(speed, "the speed");
    inputs.above_zero(std::optional(Ratio(cylinders)), "the number of cylinders");
    if (!inputs.passed())
        return inputs.problem();
    return PressureDifference::from_value(
        shaft->value() / (cylinders * swept->value() * speed->value() * working_strokes_a_revolution(kind)));
}

PressureDifference usual_friction_pressure() { return bar_difference(1.0); }

Result<Power> shaft_power_from_indicated(EngineKind kind, std::optional<Power> indicated, std::optional<Volume> swept,
                                         int cylinders, std::optional<Frequency> speed, PressureDifference friction)
{
    InputCheck inputs("the shaft power");
    inputs.above_zero(indicated, "the indicated power").above_zero(swept, "the swept volume");
    inputs.above_zero(speed, "the speed").above_zero(std::optional(Ratio(cylinders)), "the number of cylinders");
    inputs.not_negative(std::optional(friction), "the friction pressure");
    if (!inputs.passed())
        return inputs.problem();
    if (kind != EngineKind::two_stroke)
        return invalid_input("The shaft power is not known from the indicated power of a four-stroke engine, whose "
                             "friction is not the same at every load.",
                             "Enter the shaft power or the torque.");
    const Power lost = Power::from_value(friction.value() * cylinders * swept->value() * speed->value());
    if (!(*indicated > lost))
        return invalid_input("The indicated power of " + shown(*indicated) + " is not above the friction of " +
                                 shown(lost) + ".",
                             "Check the mean indicated pressures and the speed.");
    return *indicated - lost;
}

Result<Ratio> mechanical_efficiency(std::optional<Power> shaft, std::optional<Power> indicated)
{
    InputCheck inputs("the mechanical efficiency");
    inputs.not_negative(shaft, "the shaft power").above_zero(indicated, "the indicated power");
    if (!inputs.passed())
        return inputs.problem();
    const Ratio efficiency = *shaft / *indicated;
    if (efficiency.value() > largest_mechanical_efficiency)
        return invalid_input("The mechanical efficiency is not known, because the shaft power of " + shown(*shaft) +
                                 " is more than the indicated power of " + shown(*indicated) + ".",
                             "Check both powers and whether every cylinder is counted.");
    return efficiency;
}

Result<Torque> shaft_torque(std::optional<Power> shaft, std::optional<Frequency> speed)
{
    InputCheck inputs("the torque");
    inputs.finite(shaft, "the shaft power").above_zero(speed, "the speed");
    if (!inputs.passed())
        return inputs.problem();
    return Torque::from_value(shaft->value() / (radians_a_revolution * speed->value()));
}

Result<Power> shaft_power_from_torque(std::optional<Torque> torque, std::optional<Frequency> speed)
{
    InputCheck inputs("the shaft power");
    inputs.finite(torque, "the torque").above_zero(speed, "the speed");
    if (!inputs.passed())
        return inputs.problem();
    return Power::from_value(torque->value() * radians_a_revolution * speed->value());
}

} // namespace evenstroke
