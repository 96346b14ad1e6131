// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/card_indicator.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace evenstroke::indicator {
namespace {

constexpr double pi = 3.14159265358979323846;

/// An oscillator behind the cock: p'' = w²(p - y) - 2 z w y', in steps short against its period.
std::vector<double> through_passage(const SimulatedCase& what, const FineCycle& cycle, const std::vector<double>& pressure)
{
    if (!(what.passage_hz > 0.0))
        return pressure;
    const double degree_time = 1.0 / (6.0 * what.engine.speed_rpm);
    const double step_time = degree_time * (cycle.angle[1] - cycle.angle[0]);
    const double w = 2.0 * pi * what.passage_hz;
    const int parts = std::max(1, static_cast<int>(std::ceil(step_time * w / 0.05)));
    const double dt = step_time / parts;
    std::vector<double> shown(pressure.size());
    double y = pressure.front(), rate = 0.0;
    for (std::size_t i = 0; i < pressure.size(); ++i) {
        shown[i] = y;
        const double next = pressure[(i + 1) % pressure.size()];
        for (int k = 0; k < parts; ++k) {
            const double drive = pressure[i] + (next - pressure[i]) * (k + 0.5) / parts;
            rate += dt * (w * w * (drive - y) - 2.0 * what.passage_damping * w * rate);
            y += dt * rate;
        }
    }
    return shown;
}

/// Cubic through four neighbours of the fine cycle.
double at(const std::vector<double>& p, double place)
{
    const auto n = static_cast<std::ptrdiff_t>(p.size());
    const double floor = std::floor(place), t = place - floor;
    const auto i = static_cast<std::ptrdiff_t>(floor);
    const auto sample = [&](std::ptrdiff_t k) { return p[static_cast<std::size_t>(((i + k) % n + n) % n)]; };
    const double a = sample(-1), b = sample(0), c = sample(1), d = sample(2);
    return b + 0.5 * t * (c - a + t * (2.0 * a - 5.0 * b + 4.0 * c - d + t * (3.0 * (b - c) + d - a)));
}

double wrapped(double angle, double first, double period)
{
    const double turns = std::floor((angle - first) / period);
    return angle - turns * period;
}

double slow_error(const SimulatedCase& what, double true_angle)
{
    const double period = what.engine.two_stroke ? 360.0 : 720.0;
    // A thermal shock builds up while the flame is hot and fades until the next compression.
    const double since = true_angle - what.start;
    const double shock = since > 0.0 ? -what.shock * (1.0 - std::exp(-since / 25.0)) * std::exp(-since / 200.0) : 0.0;
    return what.drift * true_angle / period + shock;
}

void spoil(const SimulatedCase& what, Trace& trace, Dice& dice)
{
    const auto any = [&] { return std::uniform_int_distribution<std::size_t>(0, trace.angle.size() - 1)(dice); };
    for (int i = 0; i < what.spikes; ++i)
        trace.pressure[any()] += between(dice, 0.0, 1.0) < 0.5 ? 25.0 : -25.0;
    for (int i = 0; i < what.missing; ++i)
        trace.pressure[any()] = std::numeric_limits<double>::quiet_NaN();
}

} // namespace

double between(Dice& dice, double low, double high) { return std::uniform_real_distribution<double>(low, high)(dice); }
double spread(Dice& dice, double deviation) { return std::normal_distribution<double>(0.0, deviation)(dice); }

Trace record(const SimulatedCase& what, const FineCycle& fired, const FineCycle& unfired, Dice& dice)
{
    const double period = what.engine.two_stroke ? 360.0 : 720.0, fine = fired.angle[1] - fired.angle[0];
    Trace trace;
    std::normal_distribution<double> noise(0.0, what.noise);
    std::vector<double> pressure(fired.pressure);
    // The cycles differ, and their mean is the cycle whose truth is known.
    std::vector<double> variation(static_cast<std::size_t>(what.cycles));
    double mean = 0.0;
    for (double& v : variation)
        mean += (v = spread(dice, what.fuel_variation)) / what.cycles;
    for (int c = 0; c < what.cycles; ++c) {
        const double more = what.fired ? variation[static_cast<std::size_t>(c)] - mean : 0.0;
        for (std::size_t i = 0; i < unfired.pressure.size(); ++i)
            pressure[i] = fired.pressure[i] + more * (fired.pressure[i] - unfired.pressure[i]);
        const std::vector<double> shown = through_passage(what, fired, pressure);
        const auto samples = static_cast<int>(std::lround(period / what.step));
        for (int i = 0; i < samples; ++i) {
            const double angle = -0.5 * period + i * what.step;
            const double truly = wrapped(angle - what.offset, fired.angle.front(), period);
            const double value = at(shown, (truly - fired.angle.front()) / fine);
            const double around = truly > 0.5 * period ? truly - period : truly;
            if (what.cycles > 1)
                trace.cycle.push_back(c + 1);
            trace.angle.push_back(angle);
            trace.pressure.push_back(what.gain * value + what.zero + slow_error(what, around) + noise(dice));
        }
    }
    spoil(what, trace, dice);
    return trace;
}

Engine as_entered(const SimulatedEngine& engine)
{
    Engine entered;
    entered.name = "simulated engine";
    entered.kind = engine.two_stroke ? EngineKind::two_stroke : EngineKind::four_stroke;
    entered.cylinders = 6;
    entered.bore = engine.bore * si::metres;
    entered.stroke = engine.stroke * si::metres;
    entered.rod_length = engine.rod * si::metres;
    entered.rated_speed = per_minute(engine.speed_rpm);
    entered.compression_ratio = engine.compression_ratio;
    entered.cylinder_closes_deg = engine.closes;
    entered.cylinder_opens_deg = engine.opens;
    return entered;
}

SimulatedEngine large_two_stroke() { return {}; }

SimulatedEngine medium_four_stroke()
{
    return {false, 0.32, 0.40, 0.80, 15.0, -140.0, 130.0, 750.0, 500.0, 1.00};
}

SimulatedCase healthy_case(bool two_stroke, Dice& dice)
{
    SimulatedCase what;
    what.engine = two_stroke ? large_two_stroke() : medium_four_stroke();
    const double load = between(dice, 0.5, 1.0);
    what.scavenge = (two_stroke ? 3.9 : 3.6) * (0.25 + 0.75 * load);
    what.fuel_kg = (two_stroke ? 0.056 : 3.3e-3) * (0.1 + 0.9 * load);
    if (two_stroke)
        what.engine.speed_rpm *= std::cbrt(load);
    what.start = between(dice, -4.0, 2.0);
    what.duration = between(dice, 40.0, 60.0);
    what.premixed = between(dice, 0.02, 0.12);
    what.form = between(dice, 0.6, 1.1);
    what.closing_kelvin = between(dice, 330.0, 360.0);
    what.wall_multiplier = between(dice, 0.6, 1.4);
    what.virial_factor = between(dice, 0.95, 1.05);
    what.ratio_error = between(dice, -0.005, 0.005);
    what.closing_slip = spread(dice, 0.01);
    what.offset = between(dice, -1.5, 1.5);
    what.zero = spread(dice, 0.5);
    what.said_scavenge_factor = 1.0 + spread(dice, 0.01);
    what.said_closing_shift = between(dice, -8.0, 8.0);
    return what;
}

SimulatedCase doubtful_inputs_case(bool two_stroke, Dice& dice)
{
    SimulatedCase what = healthy_case(two_stroke, dice);
    what.ratio_error = between(dice, -0.03, 0.03);
    if (between(dice, 0.0, 1.0) < 0.5)
        what.drift = between(dice, -0.3, 0.3);
    else
        what.shock = between(dice, 0.0, 0.3);
    what.noise = between(dice, 0.05, 0.5);
    what.cycles = between(dice, 0.0, 1.0) < 0.5 ? 1 : 20;
    return what;
}

} // namespace evenstroke::indicator
