// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/example_engine.h"

#include <chrono>
#include <cstdint>
#include <cstdio>
#include <stdexcept>

namespace evenstroke {
namespace {

std::string decimal_text(double number, int decimals)
{
    char buffer[64];
    std::snprintf(buffer, sizeof buffer, "%.*f", decimals, number);
    return buffer;
}

/// A fixed, nearly normal scatter of sigma 0.6 between -2.1 and 2.1: twelve bits at a time of a mixed counter.
double scatter(std::size_t reading, int cylinder, int quantity_number)
{
    std::uint64_t mixed = (reading + 1) * 1000003u + static_cast<std::uint64_t>(cylinder * 1009 + quantity_number * 37);
    mixed = (mixed ^ (mixed >> 30)) * 0xbf58476d1ce4e5b9u;
    mixed = (mixed ^ (mixed >> 27)) * 0x94d049bb133111ebu;
    mixed ^= mixed >> 31;
    double sum = 0.0;
    for (int part = 0; part < 4; ++part)
        sum += static_cast<double>((mixed >> (12 * part)) & 0xfffu) / 4095.0 - 0.5;
    return 1.04 * sum; // four uniform parts have sigma 0.577
}

} // namespace

Engine example_engine()
{
    Engine engine;
    engine.name = "main engine";
    engine.cylinders = 6;
    engine.bore = millimetres(600.0);
    engine.stroke = millimetres(2400.0);
    engine.rod_length = millimetres(2500.0);
    engine.rated_power = kilowatts(12000.0);
    engine.rated_speed = per_minute(105.0);
    engine.correction = {{"scavenge_pressure", {2.7e-3, -2.0e-3, "invented"}},
                         {"compression_pressure", {2.8e-3, -1.4e-3, "invented"}},
                         {"maximum_pressure", {2.1e-3, -0.7e-3, "invented"}},
                         {"exhaust_temperature", {-2.3e-3, -0.5e-3, "invented"}}};
    const auto point = [](double load, double scale) {
        return BaselinePoint{load,
                             "",
                             {{"maximum_pressure", 150.0 * scale},
                              {"compression_pressure", 120.0 * scale},
                              {"mean_indicated_pressure", 18.0 * scale},
                              {"exhaust_temperature", 320.0 * scale},
                              {"fuel_index", 70.0 * scale},
                              {"scavenge_pressure", 2.5 * scale},
                              {"turbocharger_speed", 11000.0 * scale},
                              {"exhaust_before_turbine", 380.0 * scale},
                              {"exhaust_after_turbine", 260.0 * scale},
                              {"cooler_pressure_drop", 15.0 * scale},
                              {"specific_fuel_consumption", 175.0}}};
    };
    engine.baseline = {point(50.0, 0.8), point(75.0, 1.0), point(100.0, 1.2)};
    engine.baseline_source = "invented";
    return engine;
}

Value typed_value(std::string_view name, Place place, const std::string& text, std::string_view unit_text)
{
    const auto id = find_quantity(name, place.kind);
    if (!id)
        throw std::logic_error("no such quantity: " + std::string(name));
    Value value;
    value.quantity = *id;
    value.place = place;
    value.typed = text;
    value.unit = quantity(*id).unit;
    value.kind = quantity(*id).kind;
    if (!unit_text.empty()) {
        const WrittenUnit written = find_unit(unit_text).value();
        value.unit = written.id;
        if (written.kind != PressureKind::none)
            value.kind = written.kind;
    }
    value.number = parse_number(text).value();
    value.value_si = unit(value.unit).to_si(*value.number);
    return value;
}

EngineRecord example_record(std::size_t count)
{
    EngineRecord record;
    record.vessel.name = "Example";
    record.engine = example_engine();
    const struct
    {
        const char* name;
        double value, noise;
        int decimals;
    } per_cylinder[] = {{"maximum_pressure", 150.0, 1.5, 1},    {"compression_pressure", 120.0, 1.2, 1},
                        {"mean_indicated_pressure", 18.0, 0.27, 2}, {"exhaust_temperature", 320.0, 6.0, 0},
                        {"jacket_outlet_temperature", 82.0, 1.0, 1}, {"fuel_index", 70.0, 0.8, 1}};
    for (std::size_t i = 0; i < count; ++i) {
        Reading reading;
        reading.name = "r" + std::to_string(i + 1);
        reading.taken_at.utc = TimePoint(std::chrono::seconds(1700000000 + static_cast<long long>(i) * 2629800));
        const auto engine_value = [&](const char* name, const std::string& text) {
            reading.values.push_back(typed_value(name, Place::engine(), text));
        };
        engine_value("load_percent", "75.0");
        engine_value("shaft_power", "9000");
        engine_value("inlet_air_temperature", "25.0");
        engine_value("cooler_coolant_inlet_temperature", "25.0");
        engine_value("scavenge_pressure", decimal_text(2.5 + 0.03 * scatter(i, 0, 1), 2));
        engine_value("turbocharger_speed", decimal_text(11000.0 + 60.0 * scatter(i, 0, 2), 0));
        engine_value("scavenge_temperature", decimal_text(37.0 + 2.0 * scatter(i, 0, 3), 1));
        engine_value("fuel_consumption", decimal_text(1575.0 + 13.0 * scatter(i, 0, 4), 0));
        engine_value("cooler_pressure_drop", decimal_text(15.0 + 0.6 * scatter(i, 0, 5), 1));
        int k = 0;
        for (const auto& q : per_cylinder) {
            ++k;
            for (int cylinder = 1; cylinder <= record.engine.cylinders; ++cylinder)
                reading.values.push_back(typed_value(q.name, Place::cylinder(cylinder),
                                                     decimal_text(q.value + q.noise * scatter(i, cylinder, 7 * k), q.decimals)));
        }
        record.readings.push_back(std::move(reading));
    }
    return record;
}

void move_value(Reading& reading, std::string_view name, Place place, double amount)
{
    const QuantityId id = *find_quantity(name, place.kind);
    for (Value& value : reading.values) {
        if (value.quantity != id || value.place != place)
            continue;
        value.number = *value.number + amount;
        value.value_si = unit(value.unit).to_si(*value.number);
        value.typed = decimal_text(*value.number, quantity(id).decimals);
    }
}

EngineRecord overhauled_record(std::size_t readings_since, double left)
{
    constexpr std::size_t onset = 26, work_at = 38; // work_at: the first reading after the work
    EngineRecord record = example_record(work_at + readings_since);
    for (std::size_t i = onset; i < record.readings.size(); ++i) {
        const double fallen = i < work_at ? 0.7 * static_cast<double>(i - onset + 1) : left;
        move_value(record.readings[i], "compression_pressure", Place::cylinder(3), -fallen);
        move_value(record.readings[i], "maximum_pressure", Place::cylinder(3), -0.9 * fallen);
    }
    Event work;
    work.kind = "overhaul";
    work.place = Place::cylinder(3);
    work.date.utc = record.readings[work_at - 1].taken_at.utc + std::chrono::hours(24);
    record.events.push_back(work);
    return record;
}

} // namespace evenstroke
