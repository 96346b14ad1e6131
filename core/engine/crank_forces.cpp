// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/crank_forces.h"

#include "core/plain_text.h"

#include <cmath>
#include <string>

namespace evenstroke {
namespace {

constexpr double pi = 3.14159265358979323846;
constexpr double highest_pressure = 500e5; // Pa

bool is_possible(double angle, double pressure)
{
    return std::isfinite(angle) && pressure > 0.0 && pressure <= highest_pressure;
}

Problem bad_sample(double angle, double pressure, const std::string& where)
{
    return invalid_input(
        "The card" + where + " has " + short_number_text(pressure / 1e5) + " bar abs at " +
            short_number_text(angle * 180.0 / pi) +
            "°, and a pressure is above 0 and at most 500 bar abs at an angle that is a number.",
        "Check the card, its unit and whether it is gauge or absolute.");
}

bool is_whole_cycle(double span)
{
    return std::abs(span - 2.0 * pi) <= 1e-6 || std::abs(span - 4.0 * pi) <= 1e-6;
}

} // namespace

std::optional<Problem> find_problem(const CrankLoad& load)
{
    if (!load.below_piston) {
        return Problem{
            Problem::Kind::not_found, "The pressure below the piston is not known.",
            "Enter the scavenge pressure (crosshead engine) or the crankcase pressure (trunk piston)."};
    }
    if (!(load.below_piston->value() > 0.0 && load.below_piston->value() <= highest_pressure)) {
        return invalid_input("A pressure of " + short_number_text(in_bar(*load.below_piston)) +
                                 " bar abs below the piston is not above 0 and at most 500 bar abs.",
                             "Check the pressure below the piston and its unit.");
    }
    if (load.moving_mass && !(load.moving_mass->value() >= 0.0 && std::isfinite(load.moving_mass->value()))) {
        return invalid_input("A moving mass of " + short_number_text(load.moving_mass->value()) +
                                 " kg cannot be.",
                             "Check the mass of piston, rod and crosshead.");
    }
    if (load.moving_mass && !load.speed) {
        return Problem{Problem::Kind::not_found,
                       "The speed is not known, so the force of the moving mass is not either.",
                       "Enter the speed of the engine during the card, or leave the moving mass empty."};
    }
    if (load.speed && !(load.speed->value() >= 0.0 && std::isfinite(load.speed->value()))) {
        return invalid_input("A speed of " + short_number_text(load.speed->value() * 60.0) +
                                 " r/min cannot be.",
                             "Check the speed of the engine during the card.");
    }
    return std::nullopt;
}

CrankForceRule::CrankForceRule(const SliderCrank& gear, const CrankLoad& load)
    : area_(gear.area()), below_(load.below_piston->value())
{
    if (load.moving_mass && load.speed) {
        const double omega = 2.0 * pi * load.speed->value();
        inertia_ = load.moving_mass->value() * omega * omega;
    }
}

Result<CrankForces> crank_forces(const SliderCrank& gear, PlaneAngle crank_angle, AbsolutePressure cylinder,
                                 const CrankLoad& load)
{
    if (auto problem = find_problem(load)) {
        return *std::move(problem);
    }
    if (!is_possible(crank_angle.value(), cylinder.value())) {
        return bad_sample(crank_angle.value(), cylinder.value(), "");
    }
    const PlainCrankForces forces = CrankForceRule(gear, load).at(gear.motion(crank_angle.value()), cylinder.value());
    return CrankForces{forces.piston * si::newtons, forces.guide * si::newtons,
                       Torque::from_value(forces.turning_moment)};
}

Result<CrankForceCurve> crank_forces(const SliderCrank& gear, std::span<const double> angle,
                                     std::span<const double> pressure, const CrankLoad& load)
{
    if (auto problem = find_problem(load)) {
        return *std::move(problem);
    }
    if (angle.size() != pressure.size() || angle.empty()) {
        return invalid_input("The card has " + std::to_string(angle.size()) + " angles and " +
                                 std::to_string(pressure.size()) + " pressures.",
                             "Give each sample of the card its angle and its pressure.");
    }
    const CrankForceRule rule(gear, load);
    CrankForceCurve curve;
    curve.gas_force_only = !load.moving_mass.has_value();
    for (std::vector<double>* column : {&curve.piston, &curve.guide, &curve.turning_moment}) {
        column->reserve(angle.size());
    }
    for (std::size_t i = 0; i < angle.size(); ++i) {
        if (!is_possible(angle[i], pressure[i])) {
            return bad_sample(angle[i], pressure[i], ", sample " + std::to_string(i + 1) + ",");
        }
        const PlainCrankForces forces = rule.at(gear.motion(angle[i]), pressure[i]);
        curve.piston.push_back(forces.piston);
        curve.guide.push_back(forces.guide);
        curve.turning_moment.push_back(forces.turning_moment);
    }
    return curve;
}

Result<Torque> mean_turning_moment(std::span<const double> angle, std::span<const double> moment)
{
    if (angle.size() != moment.size() || angle.size() < 3) {
        return invalid_input("The turning moment has " + std::to_string(angle.size()) + " angles and " +
                                 std::to_string(moment.size()) + " values; its mean needs 3 or more of both.",
                             "Give each sample its angle and its moment.");
    }
    if (!is_whole_cycle(angle.back() - angle.front())) {
        return invalid_input("The card spans " +
                                 short_number_text((angle.back() - angle.front()) * 180.0 / pi) +
                                 "° of crank, and its mean turning moment needs 360° or 720°.",
                             "Take a card of one whole cycle, its first point repeated at the end.");
    }
    double sum = 0.0;
    for (std::size_t i = 1; i < angle.size(); ++i) {
        if (!(angle[i] >= angle[i - 1]) || !std::isfinite(moment[i]) || !std::isfinite(moment[i - 1])) {
            return invalid_input("Sample " + std::to_string(i + 1) + " of the turning moment, at " +
                                     short_number_text(angle[i] * 180.0 / pi) +
                                     "°, has a falling angle or a moment that is no number.",
                                 "Check the card around this sample.");
        }
        sum += 0.5 * (moment[i] + moment[i - 1]) * (angle[i] - angle[i - 1]);
    }
    return Torque::from_value(sum / (angle.back() - angle.front()));
}

} // namespace evenstroke
