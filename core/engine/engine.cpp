// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/engine.h"

#include "core/heat/wall_problem.h"
#include "core/input_check.h"

#include <charconv>
#include <cmath>

namespace evenstroke {
namespace {

std::string number_text(double value)
{
    char buffer[32];
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::general, 6).ptr;
    return {buffer, end};
}

/// Largest engines built have 14 cylinders in line and 20 in vee; four times that is a slip of the pen.
constexpr int most_cylinders = 80;

std::optional<Problem> find_size_problem(const Engine& engine)
{
    const struct
    {
        const char* name;
        double value;
        const char* unit;
    } sizes[] = {{"bore", engine.bore.value() * 1000.0, "mm"},
                 {"stroke", engine.stroke.value() * 1000.0, "mm"},
                 {"rod_length", engine.rod_length.value() * 1000.0, "mm"},
                 {"rated_power", engine.rated_power.value() / 1000.0, "kW"},
                 {"rated_speed", engine.rated_speed.value() * 60.0, "r/min"}};
    for (const auto& size : sizes)
        if (!is_positive(size.value))
            return invalid_input(std::string("The engine's ") + size.name + " is " + number_text(size.value) + " " +
                                     size.unit + ", which cannot be.",
                                 "Give a number above zero.");
    if (engine.rod_length.value() < engine.stroke.value() / 2.0)
        return invalid_input("The connecting rod is " + number_text(engine.rod_length.value() * 1000.0) +
                                 " mm long, shorter than the crank of " +
                                 number_text(engine.stroke.value() * 500.0) + " mm (half the stroke).",
                             "Check rod_length_mm and stroke_mm.");
    return std::nullopt;
}

std::optional<Problem> find_baseline_problem(const Engine& engine)
{
    std::map<std::string, double> last_load;
    for (std::size_t i = 0; i < engine.baseline.size(); ++i) {
        const BaselinePoint& point = engine.baseline[i];
        if (!std::isfinite(point.load_percent) || point.load_percent < 0.0 || point.load_percent > 150.0)
            return invalid_input("Point " + std::to_string(i + 1) + " of the baseline has a load of " +
                                     number_text(point.load_percent) + " %, which cannot be.",
                                 "Give the load between 0 and 150 % of rated power.");
        const auto [last, first_of_mode] = last_load.try_emplace(point.mode, point.load_percent);
        if (!first_of_mode && point.load_percent <= last->second)
            return invalid_input("The loads of the baseline do not increase: " + number_text(point.load_percent) +
                                     " % comes after " + number_text(last->second) + " %" +
                                     (point.mode.empty() ? "." : " in mode " + point.mode + "."),
                                 "Put the points in order of load, each load once within a mode.");
        last->second = point.load_percent;
        for (const auto& [name, value] : point.values)
            if (!std::isfinite(value))
                return invalid_input("The baseline's " + name + " at " + number_text(point.load_percent) +
                                         " % load is no finite number.",
                                     "Give a number or leave it out.");
    }
    return std::nullopt;
}

std::optional<Problem> find_share_problem(const std::optional<double>& share, const std::string& what)
{
    if (!share || (*share > 0.0 && *share <= 1.0))
        return std::nullopt;
    return invalid_input("The " + what + " is " + number_text(*share) + ", which is no share between 0 and 1.",
                         "Give it as a share of 1, such as 0.95.");
}

/// What may be left out, but cannot be just anything.
std::optional<Problem> find_optional_problem(const Engine& engine)
{
    if (auto problem = find_share_problem(engine.generator_efficiency, "generator efficiency"))
        return problem;
    if (engine.moving_mass && !is_positive(engine.moving_mass->value()))
        return invalid_input("The moving mass of a cylinder is " + number_text(engine.moving_mass->value()) +
                                 " kg, which cannot be.",
                             "Give a mass above zero, or leave it out.");
    const auto& humidity = engine.reference.relative_humidity;
    if (humidity && !(*humidity >= 0.0 && *humidity <= 1.0))
        return invalid_input("The relative humidity of the reference is " + number_text(*humidity * 100.0) +
                                 " %, which cannot be.",
                             "Give it from 0 to 100 %, or leave it out.");
    if (engine.load_limits) {
        const auto diagram = LoadDiagram::make(engine.rated_power, engine.rated_speed, *engine.load_limits);
        if (!diagram.has_value())
            return diagram.error();
    }
    for (const WallDescription& wall : engine.walls)
        if (auto problem = find_problem(wall))
            return problem;
    return std::nullopt;
}

} // namespace

std::string Engine::cylinder_name(int number) const
{
    if (number >= 1 && static_cast<std::size_t>(number) <= cylinder_names.size())
        return cylinder_names[static_cast<std::size_t>(number) - 1];
    return std::to_string(number);
}

std::optional<int> Engine::find_cylinder(std::string_view text) const
{
    for (std::size_t i = 0; i < cylinder_names.size(); ++i)
        if (cylinder_names[i] == text)
            return static_cast<int>(i) + 1;
    int number = 0;
    const auto [end, problem] = std::from_chars(text.data(), text.data() + text.size(), number);
    if (problem != std::errc() || end != text.data() + text.size() || number < 1 || number > cylinders)
        return std::nullopt;
    return number;
}

std::optional<Problem> find_problem(const Engine& engine)
{
    if (engine.cylinders < 1 || engine.cylinders > most_cylinders)
        return invalid_input("The engine has " + std::to_string(engine.cylinders) + " cylinders, which cannot be.",
                             "Give the number of cylinders, 1 to " + std::to_string(most_cylinders) + ".");
    if (!engine.cylinder_names.empty() &&
        engine.cylinder_names.size() != static_cast<std::size_t>(engine.cylinders))
        return invalid_input("There are " + std::to_string(engine.cylinder_names.size()) + " cylinder names for " +
                                 std::to_string(engine.cylinders) + " cylinders.",
                             "Give one name a cylinder, or none.");
    if (auto problem = find_size_problem(engine))
        return problem;
    if (engine.compression_ratio && !(std::isfinite(*engine.compression_ratio) && *engine.compression_ratio > 1.0))
        return invalid_input("The compression ratio is " + number_text(*engine.compression_ratio) +
                                 "; it must be above 1.",
                             "Give the maker's compression ratio, usually 10 to 25.");
    if (auto problem = find_optional_problem(engine))
        return problem;
    return find_baseline_problem(engine);
}

} // namespace evenstroke
