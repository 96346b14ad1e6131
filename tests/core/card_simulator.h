// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

#include <random>
#include <vector>

/// A cylinder that is calculated, and an indicator that is not perfect: cards whose truth is known.
///
/// Assumed: one zone; air, burnt gas of CH_1.86 and a real gas like the evaluation's but with a second virial
/// coefficient of its own (spread below); first law with internal energy, wall loss by Woschni's film without or
/// Hohenberg's film times a multiplier; two Wiebe functions for what burns; leakage through a small opening, as through
/// a nozzle; gas exchange by smooth curves from blow-down to closing, not by flow. The indicator adds an offset of
/// the angle, a zero, its gain, white noise, a drift over the cycle, a thermal shock after combustion, the ringing of
/// its passage as an oscillator of second order, spikes and missing samples. Cycles differ in fuel. Numbers invented
/// or common practice without a source.
namespace evenstroke::indicator {

struct SimulatedEngine
{
    bool two_stroke = true;
    double bore = 0.6, stroke = 2.4, rod = 2.46; // m
    double compression_ratio = 19.0;
    double closes = -90.0, opens = 115.0, speed_rpm = 105.0, wall_kelvin = 545.0;
    double closing_factor = 1.02; // pressure at closing over scavenge pressure
};
SimulatedEngine large_two_stroke();
SimulatedEngine medium_four_stroke();

struct SimulatedCase
{
    SimulatedEngine engine;
    // the cylinder
    double scavenge = 3.65, closing_kelvin = 343.0, fuel_kg = 0.039;
    double start = 0.0, duration = 45.0, premixed = 0.06, form = 0.9;
    double late_share = 0.0, late_start = 40.0; // dribble: a part that burns late
    double wall_multiplier = 1.0, virial_factor = 1.0, ratio_error = 0.0, closing_slip = 0.0; // true ratio = entered (1 + error)
    bool hohenberg = false;
    double leak_mm2 = 0.0;
    bool fired = true;
    // the indicator
    double offset = 0.0, zero = 0.0, gain = 1.0, noise = 0.3, drift = 0.0, shock = 0.0;
    double passage_hz = 0.0, passage_damping = 0.1;
    double step = 0.5, fuel_variation = 0.01;
    int cycles = 20, spikes = 0, missing = 0;
    // what the operator says
    double said_scavenge_factor = 1.0, said_closing_shift = 0.0;
};

/// What the card would show without indicator.
struct Truth
{
    double mean_indicated = 0.0, maximum = 0.0, maximum_angle = 0.0, compression = 0.0, expansion = 0.0, rise = 0.0;
    double ca10 = 0.0, ca50 = 0.0, ca90 = 0.0, mass = 0.0, dead_centre_kelvin = 0.0, highest_kelvin = 0.0, heat = 0.0;
};

struct SimulatedCard
{
    Engine engine;
    Conditions conditions;
    Trace trace;
    Truth truth;
};

using Dice = std::mt19937_64;
SimulatedCard simulate(const SimulatedCase& what, Dice& dice);

/// A sound engine at 50 to 100 % load with an indicator that has an offset within 1.5°, a zero of 0.5 bar (standard
/// deviation), noise of 0.3 bar; scavenge pressure said to 1 %, ratio known to 0.5 %, closing temperature to 8 K,
/// wall loss 40 % either way.
SimulatedCase healthy_case(bool two_stroke, Dice& dice);
/// The same with a ratio within 3 % of the entered one and a drift within 0.3 bar a cycle.
SimulatedCase doubtful_inputs_case(bool two_stroke, Dice& dice);

double between(Dice& dice, double low, double high);
double spread(Dice& dice, double deviation);

} // namespace evenstroke::indicator
