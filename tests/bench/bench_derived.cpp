// SPDX-License-Identifier: GPL-3.0-or-later
// How long the computed quantities of ten years take, one reading a month, with their uncertainties.
#include "core/trend/derived.h"
#include "tests/core/example_engine.h"

#include <chrono>
#include <iostream>

using namespace evenstroke;

namespace {

/// Every input of every computed quantity; invented numbers.
Reading full_reading(int cylinders)
{
    const Place ship{Place::Kind::ship, 0}, charger = Place::turbocharger(1), cooler = Place::cooler(1);
    Reading reading;
    const auto add = [&](const char* name, Place place, const char* text) {
        reading.values.push_back(typed_value(name, place, text));
    };
    add("load_percent", Place::engine(), "75"), add("speed", Place::engine(), "95.4");
    add("shaft_power", Place::engine(), "9000"), add("fuel_consumption", Place::engine(), "1600");
    add("fuel_lower_heating_value", Place::engine(), "42.0"), add("inlet_air_temperature", Place::engine(), "30");
    add("relative_humidity", ship, "90"), add("barometric_pressure", ship, "1013");
    add("scavenge_pressure", Place::engine(), "2.2"), add("scavenge_temperature", Place::engine(), "42");
    add("exhaust_receiver_pressure", Place::engine(), "2.0"), add("compressor_outlet_temperature", charger, "170");
    add("air_filter_pressure_drop", charger, "10"), add("exhaust_before_turbine", charger, "390");
    add("exhaust_back_pressure", charger, "25"), add("cooler_pressure_drop", cooler, "15");
    add("cooler_air_outlet_temperature", cooler, "41"), add("cooler_coolant_inlet_temperature", cooler, "32");
    add("speed_through_water", ship, "14");
    for (int i = 1; i <= cylinders; ++i) {
        add("mean_indicated_pressure", Place::cylinder(i), "16");
        add("compression_pressure", Place::cylinder(i), "120");
    }
    return reading;
}

} // namespace

int main()
{
    Engine engine = example_engine();
    engine.propeller_pitch = 4.8 * si::metres;
    const Baseline baseline(engine);
    const Reading reading = full_reading(engine.cylinders);
    const auto start = std::chrono::steady_clock::now();
    std::size_t rows = 0;
    for (int month = 0; month < 120; ++month)
        rows += derive(engine, baseline, reading).size();
    const std::chrono::duration<double, std::milli> took = std::chrono::steady_clock::now() - start;
    std::cout << "120 readings, " << rows << " computed rows with uncertainty: " << took.count() << " ms\n";
    return rows == 0 ? 1 : 0;
}
