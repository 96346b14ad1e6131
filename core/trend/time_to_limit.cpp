// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift.h"
#include "core/trend/scan.h"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace evenstroke::drift {

namespace {

constexpr double grid_months = 0.25, farthest_months = 120.0;
/// The scatter of values counts 1.2 times: it is not quite independent from reading to reading. Found with
/// simulated engines: with it nine of ten 90 % intervals held.
constexpr double allowance = 1.2;

/// One straight line that starts to leave the level at `from`.
struct Line
{
    double from, slope, slope_sigma, log_weight;
};

std::optional<Line> fit_line(const RunningSums& sums, const RunningSums::Sums& all, double values_squared,
                             std::size_t onset, double from, double noise)
{
    const std::size_t last = sums.values().size() - 1;
    const auto fit = fit_ramp(sums, 0, onset, last, noise, from);
    if (!fit)
        return std::nullopt;
    const double slope = fit->size(noise), sigma = allowance * noise;
    const double left =
        values_squared - all.value * all.value / all.count - slope * slope * fit->shape_squared;
    return Line{from, slope, sigma / std::sqrt(fit->shape_squared),
                -left / (2.0 * sigma * sigma) - 0.5 * std::log(fit->shape_squared)};
}

double normal_below(double x)
{
    return 0.5 * std::erfc(-x / std::numbers::sqrt2);
}

double chance_reached(const std::vector<Line>& lines, double limit, double month)
{
    double reached = 0.0, total = 0.0;
    for (const Line& line : lines) {
        const double weight = std::exp(line.log_weight);
        const double slope = limit < 0.0 ? -line.slope : line.slope;
        reached += weight * normal_below((slope - std::abs(limit) / (month - line.from)) / line.slope_sigma);
        total += weight;
    }
    return reached / total;
}

/// First step of the grid at which the chance is reached; it only grows with time.
std::optional<double> months_until(const std::vector<Line>& lines, double limit, double now, double chance)
{
    const auto reached = [&](int step) {
        return chance_reached(lines, limit, now + step * grid_months) >= chance;
    };
    int low = 0, high = static_cast<int>(farthest_months / grid_months);
    if (!reached(high))
        return std::nullopt;
    while (low < high) {
        const int middle = (low + high) / 2;
        if (reached(middle))
            high = middle;
        else
            low = middle + 1;
    }
    return low * grid_months;
}

} // namespace

std::optional<TimeToLimit> time_to_limit(const std::vector<double>& months, const std::vector<double>& values,
                                         double noise, double limit)
{
    if (months.size() != values.size() || values.size() < readings_before_onset + readings_after_onset ||
        !(noise > 0.0) || limit == 0.0 || !std::isfinite(limit))
        return std::nullopt;
    RunningSums sums;
    double values_squared = 0.0;
    for (std::size_t i = 0; i < values.size(); ++i) {
        sums.add(months[i] - months.front(), values[i]);
        values_squared += values[i] * values[i];
    }
    const std::size_t last = values.size() - 1;
    const RunningSums::Sums all = sums.between(0, last);
    std::vector<Line> lines;
    for (std::size_t onset = std::max(readings_before_onset, last > onset_window ? last - onset_window : 0);
         onset < last; ++onset)
        if (const auto line =
                fit_line(sums, all, values_squared, onset, months[onset - 1] - months.front(), noise))
            lines.push_back(*line);
    if (lines.empty())
        return std::nullopt;
    const double heaviest =
        std::max_element(lines.begin(), lines.end(), [](const Line& one, const Line& other) {
            return one.log_weight < other.log_weight;
        })->log_weight;
    for (Line& line : lines)
        line.log_weight -= heaviest;
    const double now = months.back() - months.front();
    TimeToLimit time;
    time.months_5 = months_until(lines, limit, now, 0.05);
    time.months_50 = months_until(lines, limit, now, 0.50);
    time.months_95 = months_until(lines, limit, now, 0.95);
    time.may_be_reached = time.months_5 && *time.months_5 == 0.0;
    return time;
}

std::optional<TimeToLimit> time_to_limit(const Input& input, const Output& output, std::size_t channel,
                                         std::size_t cylinder, std::size_t reading, double limit)
{
    if (channel >= output.cells.size() || cylinder >= input.cylinders || reading >= input.readings())
        return std::nullopt;
    const auto cell = [&](std::size_t i) -> const CellResult& {
        return output.cells[channel][i * input.cylinders + cylinder];
    };
    std::vector<double> months, values;
    for (std::size_t i = cell(reading).segment_start; i <= reading; ++i)
        if (cell(i).used) {
            months.push_back(input.months[i]);
            values.push_back(cell(i).clipped);
        }
    return time_to_limit(months, values, cell(reading).noise, limit);
}

} // namespace evenstroke::drift
