// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/remarks.h"

#include "core/card/result_catalogue.h"
#include "core/plain_text.h"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace evenstroke::indicator {
namespace {

/// At most two decimals.
std::string shown(double number) { return short_number_text(std::round(number * 100.0) / 100.0); }

std::string list_text(const std::vector<int>& numbers)
{
    std::string text;
    for (std::size_t i = 0; i < numbers.size() && i < 5; ++i)
        text += (i == 0 ? "" : ", ") + std::to_string(numbers[i]);
    return numbers.size() > 5 ? text + "…" : text;
}

void remark_on_cycles(Evaluation& card, const DirectReadings& direct)
{
    const CleanTrace& trace = card.trace;
    if (!trace.partial_cycles.empty())
        card.remarks.push_back(make_remark("partial_cycles", {list_text(trace.partial_cycles)}));
    if (trace.unlike_cycles.empty())
        return;
    std::vector<double> work = direct.work;
    const auto middle = work.begin() + static_cast<std::ptrdiff_t>(work.size() / 2);
    std::nth_element(work.begin(), middle, work.end());
    std::vector<int> misfires, unlike;
    for (std::size_t i = 0; i < trace.cycles.size(); ++i) {
        const int number = trace.cycles[i].number;
        if (std::find(trace.unlike_cycles.begin(), trace.unlike_cycles.end(), number) == trace.unlike_cycles.end())
            continue;
        (direct.work[i] < *middle / 3.0 ? misfires : unlike).push_back(number);
    }
    if (!misfires.empty())
        card.remarks.push_back(make_remark("misfire", {list_text(misfires)}));
    if (!unlike.empty())
        card.remarks.push_back(make_remark("unlike_cycles", {list_text(unlike)}));
}

/// One revolution of a four-stroke, or a record that breaks off.
void remark_on_extent(Evaluation& card, const SliderCrank& gear)
{
    const CleanTrace& trace = card.trace;
    if (trace.complete())
        return;
    const Range half = samples_within(trace.angle, -180.0, 180.0 - 0.5 * trace.step);
    const double period = trace.step * static_cast<double>(trace.angle.size());
    if (period > 500.0 && trace.covers(-179.0, 179.0)) {
        std::vector<double> angle, pressure;
        for (std::size_t i = half.first; i < half.first + half.count; ++i)
            if (std::isfinite(trace.mean[i]))
                angle.push_back(trace.angle[i]), pressure.push_back(trace.mean[i]);
        card.remarks.push_back(make_remark("half_cycle", {shown(polygon_pressure(gear, angle, pressure, 0.0))}));
        return;
    }
    card.remarks.push_back(make_remark("truncated_trace", {short_number_text(std::round(100.0 * trace.share_present))}));
}

} // namespace

void remark_on_trace(Evaluation& card, const SliderCrank& gear, const DirectReadings& direct)
{
    constexpr double noise_worth_saying = 0.42, filled_worth_saying = 0.02;
    const CleanTrace& trace = card.trace;
    remark_on_extent(card, gear);
    if (trace.complete())
        for (const Gap& gap : trace.gaps)
            card.remarks.push_back(make_remark("gap", {shown(gap.from), shown(gap.to)}, gap.from));
    if (trace.coarse)
        card.remarks.push_back(make_remark("coarse_steps", {shown(trace.step)}));
    if (trace.spikes > 0)
        card.remarks.push_back(make_remark("spikes_removed", {std::to_string(trace.spikes)}));
    if (trace.ringing)
        card.remarks.push_back(make_remark("pressure_oscillation", {shown(trace.ringing_at)}, trace.ringing_at));
    const double filled = static_cast<double>(std::count(trace.filled.begin(), trace.filled.end(), true)) /
                          static_cast<double>(trace.filled.size());
    if (filled > filled_worth_saying && trace.cycles.size() == 1)
        card.remarks.push_back(make_remark("samples_filled", {short_number_text(std::round(filled * 1000.0) / 10.0)}));
    if (trace.noise_mean > noise_worth_saying)
        card.remarks.push_back(make_remark("noisy_trace", {shown(trace.noise_mean)}));
    remark_on_cycles(card, direct);
}

std::optional<Ringing> find_ringing(std::span<const double> angle, std::span<const double> pressure, double peak_angle,
                                    double noise, double speed_rpm)
{
    constexpr double damping = 0.1, harmless = 0.1; // of a passage (common practice); degrees
    constexpr double stretch = 40.0, shortest = 1.5, longest = 10.0; // degrees
    const Range range = samples_within(angle, peak_angle + 1.0, peak_angle + 1.0 + stretch);
    if (range.count < 30)
        return std::nullopt;
    LeastSquares<7> rows; // the expansion without the ringing
    const auto powers = [&](std::size_t i) {
        Row<7> row{1.0};
        const double x = (angle[i] - peak_angle - 1.0) / stretch * 2.0 - 1.0;
        for (std::size_t k = 1; k < row.size(); ++k)
            row[k] = row[k - 1] * x;
        return row;
    };
    for (std::size_t i = range.first; i < range.first + range.count; ++i)
        rows.add(powers(i), pressure[i]);
    const auto smooth = rows.solve();
    if (!smooth)
        return std::nullopt;
    std::vector<double> rest;
    for (std::size_t i = range.first; i < range.first + range.count; ++i) {
        const Row<7> row = powers(i);
        rest.push_back(pressure[i] - std::inner_product(row.begin(), row.end(), smooth->values.begin(), 0.0));
    }
    double best = 0.0, best_period = 0.0;
    for (double period = shortest; period <= longest; period *= 1.04) {
        double sine = 0.0, cosine = 0.0;
        for (std::size_t i = 0; i < rest.size(); ++i) {
            const double phase = 2.0 * 3.14159265358979323846 * angle[range.first + i] / period;
            sine += rest[i] * std::sin(phase);
            cosine += rest[i] * std::cos(phase);
        }
        if (const double amplitude = 2.0 * std::hypot(sine, cosine) / static_cast<double>(rest.size()); amplitude > best)
            best = amplitude, best_period = period;
    }
    const double by_chance = 5.0 * noise * std::sqrt(2.0 / static_cast<double>(rest.size()));
    if (best < std::max(by_chance, 0.25) || best_period > 0.95 * longest)
        return std::nullopt;
    const double lag = 2.0 * damping * best_period / (2.0 * 3.14159265358979323846);
    if (lag < harmless)
        return std::nullopt;
    return Ringing{6.0 * speed_rpm / best_period, best, lag};
}

} // namespace evenstroke::indicator
