// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/decimal_text.h"
#include "sample_vessel/file_writer.h"

#include <map>

namespace evenstroke::sample {
namespace {

const std::string invented = "invented for the sample vessel";

std::string quoted(const std::string& text)
{
    std::string json = "\"";
    for (const char letter : text) {
        if (letter == '"' || letter == '\\')
            json += '\\';
        json += letter;
    }
    return json + "\"";
}

/// As few places as the number needs, at most `decimals`.
std::string number(double value, int decimals = 4)
{
    std::string text = decimal_text(value, decimals);
    while (text.find('.') != std::string::npos && (text.back() == '0' || text.back() == '.')) {
        const bool point = text.back() == '.';
        text.pop_back();
        if (point)
            break;
    }
    return text;
}

std::string key(const std::string& name)
{
    return quoted(name) + ": ";
}

std::string source_entry()
{
    return key("source") + quoted(invented);
}

/// Members of an object or array, one a line.
std::string joined(const std::vector<std::string>& members, const std::string& indent)
{
    std::string json;
    for (std::size_t i = 0; i < members.size(); ++i)
        json += indent + members[i] + (i + 1 < members.size() ? ",\n" : "\n");
    return json;
}

std::string vessel(const Scenario& scenario)
{
    return key("vessel") + "{" + key("name") + quoted(scenario.vessel) + ", " + key("imo") +
           quoted(scenario.imo) + ", " + key("flag") + quoted(scenario.flag) + ", " + key("class") +
           quoted(scenario.class_society) + ", " + key("class_number") + quoted(scenario.class_number) + "}";
}

std::string firing_order(const EngineDesign& engine)
{
    std::string json = key("firing_order") + "[";
    for (std::size_t i = 0; i < engine.firing_order.size(); ++i)
        json += (i > 0 ? ", " : "") + std::to_string(engine.firing_order[i]);
    return json + "]";
}

std::string reference()
{
    return key("reference") + "{" + key("inlet_air_c") + number(reference_inlet_air_c) + ", " +
           key("cooler_coolant_c") + number(reference_coolant_c) + ", " + key("barometric_mbar") +
           number(reference_barometer_mbar) + ", " + source_entry() + "}";
}

std::string correction(const EngineDesign& engine)
{
    std::vector<std::string> members;
    for (const auto& [quantity, pair] : engine.correction)
        members.push_back(key(quantity) + "{" + key("per_inlet_air") + number(pair.per_inlet_air) + ", " +
                          key("per_coolant") + number(pair.per_coolant) + ", " + source_entry() + "}");
    return key("correction") + "{\n" + joined(members, "    ") + "  }";
}

std::string limits(const EngineDesign& engine)
{
    std::vector<std::string> members;
    for (const DesignLimit& limit : engine.limits) {
        const std::string low = limit.low ? key("low") + number(*limit.low) + ", " : "";
        const std::string high = limit.high ? key("high") + number(*limit.high) + ", " : "";
        members.push_back(key(limit.quantity) + "{" + low + high + source_entry() + "}");
    }
    return key("limits") + "{\n" + joined(members, "    ") + "  }";
}

std::string instruments(const EngineDesign& engine)
{
    std::vector<std::string> members;
    for (const DesignInstrument& one : engine.instruments)
        members.push_back("{" + key("quantity") + quoted(one.quantity) + ", " + key("serial") +
                          quoted(one.serial) + ", " + key("calibrated") + quoted(one.calibrated) + ", " +
                          key("uncertainty") + number(one.uncertainty) + ", " + source_entry() + "}");
    return key("instruments") + "[\n" + joined(members, "    ") + "  ]";
}

std::string baseline(const EngineDesign& engine)
{
    std::vector<std::string> members;
    for (const DesignPoint& point : engine.baseline) {
        std::string member = "{" + key("load_percent") + number(point.load_percent);
        for (const auto& [quantity, value] : point.values)
            member += ", " + key(quantity) + number(value);
        members.push_back(member + "}");
    }
    return key("baseline") + "[\n" + joined(members, "    ") + "  ]";
}

std::string braces(const std::vector<std::string>& members)
{
    std::string json = "{";
    for (std::size_t i = 0; i < members.size(); ++i)
        json += (i > 0 ? ", " : "") + members[i];
    return json + "}";
}

std::string load_limits(const DesignLoadLimits& limits)
{
    std::vector<std::string> members;
    const auto add = [&](const char* name, const std::optional<double>& value) {
        if (value)
            members.push_back(key(name) + number(*value));
    };
    add("mean_effective_pressure_percent", limits.mean_effective_pressure);
    add("torque_exponent", limits.torque_exponent);
    add("torque_below_speed_percent", limits.torque_below_speed);
    add("highest_speed_percent", limits.highest_speed);
    add("overload_percent", limits.overload);
    add("light_running_margin_percent", limits.light_running_margin);
    if (limits.constant_speed)
        members.push_back(key("constant_speed") + "true");
    members.push_back(source_entry());
    return key("load_limits") + braces(members);
}

std::string walls(const EngineDesign& engine)
{
    std::vector<std::string> list;
    for (const DesignWall& wall : engine.walls) {
        std::vector<std::string> members{
            key("part") + quoted(wall.part),
            key("load_percent") + number(wall.load_percent),
            key("gas_c") + number(wall.gas_c),
            key("gas_film_w_m2k") + number(wall.gas_film),
            key("thickness_mm") + number(wall.thickness_mm),
            key("conductivity_w_mk") + number(wall.conductivity),
            key("coolant_film_w_m2k") + number(wall.coolant_film),
            key("coolant_c") + number(wall.coolant_c),
            key("highest_c") + number(wall.highest_c),
        };
        if (wall.lowest_c)
            members.push_back(key("lowest_c") + number(*wall.lowest_c));
        members.push_back(source_entry());
        list.push_back(braces(members));
    }
    return key("walls") + "[\n" + joined(list, "    ") + "  ]";
}

std::vector<std::string> particulars(const EngineDesign& engine)
{
    std::vector<std::string> members{
        key("engine") + quoted(engine.name),
        key("cycle") + quoted(engine.two_stroke ? "two-stroke" : "four-stroke"),
        key("cylinders") + std::to_string(engine.cylinders),
        key("bore_mm") + number(engine.bore_mm),
        key("stroke_mm") + number(engine.stroke_mm),
        key("rod_length_mm") + number(engine.rod_length_mm),
        key("rated_power_kw") + number(engine.rated_power_kw),
        key("rated_speed_rpm") + number(engine.rated_speed_rpm),
        key("maximum_pressure_controlled") + "false",
        firing_order(engine),
        key("compression_ratio") + number(engine.compression_ratio),
        key("cylinder_closes_deg") + number(engine.cylinder_closes_deg),
        key("cylinder_opens_deg") + number(engine.cylinder_opens_deg),
        key("mechanical_efficiency") + number(engine.mechanical_efficiency),
    };
    if (engine.propeller_pitch_m)
        members.push_back(key("propeller_pitch_m") + number(*engine.propeller_pitch_m));
    if (engine.moving_mass_kg)
        members.push_back(key("moving_mass_kg") + number(*engine.moving_mass_kg));
    if (engine.generator_efficiency)
        members.push_back(key("generator_efficiency") + number(*engine.generator_efficiency));
    return members;
}

} // namespace

std::string engine_json(const Scenario& scenario, const EngineDesign& engine)
{
    std::vector<std::string> members{vessel(scenario)};
    for (const std::string& member : particulars(engine))
        members.push_back(member);
    members.push_back(reference());
    members.push_back(correction(engine));
    members.push_back(limits(engine));
    members.push_back(instruments(engine));
    members.push_back(load_limits(engine.load_limits));
    if (!engine.walls.empty())
        members.push_back(walls(engine));
    members.push_back(key("baseline_source") + quoted(invented));
    members.push_back(baseline(engine));
    return "{\n" + joined(members, "  ") + "}\n";
}

} // namespace evenstroke::sample
