// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <optional>

/// The engine and its propeller, fixed pitch and driven without a gear: the speed is that of both.
/// Problems everywhere: not_found: an input is missing (named). invalid_input: one cannot be.
namespace evenstroke {

/// A point that the propeller curve goes through; the rating, where nothing better is known.
struct PropellerPoint
{
    std::optional<Power> power;
    std::optional<Frequency> speed;
};

/// P = P_ref (n / n_ref)³, and the speed that goes with a power.
/// @par Source the cube law of propellers; common practice for displacement ships
/// @par Validity one loading, hull and weather; the exponent is nearer 3.2 to 4 for fast ships (from memory)
Result<Power> power_on_propeller_curve(std::optional<Frequency> speed, const PropellerPoint& through);
Result<Frequency> speed_on_propeller_curve(std::optional<Power> power, const PropellerPoint& through);

/// How much faster than on the curve the shaft turns at this power: n / n_curve(P) - 1. Negative: heavy running.
/// A newly cleaned hull has 4 to 7 % (common practice); a margin that falls at the same power is a heavier
/// propeller: growth, damage, weather.
Result<Ratio> light_running_margin(std::optional<Power> power, std::optional<Frequency> speed,
                                   const PropellerPoint& rating);

/// 1 - V / (p n). @param through_water by the log, not over ground @param pitch of the propeller
/// @par Source definition @par Validity going ahead
Result<Ratio> apparent_slip(std::optional<Velocity> through_water, std::optional<Length> pitch,
                            std::optional<Frequency> speed);

/// The same with the water that the hull drags along: 1 - (1 - w) V / (p n).
/// @param wake_fraction w, below 1 @par Source definition
Result<Ratio> real_slip(std::optional<Velocity> through_water, std::optional<Length> pitch,
                        std::optional<Frequency> speed, std::optional<Ratio> wake_fraction);

/// Δ^(2/3) V³ / P with the trade's own units: tonnes, knots, kilowatts. For one ship over time only.
/// @par Source admiralty formula; common practice
Result<double> admiralty_coefficient(std::optional<Mass> displacement, std::optional<Velocity> through_water,
                                     std::optional<Power> power);

/// 1852 m an hour, by definition.
inline Velocity knots(double speed) { return speed * (1852.0 / 3600.0) * si::metres_per_second; }

} // namespace evenstroke
