// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/typed_number.h"

#include "core/reading/fitting_unit.h"

#include <charconv>
#include <cmath>

namespace evenstroke {
namespace {

/// A gauge or absolute pressure in pascal, brought to the wanted one of the two.
std::optional<double> in_kind(double pascal, PressureKind from, PressureKind to,
                              std::optional<AbsolutePressure> barometer)
{
    if (from == to)
        return pascal;
    if (!barometer)
        return std::nullopt;
    if (from == PressureKind::gauge && to == PressureKind::absolute)
        return pascal + barometer->value();
    if (from == PressureKind::absolute && to == PressureKind::gauge)
        return pascal - barometer->value();
    return std::nullopt; // a difference is neither
}

} // namespace

std::optional<AbsolutePressure> barometer_of(const Reading& reading)
{
    const auto wanted = find_quantity("barometric_pressure");
    for (const Value& value : reading.values)
        if (wanted && value.quantity == *wanted && value.value_si && *value.value_si > 0.0)
            return *value.value_si * absolute<si::pressure>();
    return std::nullopt;
}

std::optional<double> number_in_own_unit(const Value& value, std::optional<AbsolutePressure> barometer)
{
    if (!value.value_si || value.missing != MissingReason::none)
        return std::nullopt;
    const Quantity& meant = quantity(value.quantity);
    const Unit& own = unit(meant.unit);
    if (!converts_by_si(meant, unit(value.unit).dimension))
        return std::nullopt;
    const bool has_level = meant.kind == PressureKind::gauge || meant.kind == PressureKind::absolute;
    if (!has_level || value.kind == PressureKind::none)
        return own.from_si(*value.value_si);
    const auto pascal = in_kind(*value.value_si, value.kind, meant.kind, barometer);
    return pascal ? std::optional(own.from_si(*pascal)) : std::nullopt;
}

std::optional<double> absolute_in_own_unit(const Value& value, std::optional<AbsolutePressure> barometer)
{
    if (!value.value_si || value.missing != MissingReason::none)
        return std::nullopt;
    const Quantity& meant = quantity(value.quantity);
    const PressureKind typed = value.kind == PressureKind::none ? meant.kind : value.kind;
    const auto pascal = in_kind(*value.value_si, typed, PressureKind::absolute, barometer);
    return pascal ? std::optional(unit(meant.unit).from_si(*pascal)) : std::nullopt;
}

std::string words_of(const Reading& reading, std::string_view quantity_name)
{
    const auto id = find_quantity(quantity_name, Place::Kind::engine);
    for (const Value& value : reading.values)
        if (id && value.quantity == *id && value.phase == Phase::reading)
            return value.words.empty() ? value.typed : value.words;
    return {};
}

std::string plain_number(double number, int decimals)
{
    // to_chars rounds half to even on the binary value; printed records round half away from zero.
    const double scale = std::pow(10.0, decimals);
    const double scaled = std::round(number * scale);
    const double rounded = std::isfinite(scaled) ? scaled / scale : number;
    char buffer[400];
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, rounded == 0.0 ? 0.0 : rounded,
                                   std::chars_format::fixed, decimals);
    return {buffer, end.ptr};
}

std::string unit_behind(UnitId unit_id)
{
    const std::string symbol(unit(unit_id).symbol);
    return symbol == "1" || symbol == "code" || symbol == "mark" ? std::string() : symbol;
}

std::string with_own_unit(QuantityId quantity_id, double own)
{
    const Quantity& meant = quantity(quantity_id);
    const std::string behind = unit_behind(meant.unit);
    return plain_number(own, meant.decimals) + (behind.empty() ? "" : " " + behind);
}

} // namespace evenstroke
