// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/card_forces.h"

#include "core/engine/crank_forces.h"
#include "core/engine/shaft_moment.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {

std::optional<CardForces> card_forces(const Engine& engine, const Conditions& conditions, const Evaluation& card)
{
    constexpr double kilo = 1e3, pascals_a_bar = 1e5, crankcase = 1.0, least = 1e-3; // bar
    const auto gear = SliderCrank::make(engine.bore, engine.stroke, engine.rod_length);
    CrankLoad load;
    if (!engine.two_stroke())
        load.below_piston = bar_absolute(crankcase);
    else
        load.below_piston = conditions.scavenge_pressure;
    if (!gear || !load.below_piston || card.trace.coarse || card.trace.angle.empty())
        return std::nullopt;
    load.speed = conditions.speed;
    if (load.speed)
        load.moving_mass = engine.moving_mass;
    // As with the mean indicated pressure the drift stays in: what the compression says of it does not hold for a whole cycle,
    // and the mean moment is to be that of the stated work.
    std::vector<double> angle, pressure;
    for (std::size_t i = 0; i < card.trace.angle.size(); ++i) {
        if (!std::isfinite(card.trace.mean[i]))
            return std::nullopt;
        angle.push_back(crank_degrees(card.trace.angle[i] - card.unknowns[offset]).value());
        pressure.push_back(std::max(card.trace.mean[i] - card.unknowns[zero], least) * pascals_a_bar);
    }
    angle.push_back(angle.front() + cycle_angle(engine.two_stroke()).value());
    pressure.push_back(pressure.front());
    const auto curve = crank_forces(gear.value(), angle, pressure, load);
    if (!curve)
        return std::nullopt;
    const auto mean = mean_turning_moment(angle, curve.value().turning_moment);
    if (!mean)
        return std::nullopt;
    CardForces forces;
    for (const double newtons : curve.value().guide)
        forces.largest_guide = std::max(forces.largest_guide, std::abs(newtons) / kilo);
    forces.mean_moment = mean.value().value() / kilo;
    forces.largest_moment =
        *std::max_element(curve.value().turning_moment.begin(), curve.value().turning_moment.end()) / kilo;
    forces.gas_force_only = curve.value().gas_force_only;
    return forces;
}

} // namespace evenstroke::indicator
