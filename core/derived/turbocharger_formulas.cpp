// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/airside/turbocharger.h"
#include "core/reading/typed_number.h"

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
                                                  {"turbine_efficiency", without_blower<turbine_of>}};
    return formulas;
}

} // namespace evenstroke
