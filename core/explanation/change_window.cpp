// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/explanation/change_window.h"

#include "core/trend/robust.h"

#include <algorithm>
#include <cmath>
#include <utility>

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

/// What an odd value is pulled in to: the middle; of two values the one nearer to the level before, since either may
/// be the odd one.
double centre_of(std::vector<double> values)
{
    if (values.size() == 2)
        return std::abs(values[0]) < std::abs(values[1]) ? values[0] : values[1];
    return drift::median_in_place(values);
}

std::optional<Estimate> estimate_step(const QuantitySeries& series, const Level& level, std::size_t onset)
{
    std::vector<double> values;
    for (std::size_t i = onset; i < series.values.size(); ++i)
        if (series.values[i])
            values.push_back(*series.values[i] - level.mean);
    if (values.empty())
        return std::nullopt;
    const double centre = centre_of(values), count = static_cast<double>(values.size());
    double sum = 0.0;
    for (const double value : values)
        sum += drift::pull_in(value, centre, pull_to * series.noise);
    return Estimate{sum / count, 1.0 / count + 1.0 / level.count, values.size()};
}

/// Slope of a ramp that starts from nothing at the reading before the onset.
/// @param from the slope towards which odd values are pulled in; nothing: they are taken as they are
double ramp_slope(const std::vector<std::pair<double, double>>& points, std::optional<double> from, double reach)
{
    double product = 0.0, squares = 0.0;
    for (const auto& [months, value] : points) {
        product += months * (from ? drift::pull_in(value, *from * months, reach) : value);
        squares += square(months);
    }
    return product / squares;
}

std::optional<Estimate> estimate_ramp(const SubjectSeries& of, const QuantitySeries& series, const Level& level,
                                      std::size_t onset)
{
    const double from = of.months[onset - 1], whole = of.months.back() - from;
    std::vector<std::pair<double, double>> points;
    double squares = 0.0, sum = 0.0;
    for (std::size_t i = onset; i < series.values.size(); ++i)
        if (series.values[i]) {
            const double months = of.months[i] - from;
            points.emplace_back(months, *series.values[i] - level.mean);
            squares += square(months);
            sum += months;
        }
    if (points.size() < ramp_needs || !(squares > 0.0))
        return std::nullopt;
    const double plain = ramp_slope(points, std::nullopt, 0.0);
    const double slope = ramp_slope(points, plain, pull_to * series.noise);
    return Estimate{whole * slope, square(whole) * (1.0 / squares + square(sum / squares) / level.count), points.size()};
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

/// How well the shape goes with a fault that creeps or comes at once.
double log_of_course(Fault::Course course, bool ramp)
{
    constexpr double as_said = 0.75; // of three times out of four (estimate)
    const bool creeping = course == Fault::Course::creeping;
    const double share = course == Fault::Course::any ? 0.5 : creeping == ramp ? as_said : 1.0 - as_said;
    return std::log(share);
}

/// Each fault's weight, averaged over the windows. Those that fit far worse than the best add nothing that counts, and a
/// single reading carries no pattern.
std::vector<double> weigh_over(const std::vector<ChangeWindow>& windows, double best, std::span<const Fault* const> faults)
{
    constexpr double counts = 6.0; // logarithm of the odds against the best
    std::vector<std::vector<double>> weights(faults.size());
    double tried = 0.0;
    for (const ChangeWindow& window : windows) {
        if (window.readings < 2)
            continue;
        tried += 0.5; // step and ramp of one onset share one chance
        if (square(best) - square(window.likelihood) > 2.0 * counts)
            continue;
        for (std::size_t f = 0; f < faults.size(); ++f)
            weights[f].push_back(log_likelihood(*faults[f], window.changes) + log_of_course(faults[f]->course, window.ramp));
    }
    std::vector<double> found;
    for (std::size_t f = 0; f < faults.size(); ++f)
        if (!weights[f].empty())
            found.push_back(log_sum(weights[f]) - std::log(tried) + log_commonness(*faults[f]));
    return found;
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
    std::vector<ChangeWindow> windows;
    const std::size_t count = series.months.size();
    const std::size_t first = std::max({earliest, std::size_t{1}, count > longest_window ? count - longest_window : 1});
    for (std::size_t onset = first; onset < count; ++onset)
        for (const bool ramp : {false, true}) {
            auto window = change_since(series, onset, ramp);
            if (!window)
                continue;
            window->likelihood = strongest_sign(faults, claiming(series, window->without_wander));
            windows.push_back(std::move(*window));
        }
    if (windows.empty())
        return std::nullopt;
    const auto best = std::max_element(windows.begin(), windows.end(),
                                 [](const ChangeWindow& a, const ChangeWindow& b) { return a.likelihood < b.likelihood; });
    const std::vector<double> log_weights = weigh_over(windows, best->likelihood, faults);
    ChangeWindow found = std::move(*best);
    found.at_edge = found.onset == first && first > earliest;
    found.strength = strongest_sign(faults, claiming(series, found.changes));
    found.log_weights = log_weights;
    return found;
}

} // namespace evenstroke
