// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/load_diagram.h"

#include "core/plain_text.h"

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <stdexcept>

namespace evenstroke {
namespace {

Problem missing(const std::string& what)
{
    return {Problem::Kind::not_found, "The " + what + " is not known.", "Enter the " + what + "."};
}

std::optional<Problem> find_outside(const std::optional<double>& value, double lowest, double highest,
                                    const std::string& what)
{
    if (!value || (*value >= lowest && *value <= highest)) {
        return std::nullopt;
    }
    return invalid_input("The " + what + " of the load diagram is " + short_number_text(*value) +
                             ", which is not from " + short_number_text(lowest) + " to " +
                             short_number_text(highest) + ".",
                         "Enter it as a part of the rating, such as 1.05 for 105 %.");
}

std::optional<Problem> find_problem(const LoadLimits& limits)
{
    if (limits.torque_exponent && !limits.torque_below_speed) {
        return missing("speed below which the torque and speed limit applies");
    }
    const std::optional<Problem> problems[] = {
        find_outside(limits.mean_effective_pressure, 0.5, 1.5, "mean effective pressure limit"),
        find_outside(limits.torque_exponent, 1.0, 4.0, "exponent of the torque and speed limit"),
        find_outside(limits.torque_below_speed, 0.3, 1.2, "speed of the torque and speed limit"),
        find_outside(limits.torque_factor, 0.5, 1.5, "factor of the torque and speed limit"),
        find_outside(limits.highest_speed, 1.0, 1.3, "highest speed"),
        find_outside(limits.overload, 1.0, 1.3, "overload"),
        find_outside(limits.light_running_margin, -0.1, 0.3, "light running margin"),
    };
    for (const std::optional<Problem>& problem : problems) {
        if (problem) {
            return problem;
        }
    }
    return std::nullopt;
}

/// One decimal: more would claim what a torsion meter does not know.
std::string percent_text(double percent)
{
    return short_number_text(std::round(percent * 10.0) / 10.0 + 0.0) + " %"; // + 0.0: no "-0"
}

std::string sentence_of(const LoadState& state, const LoadLimits& limits)
{
    const LoadMargin& nearest = state.margins.front();
    const std::string where = "At " + percent_text(state.speed_percent) + " speed and " +
                              percent_text(state.power_percent) + " power the engine is ";
    const std::string limit(load_limit_text(nearest.limit));
    if (!state.beyond) {
        return where + percent_text(nearest.power_percent) + " of rated power below the " + limit +
               ", the nearest.";
    }
    const std::string above =
        where + percent_text(-nearest.power_percent) + " of rated power above the " + limit;
    if (nearest.limit == LoadLimit::power && limits.overload && !state.within_overload) {
        return above + " and beyond its overload of " + percent_text(*limits.overload * 100.0) +
               ": reduce power, see the maker's instructions.";
    }
    if (nearest.limit == LoadLimit::power && !limits.overload) {
        return above + ", and no overload is entered for it: see the maker's instructions.";
    }
    return above + ": permitted only for a limited time, see the maker's instructions.";
}

} // namespace

std::string_view load_limit_text(LoadLimit limit)
{
    switch (limit) {
    case LoadLimit::mean_effective_pressure:
        return "mean effective pressure limit";
    case LoadLimit::torque_and_speed:
        return "torque and speed limit";
    case LoadLimit::speed:
        return "speed limit";
    case LoadLimit::power:
        return "limit of continuous power";
    }
    throw std::logic_error("limit of the load diagram without words");
}

Result<LoadDiagram> LoadDiagram::make(Power rated_power, Frequency rated_speed, const LoadLimits& limits)
{
    const double watts = rated_power.value(), speed = rated_speed.value();
    if (watts == 0.0) {
        return missing("rated power");
    }
    if (speed == 0.0) {
        return missing("rated speed");
    }
    if (!(watts > 0.0 && std::isfinite(watts) && speed > 0.0 && std::isfinite(speed))) {
        return invalid_input("A rating of " + short_number_text(watts / 1000.0) + " kW at " +
                                 short_number_text(speed * 60.0) + " r/min cannot be.",
                             "Check rated power and rated speed on the engine's page.");
    }
    if (auto problem = find_problem(limits)) {
        return *std::move(problem);
    }
    return LoadDiagram(watts, speed, limits);
}

std::optional<double> LoadDiagram::light_curve(double x) const
{
    if (!limits_.light_running_margin) {
        return std::nullopt;
    }
    return propeller_curve(x / (1.0 + *limits_.light_running_margin));
}

std::optional<double> LoadDiagram::mean_effective_pressure_limit(double x) const
{
    if (!limits_.mean_effective_pressure) {
        return std::nullopt;
    }
    return *limits_.mean_effective_pressure * x;
}

std::optional<double> LoadDiagram::torque_and_speed_limit(double x) const
{
    if (!limits_.torque_exponent || !(x < *limits_.torque_below_speed)) {
        return std::nullopt;
    }
    return limits_.torque_factor * std::pow(x, *limits_.torque_exponent);
}

std::optional<double> LoadDiagram::highest_power(double x) const
{
    if (limits_.highest_speed && x > *limits_.highest_speed) {
        return std::nullopt;
    }
    return std::min(
        {1.0, mean_effective_pressure_limit(x).value_or(1.0), torque_and_speed_limit(x).value_or(1.0)});
}

std::vector<LoadMargin> LoadDiagram::margins(double x, double y) const
{
    std::vector<LoadMargin> result{{LoadLimit::power, 100.0 * (1.0 - y)}};
    if (const auto limit = mean_effective_pressure_limit(x)) {
        result.push_back({LoadLimit::mean_effective_pressure, 100.0 * (*limit - y)});
    }
    if (const auto limit = torque_and_speed_limit(x)) {
        result.push_back({LoadLimit::torque_and_speed, 100.0 * (*limit - y)});
    }
    if (limits_.highest_speed && (!limits_.constant_speed || x > *limits_.highest_speed)) {
        const double along_propeller = propeller_curve(*limits_.highest_speed / x) - 1.0;
        result.push_back({LoadLimit::speed, 100.0 * y * along_propeller});
    }
    std::stable_sort(result.begin(), result.end(), [](const LoadMargin& a, const LoadMargin& b) {
        return a.power_percent < b.power_percent;
    });
    return result;
}

Result<LoadState> LoadDiagram::locate(std::optional<Power> power, std::optional<Frequency> speed) const
{
    if (!power) {
        return missing("power of the engine");
    }
    if (!speed) {
        return missing("speed of the engine");
    }
    const double x = speed->value() / rated_speed_, y = power->value() / rated_watts_;
    if (!(x >= 0.1 && x <= 1.4 && y >= 0.0 && y <= 1.5)) {
        return invalid_input("The engine at " + short_number_text(power->value() / 1000.0) + " kW and " +
                                 short_number_text(speed->value() * 60.0) +
                                 " r/min lies outside the load "
                                 "diagram, which goes from 10 to 140 % of rated speed and from 0 to 150 % of "
                                 "rated power.",
                             "Check power, speed and the engine's rating.");
    }
    LoadState state;
    state.speed_percent = 100.0 * x;
    state.power_percent = 100.0 * y;
    state.margins = margins(x, y);
    const auto exceeded = [](const LoadMargin& margin) { return margin.power_percent < -1e-9; };
    state.beyond = exceeded(state.margins.front());
    state.within_overload =
        state.beyond && limits_.overload && y <= *limits_.overload &&
        std::all_of(state.margins.begin(), state.margins.end(), [&](const LoadMargin& margin) {
            return margin.limit == LoadLimit::power || !exceeded(margin);
        });
    state.sentence = sentence_of(state, limits_);
    return state;
}

} // namespace evenstroke
