// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_formulas.h"

#include "core/engine/power.h"

namespace evenstroke {
namespace {

constexpr int indicator = 1; // one instrument for all cylinders: its slip does not average out of sums

/// Swept volume of one cylinder.
std::optional<Volume> swept(DerivedInputs& of)
{
    of.particular("Bore", "D", of.engine().bore.value(), "m");
    of.particular("Stroke", "S", of.engine().stroke.value(), "m");
    const auto volume = swept_volume(of.engine().bore, of.engine().stroke);
    of.step("Swept volume of one cylinder", volume.has_value() ? std::optional(volume.value().value()) : std::nullopt, "m³");
    return volume.has_value() ? std::optional(volume.value()) : std::nullopt;
}

Number of_mean_pressure(DerivedInputs& of, double bar, double speed, std::optional<Volume> volume)
{
    return of.known(indicated_power(of.engine().kind, bar_difference(bar), volume, per_minute(speed)), 1e-3);
}

Number cylinder_power(DerivedInputs& of, Place place)
{
    const Number pressure = of.at("mean_indicated_pressure", place);
    const Number speed = of.mean("speed");
    return pressure && speed ? of_mean_pressure(of, *pressure, *speed, swept(of)) : std::nullopt;
}

Number indicated(DerivedInputs& of, Place place)
{
    return place.kind == Place::Kind::cylinder ? cylinder_power(of, place) : indicated_kilowatts(of);
}

Number effective_pressure(DerivedInputs& of, Place)
{
    const Number power = shaft_kilowatts(of);
    const Number speed = power ? of.mean("speed") : std::nullopt;
    if (!speed)
        return std::nullopt;
    const auto volume = swept(of);
    const double cylinders = of.particular("Cylinders", "z", of.engine().cylinders, "");
    return of.known(mean_effective_pressure(of.engine().kind, kilowatts(*power), volume, static_cast<int>(cylinders), per_minute(*speed)), 1e-5);
}

Number mechanical(DerivedInputs& of, Place)
{
    const Number shaft = shaft_kilowatts(of);
    const Number gas = shaft ? indicated_kilowatts(of) : std::nullopt;
    return gas ? of.known(mechanical_efficiency(kilowatts(*shaft), kilowatts(*gas))) : std::nullopt;
}

Number mean_pressure(DerivedInputs& of, Place)
{
    double sum = 0.0;
    for (int i = 1; i <= of.engine().cylinders; ++i) {
        const Number pressure = of.at("mean_indicated_pressure", Place::cylinder(i), indicator);
        if (!pressure)
            return std::nullopt;
        sum += *pressure;
    }
    of.remark("One indicator goes from cylinder to cylinder: its slip is common to all and does not average out.");
    return of.engine().cylinders > 0 ? std::optional(sum / of.engine().cylinders) : std::nullopt;
}

} // namespace

Number indicated_kilowatts(DerivedInputs& of)
{
    const Number speed = of.optional_mean("speed");
    const auto volume = speed ? swept(of) : std::nullopt;
    double sum = 0.0;
    for (int i = 1; i <= of.engine().cylinders; ++i) {
        const Place place = Place::cylinder(i);
        const Number pressure = speed ? of.optional_at("mean_indicated_pressure", place, indicator) : std::nullopt;
        const Number power = pressure ? of_mean_pressure(of, *pressure, *speed, volume)
                                      : of.optional_at("indicated_power", place, indicator);
        if (!power && !of.stopped())
            return speed ? of.at("mean_indicated_pressure", place) : of.mean("speed"); // so that it is named
        if (!power)
            return std::nullopt;
        sum += *of.step("Indicated power", power, "kW", place);
    }
    of.remark("One indicator goes from cylinder to cylinder: its slip is common to all and does not average out.");
    return of.step("Indicated power of all cylinders", sum, "kW");
}

Number shaft_kilowatts(DerivedInputs& of)
{
    if (const Number power = of.optional_mean("shaft_power"))
        return power;
    const Number torque = of.optional_mean("shaft_torque");
    const Number speed = torque ? of.mean("speed") : of.mean("shaft_power");
    if (!torque || !speed)
        return std::nullopt;
    return of.step("Shaft power from torque and speed",
                   of.known(shaft_power_from_torque(Torque::from_value(1000.0 * *torque), per_minute(*speed)), 1e-3), "kW");
}

std::span<const DerivedFormula> power_formulas()
{
    static const DerivedFormula formulas[] = {{"indicated_power", indicated},
                                                  {"mean_effective_pressure", effective_pressure},
                                                  {"mechanical_efficiency", mechanical},
                                                  {"mean_indicated_pressure", mean_pressure}};
    return formulas;
}

} // namespace evenstroke
