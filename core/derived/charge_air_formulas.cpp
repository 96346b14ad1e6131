// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/reference/humid_air.h"

#include <algorithm>

namespace evenstroke {
namespace {

std::optional<ChargeAirWater> water(DerivedInputs& of)
{
    const Number inlet = of.mean("inlet_air_temperature"), humidity = of.mean("relative_humidity");
    const Number air = of.mean("scavenge_temperature"), pressure = of.mean("scavenge_pressure");
    if (!inlet || !humidity || !air || !pressure)
        return std::nullopt;
    const double barometer = of.barometer();
    // A hygrometer at 100 % is not asked for more when the effect of its slip is worked out.
    const double share = std::min(*humidity / 100.0, 1.0);
    const auto found = charge_air_water(celsius(*inlet), Ratio(share), bar_absolute(barometer), celsius(*air),
                                        bar_absolute(*pressure + barometer));
    if (!of.holds(found))
        return std::nullopt;
    of.step("Water drawn in", 1000.0 * found.value().drawn_in.value(), "g/kg");
    of.step("Water that the scavenge air can carry", 1000.0 * found.value().saturated.value(), "g/kg");
    return found.value();
}

Number condensate(DerivedInputs& of, Place)
{
    const auto found = water(of);
    return found ? std::optional(1000.0 * found->condensate.value()) : std::nullopt;
}

Number dew_point_of(DerivedInputs& of, Place)
{
    const auto found = water(of);
    if (found && !found->dew_point)
        return of.not_known("The dew point of the charge air is not known, because it lies below 0 °C.", "");
    return found ? std::optional(in_celsius(*found->dew_point)) : std::nullopt;
}

} // namespace

std::span<const DerivedFormula> charge_air_formulas()
{
    static const DerivedFormula formulas[] = {{"charge_air_condensate", condensate}, {"charge_air_dew_point", dew_point_of}};
    return formulas;
}

} // namespace evenstroke
