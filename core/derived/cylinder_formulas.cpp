// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/airside/compressor.h"
#include "core/trend/deviations.h"

namespace evenstroke {
namespace {

Number ratio(DerivedInputs& of, Place place)
{
    const Number compression = of.at("compression_pressure", place), scavenge = of.mean("scavenge_pressure");
    if (!compression || !scavenge)
        return std::nullopt;
    const double barometer = of.barometer();
    return of.known(compressor_pressure_ratio(bar_absolute(*scavenge + barometer), bar_absolute(*compression + barometer)));
}

/// Absolute pressure in bar, corrected as the typed value is.
Number corrected_pressure(DerivedInputs& of, std::string_view name, double own)
{
    const Conditions& conditions = of.of().conditions;
    const Correction correction = find_correction(of.engine(), quantity(*find_quantity(name)), own, conditions);
    if (correction.applied == Applied::not_correctable)
        return of.not_known("The ratio is not corrected, because the engine has no coefficients for both pressures.",
                            "Enter coefficients with their source with the engine's particulars.");
    if (!correction.known())
        return of.not_known("The ratio is not corrected, because no " + correction.missing_input + " was read.",
                            "Read the " + correction.missing_input + ".");
    return correction.scale * own + correction.shift + conditions.barometer_or_one_bar();
}

Number corrected_ratio(DerivedInputs& of, Place place)
{
    const Number compression = of.at("compression_pressure", place), scavenge = of.mean("scavenge_pressure");
    if (!compression || !scavenge)
        return std::nullopt;
    const Number high = corrected_pressure(of, "compression_pressure", *compression);
    const Number low = high ? corrected_pressure(of, "scavenge_pressure", *scavenge) : std::nullopt;
    of.step("Compression pressure, corrected, absolute", high, "bar");
    of.step("Scavenge pressure, corrected, absolute", low, "bar");
    return low && *low > 0.0 ? std::optional(*high / *low) : std::nullopt;
}

/// As typed pressures are compared: uncorrected where the engine has no coefficients.
Number compared_ratio(DerivedInputs& of, Place place)
{
    const Number compression = of.at("compression_pressure", place), scavenge = of.mean("scavenge_pressure");
    if (!compression || !scavenge)
        return std::nullopt;
    const Conditions& conditions = of.of().conditions;
    const auto high = find_correction(of.engine(), quantity(*find_quantity("compression_pressure")), *compression, conditions);
    const auto low = find_correction(of.engine(), quantity(*find_quantity("scavenge_pressure")), *scavenge, conditions);
    if (!high.missing_input.empty() || !low.missing_input.empty())
        return std::nullopt;
    const double barometer = conditions.barometer_or_one_bar();
    const double below = low.scale * *scavenge + low.shift + barometer;
    return below > 0.0 ? std::optional((high.scale * *compression + high.shift + barometer) / below) : std::nullopt;
}

Number pressure_rise(DerivedInputs& of, Place place)
{
    const Number maximum = of.at("maximum_pressure", place), compression = of.at("compression_pressure", place);
    return maximum && compression ? std::optional(*maximum - *compression) : std::nullopt;
}

} // namespace

std::span<const DerivedFormula> cylinder_formulas()
{
    static const DerivedFormula formulas[] = {{"compression_pressure_ratio", ratio, corrected_ratio, compared_ratio},
                                                  {"combustion_pressure_rise", pressure_rise}};
    return formulas;
}

} // namespace evenstroke
