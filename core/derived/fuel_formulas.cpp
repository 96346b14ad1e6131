// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/reference/fuel.h"
#include "core/reference/fuel_properties.h"
#include "core/reference/humid_air.h"
#include "core/reference/linear_correction.h"
#include "core/trend/deviations.h"

namespace evenstroke {
namespace {

/// Heaviest distillate of ISO 8217 (from memory): above, a fuel is taken for a residual one.
constexpr double heaviest_distillate = 900.0; // kg/m³

std::optional<Temperature> temperature(Number degrees)
{
    return degrees ? std::optional(celsius(*degrees)) : std::nullopt;
}

/// kg/h and kW.
struct Burnt
{
    double fuel, power;
};

/// kg/h of the meter; where none was read, of the tank's soundings.
Number fuel_burnt(DerivedInputs& of)
{
    if (!of.optional_mean("fuel_consumption"))
        if (const Number sounded = of.optional_mean("fuel_consumption_sounded")) {
            of.remark("No meter was read: the consumption is that of the tank's soundings.");
            return sounded;
        }
    return of.mean("fuel_consumption");
}

std::optional<Burnt> burnt(DerivedInputs& of)
{
    const Number fuel = fuel_burnt(of);
    const bool measured = of.optional_mean("shaft_power") || (of.optional_mean("shaft_torque") && of.optional_mean("speed"));
    Number power;
    if (measured) {
        power = shaft_kilowatts(of);
    } else if (const Number load = of.mean("load_percent")) {
        of.remark("No power was measured: that of the typed load was taken.");
        const double rated = of.particular("Rated power", "P_rated", of.engine().rated_power.value() / 1000.0, "kW");
        power = of.step("Power at the typed load", *load / 100.0 * rated, "kW");
    }
    if (!fuel || !power)
        return std::nullopt;
    if (!(*power > 0.0)) {
        of.not_known("The specific fuel consumption is not known, because the power is not above zero.", "Check the power.");
        return std::nullopt;
    }
    return Burnt{*fuel, *power};
}

Number raw_consumption(DerivedInputs& of, Place)
{
    const auto now = burnt(of);
    return now ? std::optional(1000.0 * now->fuel / now->power) : std::nullopt;
}

/// Both pressures of steam, where the class of engine needs them; false where one is not known.
bool add_steam(DerivedInputs& of, Iso3046Ambient& site, Iso3046Ambient& reference)
{
    const Number humidity = of.mean("relative_humidity");
    if (!humidity)
        return false;
    if (!of.engine().reference.relative_humidity) {
        of.not_known("The adjustment to ISO 3046-1 is not known, because the reference conditions have no humidity.",
                     "Enter the reference humidity with the engine's particulars.");
        return false;
    }
    const auto now = vapour_pressure(site.inlet_air, Ratio(*humidity / 100.0));
    const auto then = vapour_pressure(reference.inlet_air, Ratio(*of.engine().reference.relative_humidity));
    if (!of.holds(now) || !of.holds(then))
        return false;
    site.water_vapour = now.value();
    reference.water_vapour = then.value();
    return true;
}

/// β of ISO 3046-1 for the air and the coolant of the reading.
Number iso_factor(DerivedInputs& of)
{
    const Engine& engine = of.engine();
    const Iso3046Exponents exponents = iso_3046_exponents(engine.aspiration);
    const Number inlet = of.mean("inlet_air_temperature");
    const Number coolant = exponents.s != 0.0 ? of.mean("cooler_coolant_inlet_temperature") : std::nullopt;
    if (!inlet || (exponents.s != 0.0 && !coolant))
        return std::nullopt;
    Iso3046Ambient site{bar_absolute(of.barometer()), celsius(*inlet), temperature(coolant), {}};
    Iso3046Ambient reference{engine.reference.barometer, engine.reference.inlet_air, engine.reference.cooler_coolant, {}};
    if (exponents.a != 0.0 && !add_steam(of, site, reference))
        return std::nullopt;
    if (!engine.mechanical_efficiency)
        of.remark("The engine's particulars state no mechanical efficiency: 0.80 was taken, as ISO 3046-1 does.");
    const double efficiency = of.particular("Mechanical efficiency", "η_m",
                                            engine.mechanical_efficiency.value_or(iso_3046_mechanical_efficiency), "");
    const auto adjustment = adjust_iso_3046(engine.aspiration, site, reference, efficiency);
    if (!of.holds(adjustment))
        return std::nullopt;
    of.step("Factor k of ISO 3046-1", adjustment.value().k, "");
    of.step("Factor α of ISO 3046-1", adjustment.value().alpha, "");
    return of.step("Factor β of ISO 3046-1", adjustment.value().beta, "");
}

Number corrected_by_iso(DerivedInputs& of, double consumption, bool has_linear)
{
    if (has_linear)
        of.remark("The engine has linear coefficients for the consumption too; with ISO 3046-1 chosen they are not used.");
    const Number beta = iso_factor(of);
    return beta ? std::optional(consumption / *beta) : std::nullopt;
}

Number corrected_linearly(DerivedInputs& of, double consumption, const CorrectionCoefficients& by)
{
    const auto corrected = correct_linearly(
        grams_per_kilowatt_hour(consumption),
        ambient_difference(temperature(of.optional_mean("inlet_air_temperature")),
                           temperature(of.optional_mean("cooler_coolant_inlet_temperature")), of.engine().reference),
        by);
    if (!of.holds(corrected))
        return std::nullopt;
    if (corrected.value().extrapolated)
        of.remark("Air or coolant lie outside the range that the linear correction is good for: extrapolated.");
    return in_grams_per_kilowatt_hour(corrected.value().value);
}

/// At 42.7 MJ/kg and at reference ambient: by linear coefficients or by ISO 3046-1, never by both.
Number consumption_at_reference(DerivedInputs& of, const std::optional<Burnt>& now, Number heat)
{
    if (!now || !heat)
        return std::nullopt;
    const double usual = 1000.0 / now->power * (*heat / reference_heating_value) * now->fuel;
    of.step("Specific consumption at 42.7 MJ/kg", usual, "g/kWh");
    const auto linear = of.engine().correction.find("specific_fuel_consumption");
    const bool has_linear = linear != of.engine().correction.end();
    if (of.engine().consumption_correction == ConsumptionCorrection::iso_3046)
        return corrected_by_iso(of, usual, has_linear);
    if (has_linear)
        return corrected_linearly(of, usual, linear->second);
    of.remark("The engine has no correction of the consumption for ambient air: only the heating value was corrected.");
    return usual;
}

Number corrected_consumption(DerivedInputs& of, Place)
{
    const auto now = burnt(of);
    return consumption_at_reference(of, now, of.mean("fuel_lower_heating_value"));
}

Number compared_consumption(DerivedInputs& of, Place)
{
    return consumption_at_reference(of, burnt(of),
                                    of.optional_mean("fuel_lower_heating_value").value_or(reference_heating_value));
}

Number ignition(DerivedInputs& of, Place)
{
    const Number density = of.mean("fuel_density_15"), viscosity = of.mean("fuel_viscosity");
    const Number at = of.mean("fuel_temperature");
    if (!density || !viscosity || !at)
        return std::nullopt;
    return of.known(ignition_index(*density * si::kilogrammes_per_cubic_metre, square_millimetres_per_second(*viscosity), celsius(*at)));
}

/// The temperature at which the fuel has the viscosity that injection wants.
Number injection_temperature(DerivedInputs& of, Place)
{
    constexpr double wanted = 13.0; // mm²/s, common practice, no source
    const Number at_50 = of.mean("fuel_viscosity_50");
    const Number at_engine = of.mean("fuel_viscosity"), engine_temperature = of.mean("fuel_temperature");
    if (!at_50 || !at_engine || !engine_temperature)
        return std::nullopt;
    if (*at_50 <= wanted)
        return of.not_known("A fuel that is not thicker than 13 mm²/s at 50 °C needs no heating for the injection.", "");
    of.remark("13 mm²/s is common practice; the maker's instructions state the viscosity wanted and how far off it may be.");
    const double viscosity = of.particular("Viscosity wanted at the injection", "ν", wanted, "mm²/s");
    const auto line = ViscosityLine::through({square_millimetres_per_second(*at_50), celsius(50.0)},
                                             {square_millimetres_per_second(*at_engine), celsius(*engine_temperature)});
    if (!of.holds(line))
        return std::nullopt;
    const Number kelvin = of.known(line.value().temperature_for(square_millimetres_per_second(viscosity)));
    return kelvin ? std::optional(in_celsius(Temperature::from_value(*kelvin))) : std::nullopt;
}

Number heating_value(DerivedInputs& of, Place)
{
    if (of.optional_mean("fuel_lower_heating_value"))
        return of.not_known("No lower heating value was worked out, because one was typed, and that one counts.", "");
    const Number density = of.mean("fuel_density_15"), sulphur = of.mean("fuel_sulphur");
    if (!density || !sulphur)
        return std::nullopt;
    const bool residual = *density > heaviest_distillate;
    of.remark(residual ? "Above 900 kg/m³ the form for residual fuels was taken."
                       : "Up to 900 kg/m³ the form for distillates was taken.");
    of.remark("Water and ash were taken as none; each tenth of a per cent of water takes about 0.04 MJ/kg off.");
    const double water = of.assumed("Water and ash", "w", 0.0, "%", "not read: none taken");
    const auto heat = net_heating_value(residual ? PetroleumGroup::residual : PetroleumGroup::distillate,
                                        {*density * si::kilogrammes_per_cubic_metre, Ratio(water / 100.0), Ratio(0.0),
                                         Ratio(*sulphur / 100.0), Ratio(0.0)});
    return of.known(heat, 1e-6);
}

Number density_as_metered(DerivedInputs& of, Place)
{
    const Number density = of.mean("fuel_density_15"), at = of.mean("fuel_temperature");
    return density && at ? of.known(density_at_temperature(*density * si::kilogrammes_per_cubic_metre, celsius(*at))) : std::nullopt;
}

Number mass_flow(DerivedInputs& of, Place place)
{
    const Number litres = of.metered_volume();
    if (!litres)
        return of.optional_mean("fuel_consumption")
                   ? of.not_known("No mass flow was worked out, because the fuel consumption was typed as a mass.", "")
                   : of.mean("fuel_consumption");
    const Number density = of.step("Density as metered", density_as_metered(of, place), "kg/m³");
    return density ? std::optional(*litres / 1000.0 * *density) : std::nullopt;
}

} // namespace

Number consumption_ambient_factor(DerivedInputs& of)
{
    if (of.engine().consumption_correction == ConsumptionCorrection::iso_3046)
        return iso_factor(of);
    const auto linear = of.engine().correction.find("specific_fuel_consumption");
    if (linear == of.engine().correction.end())
        return 1.0;
    constexpr double any = 100.0; // g/kWh: the correction is a factor
    const Number at_reference = corrected_linearly(of, any, linear->second);
    return at_reference ? std::optional(any / *at_reference) : std::nullopt;
}

std::span<const DerivedFormula> fuel_formulas()
{
    static const DerivedFormula formulas[] = {
        {"specific_fuel_consumption", raw_consumption, corrected_consumption, compared_consumption, true},
        {"calculated_ignition_index", ignition},
        {"fuel_injection_temperature", injection_temperature},
        {"calculated_heating_value", heating_value},
        {"fuel_density_at_meter", density_as_metered},
        {"fuel_mass_flow", mass_flow}};
    return formulas;
}

} // namespace evenstroke
