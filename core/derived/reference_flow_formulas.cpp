// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/airside/charge_air_cooler.h"

/// Pressure drops of the air and gas path, brought from the flow of the reading to that of the healthy engine at the
/// same load: what is left of a change is dirt, and not weather or load.
namespace evenstroke {
namespace {

constexpr double millibar = 100.0; // Pa

/// What is in proportion to the air flow, now and on the baseline.
struct Flows
{
    double now = 0.0, reference = 0.0;
    AbsolutePressure scavenge{}, scavenge_reference{};
};

std::optional<Flows> flows(DerivedInputs& of)
{
    const Number scavenge = of.mean("scavenge_pressure"), turbine = of.mean("exhaust_before_turbine");
    if (!scavenge || !turbine)
        return std::nullopt;
    const Number scavenge_then = of.baseline("scavenge_pressure"), turbine_then = of.baseline("exhaust_before_turbine");
    if (!scavenge_then || !turbine_then)
        return std::nullopt;
    const double barometer = of.barometer();
    Flows found;
    found.scavenge = bar_absolute(*scavenge + barometer);
    found.scavenge_reference = bar_absolute(*scavenge_then) + (of.engine().reference.barometer - AbsolutePressure{});
    const auto now = flow_figure(found.scavenge, celsius(*turbine));
    const auto then = flow_figure(found.scavenge_reference, celsius(*turbine_then));
    if (!of.holds(now) || !of.holds(then))
        return std::nullopt;
    found.now = now.value();
    found.reference = then.value();
    of.remark("The air flow is not measured: the turbine was taken as a nozzle, the flow in proportion to p_scav/√T_3.");
    of.step("Air flow, of the baseline's at this load", 100.0 * found.now / found.reference, "%");
    return found;
}

Number brought(DerivedInputs& of, double drop, const FlowState& now, const FlowState& reference, Place place)
{
    return of.step("At reference flow",
                   of.known(drop_at_reference_flow(PressureDifference::from_value(drop * millibar), now, reference), 1.0 / millibar),
                   "mbar", place);
}

/// The baseline's scavenge temperature: its own, or the reference coolant's plus the baseline's difference over it.
Temperature reference_scavenge(DerivedInputs& of, double as_read)
{
    if (const Number own = of.optional_baseline("scavenge_temperature"))
        return celsius(*own);
    if (const Number over = of.optional_baseline("cooler_temperature_difference"))
        return of.engine().reference.cooler_coolant + kelvin_difference(*over);
    of.remark("The baseline has no scavenge temperature: that of the reading was taken for it.");
    return celsius(as_read);
}

Number cooler_drop(DerivedInputs& of, Place place)
{
    const Number drop = of.at("cooler_pressure_drop", place);
    const Number air = drop ? of.mean("scavenge_temperature") : std::nullopt;
    const auto flow = air ? flows(of) : std::nullopt;
    if (!flow)
        return std::nullopt;
    return brought(of, *drop, {flow->scavenge, celsius(*air), flow->now},
                   {flow->scavenge_reference, reference_scavenge(of, *air), flow->reference}, place);
}

Number filter_drop(DerivedInputs& of, Place place)
{
    const Number drop = of.at("air_filter_pressure_drop", place);
    const Number air = drop ? of.at_or_mean("inlet_air_temperature", place) : std::nullopt;
    const auto flow = air ? flows(of) : std::nullopt;
    if (!flow)
        return std::nullopt;
    const ReferenceConditions& reference = of.engine().reference;
    return brought(of, *drop, {bar_absolute(of.barometer()), celsius(*air), flow->now},
                   {reference.barometer, reference.inlet_air, flow->reference}, place);
}

Number back_pressure(DerivedInputs& of, Place place)
{
    const Number back = of.at("exhaust_back_pressure", place);
    const Number gas = back ? of.at_or_mean("exhaust_after_turbine", place) : std::nullopt;
    const auto flow = gas ? flows(of) : std::nullopt;
    if (!flow)
        return std::nullopt;
    const Number gas_then = of.optional_baseline("exhaust_after_turbine");
    if (!gas_then)
        of.remark("The baseline has no exhaust temperature after the turbine: that of the reading was taken for it.");
    const double barometer = of.barometer(), reference = in_bar(of.engine().reference.barometer);
    return brought(of, *back, {bar_absolute(barometer + *back * bar_of_millibar), celsius(*gas), flow->now},
                   {bar_absolute(reference + *back * bar_of_millibar), celsius(gas_then.value_or(*gas)), flow->reference}, place);
}

template <Number (*part)(DerivedInputs&, Place), Place::Kind kind> Number each_of(DerivedInputs& of, Place place)
{
    return mean_over(of, kind, place, part);
}

} // namespace

std::span<const DerivedFormula> reference_flow_formulas()
{
    static const DerivedFormula formulas[] = {
        {"cooler_drop_at_reference_flow", each_of<cooler_drop, Place::Kind::cooler>},
        {"filter_drop_at_reference_flow", each_of<filter_drop, Place::Kind::turbocharger>},
        {"back_pressure_at_reference_flow", each_of<back_pressure, Place::Kind::turbocharger>}};
    return formulas;
}

} // namespace evenstroke
