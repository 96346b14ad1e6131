// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/propeller.h"

#include "core/input_check.h"

#include <cmath>

namespace evenstroke {
namespace {

void check_point(InputCheck& inputs, const PropellerPoint& point)
{
    inputs.above_zero(point.power, "the rated power").above_zero(point.speed, "the rated speed");
}

Result<Ratio> slip(const char* result, std::optional<Velocity> water_at_propeller, std::optional<Length> pitch,
                   std::optional<Frequency> speed)
{
    InputCheck inputs(result);
    inputs.not_negative(water_at_propeller, "the speed through the water").above_zero(pitch, "the propeller's pitch");
    inputs.above_zero(speed, "the speed of the shaft");
    if (!inputs.passed())
        return inputs.problem();
    return Ratio(1.0 - water_at_propeller->value() / (pitch->value() * speed->value()));
}

} // namespace

Result<Power> power_on_propeller_curve(std::optional<Frequency> speed, const PropellerPoint& through)
{
    InputCheck inputs("the power on the propeller curve");
    inputs.not_negative(speed, "the speed");
    check_point(inputs, through);
    if (!inputs.passed())
        return inputs.problem();
    const double share = speed->value() / through.speed->value();
    return *through.power * (share * share * share);
}

Result<Frequency> speed_on_propeller_curve(std::optional<Power> power, const PropellerPoint& through)
{
    InputCheck inputs("the speed on the propeller curve");
    inputs.not_negative(power, "the power");
    check_point(inputs, through);
    if (!inputs.passed())
        return inputs.problem();
    return *through.speed * std::cbrt(power->value() / through.power->value());
}

Result<Ratio> light_running_margin(std::optional<Power> power, std::optional<Frequency> speed,
                                   const PropellerPoint& rating)
{
    InputCheck inputs("the light-running margin");
    inputs.above_zero(power, "the power").above_zero(speed, "the speed");
    check_point(inputs, rating);
    if (!inputs.passed())
        return inputs.problem();
    return Ratio(*speed / speed_on_propeller_curve(power, rating).value() - 1.0);
}

Result<Ratio> apparent_slip(std::optional<Velocity> through_water, std::optional<Length> pitch,
                            std::optional<Frequency> speed)
{
    return slip("the apparent slip", through_water, pitch, speed);
}

Result<Ratio> real_slip(std::optional<Velocity> through_water, std::optional<Length> pitch,
                        std::optional<Frequency> speed, std::optional<Ratio> wake_fraction)
{
    InputCheck inputs("the real slip");
    inputs.not_negative(through_water, "the speed through the water").finite(wake_fraction, "the wake fraction");
    if (!inputs.passed())
        return inputs.problem();
    if (!(wake_fraction->value() < 1.0))
        return invalid_input("A wake fraction of " + shown(*wake_fraction) + " is not below 1, which cannot be.",
                             "Enter it as a share, such as 0.35.");
    return slip("the real slip", (1.0 - wake_fraction->value()) * *through_water, pitch, speed);
}

Result<double> admiralty_coefficient(std::optional<Mass> displacement, std::optional<Velocity> through_water,
                                     std::optional<Power> power)
{
    InputCheck inputs("the admiralty coefficient");
    inputs.above_zero(displacement, "the displacement").not_negative(through_water, "the speed through the water");
    inputs.above_zero(power, "the power");
    if (!inputs.passed())
        return inputs.problem();
    const double tonnes = displacement->value() / 1000.0, kilowatt = power->value() / 1000.0;
    const double knot = through_water->value() / knots(1.0).value();
    return std::cbrt(tonnes * tonnes) * knot * knot * knot / kilowatt;
}

} // namespace evenstroke
