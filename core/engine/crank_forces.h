// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/slider_crank.h"

#include <optional>
#include <span>
#include <vector>

/// Forces in the crank gear from the pressure over the piston, and the moment that turns the shaft.
///
///     F = (p - p_below) A - m ω² d²x/dθ²     along the cylinder axis, positive towards the crankshaft
///     N = F tan φ                            on the guide (crosshead) or the liner (trunk piston)
///     M = F dx/dθ = F r sin(θ + φ) / cos φ   on the crankshaft, positive in the sense of running
///
/// Rigid links, no friction, no weight, the rod's own turning left out: what of the rod moves with the piston
/// is part of m. Source: algebra of the slider crank (slider_crank.h).
namespace evenstroke {

using Force = Measured<si::force>;

/// What acts beside the gas over the piston.
struct CrankLoad
{
    /// Scavenge space (crosshead engine) or crankcase (trunk piston), taken as constant over the cycle.
    std::optional<AbsolutePressure> below_piston;
    /// Piston, rod, crosshead and the rod's share; empty: gas force only, and a page must say so.
    std::optional<Mass> moving_mass;
    std::optional<Frequency> speed; ///< needed with a mass only
};

/// What is wrong with a load; nothing where it can be used.
std::optional<Problem> find_problem(const CrankLoad& load);

struct CrankForces
{
    Force piston{};
    Force guide{};
    Torque turning_moment{};
};

/// Forces at one angle.
/// @param cylinder absolute gas pressure, above 0, up to 500 bar (no engine exceeds it, common practice)
/// @par Problems not_found: pressure below the piston not entered, or speed missing where a mass is entered;
///      invalid_input: a pressure outside its range, negative mass or speed, angle no number
Result<CrankForces> crank_forces(const SliderCrank& gear, PlaneAngle crank_angle, AbsolutePressure cylinder,
                                 const CrankLoad& load);

/// Forces at one place of the crank gear in plain numbers, for loops over a card: N, N, N·m.
struct PlainCrankForces
{
    double piston, guide, turning_moment;
};

/// All that does not change over the card. The load must be one without a problem.
class CrankForceRule
{
public:
    CrankForceRule(const SliderCrank& gear, const CrankLoad& load);
    /// @param pressure absolute [Pa]
    PlainCrankForces at(const CrankMotion& here, double pressure) const
    {
        const double force = (pressure - below_) * area_ - inertia_ * here.curvature;
        return {force, force * here.sine_of_rod / here.cosine_of_rod, force * here.slope};
    }

private:
    double area_, below_, inertia_ = 0.0; // m², Pa, kg rad²/s²
};

/// Forces over a whole card in plain numbers, one entry a sample: N, N, N·m.
struct CrankForceCurve
{
    std::vector<double> piston, guide, turning_moment;
    bool gas_force_only = true; ///< no moving mass was entered
};

/// @param angle crank angles [rad]  @param pressure absolute gas pressure at the same samples [Pa]
/// @par Problems as crank_forces, the first unusable sample named by its number; different numbers of samples
Result<CrankForceCurve> crank_forces(const SliderCrank& gear, std::span<const double> angle,
                                     std::span<const double> pressure, const CrankLoad& load);

/// Mean over the cycle of a moment by the trapezoidal rule. Times the cycle's angle it is the indicated work
/// of the card (the pressure below the piston and the mass add nothing over whole revolutions).
/// @param angle [rad], never falling, spanning 2π (two-stroke) or 4π (four-stroke) within 1e-6; the first
///        point is repeated at the end. Two samples at one angle are a jump.
/// @param moment [N·m] at the same samples
/// @par Problems invalid_input: other spans, different numbers of samples, fewer than 3, falling angles
Result<Torque> mean_turning_moment(std::span<const double> angle, std::span<const double> moment);

} // namespace evenstroke
