// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/engine_design.h"

#include "sample_vessel/engine_curves.h"

#include <algorithm>
#include <numbers>

namespace evenstroke::sample {
namespace {

constexpr CurveShape two_stroke_curves{
    .scavenge_at_full = 2.75,
    .scavenge_power = 1.5,
    .compression_ratio_of_pressures = 34.5,
    .rise_top = 42.0,
    .rise_curvature = 82.0,
    .rise_load = 0.72,
    .exhaust_least = 268.0,
    .exhaust_rise = 77.0,
    .exhaust_load = 0.35,
    .turbine_over_exhaust = 58.0,
    .turbine_over_exhaust_slope = 8.0,
    .compressor_efficiency = 0.84,
    .turbocharger_speed_at_full = 13600.0,
    .consumption_least = 168.5,
    .consumption_curvature = 36.0,
    .consumption_load = 0.8,
    .fuel_index_idle_share = 0.12,
    .fuel_index_at_full = 76.0,
    .friction = 1.0,
    .cooler_drop_at_full = 18.0,
    .approach_at_full = 14.0,
};

constexpr CurveShape four_stroke_curves{
    .scavenge_at_full = 2.95,
    .scavenge_power = 1.35,
    .compression_ratio_of_pressures = 35.0,
    .rise_top = 44.0,
    .rise_curvature = 60.0,
    .rise_load = 0.7,
    .exhaust_least = 345.0,
    .exhaust_rise = 35.0,
    .exhaust_load = 0.4,
    .turbine_over_exhaust = 90.0,
    .turbine_over_exhaust_slope = 8.0,
    .compressor_efficiency = 0.80,
    .turbocharger_speed_at_full = 34500.0,
    .consumption_least = 196.0,
    .consumption_curvature = 45.0,
    .consumption_load = 0.85,
    .fuel_index_idle_share = 0.25,
    .fuel_index_at_full = 78.0,
    .friction = 2.3,
    .cooler_drop_at_full = 22.0,
    .approach_at_full = 15.0,
};

/// The same kinds of instrument on all three engines; each has its own number.
std::vector<DesignInstrument> instruments(const std::string& mark, const std::string& year)
{
    return {
        {"maximum_pressure", "indicator " + mark + "-01", year + "-02-11", 1.5},
        {"compression_pressure", "indicator " + mark + "-01", year + "-02-11", 1.5},
        {"mean_indicated_pressure", "indicator " + mark + "-01", year + "-02-11", 0.4},
        {"exhaust_temperature", "thermometers " + mark + "-11 and following", year + "-05-03", 5.0},
        {"exhaust_before_turbine", "thermometer " + mark + "-21", year + "-05-03", 5.0},
        {"exhaust_after_turbine", "thermometer " + mark + "-22", year + "-05-03", 5.0},
        {"scavenge_pressure", "gauge " + mark + "-31", year + "-05-04", 0.04},
        {"cooler_pressure_drop", "water column " + mark + "-32", year + "-05-04", 0.4},
        {"turbocharger_speed", "counter " + mark + "-41", year + "-05-04", 40.0},
    };
}

EngineDesign auxiliary(int number)
{
    EngineDesign engine;
    engine.number = number;
    engine.two_stroke = false;
    engine.bore_mm = 265.0;
    engine.stroke_mm = 385.0;
    engine.rod_length_mm = 730.0;
    engine.rated_speed_rpm = 720.0;
    engine.mechanical_efficiency = 0.89;
    engine.compression_ratio = 15.6;
    engine.cylinder_closes_deg = -152.0;
    engine.cylinder_opens_deg = 124.0;
    engine.generator_efficiency = 0.95;
    engine.load_limits.constant_speed = true;
    engine.load_limits.mean_effective_pressure = 110.0;
    engine.load_limits.highest_speed = 105.0;
    engine.load_limits.overload = 110.0;
    engine.correction = {
        {"scavenge_pressure", {0.0028, -0.0019}},
        {"compression_pressure", {0.0025, -0.0016}},
        {"maximum_pressure", {0.0019, -0.0009}},
        {"exhaust_temperature", {-0.0021, -0.0006}},
    };
    engine.limits = {
        {"maximum_pressure", {}, 195.0},         {"exhaust_temperature", {}, 460.0},
        {"exhaust_before_turbine", {}, 560.0},   {"turbocharger_speed", {}, 38000.0},
        {"jacket_outlet_temperature", {}, 95.0}, {"lube_oil_inlet_pressure", 3.0, {}},
    };
    return engine;
}

} // namespace

double EngineDesign::swept_volume_m3() const
{
    return std::numbers::pi / 4.0 * bore_mm * bore_mm * stroke_mm * 1e-9;
}

EngineDesign main_engine()
{
    EngineDesign engine;
    engine.number = 0;
    engine.folder = "main_engine";
    engine.name = "main engine";
    engine.cylinders = 6;
    engine.bore_mm = 545.0;
    engine.stroke_mm = 2235.0;
    engine.rod_length_mm = 2310.0;
    engine.rated_power_kw = 9600.0;
    engine.rated_speed_rpm = 104.0;
    engine.mechanical_efficiency = 0.94;
    engine.compression_ratio = 18.7;
    engine.cylinder_closes_deg = -92.0;
    engine.cylinder_opens_deg = 112.0;
    engine.firing_order = {1, 5, 3, 4, 2, 6};
    engine.propeller_pitch_m = 4.55;
    engine.correction = {
        {"scavenge_pressure", {0.0025, -0.0022}},
        {"compression_pressure", {0.0026, -0.0015}},
        {"maximum_pressure", {0.0020, -0.0008}},
        {"exhaust_temperature", {-0.0024, -0.0004}},
    };
    engine.limits = {
        {"maximum_pressure", {}, 178.0},         {"exhaust_temperature", {}, 430.0},
        {"exhaust_before_turbine", {}, 500.0},   {"turbocharger_speed", {}, 14600.0},
        {"jacket_outlet_temperature", {}, 92.0}, {"piston_coolant_outlet_temperature", {}, 72.0},
        {"scavenge_box_temperature", {}, 80.0},  {"lube_oil_inlet_pressure", 1.8, {}},
    };
    engine.moving_mass_kg = 4900.0;
    engine.load_limits = {.mean_effective_pressure = 100.0,
                          .torque_exponent = 2.0,
                          .torque_below_speed = 97.0,
                          .highest_speed = 104.5,
                          .overload = 110.0,
                          .light_running_margin = 4.0};
    engine.walls = {{.part = "liner",
                     .load_percent = 85.0,
                     .gas_c = 880.0,
                     .gas_film = 390.0,
                     .thickness_mm = 46.0,
                     .conductivity = 45.0,
                     .coolant_film = 6800.0,
                     .coolant_c = 84.0,
                     .highest_c = 320.0,
                     .lowest_c = 130.0},
                    {.part = "cover",
                     .load_percent = 85.0,
                     .gas_c = 920.0,
                     .gas_film = 430.0,
                     .thickness_mm = 32.0,
                     .conductivity = 42.0,
                     .coolant_film = 7600.0,
                     .coolant_c = 85.0,
                     .highest_c = 360.0,
                     .lowest_c = {}}};
    engine.instruments = instruments("ME", "2022");
    engine.baseline = baseline_points(engine, two_stroke_curves);
    return engine;
}

EngineDesign auxiliary_engine_1()
{
    EngineDesign engine = auxiliary(1);
    engine.folder = "auxiliary_engine_1";
    engine.name = "auxiliary engine 1";
    engine.cylinders = 6;
    engine.rated_power_kw = 1500.0;
    engine.firing_order = {1, 4, 2, 6, 3, 5};
    engine.instruments = instruments("A1", "2022");
    engine.baseline = baseline_points(engine, four_stroke_curves);
    return engine;
}

EngineDesign auxiliary_engine_2()
{
    EngineDesign engine = auxiliary(2);
    engine.folder = "auxiliary_engine_2";
    engine.name = "auxiliary engine 2";
    engine.cylinders = 5;
    engine.rated_power_kw = 1240.0;
    engine.firing_order = {1, 2, 4, 5, 3};
    engine.instruments = instruments("A2", "2022");
    CurveShape curves = four_stroke_curves; // a sister with a smaller turbocharger
    curves.scavenge_at_full = 2.9;
    curves.exhaust_least = 350.0;
    curves.turbocharger_speed_at_full = 37200.0;
    engine.baseline = baseline_points(engine, curves);
    engine.limits[3].high = 40500.0;
    return engine;
}

double expected(const EngineDesign& engine, const std::string& quantity, double load_percent)
{
    const auto& points = engine.baseline;
    auto above = std::find_if(points.begin(), points.end(),
                              [&](const DesignPoint& point) { return point.load_percent >= load_percent; });
    if (above == points.begin())
        return points.front().values.at(quantity);
    if (above == points.end())
        return points.back().values.at(quantity);
    const DesignPoint& below = *(above - 1);
    const double share = (load_percent - below.load_percent) / (above->load_percent - below.load_percent);
    return below.values.at(quantity) + share * (above->values.at(quantity) - below.values.at(quantity));
}

} // namespace evenstroke::sample
