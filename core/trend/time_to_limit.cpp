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

namespace {

/// What was judged at one place, reading by reading; nothing where there is no such place.
struct Track
{
    const CellResult* first = nullptr;
    std::size_t step = 1;
    const CellResult& at(std::size_t reading) const { return first[reading * step]; }
};

std::optional<Track> find_track(const Input& input, const Output& output, std::size_t channel,
                                std::optional<std::size_t> cylinder, std::size_t reading)
{
    if (reading >= input.readings())
        return std::nullopt;
    if (!cylinder)
        return channel < output.engine_cells.size()
                   ? std::optional(Track{output.engine_cells[channel].data(), 1})
                   : std::nullopt;
    if (channel >= output.cells.size() || *cylinder >= input.cylinders)
        return std::nullopt;
    return Track{output.cells[channel].data() + *cylinder, input.cylinders};
}

const Marks* find_marks(const Input& input, const Output& output, std::size_t channel,
                        std::optional<std::size_t> cylinder)
{
    if (cylinder)
        return &input.channels[channel].marks;
    if (channel < input.engine_channels.size())
        return &input.engine_channels[channel].marks;
    for (const Channel& one : input.channels)
        if (output.engine_quantities[channel] == "median " + one.quantity)
            return &one.median_marks;
    return nullptr;
}

/// Mean of the values between the start of the segment and the onset.
std::optional<double> level_before(const Track& track, std::size_t reading, std::size_t onset)
{
    double sum = 0.0, count = 0.0;
    for (std::size_t i = track.at(reading).segment_start; i < onset; ++i)
        if (track.at(i).used) {
            sum += track.at(i).clipped;
            count += 1.0;
        }
    return count > 0.0 ? std::optional(sum / count) : std::nullopt;
}

/// What a cylinder shares with the others at this reading, taken as lasting.
std::optional<double> shared_part(const Input& input, const Track& track, std::size_t channel,
                                  std::optional<std::size_t> cylinder, std::size_t reading)
{
    if (!cylinder)
        return 0.0; // the engine's values are kept as they are
    const auto& apart = track.at(reading).apart;
    if (!apart)
        return std::nullopt;
    return input.channels[channel].cells[reading * input.cylinders + *cylinder].deviation - *apart;
}

} // namespace

std::size_t channel_of(const Input& input, const Output& output, const std::string& quantity, bool of_cylinders)
{
    if (!of_cylinders) {
        const auto& names = output.engine_quantities;
        return static_cast<std::size_t>(std::find(names.begin(), names.end(), quantity) - names.begin());
    }
    const auto found = std::find_if(input.channels.begin(), input.channels.end(),
                                    [&](const Channel& channel) { return channel.quantity == quantity; });
    return static_cast<std::size_t>(found - input.channels.begin());
}

std::optional<MarkAhead> mark_ahead(const Input& input, const Output& output, std::size_t channel,
                                    std::optional<std::size_t> cylinder, std::size_t reading, std::size_t onset,
                                    bool rising)
{
    const auto track = find_track(input, output, channel, cylinder, reading);
    const Marks* marks = track ? find_marks(input, output, channel, cylinder) : nullptr;
    if (!marks)
        return std::nullopt;
    const auto& own = rising ? marks->own_high : marks->own_low;
    if (reading < own.size() && own[reading]) {
        const auto level = level_before(*track, reading, onset);
        const auto shared = shared_part(input, *track, channel, cylinder, reading);
        if (!level || !shared)
            return std::nullopt;
        const double distance = *own[reading] - *shared - *level;
        return (distance > 0.0) == rising ? std::optional(MarkAhead{distance, true}) : std::nullopt;
    }
    const auto& allowed = rising ? marks->allowed_rise : marks->allowed_fall;
    return allowed ? std::optional(MarkAhead{rising ? *allowed : -*allowed, false}) : std::nullopt;
}

std::optional<TimeToLimit> time_to_limit(const Input& input, const Output& output, std::size_t channel,
                                         std::optional<std::size_t> cylinder, std::size_t reading, double limit)
{
    const auto track = find_track(input, output, channel, cylinder, reading);
    if (!track)
        return std::nullopt;
    std::vector<double> months, values;
    for (std::size_t i = track->at(reading).segment_start; i <= reading; ++i)
        if (track->at(i).used) {
            months.push_back(input.months[i]);
            values.push_back(track->at(i).clipped);
        }
    return time_to_limit(months, values, track->at(reading).noise, limit);
}

} // namespace evenstroke::drift
