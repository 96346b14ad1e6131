// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// The load diagram: how far a state of the engine lies from the limits of its power and speed.
///
/// With x = speed over rated speed and y = power over rated power:
///
///     propeller curve   y = x³               light curve   y = (x / (1 + m))³
///     mean effective pressure (torque)       y <= f x
///     torque and speed (scavenge air)        y <= c x^k       for x < x_1
///     speed                                  x <= x_max
///     continuous power                       y <= 1           overload up to y_over, for a time
///
/// General form of marine engines' load diagrams (common practice); the numbers are the maker's and entered
/// for each engine, none is shipped. The maker's own diagram prevails.
namespace evenstroke {

/// Limits of one engine, as parts of rated power and speed.
struct LoadLimits
{
    std::optional<double> mean_effective_pressure; ///< f, 1 where the limit is that of the rating
    std::optional<double> torque_exponent;         ///< k, 2 to 2.5 usual
    std::optional<double> torque_below_speed;      ///< x_1; needed with the exponent
    double torque_factor = 1.0;                    ///< c
    std::optional<double> highest_speed;           ///< x_max, 1.04 to 1.05 usual
    std::optional<double> overload;                ///< y_over, such as 1.1; empty: no overload permitted
    std::optional<double> light_running_margin;    ///< m, such as 0.05: draws the light curve
    bool constant_speed = false; ///< generating set: power does not follow the propeller law
    std::string source;          ///< where the numbers come from
};

enum class LoadLimit { mean_effective_pressure, torque_and_speed, speed, power };
/// "mean effective pressure limit", as a sentence names it.
std::string_view load_limit_text(LoadLimit limit);

/// Distance to one limit.
struct LoadMargin
{
    LoadLimit limit = LoadLimit::power;
    double power_percent = 0.0; ///< of rated power: positive within, negative beyond the limit
};

/// Where a state lies in the diagram.
struct LoadState
{
    double speed_percent = 0.0, power_percent = 0.0; ///< of the rating
    std::vector<LoadMargin> margins;                 ///< every limit that applies here, nearest first
    bool beyond = false;                             ///< the nearest limit is exceeded
    bool within_overload = false; ///< only continuous power is exceeded, by no more than the overload
    std::string sentence;         ///< the nearest limit and the distance, or what is exceeded
};

/// One engine's diagram.
class LoadDiagram
{
public:
    /// @par Problems not_found: rated power or speed is 0, so not entered; the torque limit's exponent
    ///      without its speed; invalid_input: a number that cannot be: f and c 0.5 to 1.5, k 1 to 4,
    ///      x_1 0.3 to 1.2, x_max 1 to 1.3, y_over 1 to 1.3, m -0.1 to 0.3 (wider than any maker's; common
    ///      practice)
    static Result<LoadDiagram> make(Power rated_power, Frequency rated_speed, const LoadLimits& limits);

    /// Distances in per cent of rated power: at the same speed for limits of power; for the speed limit,
    /// along the propeller law through the state, y ((x_max/x)³ - 1). On a generating set (constant_speed)
    /// the speed limit counts only where it is exceeded. Validity: speed from 10 to 140 % and power from 0 to
    /// 150 % of the rating.
    /// @par Problems not_found: power or speed missing; invalid_input: outside the validity
    Result<LoadState> locate(std::optional<Power> power, std::optional<Frequency> speed) const;

    /// @name Curves for a plot, in parts of the rating; empty where the curve or its part is not entered.
    ///@{
    static double propeller_curve(double x) { return x * x * x; }
    std::optional<double> light_curve(double x) const;
    std::optional<double> mean_effective_pressure_limit(double x) const;
    std::optional<double> torque_and_speed_limit(double x) const;
    /// The lowest limit of power at this speed; empty beyond the highest speed.
    std::optional<double> highest_power(double x) const;
    const LoadLimits& limits() const { return limits_; }
    ///@}

private:
    LoadDiagram(double power, double speed, LoadLimits limits)
        : rated_watts_(power), rated_speed_(speed), limits_(std::move(limits))
    {
    }
    std::vector<LoadMargin> margins(double x, double y) const;

    double rated_watts_, rated_speed_; // W, 1/s
    LoadLimits limits_;
};

} // namespace evenstroke
