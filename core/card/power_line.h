// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/least_squares.h"
#include "core/engine/slider_crank.h"

#include <optional>
#include <span>

namespace evenstroke::indicator {

/// ln(p_rec - zero) + exponent · ln V = level: what serves where the energy balance lacks an input. Less exact.
struct PowerLine
{
    double offset = 0.0, zero = 0.0, exponent = 1.36, level = 0.0; ///< degrees, bar, 1, ln of bar at 1 m³
    Square<4> covariance{};                                        ///< in this order
    double misfit = 0.0;
    bool converged = false;

    double pressure(double volume) const { return std::exp(level - exponent * std::log(volume)); }
};

/// @param angle,pressure as recorded, within the compression  @param noise bar, one standard deviation
/// @return nothing where the samples do not determine the line
std::optional<PowerLine> fit_power_line(const SliderCrank& gear, double clearance, std::span<const double> angle,
                                        std::span<const double> pressure, double noise, const PowerLine& start);

} // namespace evenstroke::indicator
