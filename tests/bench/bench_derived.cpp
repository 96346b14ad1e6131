// SPDX-License-Identifier: GPL-3.0-or-later
// How long the computed quantities of ten years take, one reading a month, with their uncertainties (aim: at most 20 ms
// for one engine), beside the same written with pandas and scipy. Processor time; nothing fails on it.
#include "core/derived/derived.h"
#include "tests/bench/processor_time.h"
#include "tests/core/example_engine.h"

#include <algorithm>
#include <cstdio>
#include <string>

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
    add("exhaust_after_turbine", charger, "265");
    add("exhaust_back_pressure", charger, "25"), add("cooler_pressure_drop", cooler, "15");
    add("cooler_air_outlet_temperature", cooler, "41"), add("cooler_coolant_inlet_temperature", cooler, "32");
    add("cooler_coolant_outlet_temperature", cooler, "46"), add("fuel_density_15", Place::engine(), "991");
    add("fuel_temperature", Place::engine(), "120"), add("fuel_viscosity", Place::engine(), "14");
    add("fuel_sulphur", Place::engine(), "0.45"), add("displacement", ship, "55000");
    add("speed_through_water", ship, "14");
    for (int i = 1; i <= cylinders; ++i) {
        add("mean_indicated_pressure", Place::cylinder(i), "16");
        add("compression_pressure", Place::cylinder(i), "120");
        add("maximum_pressure", Place::cylinder(i), "150");
    }
    return reading;
}

/// What the script prints; empty where there is no interpreter. That of the system has the packages of tests.txt.
std::string beside()
{
    std::string text;
    if (FILE* run = popen("/usr/bin/python3 " EVENSTROKE_SOURCE_DIR "/tests/bench/derived_quantities.py 2>&1", "r")) {
        char part[256];
        while (std::fgets(part, sizeof part, run))
            text += part;
        pclose(run);
    }
    return text;
}

} // namespace

int main()
{
    Engine engine = example_engine();
    engine.cylinders = 12;
    engine.propeller_pitch = 4.8 * si::metres;
    const Baseline baseline(engine);
    const Reading reading = full_reading(engine.cylinders);
    constexpr int readings = 120;
    std::size_t rows = 0, trended = 0;
    const double with_uncertainty = best_of(5, [&] {
        rows = 0;
        for (int month = 0; month < readings; ++month)
            rows += derive(engine, baseline, reading).size();
    });
    const double values_only = best_of(5, [&] {
        trended = 0;
        for (int month = 0; month < readings; ++month)
            trended += derive_trended(DerivedReading(engine, baseline, reading)).size();
    });
    std::printf("%d readings, %zu computed rows with uncertainty: %.1f ms\n", readings, rows, with_uncertainty);
    std::printf("the %zu that are trended, values only: %.1f ms\n", trended, values_only);
    const std::string text = beside();
    double columns = 0.0, by_rows = 0.0, value = 0.0, half = 0.0;
    if (std::sscanf(text.c_str(), "%lf %lf %lf %lf", &columns, &by_rows, &value, &half) != 4) {
        std::printf("the same with pandas and scipy was not measured: %s\n", text.empty() ? "no python3" : text.c_str());
        return rows == 0 ? 1 : 0;
    }
    constexpr double common = 38.0 * readings; // rows that the script works out
    const double own = with_uncertainty / static_cast<double>(rows), others = columns / common;
    std::printf("pandas, all readings at once, %.0f rows: %.1f ms, %.2f times as long a row\n", common, columns, others / own);
    std::printf("scipy, reading by reading: %.0f ms, %.0f times as long a row\n", by_rows, by_rows / common / own);
    for (const DerivedValue& row : derive(engine, baseline, reading))
        if (row.quantity == "compressor_efficiency")
            std::printf("compressor efficiency here %.6f +- %.6f, there %.6f +- %.6f\n", row.value,
                        row.uncertainty.value_or(0.0), value, half);
    return rows == 0 ? 1 : 0;
}
