// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/slider_crank.h"
#include "core/problem.h"

#include <optional>
#include <string>
#include <vector>

/// The turning moments of all cylinders on one shaft, and how much their sum swings.
///
/// Rigid shaft: what twists it, and any resonance, is not in here. Source: addition.
namespace evenstroke {

/// Crank angle of a whole cycle: two strokes, one revolution; four strokes, two.
inline PlaneAngle cycle_angle(bool two_stroke)
{
    return crank_degrees(two_stroke ? 360.0 : 720.0);
}

/// One cylinder's moment over one cycle against its own crank angle.
struct CylinderMoment
{
    std::string cylinder;       ///< as the engine names it, for a sentence
    PlaneAngle fires_at{};      ///< angle of the shaft at which this cylinder is in firing dead centre
    std::vector<double> angle;  ///< [rad] after own firing dead centre, never falling, spanning one cycle
    std::vector<double> moment; ///< [N m] at the same samples
};

struct ShaftMoment
{
    std::vector<double> angle;  ///< [rad] of the shaft, from 0, evenly spaced, the cycle's end left out
    std::vector<double> moment; ///< [N m]
    Torque mean{}, highest{}, lowest{};
    /// (highest - lowest) / mean; empty where the mean is not above 0.
    std::optional<double> variation;
};

/// Angles of the shaft at which the cylinders fire, evenly spaced: the first of the order at 0. In the order
/// of cylinder numbers. A vee engine that fires unevenly needs its own angles.
/// @par Problems not_found: no order entered; invalid_input: it does not name each cylinder once
Result<std::vector<PlaneAngle>> even_firing_angles(const std::vector<int>& firing_order, int cylinders,
                                                   PlaneAngle cycle);

/// Sum over the cylinders at evenly spaced angles, straight lines between the samples of a card.
/// @param points 36 to 100000 over the cycle
/// @par Problems not_found: no cylinder, or one without a card (named): a sum without it would be wrong;
///      invalid_input: a card that does not span the cycle (within 1e-6 rad), angles that fall, values that
///      are no numbers, a cycle other than 360 or 720°
Result<ShaftMoment> shaft_moment(const std::vector<CylinderMoment>& cylinders, PlaneAngle cycle,
                                 std::size_t points = 720);

} // namespace evenstroke
