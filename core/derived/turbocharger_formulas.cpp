// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/airside/turbocharger.h"
#include "core/reading/typed_number.h"

#include <cmath>

namespace evenstroke {
namespace {

Number pressure_ratio_of(DerivedInputs& of, Place place)
{
    const Number scavenge = of.mean("scavenge_pressure");
    const Number filter = of.optional_at("air_filter_pressure_drop", place);
    const Number drop = of.optional_at_or_mean("cooler_pressure_drop",
                                               place.number > 0 ? Place::cooler(place.number) : Place::engine());
    if (!scavenge)
        return std::nullopt;
    if (!filter)
        of.remark("No air filter drop was read: none was taken.");
    if (!drop)
        of.remark("No cooler pressure drop was read: none was taken.");
    const double barometer = of.barometer();
    const double lost = filter ? *filter * bar_of_millibar : 0.0, behind = drop ? *drop * bar_of_millibar : 0.0;
    return of.step("Compressor pressure ratio",
                   of.known(compressor_pressure_ratio(bar_absolute(barometer - lost), bar_absolute(*scavenge + barometer + behind))),
                   "", place);
}

Number compressor_of(DerivedInputs& of, Place place)
{
    const Number ratio = pressure_ratio_of(of, place);
    const Number inlet = ratio ? of.at_or_mean("inlet_air_temperature", place) : std::nullopt;
    const Number outlet = ratio ? of.at("compressor_outlet_temperature", place) : std::nullopt;
    if (!inlet || !outlet)
        return std::nullopt;
    return of.step("Compressor efficiency", of.known(compressor_efficiency(celsius(*inlet), celsius(*outlet), Ratio(*ratio))), "", place);
}

Number turbocharger_of(DerivedInputs& of, Place place)
{
    const Number ratio = pressure_ratio_of(of, place);
    if (!ratio)
        return std::nullopt;
    const Number inlet = of.at_or_mean("inlet_air_temperature", place);
    const Number before = of.at("exhaust_before_turbine", place);
    const Number receiver = of.mean("exhaust_receiver_pressure");
    const Number back = of.at("exhaust_back_pressure", place);
    if (!inlet || !before || !receiver || !back)
        return std::nullopt;
    const double barometer = of.barometer();
    const double heat = air_over_gas_heat_flow().value().value();
    of.step("Heat capacity flow of air over gas, c", heat, "", place);
    return of.step("Turbocharger efficiency",
                   of.known(turbocharger_efficiency({celsius(*inlet), Ratio(*ratio), celsius(*before),
                                                     bar_absolute(*receiver + barometer),
                                                     bar_absolute(*back * bar_of_millibar + barometer)},
                                                    heat)),
                   "", place);
}

Number turbine_of(DerivedInputs& of, Place place)
{
    const Number whole = turbocharger_of(of, place), compressor = whole ? compressor_of(of, place) : std::nullopt;
    return compressor ? of.known(turbine_efficiency(Ratio(*whole), Ratio(*compressor))) : std::nullopt;
}

/// A given pressure ratio asks a sound turbocharger for one speed (at one inlet temperature); one that needs more
/// than the baseline did has lost on its compressor side.
Number speed_at_ratio_of(DerivedInputs& of, Place place)
{
    const Number speed = of.at("turbocharger_speed", place), scavenge = of.mean("scavenge_pressure");
    const Number inlet = of.at_or_mean("inlet_air_temperature", place);
    if (!speed || !scavenge || !inlet)
        return std::nullopt;
    const double barometer = of.barometer();
    const Baseline& baseline = of.of().baseline;
    const BaselineCurve* pressures = baseline.curve(of.of().conditions.mode, "scavenge_pressure");
    const BaselineCurve* speeds = baseline.curve(of.of().conditions.mode, "turbocharger_speed");
    if (!pressures || !speeds)
        return of.not_known("The baseline has no scavenge pressure and turbocharger speed to compare with.",
                            "Enter both with the engine's baseline.");
    const double reference = in_bar(of.engine().reference.barometer);
    const double ratio = (*scavenge + barometer) / barometer;
    of.step("Scavenge over barometric pressure", ratio, "");
    const auto load = pressures->load_at((ratio - 1.0) * reference);
    if (!load)
        return of.not_known("The baseline has this pressure ratio at no load, or at more than one.",
                            "Compare at a load within the baseline.");
    of.step("Load at which the baseline has this ratio", *load, "%");
    const Number expected = of.step("Speed of the baseline there", speeds->at(*load), "1/min");
    const double kelvin = celsius(*inlet).value(), reference_kelvin = of.engine().reference.inlet_air.value();
    if (!expected || !(*expected > 0.0) || !(kelvin > 0.0))
        return std::nullopt;
    const double at_reference = *speed * std::sqrt(reference_kelvin / kelvin);
    of.step("Speed at reference inlet air", at_reference, "1/min", place);
    return 100.0 * (at_reference / *expected - 1.0);
}

/// With an auxiliary blower running nothing is said: it stands between compressor and receiver.
template <Number (*part)(DerivedInputs&, Place)> Number without_blower(DerivedInputs& of, Place place)
{
    if (words_of(of.of().reading, "auxiliary_blower_running") == "yes")
        return of.not_known("An auxiliary blower was running, which stands between compressor and receiver.",
                            "Read the air side again without it.");
    return mean_over(of, Place::Kind::turbocharger, place, part);
}

} // namespace

std::span<const DerivedFormula> turbocharger_formulas()
{
    static const DerivedFormula formulas[] = {{"compressor_pressure_ratio", without_blower<pressure_ratio_of>},
                                                  {"compressor_efficiency", without_blower<compressor_of>},
                                                  {"turbocharger_efficiency", without_blower<turbocharger_of>},
                                                  {"turbine_efficiency", without_blower<turbine_of>},
                                                  {"turbocharger_speed_at_ratio", without_blower<speed_at_ratio_of>}};
    return formulas;
}

} // namespace evenstroke
