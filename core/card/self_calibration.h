// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

namespace evenstroke::indicator {

/// The mean cycle in steps of about half a degree: what fit and heat release work on.
struct ThinTrace
{
    std::vector<double> angle, pressure; ///< as recorded
    double step = 0.5, noise = 0.0;      ///< degrees; bar, one standard deviation
};
/// Means of blocks of samples, freed of what the curve's bend adds to a mean.
ThinTrace make_thin(const CleanTrace& trace);

/// Engine and reading as the balance takes them, with what is only assumed.
struct Setting
{
    Cylinder cylinder;
    std::optional<double> scavenge;  ///< bar abs
    double closing_spread = 5.2;     ///< K, one standard deviation
    std::optional<double> known_offset, fuel_heat; ///< degrees; J a cycle
    std::optional<double> known_offset_spread;     ///< degrees, one standard deviation
    bool closing_known = true, speed_known = true;
};

struct SelfCalibration
{
    CalibrationMethod method = CalibrationMethod::offset_assumed;
    Calibration fit;
    Unknowns believed{};                         ///< standard deviations of the beliefs of that fit; 0: none
    double own_offset = 0.0, own_offset_spread = 0.0; ///< degrees, of this card alone
    double own_offset_noise = 0.0; ///< of that spread what the engine's other cards do not share
    Parabola closing_pressure;
    CompressionWindow window;                    ///< the samples of the fit; views of the thin trace
    double window_from = 0.0, window_to = 0.0;   ///< true degrees
    LineEnd end;
    std::vector<double> line_angle, line_log;    ///< true degrees, ln of bar; from the window's end on
    std::optional<CombustionStart> start;        ///< empty: nothing burns
    double highest_excess = 0.0;                 ///< ln p over the line, largest
    double wall_multiplier = 1.0;                ///< with the entered compression ratio held
    double compared_wall = 1.0, compared_wall_spread = 0.0; ///< the same at the installation's offset; from noise alone
    double pegged_zero = 0.0;                    ///< zero that the charge pressure asks for
    bool doubtful = false;                       ///< multiplier outside -1 to 4, or more heat than fuel
};

/// The samples from `from` to `to` (true degrees) of a trace recorded with this offset.
CompressionWindow make_window(const ThinTrace& trace, const Parabola& closing_pressure, double recorded_offset, double from,
                              double to);

/// Zero, in bar, that makes the pressure after closing what the charge pressure asks for.
std::optional<double> peg_zero(const ThinTrace& trace, const Setting& setting, double recorded_offset);

/// @param trace outlives the answer  @return nothing where the compression does not determine anything
std::optional<SelfCalibration> self_calibrate(const ThinTrace& trace, const Setting& setting);

} // namespace evenstroke::indicator
