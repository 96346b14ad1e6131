// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/simulation/fleet_simulator.h"

#include <algorithm>
#include <iterator>
#include <string>

/// What the simulated engines look like and what faults do to them. All figures are invented; the sizes of
/// faults are those the method was laid out for.
namespace evenstroke::simulation {

/// What a typed value looks like: expected over load, digits after the point, size of the common noise.
struct Look
{
    const char* quantity;
    double at_no_load, per_percent;
    int decimals;
    double common; ///< sigma of what all cylinders share, deviation's unit
};
inline constexpr Look looks[] = {
    {"mean_indicated_pressure", 4.2, 0.175, 2, 2.1},
    {"maximum_pressure", 35.0, 1.45, 1, 2.0},
    {"compression_pressure", 25.0, 1.15, 1, 1.5},
    {"exhaust_temperature", 290.0, 0.4, 0, 8.0},
    {"jacket_outlet_temperature", 80.0, 0.0, 1, 1.1},
    {"piston_coolant_outlet_temperature", 56.0, 0.0, 1, 1.0},
    {"fuel_index", 22.0, 0.55, 1, 0.65},
    {"scavenge_box_temperature", 48.0, 0.1, 0, 2.0},
    {"liner_temperature", 110.0, 0.3, 0, 5.0},
    {"expansion_pressure", 20.0, 0.5, 1, 1.0},
    {"angle_of_maximum_pressure", 13.0, 0.0, 1, 0.5},
    {"angle_of_half_heat_release", 17.0, 0.0, 1, 0.5},
    {"scavenge_pressure", -0.2, 0.033, 2, 0.0},
    {"turbocharger_speed", 4200.0, 68.0, 0, 0.0},
    {"exhaust_before_turbine", 330.0, 0.8, 0, 0.0},
    {"exhaust_after_turbine", 245.0, 0.1, 0, 0.0},
    {"cooler_temperature_difference", 6.0, 0.05, 1, 0.0},
    {"specific_fuel_consumption", 172.0, -0.05, 1, 0.0},
    {"cooler_pressure_drop", 10.0, 1.9, 0, 0.0},
    {"exhaust_back_pressure", 1.0, 0.25, 0, 0.0},
    {"air_filter_pressure_drop", 1.0, 0.08, 1, 0.0},
    {"compressor_outlet_temperature", 40.0, 1.6, 0, 0.0},
    {"compressor_efficiency", 0.83, 0.0, 3, 0.0},
    {"turbocharger_efficiency", 0.66, 0.0, 3, 0.0},
    {"cooler_effectiveness", 0.92, 0.0, 3, 0.0},
};
inline const Look& look_of(const std::string& quantity)
{
    return *std::find_if(std::begin(looks), std::end(looks),
                         [&](const Look& look) { return quantity == look.quantity; });
}
/// Whether the simulator can make this quantity.
inline bool has_look(const std::string& quantity)
{
    return std::any_of(std::begin(looks), std::end(looks),
                       [&](const Look& look) { return quantity == look.quantity; });
}

/// What a fault does to one quantity: a month (ramp) or once (step), deviation's unit.
struct Effect
{
    Fault fault;
    const char* quantity;
    double amount;
};
inline constexpr Effect effects[] = {
    {Fault::slow_ring_wear, "compression_pressure", -0.3},
    {Fault::slow_ring_wear, "maximum_pressure", -0.25},
    {Fault::slow_ring_wear, "exhaust_temperature", 0.8},
    {Fault::fast_ring_wear, "compression_pressure", -0.9},
    {Fault::fast_ring_wear, "maximum_pressure", -0.75},
    {Fault::fast_ring_wear, "exhaust_temperature", 2.4},
    {Fault::fuel_pump_wear, "fuel_index", 0.2},
    {Fault::fuel_pump_wear, "maximum_pressure", -0.2},
    {Fault::fuel_pump_wear, "mean_indicated_pressure", -0.15},
    {Fault::fuel_nozzle, "exhaust_temperature", 20.0},
    {Fault::fuel_nozzle, "maximum_pressure", -4.0},
    {Fault::fuel_nozzle, "mean_indicated_pressure", -2.0},
    {Fault::exhaust_valve, "exhaust_temperature", 25.0},
    {Fault::exhaust_valve, "compression_pressure", -4.0},
    {Fault::exhaust_valve, "maximum_pressure", -4.5},
    {Fault::exhaust_sensor_drift, "exhaust_temperature", -2.0},
    {Fault::jacket_sensor_step, "jacket_outlet_temperature", 3.0},
    {Fault::turbocharger_fouling, "exhaust_temperature", 1.5},
    {Fault::turbocharger_fouling, "compression_pressure", -0.4},
    {Fault::turbocharger_fouling, "maximum_pressure", -0.4},
    {Fault::turbocharger_fouling, "scavenge_pressure", -0.012},
    {Fault::turbocharger_fouling, "turbocharger_speed", -0.2},
    {Fault::turbocharger_fouling, "exhaust_before_turbine", 2.0},
    {Fault::turbocharger_fouling, "exhaust_after_turbine", 2.4},
    {Fault::turbocharger_fouling, "specific_fuel_consumption", 0.25},
    {Fault::air_cooler_fouling, "cooler_temperature_difference", 0.5},
    {Fault::air_cooler_fouling, "cooler_pressure_drop", 1.5},
    {Fault::air_cooler_fouling, "scavenge_pressure", -0.005},
    {Fault::air_cooler_fouling, "exhaust_temperature", 0.6},
    {Fault::air_cooler_fouling, "exhaust_before_turbine", 0.6},
};
inline bool is_step(Fault fault)
{
    return fault == Fault::fuel_nozzle || fault == Fault::exhaust_valve || fault == Fault::jacket_sensor_step;
}
inline bool is_coolant(const std::string& quantity)
{
    return quantity.find("outlet_temperature") != std::string::npos;
}
inline bool is_of_sensor(Fault fault)
{
    return fault == Fault::exhaust_sensor_drift || fault == Fault::jacket_sensor_step;
}
inline bool is_of_engine(Fault fault)
{
    return fault == Fault::turbocharger_fouling || fault == Fault::air_cooler_fouling;
}

} // namespace evenstroke::simulation
