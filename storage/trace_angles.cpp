// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/trace_angles.h"

#include "core/plain_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::storage {
namespace {

constexpr double hair = 1e-6; // degrees: what sums of steps may be off

/// Far below what an instrument tells apart, and short enough for the packing of the history.
double millionths(double number)
{
    return std::round(number * 1e6) / 1e6 + 0.0;
}

} // namespace

void TraceAngles::reserve(std::size_t samples)
{
    angle_.reserve(samples);
    cycle_.reserve(samples);
}

double TraceAngles::angle_of(double value)
{
    switch (layout_.angle_from) {
    case AngleFrom::column:
        return layout_.backwards ? layout_.dead_centre_at - value : value - layout_.dead_centre_at;
    case AngleFrom::sample_number:
        return layout_.first_angle - layout_.dead_centre_at + value * 360.0 / layout_.counts_per_revolution;
    case AngleFrom::time:
        if (angle_.empty())
            first_time_ = value;
        constexpr double degrees_per_second_at_one_rpm = 6.0;
        return layout_.first_angle - layout_.dead_centre_at +
               (value - first_time_) * layout_.seconds_per_count * layout_.speed *
                   degrees_per_second_at_one_rpm;
    }
    return value;
}

bool TraceAngles::begins_cycle(double angle, std::optional<int> cycle) const
{
    if (angle_.empty())
        return true;
    if (cycle)
        return cycle != named_;
    const double since = angle - cycle_began_;
    if (layout_.angle_from != AngleFrom::column)
        return since > period_ - hair;
    // The last sample of a cycle may be the first of the next.
    return angle < angle_.back() - 0.5 * period_ || since > period_ + hair;
}

Problem TraceAngles::steps_back(double value) const
{
    const bool time = layout_.angle_from == AngleFrom::time;
    const std::string unit_text = time ? "" : "°", before = number_text(last_value_) + unit_text;
    const std::string what = time ? "The time " : "The crank angle ";
    const std::string rise =
        time ? "Choose the column of the times, in rising order."
             : "Choose the column of the angles; if they fall while the engine runs, turn their direction.";
    if (value == last_value_)
        return invalid_input(
            what + before + " stands twice.",
            time ? rise : "Give each angle of a cycle once, or name the column that counts the cycles.");
    return invalid_input(what + "steps back from " + before + " to " + number_text(value) + unit_text + ".",
                         rise);
}

Done TraceAngles::add(double value, std::optional<int> cycle)
{
    if (!std::isfinite(value))
        return invalid_input("The crank angle is no number.", "Check the column of the angles.");
    const double angle = angle_of(value);
    if (begins_cycle(angle, cycle)) {
        const bool goes_on = !angle_.empty() && angle > angle_.back() && !cycle;
        cycle_began_ = goes_on ? cycle_began_ + period_ : angle;
        if (goes_on && angle - cycle_began_ > period_)
            cycle_began_ = angle; // a stretch without samples
        cycle_.push_back(cycle ? *cycle : cycle_.empty() ? 1 : cycle_.back() + 1);
    } else if (!(angle > angle_.back())) {
        return steps_back(value);
    } else if (angle - cycle_began_ > period_ + hair) {
        return invalid_input(
            "The crank angle lies " + short_number_text(angle - cycle_began_) +
                "° after the first of its cycle, and the engine's cycle has " + number_text(period_) + "°.",
            "Check the column that counts the cycles, and whether the engine has two or four strokes.");
    } else {
        cycle_.push_back(cycle_.back());
    }
    angle_.push_back(angle);
    named_ = cycle;
    last_value_ = value;
    return done();
}

/// Brings the samples from..to into one period and turns them so that they rise.
void TraceAngles::add_cycle(std::size_t from, std::size_t to, const std::vector<double>& pressure,
                            CardTrace& trace) const
{
    struct Sample
    {
        double angle, pressure;
    };
    const double half = 0.5 * period_;
    std::vector<Sample> samples;
    for (std::size_t i = from; i < to; ++i) {
        if (std::isnan(pressure[i]))
            continue;
        double angle = angle_[i];
        if (std::abs(angle) > half + hair)
            angle -= period_ * std::round(angle / period_);
        samples.push_back({millionths(angle), pressure[i]});
    }
    const auto by_angle = [](const Sample& a, const Sample& b) { return a.angle < b.angle; };
    if (!std::is_sorted(samples.begin(), samples.end(), by_angle))
        std::stable_sort(samples.begin(), samples.end(), by_angle);
    // The first and the last sample of a record may be one place of the cycle.
    for (std::size_t i = 0; i < samples.size(); ++i) {
        double here = samples[i].pressure;
        if (i + 1 < samples.size() && samples[i + 1].angle == samples[i].angle)
            here = 0.5 * (here + samples[++i].pressure);
        trace.crank_angle_deg.push_back(samples[i].angle);
        trace.pressure_bar.push_back(millionths(here));
        trace.cycle.push_back(cycle_[from]);
    }
}

CardTrace TraceAngles::trace(const std::vector<double>& pressure, int& missing) const
{
    CardTrace trace;
    trace.cycle.reserve(angle_.size());
    trace.crank_angle_deg.reserve(angle_.size());
    trace.pressure_bar.reserve(angle_.size());
    for (std::size_t from = 0; from < angle_.size();) {
        const auto first = cycle_.begin() + static_cast<std::ptrdiff_t>(from);
        const auto last = std::find_if(first, cycle_.end(), [&](int cycle) { return cycle != *first; });
        const auto to = static_cast<std::size_t>(last - cycle_.begin());
        add_cycle(from, to, pressure, trace);
        from = to;
    }
    missing = static_cast<int>(
        std::count_if(pressure.begin(), pressure.end(), [](double p) { return std::isnan(p); }));
    const bool one = trace.cycle.empty() || trace.cycle.front() == trace.cycle.back();
    if (one)
        trace.cycle.clear();
    return trace;
}

} // namespace evenstroke::storage
