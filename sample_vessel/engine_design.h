// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// The three engines of the demonstration vessel as their shop would describe them. No such engine
/// exists; every size, curve, coefficient and limit is invented.
namespace evenstroke::sample {

/// Relative change of a corrected value per kelvin (methods of the ambient correction).
struct Coefficients
{
    double per_inlet_air = 0.0, per_coolant = 0.0; ///< 1/K
};

struct DesignPoint
{
    double load_percent = 0.0;
    std::map<std::string, double> values; ///< at reference conditions, units of the quantity list
};

struct DesignLimit
{
    std::string quantity;
    std::optional<double> low, high;
};

struct DesignInstrument
{
    std::string quantity, serial, calibrated;
    double uncertainty = 0.0; ///< half-width at 95 %, unit of the quantity
};

/// Limits of the load diagram, in per cent of the rating but for the exponent.
struct DesignLoadLimits
{
    bool constant_speed = false;
    std::optional<double> mean_effective_pressure, torque_exponent, torque_below_speed, highest_speed, overload,
        light_running_margin;
};

/// One spot of a cylinder's wall at one load.
struct DesignWall
{
    std::string part;
    double load_percent = 0.0, gas_c = 0.0, gas_film = 0.0; ///< W/(m² K)
    double thickness_mm = 0.0, conductivity = 0.0;          ///< W/(m K)
    double coolant_film = 0.0, coolant_c = 0.0, highest_c = 0.0;
    std::optional<double> lowest_c;
};

struct EngineDesign
{
    int number = 0; ///< 0 main engine, 1 and 2 the auxiliary engines
    std::string folder, name;
    bool two_stroke = true;
    int cylinders = 0;
    double bore_mm = 0.0, stroke_mm = 0.0, rod_length_mm = 0.0;
    double rated_power_kw = 0.0, rated_speed_rpm = 0.0;
    double mechanical_efficiency = 0.0;
    double compression_ratio = 0.0, cylinder_closes_deg = 0.0, cylinder_opens_deg = 0.0;
    std::vector<int> firing_order;
    std::optional<double> propeller_pitch_m;
    std::map<std::string, Coefficients> correction;
    std::vector<DesignLimit> limits;
    std::vector<DesignInstrument> instruments;
    DesignLoadLimits load_limits;
    std::vector<DesignWall> walls;
    std::optional<double> moving_mass_kg; ///< of one cylinder: what goes up and down
    std::optional<double> generator_efficiency;
    std::vector<DesignPoint> baseline; ///< 25 to 110 % in steps of 5

    double swept_volume_m3() const; ///< of one cylinder
    /// Work strokes a second and cylinder at the rated speed.
    double rated_cycles_per_second() const { return rated_speed_rpm / 60.0 / (two_stroke ? 1.0 : 2.0); }
};

inline constexpr double reference_inlet_air_c = 25.0;
inline constexpr double reference_coolant_c = 25.0;
inline constexpr double reference_barometer_mbar = 1000.0;

EngineDesign main_engine();
EngineDesign auxiliary_engine_1();
EngineDesign auxiliary_engine_2();

/// The sound engine at reference conditions: straight lines between the points of its own baseline, as
/// the program reads it, so that the two agree to the last digit. Outside the baseline the nearest end.
double expected(const EngineDesign& engine, const std::string& quantity, double load_percent);

} // namespace evenstroke::sample
