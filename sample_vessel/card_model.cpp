// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/card_model.h"

#include "sample_vessel/cylinder_gas.h"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace evenstroke::sample {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double wall_k = 545.0;         // common practice for a two-stroke at work
constexpr double residual_share = 0.03;  // burnt gas left from the cycle before, common practice
constexpr double heating_value = 42.7e6; // J/kg
constexpr double burning_deg = 50.0;     // length of the burning law, invented
constexpr double burning_form = 0.9;
constexpr double share_of_scavenge = 0.985; // pressure in the open cylinder, invented

/// What is looked for until the card meets its target.
struct CycleChoice
{
    double closing_pressure = 0.0; ///< Pa
    double leak_per_deg = 0.0;     ///< share of the charge lost at 100 bar
    double heat_j = 0.0;
    double burning_begins_deg = 0.0;
};

std::size_t index_of(double angle_deg)
{
    return static_cast<std::size_t>(std::lround((angle_deg + 180.0) / card_step_deg));
}

double angle_of(std::size_t index)
{
    return -180.0 + card_step_deg * static_cast<double>(index);
}

/// Wiebe's law: share of the fuel burnt so far.
double burnt(double angle_deg, double begins_deg)
{
    const double share = (angle_deg - begins_deg) / burning_deg;
    return share <= 0.0 ? 0.0 : 1.0 - std::exp(-6.908 * std::pow(share, burning_form + 1.0));
}

/// Heat to the wall a second, W. Woschni 1967 as publicly quoted: 130 D^-0.2 p^0.8 T^-0.53 w^0.8 with p in
/// bar.
double wall_loss(const EngineDesign& engine, const CardTarget& target, const CycleChoice& choice,
                 double angle_deg, double pressure_pa, double unfired_pa, double temperature_k)
{
    const double bore = engine.bore_mm / 1000.0, stroke = engine.stroke_mm / 1000.0,
                 piston_area = pi / 4.0 * bore * bore;
    const double closing_volume = cylinder_volume(engine, engine.cylinder_closes_deg);
    const double from_burning = 3.24e-3 * engine.swept_volume_m3() * target.closing_temperature_k /
                                (choice.closing_pressure * closing_volume) *
                                std::max(0.0, pressure_pa - unfired_pa);
    const double speed = 2.28 * stroke * target.speed_rpm / 30.0 + from_burning;
    const double film = 130.0 * std::pow(bore, -0.2) * std::pow(pressure_pa / 1e5, 0.8) *
                        std::pow(temperature_k, -0.53) * std::pow(speed, 0.8);
    const double depth = (cylinder_volume(engine, angle_deg) - cylinder_volume(engine, 0.0)) / piston_area;
    return film * (2.15 * piston_area + pi * bore * depth) * (temperature_k - wall_k);
}

/// The closed part of one cycle, advanced step by step with the midpoint rule.
class ClosedCycle
{
public:
    ClosedCycle(const EngineDesign& engine, const CardTarget& target, const CycleChoice& choice,
                const std::vector<double>* unfired)
        : engine_(engine), target_(target), choice_(choice), unfired_(unfired)
    {
        const double volume = cylinder_volume(engine, engine.cylinder_closes_deg);
        mass_ = gas_density(choice.closing_pressure, target.closing_temperature_k) * volume;
    }

    /// Fills the samples from closing to opening.
    void run(std::vector<double>& pressures)
    {
        double log_pressure = std::log(choice_.closing_pressure);
        for (std::size_t i = index_of(engine_.cylinder_closes_deg); i <= index_of(engine_.cylinder_opens_deg);
             ++i) {
            pressures[i] = std::exp(log_pressure);
            const double angle = angle_of(i), half = card_step_deg / 2.0;
            const double middle = log_pressure + half * slope(angle, log_pressure);
            mass_ *= 1.0 - leak(pressures[i]) * card_step_deg;
            log_pressure += card_step_deg * slope(angle + half, middle);
        }
    }

private:
    double leak(double pressure_pa) const { return choice_.leak_per_deg * pressure_pa / 1e7; }

    /// d ln p / d angle.
    double slope(double angle, double log_pressure) const
    {
        constexpr double small = 0.01;
        const double pressure = std::exp(log_pressure), volume = cylinder_volume(engine_, angle);
        const double volume_slope =
            (cylinder_volume(engine_, angle + small) - cylinder_volume(engine_, angle - small)) /
            (2.0 * small * volume);
        const double share = burnt(angle, choice_.burning_begins_deg);
        const double burnt_share = residual_share + choice_.heat_j * share / heating_value * 15.587 / mass_;
        const GasState gas = gas_state(pressure, mass_ / volume, std::min(1.0, burnt_share));
        const double unfired_pa = unfired_ ? (*unfired_)[index_of(angle)] : pressure;
        const double heat = choice_.heat_j *
                            (burnt(angle + small, choice_.burning_begins_deg) -
                             burnt(angle - small, choice_.burning_begins_deg)) /
                            (2.0 * small);
        const double lost =
            wall_loss(engine_, target_, choice_, angle, pressure, unfired_pa, gas.temperature_k) /
            (6.0 * target_.speed_rpm);
        return -gas.isentropic_exponent * (volume_slope + leak(pressure)) +
               gas.pressure_rise * (heat - lost) / (pressure * volume);
    }

    const EngineDesign& engine_;
    const CardTarget& target_;
    const CycleChoice& choice_;
    const std::vector<double>* unfired_;
    double mass_ = 0.0;
};

/// Exhaust, scavenging and the rise to the closing pressure.
void fill_open_part(const EngineDesign& engine, const CardTarget& target, std::vector<double>& pressures)
{
    const std::size_t opens = index_of(engine.cylinder_opens_deg),
                      closes = index_of(engine.cylinder_closes_deg);
    const double at_opening = pressures[opens], at_closing = pressures[closes],
                 open = share_of_scavenge * target.scavenge * 1e5;
    for (std::size_t i = opens + 1; i < pressures.size(); ++i) {
        const double passed = (angle_of(i) - engine.cylinder_opens_deg) / 13.0;
        pressures[i] = open + (at_opening - open) * std::exp(-std::pow(passed, 1.3));
    }
    constexpr double rise_begins_deg = -125.0;
    for (std::size_t i = 0; i < closes; ++i) {
        const double way =
            std::max(0.0, (angle_of(i) - rise_begins_deg) / (engine.cylinder_closes_deg - rise_begins_deg));
        pressures[i] = open + (at_closing - open) * way * way;
    }
}

std::vector<double> run_cycle(const EngineDesign& engine, const CardTarget& target, const CycleChoice& choice,
                              const std::vector<double>* unfired)
{
    std::vector<double> pressures(static_cast<std::size_t>(std::lround(360.0 / card_step_deg)), 0.0);
    ClosedCycle(engine, target, choice, unfired).run(pressures);
    fill_open_part(engine, target, pressures);
    return pressures;
}

/// Closing pressure, and leak where one is wanted, so that the unfired line passes through the compression
/// pressure.
CycleChoice fitted_compression(const EngineDesign& engine, const CardTarget& target)
{
    CycleChoice choice{target.scavenge * 1e5, 0.0, 0.0, 0.0};
    const std::size_t top = index_of(0.0);
    const double sound = (target.compression + target.lost_by_leak) * 1e5;
    for (int step = 0; step < 8; ++step)
        choice.closing_pressure *= sound / run_cycle(engine, target, choice, nullptr)[top];
    if (target.lost_by_leak <= 0.0)
        return choice;
    choice.leak_per_deg = 1e-3;
    for (int step = 0; step < 8; ++step)
        choice.leak_per_deg *=
            target.lost_by_leak * 1e5 / (sound - run_cycle(engine, target, choice, nullptr)[top]);
    return choice;
}

} // namespace

double cylinder_volume(const EngineDesign& engine, double angle_deg)
{
    const double crank = engine.stroke_mm / 2000.0, rod = engine.rod_length_mm / 1000.0,
                 angle = angle_deg * pi / 180.0;
    const double travel = crank * (1.0 - std::cos(angle)) + rod -
                          std::sqrt(rod * rod - crank * crank * std::sin(angle) * std::sin(angle));
    return engine.swept_volume_m3() *
           (1.0 / (engine.compression_ratio - 1.0) + travel / (engine.stroke_mm / 1000.0));
}

double mean_indicated_pressure(const EngineDesign& engine, const std::vector<double>& pressures)
{
    double work = 0.0;
    for (std::size_t i = 0; i < pressures.size(); ++i) {
        const double next = pressures[(i + 1) % pressures.size()];
        work += 0.5 * (pressures[i] + next) *
                (cylinder_volume(engine, angle_of(i + 1)) - cylinder_volume(engine, angle_of(i)));
    }
    return work / engine.swept_volume_m3();
}

std::vector<double> card_pressures(const EngineDesign& engine, const CardTarget& target)
{
    CycleChoice choice = fitted_compression(engine, target);
    const std::vector<double> unfired = run_cycle(engine, target, choice, nullptr);
    choice.heat_j =
        target.mean_indicated * 1e5 * engine.swept_volume_m3() / 0.49; // indicated efficiency to begin with
    std::vector<double> pressures;
    for (int step = 0; step < 40; ++step) {
        pressures = run_cycle(engine, target, choice, &unfired);
        const double maximum = *std::max_element(pressures.begin(), pressures.end()) / 1e5;
        const double mean = mean_indicated_pressure(engine, pressures) / 1e5;
        choice.heat_j *= 1.0 + 0.9 * (target.mean_indicated / mean - 1.0);
        choice.burning_begins_deg += 0.09 * (maximum - target.maximum); // about 7 bar a degree
    }
    for (double& pressure : pressures)
        pressure /= 1e5;
    return pressures;
}

} // namespace evenstroke::sample
