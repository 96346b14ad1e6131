// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/working_gas.h"
#include "core/engine/slider_crank.h"

#include <cmath>

namespace evenstroke::indicator {

inline constexpr double radians_per_degree = 3.14159265358979323846 / 180.0;

/// What the energy balance needs of engine and reading. Plain numbers: degrees after firing dead centre, bar
/// absolute, kelvin, metres.
struct Cylinder
{
    SliderCrank gear;
    double compression_ratio = 0.0; ///< geometric, as entered
    double closes = 0.0, opens = 0.0;
    bool two_stroke = true;
    double speed_rpm = 0.0;
    double wall_kelvin = 0.0;
    double closing_kelvin = 0.0;
    double residual_share = 0.03; ///< burnt gas in the charge, common practice, no source

    double period() const { return two_stroke ? 360.0 : 720.0; }
    double clearance(double ratio) const { return gear.swept_volume().value() / (ratio - 1.0); }
};

/// The walls around the gas: 2.15 piston areas for crown and cover (common practice) and the liner down to the piston.
/// Their film is Woschni's of 1967 without the combustion term, scaled from one value of `woschni_film`.
class WallLoss
{
public:
    explicit WallLoss(const Cylinder& cylinder);
    /// J a degree of crank angle. @param log_pressure ln of bar  @param position piston from the top, m
    double per_degree(double log_pressure, double kelvin, double position) const
    {
        const double film = film_ * std::exp(0.8 * log_pressure - 0.53 * std::log(kelvin));
        return film * (ends_ + around_ * position) * (kelvin - wall_kelvin_);
    }

private:
    double film_ = 0.0, ends_ = 0.0, around_ = 0.0, wall_kelvin_ = 0.0;
};

/// Where the gas is on a compression without combustion: d(ln p)/dθ = -slope.
struct UnfiredSlope
{
    double per_degree = 0.0;
    double kelvin = 0.0;
};

/// The energy balance of the closed cylinder for one set of unknowns.
class UnfiredBalance
{
public:
    UnfiredBalance(const Cylinder& cylinder, const WallLoss& walls, double clearance, double mass, double wall_multiplier)
        : gear_(cylinder.gear), gas_(cylinder.residual_share), walls_(walls), clearance_(clearance), mass_(mass),
          multiplier_(wall_multiplier)
    {
    }
    /// @param angle true, degrees  @param pressure bar absolute, above 0
    UnfiredSlope slope(double angle, double pressure, double log_pressure) const
    {
        return slope(gear_.motion(angle * radians_per_degree), pressure, log_pressure);
    }
    UnfiredSlope slope(const CrankMotion& crank, double pressure, double log_pressure) const
    {
        const double volume = clearance_ + gear_.area() * crank.position;
        const GasMoment moment = gas_moment(gas_, pressure * 1e5, volume, mass_);
        const double compression = gear_.area() * crank.slope * radians_per_degree / volume;
        const double loss = multiplier_ * walls_.per_degree(log_pressure, moment.temperature, crank.position);
        return {moment.exponent * compression + moment.stiffness * loss / (pressure * 1e5 * volume), moment.temperature};
    }

private:
    const SliderCrank& gear_;
    WorkingGas gas_;
    const WallLoss& walls_;
    double clearance_, mass_, multiplier_;
};

} // namespace evenstroke::indicator
