// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/engine_curves.h"

#include "sample_vessel/decimal_text.h"

#include <cmath>

namespace evenstroke::sample {
namespace {

constexpr double compression_exponent = 0.286; // of air, (kappa - 1) / kappa, trade practice
// Heat capacity of air over that of the gas, with 2 % of fuel in it; a little more for heat lost by the
// casing.
constexpr double air_to_gas = 1.005 / 1.09 / 1.02 * 1.06;

double square(double value)
{
    return value * value;
}

double air_temperature_rise(double pressure_ratio, double efficiency)
{
    constexpr double inlet_k = reference_inlet_air_c + 273.15;
    return inlet_k * (std::pow(pressure_ratio, compression_exponent) - 1.0) / efficiency;
}

/// Mean effective pressure of the shaft, bar.
double effective_pressure(const EngineDesign& engine, double load)
{
    const double at_full = engine.rated_power_kw * 1e-2 /
                           (engine.cylinders * engine.swept_volume_m3() * engine.rated_cycles_per_second());
    return at_full * (engine.two_stroke ? std::cbrt(square(load)) : load);
}

void add_air_side(DesignPoint& point, const CurveShape& shape, double load)
{
    const double scavenge = shape.scavenge_at_full * std::pow(load, shape.scavenge_power);
    const double ratio = scavenge + 1.0, ratio_at_full = shape.scavenge_at_full + 1.0;
    const double rise = air_temperature_rise(ratio, shape.compressor_efficiency);
    const double before = point.values["exhaust_temperature"] + shape.turbine_over_exhaust +
                          shape.turbine_over_exhaust_slope * load;
    point.values["scavenge_pressure"] = rounded(scavenge, 3);
    point.values["turbocharger_speed"] =
        rounded(shape.turbocharger_speed_at_full *
                    std::sqrt(rise / air_temperature_rise(ratio_at_full, shape.compressor_efficiency)),
                0);
    point.values["exhaust_before_turbine"] = rounded(before, 1);
    point.values["exhaust_after_turbine"] = rounded(before - air_to_gas * rise, 1);
    // The engine takes air like a nozzle: flow goes with the pressure, and the drop with flow squared over
    // density.
    point.values["cooler_pressure_drop"] = rounded(shape.cooler_drop_at_full * ratio / ratio_at_full, 2);
    const double approach = shape.approach_at_full * (0.4 + 0.6 * load);
    point.values["cooler_temperature_difference"] = rounded(approach, 1);
    point.values["scavenge_temperature"] = rounded(reference_coolant_c + approach, 1);
}

DesignPoint point_at(const EngineDesign& engine, const CurveShape& shape, double load)
{
    DesignPoint point;
    const double scavenge = shape.scavenge_at_full * std::pow(load, shape.scavenge_power);
    const double compression = shape.compression_ratio_of_pressures * (scavenge + 1.0) - 1.0;
    const double rise = shape.rise_top - shape.rise_curvature * square(load - shape.rise_load);
    const double warmth = (load - shape.exhaust_load) / (1.0 - shape.exhaust_load);
    const double speed_share = engine.two_stroke ? std::cbrt(load) : 1.0;
    const double fuel_share = engine.two_stroke ? std::cbrt(square(load)) : load;
    point.values["speed"] = rounded(engine.rated_speed_rpm * speed_share, 1);
    point.values["compression_pressure"] = rounded(compression, 1);
    point.values["maximum_pressure"] = rounded(compression + rise, 1);
    point.values["mean_indicated_pressure"] = rounded(effective_pressure(engine, load) + shape.friction, 2);
    point.values["exhaust_temperature"] =
        rounded(shape.exhaust_least + shape.exhaust_rise * square(warmth), 1);
    point.values["fuel_index"] =
        rounded(shape.fuel_index_at_full *
                    (shape.fuel_index_idle_share + (1.0 - shape.fuel_index_idle_share) * fuel_share),
                1);
    point.values["specific_fuel_consumption"] = rounded(
        shape.consumption_least + shape.consumption_curvature * square(load - shape.consumption_load), 1);
    add_air_side(point, shape, load);
    return point;
}

} // namespace

std::vector<DesignPoint> baseline_points(const EngineDesign& engine, const CurveShape& shape)
{
    std::vector<DesignPoint> points;
    for (int percent = 25; percent <= 110; percent += 5) {
        points.push_back(point_at(engine, shape, percent / 100.0));
        points.back().load_percent = percent;
    }
    return points;
}

} // namespace evenstroke::sample
