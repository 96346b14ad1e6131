// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/conditions.h"

#include "core/reading/fitting_unit.h"
#include "core/reading/typed_number.h"
#include "core/reading/quantity_names.h"
#include "core/reference/fuel.h"

#include <cmath>

namespace evenstroke {
namespace {

constexpr double pascals_in_bar = 1e5;

/// Gauge and absolute differ by the barometer of the reading; everything else keeps its number.
double kind_shift_si(PressureKind typed, PressureKind own, double barometer_bar)
{
    if (typed == PressureKind::absolute && own == PressureKind::gauge)
        return -barometer_bar * pascals_in_bar;
    if (typed == PressureKind::gauge && own == PressureKind::absolute)
        return barometer_bar * pascals_in_bar;
    return 0.0;
}

/// Mass flow of a volume meter, kg/s per m³/s: density at 15 °C taken to the temperature at the meter.
std::optional<double> density_at_meter(const Conditions& conditions)
{
    if (!conditions.fuel_density_15)
        return std::nullopt;
    const Density at_15 = *conditions.fuel_density_15 * si::kilogrammes_per_cubic_metre;
    if (!conditions.fuel_temperature)
        return std::nullopt;
    const auto density = density_at_temperature(at_15, celsius(*conditions.fuel_temperature));
    if (!density.has_value())
        return std::nullopt;
    return density.value().value();
}

std::optional<double> single(const Reading& reading, std::string_view name, const Conditions& conditions)
{
    return engine_mean(reading, name, conditions);
}

} // namespace

std::optional<OwnValue> own_value(const Value& value, const Conditions& conditions)
{
    if (!value.value_si || !value.number)
        return std::nullopt;
    const Quantity& q = quantity(value.quantity);
    const Unit& typed = unit(value.unit);
    const Unit& own = unit(q.unit);
    double factor = 1.0;
    if (typed.dimension == Dimension::volume_flow && own.dimension == Dimension::mass_flow) {
        const auto density = density_at_meter(conditions);
        if (!density)
            return std::nullopt;
        factor = *density;
    } else if (!converts_by_si(q, typed.dimension)) {
        return std::nullopt; // rack millimetres are no per cent
    }
    OwnValue result;
    const double shift = kind_shift_si(value.kind, q.kind, conditions.barometer_or_one_bar());
    // The same unit needs no way through SI: the value stays as typed, to the last digit.
    result.value = value.unit == q.unit && shift == 0.0 ? *value.number : own.from_si(*value.value_si * factor + shift);
    result.scale = typed.dimension == Dimension::wind_force ? 0.0 : typed.factor * factor / own.factor;
    result.shift = (typed.offset * factor + shift - own.offset) / own.factor;
    result.outside_hard = (q.hard.low && result.value < *q.hard.low) || (q.hard.high && result.value > *q.hard.high);
    return result;
}

std::optional<double> engine_mean(const Reading& reading, std::string_view name, const Conditions& conditions)
{
    const auto wanted = find_quantity(name);
    if (!wanted)
        return std::nullopt;
    double sum = 0.0;
    int count = 0;
    for (const Value& value : reading.values) {
        if (value.phase != Phase::reading || first_of_its_name(value.quantity) != *wanted)
            continue;
        const Quantity& q = quantity(value.quantity);
        if (value.place.kind == Place::Kind::cylinder && q.per != Place::Kind::cylinder)
            continue;
        const auto own = own_value(value, conditions);
        if (!own || own->outside_hard)
            continue;
        if (value.place.kind == Place::Kind::engine)
            return own->value;
        sum += own->value;
        ++count;
    }
    if (count == 0)
        return std::nullopt;
    return sum / count;
}

Conditions find_conditions(const Engine& engine, const Reading& reading)
{
    Conditions c;
    const auto barometer = single(reading, "barometric_pressure", c);
    if (barometer)
        c.barometer = *barometer / 1000.0;
    c.inlet_air = single(reading, "inlet_air_temperature", c);
    c.cooler_coolant = single(reading, "cooler_coolant_inlet_temperature", c);
    c.heating_value = single(reading, "fuel_lower_heating_value", c);
    c.fuel_density_15 = single(reading, "fuel_density_15", c);
    c.fuel_temperature = single(reading, "fuel_temperature", c);
    c.shaft_power = single(reading, "shaft_power", c);
    c.mode = words_of(reading, "mode");
    c.load_percent = single(reading, "load_percent", c);
    if (!c.load_percent && c.shaft_power && engine.rated_power.value() > 0.0) {
        c.load_percent = 100.0 * *c.shaft_power * 1000.0 / engine.rated_power.value();
        c.load_from_power = true;
    }
    return c;
}

} // namespace evenstroke
