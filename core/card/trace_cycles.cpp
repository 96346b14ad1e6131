// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/trace_cycles.h"

#include "core/plain_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

// bar as recorded: a transducer's zero may be some bars low; common practice, no source
constexpr double lowest_possible = -6.0, highest_possible = 400.0;
constexpr std::size_t fewest_samples = 60, most_spikes = 3;

bool possible(double pressure) { return pressure >= lowest_possible && pressure <= highest_possible; }

std::string sample_text(std::size_t index)
{
    return "Sample " + std::to_string(index + 1) + " of the card";
}

Problem steps_back(const Trace& trace, std::size_t i)
{
    const bool twice = trace.angle[i] == trace.angle[i - 1];
    return invalid_input(sample_text(i) + (twice ? " has the same crank angle as the one before, "
                                                 : " steps back from " + number_text(trace.angle[i - 1]) + "° to ") +
                             number_text(trace.angle[i]) + "°.",
                         "Give the samples of a cycle in rising order of crank angle, each angle once.");
}

std::optional<Problem> find_sample_problem(const Trace& trace)
{
    if (trace.angle.size() != trace.pressure.size() || (!trace.cycle.empty() && trace.cycle.size() != trace.angle.size()))
        return invalid_input("The card has " + std::to_string(trace.angle.size()) + " angles and " +
                                 std::to_string(trace.pressure.size()) + " pressures.",
                             "Give each sample its angle and its pressure.");
    if (trace.angle.size() > most_samples)
        return invalid_input("The card has " + std::to_string(trace.angle.size()) + " samples, more than " +
                                 std::to_string(most_samples) + ".",
                             "Choose fewer cycles; twenty are enough.");
    if (trace.angle.size() < fewest_samples)
        return invalid_input("The card has " + std::to_string(trace.angle.size()) +
                                 " samples, too few for a diagram.",
                             "Take a card with at least one sample every 2 degrees of crank angle.");
    double lowest = 1e9, highest = -1e9;
    std::size_t outside = 0, first_outside = 0;
    for (std::size_t i = 0; i < trace.angle.size(); ++i) {
        const double p = trace.pressure[i];
        if (!std::isfinite(trace.angle[i]) || std::isinf(p))
            return invalid_input(sample_text(i) + " is no number.", "Check the card around this sample.");
        if (std::isnan(p))
            continue;
        if (!possible(p)) {
            first_outside = outside++ == 0 ? i : first_outside;
            continue;
        }
        lowest = std::min(lowest, p);
        highest = std::max(highest, p);
    }
    // A few are spikes of the cable.
    if (outside > std::max(most_spikes, trace.angle.size() / 500))
        return invalid_input(sample_text(first_outside) + " has " + short_number_text(trace.pressure[first_outside]) +
                                 " bar at " + number_text(trace.angle[first_outside]) + "°; a card has -6 to 400 bar.",
                             "Check the unit of the pressures: they are expected in bar.");
    if (!(highest > lowest))
        return invalid_input(highest < lowest ? std::string("The card has no pressure at all.")
                                              : "All pressures of the card are " + short_number_text(highest) + " bar.",
                             "Check the transducer, its cable and the indicator cock, and take the card again.");
    return std::nullopt;
}

/// Brings angles into -period/2 to +period/2 and turns the cycle so that they rise.
void turn_into_period(RecordedCycle& cycle, double period)
{
    const double half = 0.5 * period + 1e-6;
    bool moved = false;
    for (double& angle : cycle.angle)
        while (angle > half)
            angle -= period, moved = true;
    for (double& angle : cycle.angle)
        while (angle < -half)
            angle += period, moved = true;
    if (!moved)
        return;
    const auto lowest = std::min_element(cycle.angle.begin(), cycle.angle.end()) - cycle.angle.begin();
    std::rotate(cycle.angle.begin(), cycle.angle.begin() + lowest, cycle.angle.end());
    std::rotate(cycle.pressure.begin(), cycle.pressure.begin() + lowest, cycle.pressure.end());
}

} // namespace

Result<std::vector<RecordedCycle>> split_cycles(const Trace& trace, const TraceFrame& frame)
{
    if (auto problem = find_sample_problem(trace))
        return *std::move(problem);
    const double period = frame.period();
    std::vector<RecordedCycle> cycles;
    for (std::size_t i = 0; i < trace.angle.size(); ++i) {
        const bool numbered = !trace.cycle.empty();
        const bool begins = i == 0 || (numbered ? trace.cycle[i] != trace.cycle[i - 1]
                                                : trace.angle[i] < trace.angle[i - 1] - 0.5 * period);
        if (begins)
            cycles.push_back({numbered ? trace.cycle[i] : static_cast<int>(cycles.size()) + 1, 0, {}, {}});
        else if (!(trace.angle[i] > trace.angle[i - 1]))
            return steps_back(trace, i);
        RecordedCycle& cycle = cycles.back();
        cycle.angle.push_back(trace.angle[i]);
        const bool spike = !std::isnan(trace.pressure[i]) && !possible(trace.pressure[i]);
        cycle.pressure.push_back(spike ? std::nan("") : trace.pressure[i]);
        cycle.spikes += spike ? 1 : 0;
        if (trace.angle[i] - cycle.angle.front() > period + 1e-6)
            return invalid_input(sample_text(i) + " lies " + short_number_text(trace.angle[i] - cycle.angle.front()) +
                                     "° after the first of its cycle; a " +
                                     (frame.two_stroke ? "two-stroke cycle has 360°." : "four-stroke cycle has 720°."),
                                 "Check whether the engine has two or four strokes, and the angles of the card.");
    }
    for (RecordedCycle& cycle : cycles)
        turn_into_period(cycle, period);
    return cycles;
}

bool CleanTrace::covers(double from, double to) const
{
    for (std::size_t i = 0; i < angle.size(); ++i)
        if (angle[i] >= from && angle[i] <= to && std::isnan(mean[i]))
            return false;
    return true;
}

Result<CleanTrace> clean(const Trace& trace, const TraceFrame& frame)
{
    auto recorded = split_cycles(trace, frame);
    if (!recorded)
        return recorded.error();
    CleanTrace result = lay_on_grid(recorded.value(), frame);
    std::vector<double> noises;
    for (const Cycle& cycle : result.cycles)
        noises.push_back(find_noise(result.angle, cycle.pressure));
    std::nth_element(noises.begin(), noises.begin() + static_cast<std::ptrdiff_t>(noises.size() / 2), noises.end());
    result.noise_one = noises[noises.size() / 2];
    for (Cycle& cycle : result.cycles) {
        remove_spikes(result, cycle, result.noise_one);
        fill_gaps(result, cycle);
    }
    average(result, {});
    if (!result.covers(frame.compression_begins(), -3.0))
        return invalid_input("The card does not cover the compression from " +
                                 short_number_text(frame.compression_begins()) + "° to -3° of crank angle.",
                             "Take a card of the whole cycle.");
    return result;
}

} // namespace evenstroke::indicator
