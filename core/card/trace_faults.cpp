// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/trace_cycles.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke::indicator {
namespace {

constexpr double nan = std::numeric_limits<double>::quiet_NaN();
constexpr double smallest_spike = 0.5; // bar
constexpr double longest_gap = 6.0;    // degrees
constexpr double longest_gap_at_peak = 2.0, around_peak = 10.0;

struct SpikeRun
{
    std::size_t first, length;
};

/// Sticks out of both neighbours by more than the limit, to the same side.
bool sticks_out(double before, double here, double after, double limit)
{
    const double left = here - before, right = here - after;
    return (left > limit && right > limit) || (left < -limit && right < -limit);
}

/// Round the end of the cycle as well.
std::vector<SpikeRun> find_spikes(const std::vector<double>& p, double limit)
{
    std::vector<SpikeRun> runs;
    const std::size_t n = p.size();
    for (std::size_t i = 0; i < n; ++i) {
        const double before = p[(i + n - 1) % n], here = p[i], next = p[(i + 1) % n], after = p[(i + 2) % n];
        if (sticks_out(before, here, next, limit))
            runs.push_back({i++, 1});
        else if (sticks_out(before, here, after, limit) && sticks_out(before, next, after, limit) &&
                 std::abs(after - before) < std::abs(here - before))
            runs.push_back({i, 2}), i += 2;
    }
    return runs;
}

double median_of(std::vector<double>& values)
{
    const auto middle = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
    std::nth_element(values.begin(), middle, values.end());
    return *middle;
}

/// ln(p + c) between two samples.
double between(double left, double right, double share, double c)
{
    return std::exp((1.0 - share) * std::log(left + c) + share * std::log(right + c)) - c;
}

} // namespace

double find_noise(std::span<const double> angle, std::span<const double> pressure)
{
    std::vector<double> third;
    third.reserve(angle.size() / 4);
    for (std::size_t i = 0; i + 3 < angle.size(); ++i)
        if (angle[i] >= -70.0 && angle[i + 3] <= -20.0) {
            const double d = pressure[i + 3] - 3.0 * pressure[i + 2] + 3.0 * pressure[i + 1] - pressure[i];
            if (std::isfinite(d))
                third.push_back(d);
        }
    if (third.size() < 10)
        return 0.0;
    const double middle = median_of(third);
    for (double& d : third)
        d = std::abs(d - middle);
    return 1.4826 * median_of(third) / std::sqrt(20.0);
}

void remove_spikes(CleanTrace& trace, Cycle& cycle, double noise)
{
    constexpr std::size_t most_in_a_row = 3;
    constexpr double near = 5.0, rings_around = 10.0; // degrees
    const std::vector<SpikeRun> runs = find_spikes(cycle.pressure, std::max(8.0 * noise, smallest_spike));
    const auto count_within = [&](double here, double width) {
        return static_cast<std::size_t>(std::count_if(runs.begin(), runs.end(), [&](const SpikeRun& other) {
            return std::abs(trace.angle[other.first] - here) <= width;
        }));
    };
    for (const SpikeRun& run : runs)
        if (!trace.ringing && count_within(trace.angle[run.first], near) > most_in_a_row) {
            trace.ringing = true;
            trace.ringing_at = trace.angle[run.first];
        }
    for (const SpikeRun& run : runs) {
        // What stands together rings, and so does what stands near a place where another cycle rings.
        const double here = trace.angle[run.first];
        if (count_within(here, near) > most_in_a_row ||
            (trace.ringing && std::abs(here - trace.ringing_at) <= rings_around))
            continue;
        ++trace.spikes;
        for (std::size_t k = 0; k < run.length; ++k)
            cycle.pressure[(run.first + k) % cycle.pressure.size()] = nan;
    }
}

void fill_gaps(CleanTrace& trace, Cycle& cycle)
{
    std::vector<double>& p = cycle.pressure;
    const std::size_t n = p.size();
    double lowest = 1e9, highest = -1e9, peak_angle = 0.0;
    std::size_t start = n;
    for (std::size_t i = 0; i < n; ++i) {
        if (std::isnan(p[i]))
            continue;
        start = std::min(start, i);
        lowest = std::min(lowest, p[i]);
        if (p[i] > highest)
            highest = p[i], peak_angle = trace.angle[i];
    }
    if (start == n)
        return;
    const double c = 10.0 - lowest;
    for (std::size_t k = 1; k <= n; ++k) { // once round, from a sample that is there
        const std::size_t from = (start + k - 1) % n;
        if (!std::isnan(p[(from + 1) % n]))
            continue;
        std::size_t length = 1;
        while (std::isnan(p[(from + 1 + length) % n]))
            ++length;
        const std::size_t to = (from + 1 + length) % n;
        const double wide = static_cast<double>(length) * trace.step, middle = trace.angle[from] + 0.5 * wide;
        const bool at_peak = std::abs(middle - peak_angle) < around_peak + 0.5 * wide;
        // Round bottom centre the ends may be joined over a longer way: it costs hardly any work there.
        const bool at_bottom = to < from && wide <= 0.1 * trace.step * static_cast<double>(n);
        if (wide <= (at_peak ? longest_gap_at_peak : longest_gap) + 1e-9 || at_bottom)
            for (std::size_t i = 1; i <= length; ++i) {
                const double share = static_cast<double>(i) / static_cast<double>(length + 1);
                p[(from + i) % n] = between(p[from], p[to], share, c);
                trace.filled[(from + i) % n] = true;
            }
        else
            trace.gaps.push_back({trace.angle[from], trace.angle[to]});
        k += length;
    }
}

void average(CleanTrace& trace, const std::vector<double>& mean_pressures)
{
    const std::size_t n = trace.angle.size();
    if (mean_pressures.size() == trace.cycles.size() && mean_pressures.size() > 2) {
        std::vector<double> sorted = mean_pressures;
        const double middle = median_of(sorted);
        for (std::size_t i = 0; i < mean_pressures.size(); ++i)
            if (std::abs(mean_pressures[i] - middle) > 0.05 * std::abs(middle))
                trace.unlike_cycles.push_back(trace.cycles[i].number);
        trace.median = !trace.unlike_cycles.empty();
    }
    trace.mean.assign(n, 0.0);
    std::vector<double> column(trace.cycles.size());
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t c = 0; c < column.size(); ++c)
            column[c] = trace.cycles[c].pressure[i];
        if (trace.median && std::none_of(column.begin(), column.end(), [](double p) { return std::isnan(p); }))
            trace.mean[i] = median_of(column);
        else
            for (const double p : column)
                trace.mean[i] += p / static_cast<double>(column.size());
    }
    trace.noise_mean = find_noise(trace.angle, trace.mean);
}

} // namespace evenstroke::indicator
