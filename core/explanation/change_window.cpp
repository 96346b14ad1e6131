// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/change_window.h"

#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

constexpr std::size_t level_window = 24;   ///< values that the level before is learned from
constexpr std::size_t ramp_needs = 4;      ///< readings from the onset on, for a slope to be told from a step
constexpr double pull_to = 2.5;            ///< noise sigmas to which one odd value among several is pulled in
constexpr double lasting_noise = 0.35;      ///< noise units that averaging does not take away (slow wander, season)

double square(double x) { return x * x; }

struct Level
{
    double mean = 0.0, count = 0.0;
};

/// Mean of the last values before the onset, odd ones pulled in.
std::optional<Level> level_before(const QuantitySeries& series, std::size_t onset)
{
    std::vector<double> values;
    for (std::size_t i = onset; i > series.start && values.size() < level_window; --i)
        if (series.values[i - 1])
            values.push_back(*series.values[i - 1]);
    if (values.size() < level_needs)
        return std::nullopt;
    std::vector<double> copy = values;
    const double middle = drift::median_in_place(copy);
    Level level;
    for (const double value : values)
        level.mean += drift::pull_in(value, middle, pull_to * series.noise);
    level.count = static_cast<double>(values.size());
    level.mean /= level.count;
    return level;
}

struct Estimate
{
    double amount = 0.0, variance = 0.0; ///< at the last reading; variance in units of the noise's square
    std::size_t count = 0;
};

std::optional<Estimate> estimate_step(const QuantitySeries& series, const Level& level, std::size_t onset)
{
    std::vector<double> values;
    for (std::size_t i = onset; i < series.values.size(); ++i)
        if (series.values[i])
            values.push_back(*series.values[i] - level.mean);
    if (values.empty())
        return std::nullopt;
    std::vector<double> copy = values;
    const double middle = drift::median_in_place(copy), count = static_cast<double>(values.size());
    double sum = 0.0;
    for (const double value : values)
        sum += values.size() > 2 ? drift::pull_in(value, middle, pull_to * series.noise) : value;
    return Estimate{sum / count, 1.0 / count + 1.0 / level.count, values.size()};
}

std::optional<Estimate> estimate_ramp(const SubjectSeries& of, const QuantitySeries& series, const Level& level,
                                      std::size_t onset)
{
    const double from = of.months[onset - 1], whole = of.months.back() - from;
    double product = 0.0, squares = 0.0, sum = 0.0;
    std::size_t count = 0;
    for (std::size_t i = onset; i < series.values.size(); ++i)
        if (series.values[i]) {
            const double months = of.months[i] - from;
            product += months * (*series.values[i] - level.mean);
            squares += square(months);
            sum += months;
            ++count;
        }
    if (count < ramp_needs || !(squares > 0.0))
        return std::nullopt;
    return Estimate{whole * product / squares, square(whole) * (1.0 / squares + square(sum / squares) / level.count), count};
}

/// Maximum less compression pressure: it is not read by itself.
void add_pressure_rise(ChangeWindow& window)
{
    static const std::size_t rise = find_fault_quantity("combustion_pressure_rise").value(),
                             maximum = find_fault_quantity("maximum_pressure").value(),
                             compression = find_fault_quantity("compression_pressure").value();
    const auto quantities = fault_quantities();
    if (!window.changes[maximum] || !window.changes[compression])
        return;
    const double noise = quantities[rise].noise;
    window.amounts[rise] = *window.amounts[maximum] - *window.amounts[compression];
    window.changes[rise] = Change{*window.amounts[rise] / noise,
                                  std::hypot(window.changes[maximum]->error * quantities[maximum].noise,
                                             window.changes[compression]->error * quantities[compression].noise) / noise};
}

/// Without the gauges of the engine, which are no reason to claim anything of one cylinder.
ChangeVector claiming(const SubjectSeries& series, ChangeVector changes)
{
    for (std::size_t k = 0; k < changes.size(); ++k)
        if (series.quantities[k].gauge_of_engine)
            changes[k].reset();
    return changes;
}

} // namespace

std::optional<ChangeWindow> change_since(const SubjectSeries& series, std::size_t onset, bool ramp)
{
    if (onset == 0 || onset >= series.months.size())
        return std::nullopt;
    ChangeWindow window;
    window.onset = onset;
    window.ramp = ramp;
    window.months = series.months.back() - series.months[onset - 1];
    window.changes.resize(series.quantities.size());
    window.without_wander.resize(series.quantities.size());
    window.amounts.resize(series.quantities.size());
    for (std::size_t k = 0; k < series.quantities.size(); ++k) {
        const QuantitySeries& one = series.quantities[k];
        const auto level = level_before(one, onset);
        const auto found = !level ? std::nullopt
                           : ramp ? estimate_ramp(series, one, *level, onset)
                                  : estimate_step(one, *level, onset);
        if (!found)
            continue;
        const double table = fault_quantities()[k].noise;
        // Levels of a signature are sizes in the table's units; the engine's own scatter says how sure the change is.
        const double noise = one.noise / table;
        window.amounts[k] = found->amount;
        const double variance = square(noise) * found->variance;
        window.changes[k] = Change{found->amount / table, std::sqrt(variance + square(lasting_noise))};
        window.without_wander[k] = Change{found->amount / table, std::sqrt(variance)};
        window.readings = std::max(window.readings, found->count);
    }
    add_pressure_rise(window);
    const bool any = std::any_of(window.changes.begin(), window.changes.end(), [](const auto& one) { return one.has_value(); });
    return any ? std::optional(std::move(window)) : std::nullopt;
}

std::optional<ChangeWindow> find_change(const SubjectSeries& series, std::span<const Fault* const> faults,
                                        std::size_t earliest)
{
    std::optional<ChangeWindow> best;
    const std::size_t count = series.months.size();
    const std::size_t first = std::max({earliest, std::size_t{1}, count > longest_window ? count - longest_window : 1});
    for (std::size_t onset = first; onset < count; ++onset)
        for (const bool ramp : {false, true}) {
            auto window = change_since(series, onset, ramp);
            if (!window)
                continue;
            window->likelihood = strongest_sign(faults, claiming(series, window->without_wander));
            if (!best || window->likelihood > best->likelihood)
                best = std::move(window);
        }
    if (best) {
        best->at_edge = best->onset == first && first > earliest;
        best->strength = strongest_sign(faults, claiming(series, best->changes));
    }
    return best;
}

} // namespace evenstroke
