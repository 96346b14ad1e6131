// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <cmath>

/// The crank gear: where the piston is at a crank angle, and how fast it moves there.
///
/// Exact for rigid links and a cylinder whose axis meets that of the crankshaft (no offset):
///
///     r = S/2;  q = √(ℓ² - r² sin²θ);  x = r (1 - cos θ) + ℓ - q         from top dead centre
///     dx/dθ   = r sin θ + r² sin θ cos θ / q
///     d²x/dθ² = r cos θ + r² cos 2θ / q + r⁴ sin²θ cos²θ / q³
///     sin φ   = (r/ℓ) sin θ                                              φ: rod against the cylinder axis
///
/// Source: algebra; the form is that of J. B. Heywood, Internal Combustion Engine Fundamentals, chapter 2
/// (from memory). Crank angles are positive after firing dead centre.
namespace evenstroke {

using LengthPerAngle = decltype(Length{} / PlaneAngle{});                       ///< m/rad
using LengthPerSquaredAngle = decltype(Length{} / PlaneAngle{} / PlaneAngle{}); ///< m/rad²

/// An angle from degrees of crank.
inline PlaneAngle crank_degrees(double degrees)
{
    return degrees * 3.14159265358979323846 / 180.0 * si::radians;
}
inline double in_degrees(PlaneAngle angle)
{
    return angle.value() * 180.0 / 3.14159265358979323846;
}

/// The gear at one angle, in plain numbers: m, m/rad, m/rad², and the rod's angle by its sine and cosine.
struct CrankMotion
{
    double position, slope, curvature, sine_of_rod, cosine_of_rod;
};

/// The same with units.
struct PistonPosition
{
    Length from_top{};                 ///< x: travel from top dead centre
    LengthPerAngle slope{};            ///< dx/dθ
    LengthPerSquaredAngle curvature{}; ///< d²x/dθ²
    PlaneAngle rod_angle{};            ///< φ, positive on the down stroke after firing dead centre
};

/// Sizes of one cylinder's crank gear, known to be possible.
class SliderCrank
{
public:
    /// @param bore up to 2 m, stroke up to 5 m, rod_length up to 10 m (sizes no engine exceeds, common
    ///        practice); the rod is longer than half of the stroke
    /// @par Problems not_found: a size is 0, so not entered; invalid_input: outside what is stated here
    static Result<SliderCrank> make(Length bore, Length stroke, Length rod_length);

    /// @par Problems invalid_input: the angle is no number
    Result<PistonPosition> at(PlaneAngle crank_angle) const;

    Area piston_area() const { return Area::from_value(area_); }
    Volume swept_volume() const { return Volume::from_value(area_ * 2.0 * radius_); }

    /// Volume at top dead centre: V_s / (ε - 1).
    /// @param compression_ratio geometric, V at bottom over V at top dead centre: above 1, at most 50 (no
    ///        engine exceeds it, common practice)
    /// @par Problems invalid_input: outside that range
    Result<Volume> clearance_volume(double compression_ratio) const;

    /// Gas volume at a crank angle. @par Problems invalid_input: angle no number, ratio as clearance_volume
    Result<Volume> volume_at(PlaneAngle crank_angle, double compression_ratio) const;

    /// Volume where the cylinder closes over that at top dead centre: what the charge is compressed by.
    /// @param closes within 270° of firing dead centre; its sign plays no part
    /// @par Problems invalid_input: angle outside that range, ratio as clearance_volume
    Result<double> effective_compression_ratio(PlaneAngle closes, double compression_ratio) const;

    /// Two strokes a revolution: 2 S n. @par Problems invalid_input: speed negative or no number
    Result<Velocity> mean_piston_speed(Frequency speed) const;

    /// @name Plain numbers for whole cards: SI, radians, no checks; the angle must be a finite number.
    /// One sine, one cosine, one root a point.
    ///@{
    CrankMotion motion(double angle) const
    {
        return motion(std::sin(angle), std::cos(angle));
    }
    /// The same from the sine and the cosine of the angle, for who has them.
    CrankMotion motion(double sine, double cosine) const
    {
        const double side = radius_ * sine, along = radius_ * cosine;
        const double q = std::sqrt((rod_ - side) * (rod_ + side));
        const double slope = side * (1.0 + along / q);
        const double turn = side * along / q;
        // 1 - cos θ and ℓ - q as quotients: no digits are lost near dead centre.
        const double lift = cosine > 0.0 ? radius_ * sine * sine / (1.0 + cosine) : radius_ - along;
        return {lift + side * side / (rod_ + q), slope,
                along + (along * along - side * side + turn * turn) / q, side / rod_, q / rod_};
    }
    double position(double angle) const { return motion(angle).position; }
    double volume(double angle, double clearance) const { return clearance + area_ * position(angle); }
    double area() const { return area_; }
    double radius() const { return radius_; }
    ///@}

private:
    SliderCrank(double area, double radius, double rod) : area_(area), radius_(radius), rod_(rod) {}
    double area_, radius_, rod_; // m², m, m
};

} // namespace evenstroke
