// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"

#include <algorithm>
#include <optional>
#include <span>
#include <string>
#include <vector>

/// From the samples of a file to cycles on one even grid: what is missing, what sticks out, how noisy it is.
namespace evenstroke::indicator {

/// A trace as it was recorded.
struct Trace
{
    std::vector<int> cycle;       ///< number of the cycle a sample; empty: a fall of the angle begins a new one
    std::vector<double> angle;    ///< degrees, firing dead centre 0
    std::vector<double> pressure; ///< bar absolute; NaN where the sample is missing
};

/// The engine's side of a trace. Angles in degrees after firing dead centre; empty: not known.
struct TraceFrame
{
    bool two_stroke = true;
    std::optional<double> closes, opens;
    double period() const { return two_stroke ? 360.0 : 720.0; }
    double compression_begins() const { return closes ? std::max(*closes, -75.0) : -75.0; }
};

/// One cycle on the grid.
struct Cycle
{
    int number = 1;
    std::vector<double> pressure;                 ///< bar abs; NaN where a gap was too long to fill
    std::vector<double> own_angle, own_pressure;  ///< the recorded points, where they are not on an even grid
};

struct Gap
{
    double from = 0.0, to = 0.0; ///< degrees: the last sample before and the first after it
};

struct CleanTrace
{
    double step = 0.0;            ///< degrees
    std::vector<double> angle;    ///< the grid: one period, its end left out
    std::vector<Cycle> cycles;    ///< at least one
    std::vector<double> mean;     ///< cycle that everything but the spread is worked out from
    std::vector<bool> filled;     ///< grid places where a cycle had no sample
    std::vector<Gap> gaps;        ///< too long to fill, in any cycle
    double share_present = 1.0;   ///< of a period, in the fullest cycle
    double noise_one = 0.0;       ///< of one cycle, bar, one standard deviation
    double noise_mean = 0.0;      ///< of the mean cycle
    int spikes = 0;               ///< taken out
    bool ringing = false;         ///< sticks out too often to be spikes
    double ringing_at = 0.0;      ///< degrees
    bool coarse = false;          ///< steps above 2°
    bool uneven = false;          ///< laid onto an even grid
    bool median = false;          ///< the mean is a median: a cycle is far from the others
    std::vector<int> partial_cycles; ///< left out because they do not hold a whole period
    std::vector<int> unlike_cycles;  ///< mean indicated pressure over 5 % from the middle one

    bool complete() const { return share_present >= 0.9; }
    /// Whether all grid places from..to of the mean have a value.
    bool covers(double from, double to) const;
};

inline constexpr std::size_t most_samples = 4'000'000; ///< 500 cycles of a four-stroke in tenths of a degree

/// @par Problems invalid_input, naming the sample: no or too few samples, angles that fall or stand twice, more than
///      one period in a cycle, all pressures the same, pressures outside -6 to 400 bar, a compression that is not
///      covered
Result<CleanTrace> clean(const Trace& trace, const TraceFrame& frame);

/// One standard deviation of the white part, bar: third differences from 70° to 20° before dead centre.
double find_noise(std::span<const double> angle, std::span<const double> pressure);

/// Monotone cubic through the points (F. N. Fritsch, R. E. Carlson, SIAM J. Numer. Anal. 17, 1980).
/// @param x,y at least two points, x rising  @param at rising, within x
std::vector<double> monotone_cubic(std::span<const double> x, std::span<const double> y, std::span<const double> at);

} // namespace evenstroke::indicator
