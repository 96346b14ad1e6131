// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/layered_wall.h"

#include "core/input_check.h"
#include "core/plain_text.h"

#include <cmath>
#include <string>

namespace evenstroke {
namespace {

constexpr double pi = 3.14159265358979323846;

std::optional<Problem> find_problem(const WallSide& side, const std::string& which)
{
    if (!side.temperature) {
        return Problem{Problem::Kind::not_found,
                       "The temperature on the " + which + " side of the wall is not known.",
                       "Enter the temperature on this side."};
    }
    if (!is_positive(side.temperature->value())) {
        return invalid_input("The temperature on the " + which + " side of the wall is " +
                                 short_number_text(in_celsius(*side.temperature)) +
                                 " °C, which is not above absolute zero.",
                             "Check the temperature and its unit.");
    }
    if (side.film && !is_positive(side.film->value())) {
        return invalid_input(
            "The film on the " + which + " side of the wall has " + short_number_text(side.film->value()) +
                " W/(m² K), which is not above 0.",
            "Check the film coefficient, or leave it empty where the surface temperature is known.");
    }
    return std::nullopt;
}

std::optional<Problem> find_layer_problem(std::size_t index, double thickness, double conducts)
{
    const std::string which = "Layer " + std::to_string(index + 1) + " of the wall";
    if (!is_positive(thickness)) {
        return invalid_input(which + " is " + short_number_text(thickness * 1000.0) +
                                 " mm thick, which is not above 0.",
                             "Check the sizes of the wall.");
    }
    if (!is_positive(conducts)) {
        return invalid_input(which + " has a conductivity of " + short_number_text(conducts) +
                                 " W/(m K), which is not above 0.",
                             "Check the conductivity of this layer.");
    }
    return std::nullopt;
}

double film_resistance(const WallSide& side, double area)
{
    return side.film ? 1.0 / (side.film->value() * area) : 0.0;
}

/// Heat by the sum of the resistances, and the temperatures between them. `resistances` begins and ends with
/// a film's, 0 where there is none.
template <typename Flow>
Conduction<Flow> conduct(double first, double last, const std::vector<double>& resistances)
{
    double sum = 0.0;
    for (const double resistance : resistances) {
        sum += resistance;
    }
    const double flow = (first - last) / sum;
    Conduction<Flow> result;
    result.heat = Flow::from_value(flow);
    double temperature = first;
    for (std::size_t i = 0; i + 1 < resistances.size(); ++i) {
        temperature -= flow * resistances[i];
        result.surfaces.push_back(Temperature::from_value(temperature));
    }
    return result;
}

std::optional<Problem> find_problem(const WallSide& first, const WallSide& last, std::size_t layers)
{
    if (auto problem = find_problem(first, "first")) {
        return problem;
    }
    if (auto problem = find_problem(last, "last")) {
        return problem;
    }
    if (layers == 0) {
        return invalid_input("The wall has no layer.", "Enter at least one thickness and its conductivity.");
    }
    return std::nullopt;
}

} // namespace

Result<Conduction<HeatFlux>> conduct_plane(const WallSide& first, const std::vector<PlaneLayer>& layers,
                                           const WallSide& last)
{
    if (auto problem = find_problem(first, last, layers.size())) {
        return *std::move(problem);
    }
    std::vector<double> resistances{film_resistance(first, 1.0)};
    for (std::size_t i = 0; i < layers.size(); ++i) {
        const double thickness = layers[i].thickness.value(), conducts = layers[i].conductivity.value();
        if (auto problem = find_layer_problem(i, thickness, conducts)) {
            return *std::move(problem);
        }
        resistances.push_back(thickness / conducts);
    }
    resistances.push_back(film_resistance(last, 1.0));
    return conduct<HeatFlux>(first.temperature->value(), last.temperature->value(), resistances);
}

Result<Conduction<HeatFlowPerLength>> conduct_cylinder(const WallSide& inner, Length inner_radius,
                                                       const std::vector<CylinderLayer>& layers,
                                                       const WallSide& outer)
{
    if (auto problem = find_problem(inner, outer, layers.size())) {
        return *std::move(problem);
    }
    double radius = inner_radius.value();
    if (!is_positive(radius)) {
        return invalid_input("An inner radius of " + short_number_text(radius * 1000.0) +
                                 " mm is not above 0.",
                             "Check the sizes of the wall.");
    }
    std::vector<double> resistances{film_resistance(inner, 2.0 * pi * radius)};
    for (std::size_t i = 0; i < layers.size(); ++i) {
        const double next = layers[i].outer_radius.value(), conducts = layers[i].conductivity.value();
        if (auto problem = find_layer_problem(i, next - radius, conducts)) {
            return *std::move(problem);
        }
        resistances.push_back(std::log(next / radius) / (2.0 * pi * conducts));
        radius = next;
    }
    resistances.push_back(film_resistance(outer, 2.0 * pi * radius));
    return conduct<HeatFlowPerLength>(inner.temperature->value(), outer.temperature->value(), resistances);
}

} // namespace evenstroke
