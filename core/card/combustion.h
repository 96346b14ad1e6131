// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/calibration.h"
#include "core/card/curve.h"

#include <optional>
#include <span>
#include <vector>

/// Where the record leaves the unfired line, and what the gas takes up from there on.
namespace evenstroke::indicator {

/// The record above the unfired line. Angles true, degrees.
struct CombustionStart
{
    double threshold = 0.0; ///< where the record stays above the line by more than scatter
    double start = 0.0;     ///< root of that rise carried back to the line; not the start of injection
};

/// @param angle true, rising  @param excess ln(p / p_line) there  @param limit what counts as above the line, a sample
/// @return nothing where nothing burns within the samples
std::optional<CombustionStart> find_start(std::span<const double> angle, std::span<const double> excess,
                                          std::span<const double> limit, double step);

/// What the first law says of the closed part.
struct HeatRelease
{
    std::vector<double> angle;    ///< true, degrees
    std::vector<double> kelvin;   ///< gas, mean over the cylinder
    std::vector<double> net;      ///< J from the start on: what the gas took up
    std::vector<double> gross;    ///< with what went into the walls
    std::vector<double> fuel;     ///< kg burnt
    double total = 0.0;           ///< largest of the running gross heat, J
    std::optional<double> ca10, ca50, ca90;
    double highest_kelvin = 0.0, mean_kelvin = 0.0; ///< mean over the closed part only
    std::optional<double> dead_centre_kelvin;
};

struct HeatInputs
{
    std::span<const double> angle, pressure; ///< as recorded
    double mass = 0.0;                       ///< kg of charge
    std::optional<double> start;             ///< of combustion, true; empty: nothing burns
    double wall_multiplier = 1.0;
    int rounds = 4;                          ///< of working out the burnt fuel
    const std::vector<double>* known_fuel = nullptr; ///< taken instead of the first round's none
    double expansion_drift = 0.0;            ///< bar taken off the expansion as far as the flame has heated
    std::optional<Range> samples = {};         ///< of the closed part, where another offset must not change them
};

/// Where this share of the heat is released, degrees; nothing where nothing is.
std::optional<double> angle_of_share(const HeatRelease& heat, double share);

/// How far a flame that began at dead centre has heated the transducer, 0 to 1 (common practice, no source).
double hot_share(double true_angle);

inline constexpr double fuel_heat = 42.7e6; ///< J/kg, only for the burnt fuel's mass (common practice)

/// From 2° after closing to 1° before opening. @return nothing where there are too few samples
std::optional<HeatRelease> release_heat(const Cylinder& cylinder, const WallLoss& walls, const Unknowns& x,
                                        const HeatInputs& inputs);

} // namespace evenstroke::indicator
