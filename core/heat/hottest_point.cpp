// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/hottest_point.h"

#include "core/plain_text.h"

#include <algorithm>
#include <array>
#include <cmath>

namespace evenstroke {
namespace {

enum Input : std::size_t {
    coolant,
    gas,
    baseline_wall,
    baseline_coolant,
    baseline_gas,
    film_ratio,
    inputs_count
};
using Numbers = std::array<double, inputs_count>; // K; film_ratio without unit

constexpr std::array<const char*, inputs_count> names{"coolant temperature",
                                                      "mean gas temperature",
                                                      "wall temperature of the baseline",
                                                      "coolant temperature of the baseline",
                                                      "mean gas temperature of the baseline",
                                                      "ratio of the gas films"};

constexpr double smallest_ratio = 0.2, largest_ratio = 5.0;

/// Both equations solved for T_inner: T = (T_w + k T_g) / (1 + k).
double wall_kelvin(const Numbers& x)
{
    const double k =
        x[film_ratio] * (x[baseline_wall] - x[baseline_coolant]) / (x[baseline_gas] - x[baseline_wall]);
    return (x[coolant] + k * x[gas]) / (1.0 + k);
}

double flux_ratio_of(const Numbers& x)
{
    return x[film_ratio] * (x[gas] - wall_kelvin(x)) / (x[baseline_gas] - x[baseline_wall]);
}

using PlainInputs = std::array<UncertainInput, inputs_count>;

Numbers numbers_of(const PlainInputs& plain)
{
    Numbers numbers{};
    for (std::size_t i = 0; i < inputs_count; ++i) {
        numbers[i] = plain[i].value;
    }
    return numbers;
}

template <typename Uncertain>
bool take(PlainInputs& plain, Input which, const std::optional<Uncertain>& input)
{
    if (!input) {
        return false;
    }
    if constexpr (std::is_same_v<Uncertain, UncertainTemperature>) {
        plain[which].value = input->value.value();
        if (input->half_width) {
            plain[which].half_width = input->half_width->value();
        }
    } else {
        plain[which].value = input->value;
        plain[which].half_width = input->half_width;
    }
    plain[which].instrument = input->instrument;
    return true;
}

Result<PlainInputs> read_inputs(const HottestPointInputs& inputs)
{
    PlainInputs plain;
    const std::array<bool, inputs_count> there{
        take(plain, coolant, inputs.coolant),
        take(plain, gas, inputs.gas),
        take(plain, baseline_wall, inputs.baseline_wall),
        take(plain, baseline_coolant, inputs.baseline_coolant),
        take(plain, baseline_gas, inputs.baseline_gas),
        take(plain, film_ratio, inputs.film_ratio),
    };
    for (std::size_t i = 0; i < inputs_count; ++i) {
        const std::string name = names[i];
        if (!there[i]) {
            return Problem{Problem::Kind::not_found, "The " + name + " is not known.",
                           "Enter the " + name + "."};
        }
        if (plain[i].half_width && !(*plain[i].half_width >= 0.0 && std::isfinite(*plain[i].half_width))) {
            return invalid_input("The half-width of the " + name + " is " +
                                     short_number_text(*plain[i].half_width) + ", and it cannot be below 0.",
                                 "Check the half-width, or leave it empty.");
        }
        if (i != film_ratio && !(plain[i].value >= 273.0 && plain[i].value <= 3000.0)) {
            return invalid_input("The " + name + " is " + short_number_text(plain[i].value - 273.15) +
                                     " °C, which is not from 0 to 2727 °C.",
                                 "Check the " + name + " and its unit.");
        }
    }
    return plain;
}

std::optional<Problem> find_ratio_problem(double ratio, const std::string& what)
{
    if (ratio >= smallest_ratio && ratio <= largest_ratio) {
        return std::nullopt;
    }
    return Problem{Problem::Kind::not_found,
                   "The hottest point is not known: the " + what + " against the baseline is " +
                       short_number_text(ratio) + ", and the estimate is good from 0.2 to 5.",
                   "Check the inputs, or take a baseline nearer to this state."};
}

std::optional<Problem> find_problem(const Numbers& x)
{
    if (!(x[baseline_coolant] < x[baseline_wall] && x[baseline_wall] < x[baseline_gas])) {
        return invalid_input("The baseline's wall, " + short_number_text(x[baseline_wall] - 273.15) +
                                 " °C, does not lie between its coolant, " +
                                 short_number_text(x[baseline_coolant] - 273.15) + " °C, and its gas, " +
                                 short_number_text(x[baseline_gas] - 273.15) + " °C.",
                             "Check the three temperatures of the baseline.");
    }
    if (!(x[coolant] < x[gas])) {
        return invalid_input("The gas, " + short_number_text(x[gas] - 273.15) +
                                 " °C, is not hotter than the coolant, " +
                                 short_number_text(x[coolant] - 273.15) + " °C.",
                             "Check the mean gas temperature and the coolant temperature.");
    }
    if (auto problem = find_ratio_problem(x[film_ratio], "gas film")) {
        return problem;
    }
    return find_ratio_problem(flux_ratio_of(x), "heat flux");
}

/// Half-width from what each input adds by itself, those of one instrument with their signs first.
double half_width_of(const PlainInputs& plain, const std::vector<double>& parts)
{
    double squares = 0.0;
    for (std::size_t i = 0; i < inputs_count; ++i) {
        double slip = parts[i];
        bool counted = false;
        for (std::size_t k = 0; plain[i].instrument != UncertainInput::own && k < inputs_count; ++k) {
            if (k != i && plain[k].instrument == plain[i].instrument) {
                slip += parts[k];
                counted = counted || k < i;
            }
        }
        squares += counted ? 0.0 : slip * slip;
    }
    return std::sqrt(squares);
}

/// The hottest point as a formula of plain numbers, for the propagation.
std::optional<double> wall_formula(std::span<const double> x)
{
    Numbers numbers{};
    std::copy(x.begin(), x.end(), numbers.begin());
    return wall_kelvin(numbers);
}

} // namespace

Result<HottestPoint> hottest_point(const HottestPointInputs& inputs)
{
    const Result<PlainInputs> plain = read_inputs(inputs);
    if (!plain) {
        return plain.error();
    }
    const Numbers numbers = numbers_of(plain.value());
    if (auto problem = find_problem(numbers)) {
        return *std::move(problem);
    }
    HottestPoint point;
    point.wall = Temperature::from_value(wall_kelvin(numbers));
    point.flux_ratio = flux_ratio_of(numbers);
    const auto known = [](const UncertainInput& input) { return input.half_width.has_value(); };
    point.half_width_complete = std::all_of(plain.value().begin(), plain.value().end(), known);
    const std::optional<Propagated> moved = propagate(plain.value(), wall_formula);
    if (moved && std::any_of(plain.value().begin(), plain.value().end(), known)) {
        point.half_width = kelvin_difference(half_width_of(plain.value(), moved->parts));
    }
    return point;
}

Result<Temperature> hottest_point_at_flux_ratio(Temperature coolant_now, Temperature wall,
                                                Temperature coolant_then, double flux_ratio)
{
    if (!(coolant_now.value() >= 273.0 && coolant_then.value() >= 273.0 && wall > coolant_then &&
          std::isfinite(wall.value()) && std::isfinite(coolant_now.value()))) {
        return invalid_input("The baseline's wall, " + short_number_text(in_celsius(wall)) +
                                 " °C, is not hotter than its coolant, " +
                                 short_number_text(in_celsius(coolant_then)) + " °C, or a coolant is frozen.",
                             "Check the coolant temperatures and the wall temperature of the baseline.");
    }
    if (auto problem = find_ratio_problem(flux_ratio, "heat flux")) {
        return *std::move(problem);
    }
    return coolant_now + (wall - coolant_then) * flux_ratio;
}

namespace {

/// The end of the sentence about a wall that keeps to its limits.
std::string limits_text(const WallLimits& limits)
{
    const auto degrees = [](Temperature limit) { return short_number_text(in_celsius(limit)) + " °C"; };
    if (limits.lowest && limits.highest) {
        return ", between " + degrees(*limits.lowest) + " and " + degrees(*limits.highest) + ".";
    }
    if (limits.highest) {
        return ", not above " + degrees(*limits.highest) + ".";
    }
    return limits.lowest ? ", not below " + degrees(*limits.lowest) + "." : "; no limits are entered.";
}

} // namespace

WallWarning judge_wall(const HottestPoint& point, const WallLimits& limits)
{
    const double width = point.half_width ? point.half_width->value() : 0.0;
    const std::string estimate =
        "The hottest point is estimated at " + short_number_text(std::round(in_celsius(point.wall))) + " °C" +
        (point.half_width ? std::string(point.half_width_complete ? " ± " : " ± at least ") +
                                short_number_text(std::ceil(width)) + " °C"
                          : " (uncertainty not known)");
    if (limits.highest && point.wall.value() + width > limits.highest->value()) {
        const bool sure = point.wall.value() - width > limits.highest->value();
        return {sure ? WallVerdict::too_hot : WallVerdict::may_be_too_hot,
                estimate + (sure ? ", above " : ", and may be above ") +
                    short_number_text(in_celsius(*limits.highest)) +
                    " °C: cast iron weakens and the oil film deteriorates there."};
    }
    if (limits.lowest && point.wall.value() - width < limits.lowest->value()) {
        const bool sure = point.wall.value() + width < limits.lowest->value();
        return {sure ? WallVerdict::too_cold : WallVerdict::may_be_too_cold,
                estimate + (sure ? ", below " : ", and may be below ") +
                    short_number_text(in_celsius(*limits.lowest)) +
                    " °C: acid from the fuel's sulphur may corrode the liner."};
    }
    return {limits.highest || limits.lowest ? WallVerdict::within : WallVerdict::no_limits,
            estimate + limits_text(limits)};
}

} // namespace evenstroke
