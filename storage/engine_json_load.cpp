// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/engine_json_load.h"

#include "core/heat/wall_problem.h"
#include "core/plain_text.h"
#include "storage/sql.h"

#include <map>

namespace evenstroke::storage {
namespace {

/// A number of the load diagram: in per cent in the file, as a part of the rating in the engine.
struct LimitKey
{
    const char* key;
    std::optional<double> LoadLimits::* member;
    double per; ///< of the file's number in one of the engine's
};
constexpr LimitKey limit_keys[] = {
    {"mean_effective_pressure_percent", &LoadLimits::mean_effective_pressure, 100.0},
    {"torque_exponent", &LoadLimits::torque_exponent, 1.0},
    {"torque_below_speed_percent", &LoadLimits::torque_below_speed, 100.0},
    {"highest_speed_percent", &LoadLimits::highest_speed, 100.0},
    {"overload_percent", &LoadLimits::overload, 100.0},
    {"light_running_margin_percent", &LoadLimits::light_running_margin, 100.0},
};

const std::map<std::string, ConsumptionCorrection>& consumption_corrections()
{
    static const std::map<std::string, ConsumptionCorrection> words{{"linear", ConsumptionCorrection::linear},
                                                                    {"iso-3046", ConsumptionCorrection::iso_3046}};
    return words;
}

const std::map<std::string, AspirationClass>& aspirations()
{
    static const std::map<std::string, AspirationClass> words{
        {"charge-air-cooled", AspirationClass::charge_air_cooled},
        {"turbocharged", AspirationClass::turbocharged},
        {"naturally-aspirated", AspirationClass::naturally_aspirated}};
    return words;
}

/// What the load diagram says of the limits; the rating itself is judged elsewhere.
std::optional<Problem> problem_of(const LoadLimits& limits)
{
    const auto diagram = LoadDiagram::make(kilowatts(1.0), per_minute(1.0), limits);
    return diagram.has_value() ? std::nullopt : std::optional(diagram.error());
}

void read_limit(JsonReader& reader, const LimitKey& key, LoadLimits& limits)
{
    const auto number = reader.number(key.key);
    if (!number)
        return;
    LoadLimits alone;
    alone.torque_below_speed = 0.9; // the exponent is not judged without one
    alone.*key.member = *number / key.per;
    if (const auto problem = problem_of(alone))
        reader.refuse(key.key, *number, reader.path(key.key) + " is " + number_text(*number) + ": " + problem->what_happened,
                      key.per == 1.0 ? "Write the exponent of the power over the speed, 2 to 2.5 usual."
                                     : "Write per cent of the rating, such as 105 for 1.05.");
    else
        limits.*key.member = *number / key.per;
}

void read_load_limits(JsonReader& top, Engine& engine)
{
    const QJsonValue value = top.take("load_limits");
    if (value.isUndefined())
        return;
    if (!value.isObject()) {
        top.refuse("load_limits", value, "load_limits is " + json_text(value) + ", which has no keys of its own.",
                   "Write it in braces: {\"mean_effective_pressure_percent\": …, \"source\": …}.");
        return;
    }
    JsonReader reader(value.toObject(), "load_limits.", top.problems());
    LoadLimits limits;
    for (const LimitKey& key : limit_keys)
        read_limit(reader, key, limits);
    if (const auto factor = reader.number("torque_factor")) {
        LoadLimits alone;
        alone.torque_factor = *factor;
        if (const auto problem = problem_of(alone))
            reader.refuse("torque_factor", *factor, "load_limits.torque_factor is " + number_text(*factor) + ": " +
                                                        problem->what_happened,
                          "Write the factor of the torque and speed limit, 1 where the maker states none.");
        else
            limits.torque_factor = *factor;
    }
    limits.constant_speed = reader.truth("constant_speed").value_or(false);
    limits.source = reader.text("source");
    for (const std::string& left : reader.left_keys())
        top.keep_aside(left);
    if (reader.has("torque_exponent") && !reader.has("torque_below_speed_percent"))
        reader.refuse("torque_exponent", reader.object().value(QLatin1String("torque_exponent")),
                      "load_limits has a torque_exponent and no torque_below_speed_percent.",
                      "Write below which speed the torque and speed limit applies, in per cent of rated speed.");
    engine.load_limits = limits;
}

std::optional<Temperature> temperature(JsonReader& reader, const char* key)
{
    const auto degrees = reader.number(key);
    if (degrees && *degrees <= -273.15) {
        reader.refuse(key, *degrees, reader.path(key) + " is " + number_text(*degrees) + " °C, below absolute zero.",
                      "Write the temperature in °C.");
        return std::nullopt;
    }
    return degrees ? std::optional(celsius(*degrees)) : std::nullopt;
}

/// A wall without one of these cannot be worked out at all.
constexpr const char* needed_of_wall[] = {"load_percent",      "gas_c",              "gas_film_w_m2k", "thickness_mm",
                                          "conductivity_w_mk", "coolant_film_w_m2k", "coolant_c"};

bool lacks_something(JsonReader& reader, const QJsonValue& value)
{
    bool lacks = false;
    for (const char* key : needed_of_wall)
        if (!reader.has(key)) {
            reader.refuse(key, value, reader.path(key) + " is not given, and the wall cannot be worked out without it.",
                          std::string("Write \"") + key + "\" with a number, or leave the whole wall out.");
            lacks = true;
        }
    return lacks;
}

WallDescription read_wall(JsonReader& reader)
{
    WallDescription wall;
    wall.part = reader.text("part");
    wall.load_percent = reader.number("load_percent").value_or(0.0);
    wall.gas = temperature(reader, "gas_c").value_or(Temperature{});
    wall.gas_film = film_coefficient(reader.number("gas_film_w_m2k").value_or(0.0));
    wall.thickness = millimetres(reader.number("thickness_mm").value_or(0.0));
    wall.conductivity = conductivity(reader.number("conductivity_w_mk").value_or(0.0));
    wall.coolant_film = film_coefficient(reader.number("coolant_film_w_m2k").value_or(0.0));
    wall.coolant = temperature(reader, "coolant_c").value_or(Temperature{});
    wall.highest = temperature(reader, "highest_c");
    wall.lowest = temperature(reader, "lowest_c");
    wall.source = reader.text("source");
    return wall;
}

void read_walls(JsonReader& top, Engine& engine)
{
    const QJsonValue list = top.take("walls");
    if (!list.isUndefined() && !list.isArray()) {
        top.refuse("walls", list, "walls is " + json_text(list) + ", which is no list.", "Write it in brackets: […].");
        return;
    }
    int index = 0;
    for (const QJsonValue& value : list.toArray()) {
        const std::string where = "walls[" + std::to_string(index++) + "]";
        if (!value.isObject()) {
            top.refuse("walls", value, where + " is " + json_text(value) + ", which describes no wall.",
                       "Write {\"part\": …, \"load_percent\": …, \"gas_c\": …}.");
            continue;
        }
        JsonReader reader(value.toObject(), where + ".", top.problems());
        const std::size_t before = top.problems().size();
        const bool lacks = lacks_something(reader, value);
        const WallDescription wall = read_wall(reader);
        for (const std::string& left : reader.left_keys())
            top.keep_aside(left);
        if (lacks || top.problems().size() > before)
            continue;
        if (const auto problem = find_problem(wall))
            top.problems().push_back({where, 0, json_text(value), where + ": " + problem->what_happened, problem->what_to_do});
        else
            engine.walls.push_back(wall);
    }
}

template <typename Choice>
void read_choice(JsonReader& top, const char* key, const std::map<std::string, Choice>& words, Choice& to)
{
    if (!top.has(key))
        return;
    const std::string text = top.text(key);
    if (const auto found = words.find(text); found != words.end()) {
        to = found->second;
        return;
    }
    if (!top.object().value(QLatin1String(key)).isString())
        return; // said already
    std::string known;
    for (const auto& [word, choice] : words)
        known += (known.empty() ? "\"" : ", \"") + word + "\"";
    top.refuse(key, to_qt(text), std::string(key) + " is " + evenstroke::quoted(text) + ", which is not known.",
               "Write one of " + known + ".");
}

template <typename Choice> std::string word_of(const std::map<std::string, Choice>& words, Choice choice)
{
    for (const auto& [word, meant] : words)
        if (meant == choice)
            return word;
    return {};
}

void put(QJsonObject& object, const char* key, const std::string& text)
{
    if (!text.empty())
        object.insert(QLatin1String(key), to_qt(text));
}

void put(QJsonObject& object, const char* key, const std::optional<double>& number)
{
    if (number)
        object.insert(QLatin1String(key), rounded_number(*number));
}

std::optional<double> in_degrees(const std::optional<Temperature>& temperature)
{
    return temperature ? std::optional(in_celsius(*temperature)) : std::nullopt;
}

QJsonObject limits_object(const LoadLimits& limits)
{
    QJsonObject object;
    for (const LimitKey& key : limit_keys)
        if (const auto& number = limits.*key.member)
            put(object, key.key, *number * key.per);
    if (limits.torque_factor != 1.0)
        put(object, "torque_factor", limits.torque_factor);
    if (limits.constant_speed)
        object.insert(QStringLiteral("constant_speed"), true);
    put(object, "source", limits.source);
    return object;
}

QJsonObject wall_object(const WallDescription& wall)
{
    QJsonObject object;
    put(object, "part", wall.part);
    put(object, "load_percent", wall.load_percent);
    put(object, "gas_c", in_celsius(wall.gas));
    put(object, "gas_film_w_m2k", wall.gas_film.value());
    put(object, "thickness_mm", wall.thickness.value() * 1000.0);
    put(object, "conductivity_w_mk", wall.conductivity.value());
    put(object, "coolant_film_w_m2k", wall.coolant_film.value());
    put(object, "coolant_c", in_celsius(wall.coolant));
    put(object, "highest_c", in_degrees(wall.highest));
    put(object, "lowest_c", in_degrees(wall.lowest));
    put(object, "source", wall.source);
    return object;
}

} // namespace

QJsonValue rounded_number(double number)
{
    return QString::number(number, 'g', 12).toDouble();
}

void read_load_and_heat(JsonReader& top, Engine& engine)
{
    read_load_limits(top, engine);
    read_walls(top, engine);
    if (const auto mass = top.positive("moving_mass_kg"))
        engine.moving_mass = *mass * si::kilograms;
    engine.generator_efficiency = top.positive("generator_efficiency");
    if (engine.generator_efficiency && *engine.generator_efficiency > 1.0)
        top.refuse("generator_efficiency", *engine.generator_efficiency,
                   "The generator efficiency is " + number_text(*engine.generator_efficiency) + "; more than 1 cannot be.",
                   "Write a share of 1, such as 0.95.");
    read_choice(top, "consumption_correction", consumption_corrections(), engine.consumption_correction);
    read_choice(top, "aspiration", aspirations(), engine.aspiration);
}

void put_load_and_heat(QJsonObject& object, const Engine& engine)
{
    if (engine.load_limits)
        object.insert(QStringLiteral("load_limits"), limits_object(*engine.load_limits));
    QJsonArray walls;
    for (const WallDescription& wall : engine.walls)
        walls.append(wall_object(wall));
    if (!walls.isEmpty())
        object.insert(QStringLiteral("walls"), walls);
    if (engine.moving_mass)
        put(object, "moving_mass_kg", engine.moving_mass->value());
    put(object, "generator_efficiency", engine.generator_efficiency);
    if (engine.consumption_correction != ConsumptionCorrection::linear)
        put(object, "consumption_correction", word_of(consumption_corrections(), engine.consumption_correction));
    if (engine.aspiration != AspirationClass::charge_air_cooled)
        put(object, "aspiration", word_of(aspirations(), engine.aspiration));
}

} // namespace evenstroke::storage
