// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/card_simulator.h"

#include "core/card/working_gas.h"
#include "tests/core/card_indicator.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double per_degree = 3.14159265358979323846 / 180.0;
constexpr double heat_of_fuel = 42.7e6; // J/kg
constexpr double residual = 0.03;

struct State
{
    double energy, mass, fuel; // J, kg of everything, kg burnt
};
struct Gas
{
    double kelvin, pressure; // K, Pa
};

/// The closed cylinder, degree by degree.
class ClosedCylinder
{
public:
    explicit ClosedCylinder(const SimulatedCase& what) : what_(what), engine_(what.engine)
    {
        area_ = 3.14159265358979323846 / 4.0 * engine_.bore * engine_.bore;
        clearance_ = area_ * engine_.stroke / (engine_.compression_ratio * (1.0 + what.ratio_error) - 1.0);
    }
    double position(double angle) const
    {
        const double r = 0.5 * engine_.stroke, s = std::sin(angle * per_degree);
        return r * (1.0 - std::cos(angle * per_degree)) + engine_.rod - std::sqrt(engine_.rod * engine_.rod - r * r * s * s);
    }
    double volume(double angle) const { return clearance_ + area_ * position(angle); }
    double burnt_fuel(double angle) const
    {
        const auto wiebe = [](double x, double form) {
            return x <= 0.0 ? 0.0 : 1.0 - std::exp(-6.908 * std::pow(std::min(x, 1.5), form + 1.0));
        };
        const double from = angle - what_.start;
        const double main = what_.premixed * wiebe(from / 7.0, 1.5) +
                            (1.0 - what_.premixed) * wiebe(from / what_.duration, what_.form);
        return what_.fuel_kg * ((1.0 - what_.late_share) * main +
                                what_.late_share * wiebe((angle - what_.late_start) / 45.0, 1.0));
    }
    Gas gas(const State& state, double angle, double& kelvin) const
    {
        const double v = volume(angle);
        const double charge = state.mass - state.fuel;
        const WorkingGas mixture(std::min(1.0, (residual * charge + (1.0 + stoichiometric_air) * state.fuel) / state.mass));
        const double density = state.mass / v, r = mixture.gas_constant();
        for (int round = 0; round < 2; ++round) {
            const Virial b = virial(kelvin);
            const double f = what_.virial_factor;
            const double energy = mixture.energy(kelvin) - density * r * kelvin * kelvin * f * b.slope;
            const double capacity = mixture.heat_capacity(kelvin) -
                                    density * r * kelvin * f * (2.0 * b.slope + kelvin * b.curvature);
            kelvin += (state.energy / state.mass - energy) / capacity;
        }
        return {kelvin, density * r * kelvin * (1.0 + what_.virial_factor * virial(kelvin).value * density)};
    }
    State start(double& kelvin) const
    {
        const WorkingGas mixture(residual);
        const double v = volume(engine_.closes);
        const double pressure = engine_.closing_factor * (1.0 + what_.closing_slip) * what_.scavenge * 1e5;
        kelvin = what_.closing_kelvin;
        const double b = what_.virial_factor * virial(kelvin).value;
        double density = pressure / (mixture.gas_constant() * kelvin);
        for (int round = 0; round < 5; ++round)
            density = pressure / (mixture.gas_constant() * kelvin * (1.0 + b * density));
        const double energy = mixture.energy(kelvin) -
                              density * mixture.gas_constant() * kelvin * kelvin * what_.virial_factor * virial(kelvin).slope;
        return {density * v * energy, density * v, 0.0};
    }
    State slope(const State& state, double angle, bool fired, double& kelvin) const
    {
        const Gas here = gas(state, angle, kelvin);
        const double h = 1e-3;
        const double dv = (volume(angle + h) - volume(angle - h)) / (2.0 * h);
        const double burning = fired ? (burnt_fuel(angle + 0.05) - burnt_fuel(angle - 0.05)) / 0.1 : 0.0;
        const double leaking = leak(here);
        const double enthalpy = state.energy / state.mass + here.pressure * volume(angle) / state.mass;
        return {burning * heat_of_fuel - wall(here, angle) - here.pressure * dv - leaking * enthalpy, burning - leaking, burning};
    }

private:
    /// J a degree.
    double wall(const Gas& gas, double angle) const
    {
        const double piston = 2.0 * engine_.stroke * engine_.speed_rpm / 60.0, bar = gas.pressure * 1e-5;
        const double film =
            what_.hohenberg
                ? 130.0 * std::pow(volume(angle), -0.06) * std::pow(bar, 0.8) * std::pow(gas.kelvin, -0.4) * std::pow(piston + 1.4, 0.8)
                : 130.0 * std::pow(engine_.bore, -0.2) * std::pow(bar, 0.8) * std::pow(gas.kelvin, -0.53) * std::pow(2.28 * piston, 0.8);
        const double walls = 2.15 * area_ + 3.14159265358979323846 * engine_.bore * position(angle);
        return what_.wall_multiplier * film * walls * (gas.kelvin - engine_.wall_kelvin) / (6.0 * engine_.speed_rpm);
    }
    /// kg a degree through a choked opening.
    double leak(const Gas& gas) const
    {
        return what_.leak_mm2 * 1e-6 * 0.685 * gas.pressure / std::sqrt(287.0 * gas.kelvin) / (6.0 * engine_.speed_rpm);
    }

    const SimulatedCase& what_;
    const SimulatedEngine& engine_;
    double area_, clearance_;
};

constexpr double fine = 0.1; // degrees

/// Closed part: pressure and temperature from closing to opening, second order.
void run_closed(const SimulatedCase& what, bool fired, FineCycle& cycle)
{
    const ClosedCylinder cylinder(what);
    double kelvin = 0.0;
    State state = cylinder.start(kelvin);
    cycle.mass = state.mass;
    const auto steps = static_cast<int>(std::lround((what.engine.opens - what.engine.closes) / fine));
    for (int i = 0; i <= steps; ++i) {
        const double angle = what.engine.closes + i * fine;
        const Gas gas = cylinder.gas(state, angle, kelvin);
        cycle.angle.push_back(angle);
        cycle.pressure.push_back(gas.pressure * 1e-5);
        cycle.kelvin.push_back(gas.kelvin);
        const State first = cylinder.slope(state, angle, fired, kelvin);
        const State half{state.energy + 0.5 * fine * first.energy, state.mass + 0.5 * fine * first.mass,
                         state.fuel + 0.5 * fine * first.fuel};
        const State middle = cylinder.slope(half, angle + 0.5 * fine, fired, kelvin);
        state = {state.energy + fine * middle.energy, state.mass + fine * middle.mass, state.fuel + fine * middle.fuel};
    }
}

/// Blow-down, gas exchange and what flows in, up to the next closing: smooth, and joined at both ends.
void add_gas_exchange(const SimulatedCase& what, FineCycle& cycle)
{
    const double period = what.engine.two_stroke ? 360.0 : 720.0;
    const double open = cycle.pressure.back(), closed = cycle.pressure.front();
    const double exhaust = 0.94 * what.scavenge, inlet = 0.985 * what.scavenge;
    const double end = what.engine.closes + period;
    for (double angle = what.engine.opens + fine; angle < end - 0.5 * fine; angle += fine) {
        const double since = angle - what.engine.opens, left = end - angle;
        const double middle = what.engine.two_stroke ? 0.5 * (what.engine.opens + end) : 365.0;
        const double share = 1.0 / (1.0 + std::exp(-(angle - middle) / 8.0));
        const double flow = exhaust + (inlet - exhaust) * share;
        const double blow = (open - exhaust) * std::exp(-since / 9.0), into = (closed - inlet) * std::exp(-left / 14.0);
        cycle.angle.push_back(angle);
        cycle.pressure.push_back(flow + blow + into);
        cycle.kelvin.push_back(0.0);
    }
}

double at(const FineCycle& cycle, const std::vector<double>& values, double angle)
{
    const double place = (angle - cycle.angle.front()) / fine;
    const auto i = static_cast<std::size_t>(place);
    return values[i] + (place - static_cast<double>(i)) * (values[i + 1] - values[i]);
}

double reaches(const ClosedCylinder& cylinder, const SimulatedCase& what, double share)
{
    const double total = cylinder.burnt_fuel(what.engine.opens - 1.0);
    double low = what.start, high = what.engine.opens - 1.0;
    for (int round = 0; round < 40; ++round) {
        const double middle = 0.5 * (low + high);
        (cylinder.burnt_fuel(middle) < share * total ? low : high) = middle;
    }
    return low;
}

Truth find_truth(const SimulatedCase& what, const FineCycle& fired, const FineCycle& unfired)
{
    const ClosedCylinder cylinder(what);
    Truth truth;
    const std::size_t n = fired.angle.size();
    const double swept = cylinder.volume(180.0) - cylinder.volume(0.0);
    for (std::size_t i = 0; i < n; ++i) {
        const std::size_t next = (i + 1) % n;
        const double angle = fired.angle[i];
        truth.mean_indicated += 0.5 * (fired.pressure[i] + fired.pressure[next]) *
                                (cylinder.volume(fired.angle[next]) - cylinder.volume(angle)) / swept;
        if (fired.pressure[i] > truth.maximum)
            truth.maximum = fired.pressure[i], truth.maximum_angle = angle;
        if (i > 0 && std::abs(angle) < 40.0)
            truth.rise = std::max(truth.rise, (fired.pressure[next] - fired.pressure[i - 1]) / (2.0 * fine));
        truth.highest_kelvin = std::max(truth.highest_kelvin, fired.kelvin[i]);
    }
    truth.compression = at(unfired, unfired.pressure, 0.0);
    truth.expansion = at(fired, fired.pressure, 40.0);
    truth.dead_centre_kelvin = at(fired, fired.kelvin, 0.0);
    truth.mass = fired.mass;
    truth.heat = cylinder.burnt_fuel(what.engine.opens - 1.0) * heat_of_fuel;
    truth.ca10 = reaches(cylinder, what, 0.1);
    truth.ca50 = reaches(cylinder, what, 0.5);
    truth.ca90 = reaches(cylinder, what, 0.9);
    return truth;
}

} // namespace

SimulatedCard simulate(const SimulatedCase& what, Dice& dice)
{
    FineCycle fired, unfired;
    run_closed(what, what.fired, fired);
    run_closed(what, false, unfired);
    SimulatedCard card;
    add_gas_exchange(what, fired);
    card.truth = find_truth(what, fired, unfired);
    card.trace = record(what, fired, unfired, dice);
    card.engine = as_entered(what.engine);
    card.conditions.speed = per_minute(what.engine.speed_rpm);
    card.conditions.scavenge_pressure = bar_absolute(what.scavenge * what.said_scavenge_factor);
    card.conditions.charge_temperature = Temperature::from_value(what.closing_kelvin + what.said_closing_shift);
    return card;
}

} // namespace evenstroke::indicator
