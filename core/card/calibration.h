// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/cylinder_model.h"
#include "core/card/least_squares.h"

#include <array>
#include <optional>
#include <span>
#include <vector>

/// Dead centre and zero of a card from its own compression.
///
/// While nothing burns and no gas leaves, f(θ) = ln p + ∫ [k dlnV/dθ + G q_w/(pV)] dθ stays constant. The unknowns that
/// make it so are found by weighted Gauss-Newton steps.
/// Recorded angle = true angle + offset; recorded pressure = true pressure + zero.
/// Related published methods: E. Pipitone, A. Beccari, Applied Thermal Engineering 2009 (dead centre from unfired
/// cycles); Energies 2017, 10, 143 (dead centre and pressure offset together).
namespace evenstroke::indicator {

enum Unknown : std::size_t {
    offset,      ///< degrees
    zero,        ///< bar
    wall_loss,   ///< multiple of the wall loss of the film formula
    level,       ///< the constant
    ratio,       ///< compression ratio against the entered one, relative
    closing,     ///< gas temperature at closing, K
    drift,       ///< what the zero moves in 180° of crank angle, bar; none at the closing
    unknown_count
};
using Unknowns = Row<unknown_count>;
using UnknownCovariance = Square<unknown_count>;

/// What is believed of an unknown before the card is looked at.
struct Belief
{
    double mean = 0.0;
    std::optional<double> spread; ///< one standard deviation; empty: nothing is believed
    bool held = false;            ///< stays at the mean; its spread is carried into what is found
};
using Beliefs = std::array<Belief, unknown_count>;

/// The samples between which the fit looks, and what it needs of the closing.
struct CompressionWindow
{
    std::span<const double> angle;    ///< as recorded, degrees, rising
    std::span<const double> pressure; ///< as recorded, bar absolute
    double noise = 0.03;              ///< bar, one standard deviation
    Parabola closing_pressure;        ///< recorded pressure over recorded angle from the closing to 8° after it
};

struct Calibration
{
    Unknowns values{};
    UnknownCovariance covariance{};
    double misfit = 0.0; ///< weighted root mean square of the residuals; near 1 where model and noise fit
    double widened = 1.0; ///< what the covariance was multiplied by for misfit and strain
    double strain = 0.0; ///< squares of how far the unknowns had to leave what was believed, in its spreads
    bool converged = false;
};

inline double zero_at(const Cylinder& cylinder, const Unknowns& x, double true_angle)
{
    return x[zero] + x[drift] * (true_angle - cylinder.closes) / 180.0;
}

/// Mass of the charge, kg, from the pressure 4° after closing.
double trapped_mass(const Cylinder& cylinder, const Parabola& closing_pressure, const Unknowns& x);

/// Lays the unfired line through the window. @return nothing where the rows do not determine the unknowns, or there
/// are fewer than 20 samples
std::optional<Calibration> calibrate(const Cylinder& cylinder, const WallLoss& walls, const CompressionWindow& window,
                                     const Beliefs& beliefs, const Unknowns& start);

/// The unfired line carried from the end of the window on: ln of bar at each true angle asked for.
/// @param true_angle rising, degrees; the first ones may lie before the window's end and are worked out backwards
std::vector<double> carry_line(const Cylinder& cylinder, const WallLoss& walls, const Unknowns& x,
                               const Parabola& closing_pressure, double from_angle, double from_log_pressure,
                               std::span<const double> true_angle);

/// ln of bar of the line at the window's last sample, and that sample's true angle.
struct LineEnd
{
    double angle = 0.0, log_pressure = 0.0;
};
LineEnd line_end(const Cylinder& cylinder, const WallLoss& walls, const CompressionWindow& window, const Unknowns& x);

} // namespace evenstroke::indicator
