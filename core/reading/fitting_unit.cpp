// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/fitting_unit.h"

namespace evenstroke {

bool may_be_written_in(const Quantity& meant, UnitId written)
{
    const Dimension own = unit(meant.unit).dimension, dimension = unit(written).dimension;
    if (own == dimension)
        return true;
    if (dimension == Dimension::volume_flow) // litres of fuel, and of cylinder oil a day
        return own == Dimension::mass_flow || meant.name == "cylinder_oil_feed_rate";
    if (dimension == Dimension::wind_force)
        return meant.name == "wind_speed";
    const std::string_view symbol = unit(written).symbol;
    if (symbol == "mm") // the mark on the rack
        return meant.name == "fuel_index";
    return symbol == "deg" && meant.name == "injection_timing_setting"; // a mark is often a scale of degrees
}

bool converts_by_si(const Quantity& meant, Dimension dimension)
{
    const Dimension own = unit(meant.unit).dimension;
    return own == dimension || (own == Dimension::velocity && dimension == Dimension::wind_force);
}

std::optional<Problem> find_unit_problem(const Quantity& meant, WrittenUnit written)
{
    const std::string usual(unit(meant.unit).symbol), symbol(unit(written.id).symbol);
    if (!may_be_written_in(meant, written.id))
        return invalid_input(symbol + " is no unit of " + meant.name + ".",
                             "Write a unit of " + std::string(dimension_text(unit(meant.unit).dimension)) +
                                 ", such as " + usual + ".");
    if (meant.kind == PressureKind::difference && written.kind == PressureKind::absolute)
        return invalid_input(meant.name + " is a difference of pressures and cannot be absolute.",
                             "Write " + symbol + " alone.");
    // A gauge measures against the barometer; the barometer has nothing to be measured against.
    if (meant.name == "barometric_pressure" && written.kind == PressureKind::gauge)
        return invalid_input(meant.name + " is absolute by nature and cannot be a gauge pressure.",
                             "Write " + symbol +
                                 " alone, and check that the barometer's own reading is meant.");
    return std::nullopt;
}

} // namespace evenstroke
