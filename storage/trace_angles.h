// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/trace_layout.h"

namespace evenstroke::storage {

/// The crank angles of a file's samples: sorted into cycles as they come, brought into one period afterwards.
class TraceAngles
{
public:
    /// @param period  degrees of one working cycle
    TraceAngles(const TraceLayout& layout, double period) : layout_(layout), period_(period) {}

    void reserve(std::size_t samples);
    std::size_t samples() const { return angle_.size(); }
    /// @param value  what the file says of the sample: degrees, a time, or how many samples stand before it
    /// @par Problems invalid_input: it does not go on from the sample before
    Done add(double value, std::optional<int> cycle);
    /// The trace of one column of pressures, bar; NaN where one is missing. Counts those.
    CardTrace trace(const std::vector<double>& pressure, int& missing) const;

private:
    double angle_of(double value);
    bool begins_cycle(double angle, std::optional<int> cycle) const;
    Problem steps_back(double value) const;
    void add_cycle(std::size_t from, std::size_t to, const std::vector<double>& pressure,
                   CardTrace& trace) const;

    const TraceLayout& layout_;
    double period_;
    std::vector<double> angle_; ///< after firing dead centre, as the file goes on
    std::vector<int> cycle_;
    std::optional<int> named_; ///< cycle of the last sample, as the file counts
    double cycle_began_ = 0.0, first_time_ = 0.0, last_value_ = 0.0;
};

} // namespace evenstroke::storage
