// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/load_rows.h"

#include "core/survey/rounding.h"

namespace evenstroke::report {
namespace {

std::string percent(double part, const char* of) { return rounded_text(100.0 * part, 1) + " % of " + of; }

void add_limits(const LoadLimits& limits, Table& table)
{
    const std::string source = source_words(limits.source);
    const auto add = [&](const char* what, const std::string& value) {
        table.rows.push_back({{what, value, source}, true});
    };
    if (limits.mean_effective_pressure)
        add("Limit of mean effective pressure", percent(*limits.mean_effective_pressure, "the rating's"));
    if (limits.torque_exponent && limits.torque_below_speed) {
        const std::string factor = limits.torque_factor == 1.0 ? "" : rounded_text(limits.torque_factor, 3) + " times ";
        add("Limit of torque and speed", "power at most " + factor + "speed to the power " + rounded_text(*limits.torque_exponent, 2) +
                                             ", below " + percent(*limits.torque_below_speed, "rated speed"));
    }
    if (limits.highest_speed)
        add("Highest speed", percent(*limits.highest_speed, "rated speed"));
    if (limits.overload)
        add("Overload for a time", percent(*limits.overload, "rated power"));
    if (limits.light_running_margin)
        add("Light running margin", rounded_text(100.0 * *limits.light_running_margin, 1) + " %");
    if (limits.constant_speed)
        add("Speed", "held constant");
}

void add_wall(const WallDescription& wall, Table& table)
{
    const auto degrees = [](Temperature temperature) { return rounded_text(in_celsius(temperature), 0) + " °C"; };
    std::string words = "at " + rounded_text(wall.load_percent, 0) + " % load: gas " + degrees(wall.gas) + ", gas film " +
                        rounded_text(wall.gas_film.value(), 0) + " W/(m² K), " +
                        rounded_text(wall.thickness.value() * 1000.0, 1) + " mm of " +
                        rounded_text(wall.conductivity.value(), 1) + " W/(m K), coolant film " +
                        rounded_text(wall.coolant_film.value(), 0) + " W/(m² K), coolant " + degrees(wall.coolant);
    if (wall.highest)
        words += ", at most " + degrees(*wall.highest);
    if (wall.lowest)
        words += ", at least " + degrees(*wall.lowest);
    table.rows.push_back({{"Wall: " + wall.part, words, source_words(wall.source)}, true});
}

} // namespace

Table load_and_walls_table(const Engine& engine)
{
    Table table{"Load diagram and walls as entered for this engine",
                {{"What", Column::Kind::words}, {"Value", Column::Kind::remark}, {"Source", Column::Kind::remark}}, {}, 1, {}};
    if (engine.load_limits)
        add_limits(*engine.load_limits, table);
    for (const WallDescription& wall : engine.walls)
        add_wall(wall, table);
    return table;
}

std::string humidity_words(const Engine& engine)
{
    const auto& humidity = engine.reference.relative_humidity;
    const bool used = engine.consumption_correction == ConsumptionCorrection::iso_3046 &&
                      engine.aspiration == AspirationClass::naturally_aspirated;
    const std::string stated = humidity ? rounded_text(100.0 * *humidity, 0) + " %" : "not given";
    if (used)
        return stated;
    return (humidity ? stated + ", " : "") + "not used: no correction of this engine depends on it";
}

std::string_view aspiration_words(AspirationClass aspiration)
{
    switch (aspiration) {
    case AspirationClass::charge_air_cooled: return "turbocharged with charge-air cooler";
    case AspirationClass::turbocharged: return "turbocharged without charge-air cooler";
    case AspirationClass::naturally_aspirated: break;
    }
    return "naturally aspirated";
}

} // namespace evenstroke::report
