// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/trace.h"

namespace evenstroke::indicator {

/// The recorded samples of one cycle, rising within one period.
struct RecordedCycle
{
    int number = 1;
    int spikes = 0; ///< samples that no cylinder has, now missing
    std::vector<double> angle, pressure;
};

/// @par Problems as `clean` says of angles and pressures
Result<std::vector<RecordedCycle>> split_cycles(const Trace& trace, const TraceFrame& frame);

/// Lays the cycles onto one even grid; NaN where there is no sample.
CleanTrace lay_on_grid(const std::vector<RecordedCycle>& cycles, const TraceFrame& frame);

/// Takes out what sticks out of both neighbours, one or two samples long; counts, and says where it rings instead.
void remove_spikes(CleanTrace& trace, Cycle& cycle, double noise);

/// Fills short gaps along the straight line of ln(p + c) and lists the others.
void fill_gaps(CleanTrace& trace, Cycle& cycle);

/// Mean over the cycles, or the median where a cycle's work is more than 5 % from the middle one.
void average(CleanTrace& trace, const std::vector<double>& mean_pressures);

} // namespace evenstroke::indicator
