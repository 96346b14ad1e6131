// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/slider_crank.h"

#include <optional>
#include <span>
#include <vector>

/// What is read off a curve of pressure over crank angle without any model. Angles in degrees, pressures in bar.
namespace evenstroke::indicator {

/// What each sample of an even grid over one period adds to the mean indicated pressure: Δθ/V_s dV/dθ at the true
/// angle. Exact to rounding for a smooth periodic record; the period's end is not repeated.
std::vector<double> work_weights(const SliderCrank& gear, std::span<const double> angle, double step, double offset);
double weighted_sum(std::span<const double> pressure, std::span<const double> weights);

/// The closed polygon through points at any angles, the last joined to the first; 0.01 % off at 1° between points.
double polygon_pressure(const SliderCrank& gear, std::span<const double> angle, std::span<const double> pressure,
                        double offset);

struct Peak
{
    double pressure = 0.0, angle = 0.0;             ///< vertex of a parabola near the smoothed maximum
    double pressure_spread = 0.0, angle_spread = 0.0; ///< one standard deviation, from the noise alone
};
/// The vertex freed of what noise adds to it. @param from,to where the maximum is looked for
/// @return nothing where there are too few samples
std::optional<Peak> find_peak(std::span<const double> angle, std::span<const double> pressure, double noise,
                              double from = -1e9, double to = 1e9);

/// The same round a place that is known already, as from the mean of many cycles: the noise of one cycle then has no
/// choice of places. Looks elsewhere where the vertex is over 1.5° away.
std::optional<Peak> find_peak_near(std::span<const double> angle, std::span<const double> pressure, double noise,
                                   double near);

/// Pressure at an angle from a parabola through the samples within ±`half_width`.
std::optional<double> local_pressure(std::span<const double> angle, std::span<const double> pressure, double at,
                                     double half_width);

struct Rise
{
    double value = 0.0, spread = 0.0; ///< bar a degree; one standard deviation from the noise
};
/// Steepest rise within -40 to 40°: slope of a cubic 2° wide, 4° where the samples are 1° apart or noisy.
std::optional<Rise> steepest_rise(std::span<const double> angle, std::span<const double> pressure, double step,
                                  double noise);

/// Polytropic exponent: straight line of ln(p - zero) over ln V between two true angles.
std::optional<double> polytropic_exponent(const SliderCrank& gear, double clearance, std::span<const double> angle,
                                          std::span<const double> pressure, double offset, double zero, double from,
                                          double to);

/// Indices of the samples within [from, to] of rising angles.
struct Range
{
    std::size_t first = 0, count = 0;
};
Range samples_within(std::span<const double> angle, double from, double to);

} // namespace evenstroke::indicator
