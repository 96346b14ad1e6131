// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/trace_cycles.h"

#include <algorithm>
#include <cmath>
#include <iterator>
#include <limits>

namespace evenstroke::indicator {
namespace {

constexpr double nan = std::numeric_limits<double>::quiet_NaN();
constexpr double longest_gap = 6.0; // degrees that a monotone cubic may bridge

struct Grid
{
    double step = 0.0, first = 0.0;
    std::size_t places = 0;
    double angle(std::size_t i) const { return first + step * static_cast<double>(i); }
};

double middle_step(const RecordedCycle& cycle)
{
    std::vector<double> steps;
    for (std::size_t i = 1; i < cycle.angle.size(); ++i)
        steps.push_back(cycle.angle[i] - cycle.angle[i - 1]);
    if (steps.empty())
        return 0.0;
    const auto middle = steps.begin() + static_cast<std::ptrdiff_t>(steps.size() / 2);
    std::nth_element(steps.begin(), middle, steps.end());
    return *middle;
}

double nearest_usual_step(double step)
{
    double best = 0.1;
    for (const double usual : {0.1, 0.2, 0.25, 0.5, 1.0, 2.0})
        if (std::abs(std::log(usual / step)) < std::abs(std::log(best / step)))
            best = usual;
    return best;
}

/// The grid of a cycle's own samples where they stand on one that divides the period.
Grid own_grid(const RecordedCycle& cycle, double period)
{
    const double rough = middle_step(cycle);
    if (!(rough > 0.0))
        return {};
    const double count = std::round(period / rough);
    Grid grid{period / count, 0.0, static_cast<std::size_t>(count)};
    const double before = std::floor((cycle.angle.front() + 0.5 * period) / grid.step + 0.02);
    grid.first = cycle.angle.front() - before * grid.step;
    return grid;
}

/// Whether every sample stands within two hundredths of a step on the grid (angles are written rounded).
bool stands_on(const RecordedCycle& cycle, const Grid& grid)
{
    const double tolerance = 0.02 * grid.step + 1e-9;
    for (const double angle : cycle.angle) {
        const double place = (angle - grid.first) / grid.step;
        if (std::abs(place - std::round(place)) * grid.step > tolerance)
            return false;
    }
    return grid.places > 0;
}

std::vector<double> take_samples(const RecordedCycle& cycle, const Grid& grid)
{
    std::vector<double> pressure(grid.places, nan);
    for (std::size_t i = 0; i < cycle.angle.size(); ++i) {
        const auto place = static_cast<std::ptrdiff_t>(std::llround((cycle.angle[i] - grid.first) / grid.step));
        const auto count = static_cast<std::ptrdiff_t>(grid.places);
        double& slot = pressure[static_cast<std::size_t>(((place % count) + count) % count)];
        // Only the two ends of a record share a place.
        slot = std::isnan(slot) ? cycle.pressure[i]
                                : (std::isnan(cycle.pressure[i]) ? slot : 0.5 * (slot + cycle.pressure[i]));
    }
    return pressure;
}

/// Stretch by stretch between the gaps.
std::vector<double> resample(const RecordedCycle& cycle, const Grid& grid)
{
    std::vector<double> pressure(grid.places, nan), x, y, at;
    const auto lay = [&] {
        if (x.size() >= 2) {
            const auto first = static_cast<std::size_t>(std::max(0.0, std::ceil((x.front() - grid.first) / grid.step - 1e-9)));
            at.clear();
            for (std::size_t i = first; i < grid.places && grid.angle(i) <= x.back() + 1e-9; ++i)
                at.push_back(std::min(grid.angle(i), x.back()));
            const std::vector<double> laid = monotone_cubic(x, y, at);
            std::copy(laid.begin(), laid.end(), pressure.begin() + static_cast<std::ptrdiff_t>(first));
        }
        x.clear();
        y.clear();
    };
    for (std::size_t i = 0; i < cycle.angle.size(); ++i) {
        if (std::isnan(cycle.pressure[i]))
            continue;
        if (!x.empty() && cycle.angle[i] - x.back() > longest_gap)
            lay();
        if (x.empty() || cycle.angle[i] > x.back()) {
            x.push_back(cycle.angle[i]);
            y.push_back(cycle.pressure[i]);
        }
    }
    lay();
    return pressure;
}

double present(const std::vector<double>& pressure)
{
    const auto missing = std::count_if(pressure.begin(), pressure.end(), [](double p) { return std::isnan(p); });
    return 1.0 - static_cast<double>(missing) / static_cast<double>(pressure.size());
}

/// Begun and broken-off cycles at the ends of a recording say nothing that the whole ones do not.
void leave_out_partial(CleanTrace& trace)
{
    constexpr double whole = 0.9;
    for (const Cycle& cycle : trace.cycles)
        trace.share_present = std::max(trace.share_present, present(cycle.pressure));
    std::vector<Cycle> kept;
    for (Cycle& cycle : trace.cycles) {
        if (trace.share_present >= whole ? present(cycle.pressure) >= whole
                                         : present(cycle.pressure) >= 0.95 * trace.share_present)
            kept.push_back(std::move(cycle));
        else
            trace.partial_cycles.push_back(cycle.number);
    }
    trace.cycles = std::move(kept);
}

} // namespace

std::vector<double> monotone_cubic(std::span<const double> x, std::span<const double> y, std::span<const double> at)
{
    const std::size_t n = x.size();
    std::vector<double> slope(n, 0.0), chord(n - 1);
    for (std::size_t i = 0; i + 1 < n; ++i)
        chord[i] = (y[i + 1] - y[i]) / (x[i + 1] - x[i]);
    slope.front() = chord.front();
    slope.back() = chord.back();
    for (std::size_t i = 1; i + 1 < n; ++i) {
        if (chord[i - 1] * chord[i] <= 0.0)
            continue;
        const double left = x[i] - x[i - 1], right = x[i + 1] - x[i];
        slope[i] = 3.0 * (left + right) / ((2.0 * right + left) / chord[i - 1] + (right + 2.0 * left) / chord[i]);
    }
    std::vector<double> result;
    result.reserve(at.size());
    std::size_t i = 0;
    for (const double where : at) {
        while (i + 2 < n && where > x[i + 1])
            ++i;
        const double width = x[i + 1] - x[i], t = (where - x[i]) / width, u = 1.0 - t;
        result.push_back(y[i] * u * u * (1.0 + 2.0 * t) + y[i + 1] * t * t * (3.0 - 2.0 * t) +
                         width * t * u * (slope[i] * u - slope[i + 1] * t));
    }
    return result;
}

CleanTrace lay_on_grid(const std::vector<RecordedCycle>& cycles, const TraceFrame& frame)
{
    CleanTrace trace;
    const auto fullest = std::max_element(cycles.begin(), cycles.end(), [](const auto& a, const auto& b) {
        return a.angle.size() < b.angle.size();
    });
    Grid grid = own_grid(*fullest, frame.period());
    trace.coarse = grid.step > 2.0;
    if (!stands_on(*fullest, grid)) {
        const double step = nearest_usual_step(middle_step(*fullest));
        grid = {step, -0.5 * frame.period(), static_cast<std::size_t>(std::llround(frame.period() / step))};
    }
    trace.step = grid.step;
    for (std::size_t i = 0; i < grid.places; ++i)
        trace.angle.push_back(grid.angle(i));
    trace.filled.assign(grid.places, false);
    for (const RecordedCycle& recorded : cycles) {
        const bool even = stands_on(recorded, grid);
        trace.spikes += recorded.spikes;
        Cycle cycle{recorded.number, even ? take_samples(recorded, grid) : resample(recorded, grid), {}, {}};
        if (!even) {
            trace.uneven = true;
            cycle.own_angle = recorded.angle;
            cycle.own_pressure = recorded.pressure;
        }
        trace.cycles.push_back(std::move(cycle));
    }
    trace.share_present = 0.0;
    leave_out_partial(trace);
    return trace;
}

} // namespace evenstroke::indicator
