// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/airside/charge_air_cooler.h"

namespace evenstroke {
namespace {

/// Air behind the cooler: its own thermometer's, else that of the receiver.
Number air_out(DerivedInputs& of, Place place)
{
    if (const Number own = of.optional_at("cooler_air_outlet_temperature", place))
        return own;
    of.remark("The air after the cooler was not read: the scavenge temperature was taken.");
    return of.mean("scavenge_temperature");
}

Number effectiveness_of(DerivedInputs& of, Place place)
{
    const Number in = of.at_or_mean("compressor_outlet_temperature", place.number > 0 ? Place::turbocharger(place.number) : place);
    const Number out = air_out(of, place);
    const Number coolant = of.at_or_mean("cooler_coolant_inlet_temperature", place);
    if (!in || !out || !coolant)
        return std::nullopt;
    return of.step("Effectiveness", of.known(cooler_effectiveness({celsius(*in), celsius(*out), celsius(*coolant), {}})), "", place);
}

Number approach_of(DerivedInputs& of, Place place)
{
    const Number out = of.at("cooler_air_outlet_temperature", place);
    const Number coolant = of.at_or_mean("cooler_coolant_inlet_temperature", place);
    if (!out || !coolant)
        return std::nullopt;
    return of.step("Air over coolant", of.known(cooler_approach({{}, celsius(*out), celsius(*coolant), {}})), "K", place);
}

Number rise_of(DerivedInputs& of, Place place)
{
    const Number out = of.at("cooler_coolant_outlet_temperature", place);
    const Number in = of.at_or_mean("cooler_coolant_inlet_temperature", place);
    if (!out || !in)
        return std::nullopt;
    return of.step("Rise of the coolant", of.known(coolant_rise({{}, {}, celsius(*in), celsius(*out)})), "K", place);
}

template <Number (*part)(DerivedInputs&, Place)> Number of_coolers(DerivedInputs& of, Place place)
{
    return mean_over(of, Place::Kind::cooler, place, part);
}

/// Of the receiver, where the coolers' air has mixed. A difference over the coolant is its own correction.
Number over_coolant(DerivedInputs& of, Place)
{
    const Number air = of.mean("scavenge_temperature"), coolant = of.mean("cooler_coolant_inlet_temperature");
    return air && coolant ? std::optional(*air - *coolant) : std::nullopt;
}

} // namespace

std::span<const DerivedFormula> cooler_formulas()
{
    static const DerivedFormula formulas[] = {
        {"cooler_effectiveness", of_coolers<effectiveness_of>},
        {"cooler_temperature_difference", over_coolant, over_coolant},
        {"cooler_approach", of_coolers<approach_of>, of_coolers<approach_of>},
        {"cooler_coolant_rise", of_coolers<rise_of>}};
    return formulas;
}

} // namespace evenstroke
