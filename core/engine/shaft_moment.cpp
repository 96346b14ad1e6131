// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/shaft_moment.h"

#include "core/plain_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {
namespace {

bool is_cycle(PlaneAngle cycle)
{
    return std::abs(in_degrees(cycle) - 360.0) < 1e-6 || std::abs(in_degrees(cycle) - 720.0) < 1e-6;
}

Problem bad_cycle(PlaneAngle cycle)
{
    return invalid_input("A cycle of " + short_number_text(in_degrees(cycle)) + "° is not 360° or 720°.",
                         "Check whether the engine is two-stroke or four-stroke.");
}

std::optional<Problem> find_problem(const CylinderMoment& cylinder, double cycle)
{
    const std::string who = "cylinder " + evenstroke::quoted(cylinder.cylinder);
    if (cylinder.angle.empty()) {
        return Problem{Problem::Kind::not_found,
                       "There is no card of " + who + ", so the sum of the turning moments is not known.",
                       "Take cards of all cylinders at the same load."};
    }
    if (cylinder.angle.size() != cylinder.moment.size() || !std::isfinite(cylinder.fires_at.value())) {
        return invalid_input("The card of " + who + " has " + std::to_string(cylinder.angle.size()) +
                                 " angles, " + std::to_string(cylinder.moment.size()) +
                                 " moments and fires at " + short_number_text(in_degrees(cylinder.fires_at)) +
                                 "°.",
                             "Check the card and the firing order.");
    }
    for (std::size_t i = 0; i < cylinder.angle.size(); ++i) {
        if (!std::isfinite(cylinder.moment[i]) || !std::isfinite(cylinder.angle[i]) ||
            (i > 0 && cylinder.angle[i] < cylinder.angle[i - 1])) {
            return invalid_input("Sample " + std::to_string(i + 1) + " of the card of " + who +
                                     " has a falling angle or no number.",
                                 "Check the card around this sample.");
        }
    }
    const double span = cylinder.angle.back() - cylinder.angle.front();
    if (!(std::abs(span - cycle) <= 1e-6)) {
        return invalid_input("The card of " + who + " spans " +
                                 short_number_text(in_degrees(span * si::radians)) + "°, and the cycle has " +
                                 short_number_text(in_degrees(cycle * si::radians)) + "°.",
                             "Take a card of one whole cycle, its first point repeated at the end.");
    }
    return std::nullopt;
}

/// Moment of one cylinder at an angle of the shaft, by the straight line between the two samples around it.
double moment_at(const CylinderMoment& cylinder, double shaft, double cycle)
{
    double own = std::fmod(shaft - cylinder.fires_at.value() - cylinder.angle.front(), cycle);
    own += cylinder.angle.front() + (own < 0.0 ? cycle : 0.0);
    const auto after = std::upper_bound(cylinder.angle.begin(), cylinder.angle.end(), own);
    if (after == cylinder.angle.end()) {
        return cylinder.moment.back();
    }
    const auto i = static_cast<std::size_t>(after - cylinder.angle.begin()); // at least 1: own >= front
    if (i == 0) {
        return cylinder.moment.front();
    }
    const double part = (own - cylinder.angle[i - 1]) / (cylinder.angle[i] - cylinder.angle[i - 1]);
    return cylinder.moment[i - 1] + part * (cylinder.moment[i] - cylinder.moment[i - 1]);
}

} // namespace

Result<std::vector<PlaneAngle>> even_firing_angles(const std::vector<int>& firing_order, int cylinders,
                                                   PlaneAngle cycle)
{
    if (!is_cycle(cycle)) {
        return bad_cycle(cycle);
    }
    if (firing_order.empty() || cylinders < 1) {
        return Problem{Problem::Kind::not_found, "The firing order is not known.",
                       "Enter the firing order on the engine's page."};
    }
    std::vector<int> sorted = firing_order;
    std::sort(sorted.begin(), sorted.end());
    bool each_once = sorted.size() == static_cast<std::size_t>(cylinders);
    for (std::size_t i = 0; each_once && i < sorted.size(); ++i) {
        each_once = sorted[i] == static_cast<int>(i) + 1;
    }
    if (!each_once) {
        return invalid_input("The firing order does not name each of the " + std::to_string(cylinders) +
                                 " cylinders once.",
                             "Check the firing order on the engine's page.");
    }
    std::vector<PlaneAngle> angles(firing_order.size());
    for (std::size_t i = 0; i < firing_order.size(); ++i) {
        angles[static_cast<std::size_t>(firing_order[i] - 1)] =
            cycle * (static_cast<double>(i) / static_cast<double>(firing_order.size()));
    }
    return angles;
}

Result<ShaftMoment> shaft_moment(const std::vector<CylinderMoment>& cylinders, PlaneAngle cycle,
                                 std::size_t points)
{
    if (!is_cycle(cycle)) {
        return bad_cycle(cycle);
    }
    if (cylinders.empty()) {
        return Problem{Problem::Kind::not_found, "There is no card of any cylinder.",
                       "Take cards of all cylinders at the same load."};
    }
    if (points < 36 || points > 100000) {
        return invalid_input("The sum of the turning moments is asked for at " + std::to_string(points) +
                                 " angles, which is not from 36 to 100000.",
                             "Ask for another number of angles.");
    }
    for (const CylinderMoment& cylinder : cylinders) {
        if (auto problem = find_problem(cylinder, cycle.value())) {
            return *std::move(problem);
        }
    }
    ShaftMoment shaft;
    double total = 0.0;
    for (std::size_t i = 0; i < points; ++i) {
        const double angle = cycle.value() * static_cast<double>(i) / static_cast<double>(points);
        double sum = 0.0;
        for (const CylinderMoment& cylinder : cylinders) {
            sum += moment_at(cylinder, angle, cycle.value());
        }
        shaft.angle.push_back(angle);
        shaft.moment.push_back(sum);
        total += sum;
    }
    const auto [lowest, highest] = std::minmax_element(shaft.moment.begin(), shaft.moment.end());
    shaft.lowest = Torque::from_value(*lowest);
    shaft.highest = Torque::from_value(*highest);
    shaft.mean = Torque::from_value(total / static_cast<double>(points));
    if (shaft.mean.value() > 0.0) {
        shaft.variation = (*highest - *lowest) / shaft.mean.value();
    }
    return shaft;
}

} // namespace evenstroke
