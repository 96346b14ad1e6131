// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/card_forces.h"

#include "core/card/cylinder_model.h"
#include "core/engine/crank_forces.h"
#include "core/engine/even_motion.h"
#include "core/engine/shaft_moment.h"

#include <algorithm>
#include <cmath>
#include <limits>

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
    if (find_problem(load))
        return std::nullopt;
    const CrankForceRule rule(gear.value(), load);
    CardForces forces;
    forces.gas_force_only = !load.moving_mass.has_value();
    forces.largest_moment = -std::numeric_limits<double>::infinity();
    double sum = 0.0, first = 0.0, last = 0.0;
    bool known = true;
    // As with the mean indicated pressure the drift stays in: what the compression says of it does not hold for a whole cycle,
    // and the mean moment is to be that of the stated work.
    const CleanTrace& trace = card.trace;
    follow_evenly(gear.value(), (trace.angle.front() - card.unknowns[offset]) * radians_per_degree, trace.step * radians_per_degree,
                  trace.angle.size(), [&](std::size_t i, const CrankMotion& crank) {
                      known = known && std::isfinite(trace.mean[i]);
                      const PlainCrankForces here = rule.at(crank, std::max(trace.mean[i] - card.unknowns[zero], least) * pascals_a_bar);
                      forces.largest_guide = std::max(forces.largest_guide, std::abs(here.guide) / kilo);
                      forces.largest_moment = std::max(forces.largest_moment, here.turning_moment / kilo);
                      last = here.turning_moment / kilo;
                      first = i == 0 ? last : first;
                      sum += last;
                  });
    if (!known)
        return std::nullopt;
    // Trapezoids all round; the one that closes the cycle may be wider where the step does not divide it.
    const double cycle = in_degrees(cycle_angle(engine.two_stroke()));
    const double closing = cycle - trace.step * static_cast<double>(trace.angle.size() - 1);
    forces.mean_moment = (trace.step * sum + 0.5 * (closing - trace.step) * (first + last)) / cycle;
    return forces;
}

} // namespace evenstroke::indicator
