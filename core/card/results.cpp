// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/results.h"

#include "core/card/result_catalogue.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double expansion_half_width = 2.0; // degrees
constexpr double wall_spread = 0.25;         // of the film formula's wall loss (common practice, no source)
constexpr double hot_drift = 0.08;           // bar by which the flame may move the zero (common practice, no source)
constexpr double drift_of_work = 0.08;       // bar of mean indicated pressure from a zero that moves within the cycle
constexpr double jump_of_work = 0.8;         // bar of mean indicated pressure a bar of jump: a thermal shock of 0.5 bar, by simulation
constexpr double coverage = 2.0;             // JCGM 100: half-width at 95 % over the standard uncertainty

/// How far each unknown is moved for a difference quotient.
constexpr Unknowns moved_by{0.02, 0.02, 0.05, 1e-4, 0.002, 2.0, 0.02};

/// bar by which the record's end does not meet its beginning beyond what noise does; a flame that has heated the transducer
/// leaves it so.
double end_jump(const ThinTrace& thin)
{
    constexpr double width = 3.0; // degrees
    const auto count = std::min(thin.pressure.size(), static_cast<std::size_t>(std::max(1.0, width / thin.step)));
    if (count == 0)
        return 0.0;
    double jump = 0.0;
    for (std::size_t i = 0; i < count; ++i)
        jump += (thin.pressure[thin.pressure.size() - 1 - i] - thin.pressure[i]) / static_cast<double>(count);
    const double by_chance = 2.0 * thin.noise * std::sqrt(2.0 / static_cast<double>(count));
    return std::isfinite(jump) ? std::max(0.0, std::abs(jump) - by_chance) : 0.0;
}

std::size_t index(CardResult result) { return static_cast<std::size_t>(result); }

} // namespace

ResultMaker::ResultMaker(const Engine& engine, const CleanTrace& clean, const ThinTrace& thin,
                         const DirectReadings& direct, const Setting& setting, const SelfCalibration& found)
    : engine_(engine), clean_(clean), thin_(thin), direct_(direct), setting_(setting), found_(found),
      walls_(setting.cylinder)
{
}

double mean_indicated(const SliderCrank& gear, const CleanTrace& clean, double recorded_offset)
{
    if (!clean.uneven)
        return weighted_sum(clean.mean, work_weights(gear, clean.angle, clean.step, recorded_offset));
    double sum = 0.0;
    for (const Cycle& cycle : clean.cycles)
        sum += cycle.own_angle.empty()
                   ? weighted_sum(cycle.pressure, work_weights(gear, clean.angle, clean.step, recorded_offset))
                   : polygon_pressure(gear, cycle.own_angle, cycle.own_pressure, recorded_offset);
    return sum / static_cast<double>(clean.cycles.size());
}

Numbers ResultMaker::at(const Unknowns& x, const Beside& beside, const HeatRelease* base,
                        std::optional<HeatRelease>& heat) const
{
    const Cylinder& cylinder = setting_.cylinder;
    Numbers numbers;
    const auto set = [&](CardResult result, std::optional<double> value) { numbers[index(result)] = value; };
    set(CardResult::offset, x[offset]);
    set(CardResult::zero, x[zero]);
    if (direct_.peak) {
        const double angle = direct_.peak->angle - x[offset];
        set(CardResult::maximum_pressure, direct_.peak->pressure - zero_at(cylinder, x, angle));
        set(CardResult::maximum_pressure_angle, angle);
    }
    const double expansion = engine_.expansion_angle_deg;
    if (const auto p = local_pressure(thin_.angle, thin_.pressure, expansion + x[offset], expansion_half_width))
        set(CardResult::expansion_pressure,
            *p - zero_at(cylinder, x, expansion) - beside.expansion_drift * hot_share(expansion));
    const LineEnd end = line_end(cylinder, walls_, found_.window, x);
    const double dead_centre = 0.0;
    const auto line = carry_line(cylinder, walls_, x, found_.closing_pressure, end.angle, end.log_pressure,
                                 std::span(&dead_centre, 1));
    set(CardResult::compression_pressure, std::exp(line.front()));
    const double mass = trapped_mass(cylinder, found_.closing_pressure, x);
    set(CardResult::trapped_mass, mass);
    const double kept = x[offset] - found_.fit.values[offset]; // what was recorded stays where it was
    HeatInputs inputs{thin_.angle, thin_.pressure, mass, std::nullopt, beside.wall_multiplier};
    inputs.expansion_drift = beside.expansion_drift;
    if (found_.start) {
        inputs.start = found_.start->start - kept;
        set(CardResult::start_of_combustion, *inputs.start);
    }
    inputs.samples = samples_within(thin_.angle, cylinder.closes + 2.0 + found_.fit.values[offset],
                                    cylinder.opens - 1.0 + found_.fit.values[offset]);
    if (base) {
        inputs.known_fuel = &base->fuel;
        inputs.rounds = 1;
    }
    heat = release_heat(cylinder, walls_, x, inputs);
    if (!heat)
        return numbers;
    set(CardResult::ca10, heat->ca10);
    set(CardResult::ca50, heat->ca50);
    set(CardResult::ca90, heat->ca90);
    set(CardResult::dead_centre_temperature, heat->dead_centre_kelvin);
    set(CardResult::maximum_temperature, heat->highest_kelvin);
    return numbers;
}

/// Degrees by which the noise of the late expansion moves the shares of the heat, through the total.
std::array<double, 3> ResultMaker::heat_noise(const HeatRelease& heat) const
{
    constexpr double capacity_over_constant = 3.0, averaged = 20.0; // c_v/R of hot gas; degrees of the late mean
    const Cylinder& cylinder = setting_.cylinder;
    const double volume = cylinder.gear.volume(cylinder.opens * radians_per_degree, cylinder.clearance(cylinder.compression_ratio));
    const double joules = capacity_over_constant * volume * thin_.noise * 1e5 / std::sqrt(averaged / thin_.step);
    std::array<double, 3> degrees{};
    const double shares[] = {0.1, 0.5, 0.9};
    for (std::size_t i = 0; i < degrees.size(); ++i) {
        const auto there = angle_of_share(heat, shares[i]);
        const auto later = angle_of_share(heat, std::min(0.999, shares[i] * (1.0 + joules / std::max(heat.total, 1.0))));
        degrees[i] = there && later ? *later - *there : 0.0;
    }
    return degrees;
}

Numbers ResultMaker::numbers(std::optional<HeatRelease>& heat) const
{
    Numbers numbers = at(found_.fit.values, {}, nullptr, heat);
    numbers[index(CardResult::mean_indicated_pressure)] =
        mean_indicated(setting_.cylinder.gear, clean_, found_.fit.values[offset]);
    if (direct_.rise)
        numbers[index(CardResult::pressure_rise)] = direct_.rise->value;
    return numbers;
}

/// What the unknowns do not explain: noise of the samples the result is read from, and the catalogue's own spread.
std::optional<double> ResultMaker::own_spread(CardResult result, double value) const
{
    const ResultSpread& own = result_spread(result);
    const double stated = setting_.cylinder.two_stroke ? own.two_stroke : own.four_stroke;
    double squares = own.relative ? stated * value * stated * value : stated * stated;
    const double cycles = static_cast<double>(clean_.cycles.size());
    if (result == CardResult::maximum_pressure && direct_.peak) {
        const double noise = direct_.peak->pressure_spread;
        squares += noise * noise + direct_.maximum_spread * direct_.maximum_spread / cycles +
                   direct_.passage_swing * direct_.passage_swing;
    }
    if (result == CardResult::maximum_pressure_angle && direct_.peak)
        squares += direct_.peak->angle_spread * direct_.peak->angle_spread;
    if (result == CardResult::mean_indicated_pressure) {
        const double moved = jump_of_work * end_jump(thin_);
        squares += drift_of_work * drift_of_work + moved * moved;
    }
    if (result == CardResult::trapped_mass || result == CardResult::dead_centre_temperature ||
        result == CardResult::maximum_temperature) {
        // The charge is read from a parabola over 8° after closing.
        const double closing_pressure = std::max(found_.closing_pressure.constant - found_.fit.values[zero], 0.2);
        const double noisy = 1.3 * thin_.noise / std::sqrt(8.0 / thin_.step + 1.0) / closing_pressure * value;
        squares += noisy * noisy;
    }
    if (base_spread_ && (result == CardResult::ca10 || result == CardResult::ca50 || result == CardResult::ca90)) {
        const double noisy = (*base_spread_)[index(result) - index(CardResult::ca10)];
        squares += noisy * noisy;
    }
    if (result == CardResult::expansion_pressure)
        squares += thin_.noise * thin_.noise / 4.0;
    if (result == CardResult::pressure_rise && direct_.rise)
        squares += direct_.rise->spread * direct_.rise->spread;
    if (result == CardResult::start_of_combustion && !found_.line_log.empty()) {
        // ln p rises by about 0.02 a degree where the start is laid back from (common practice).
        const double share = thin_.noise / std::exp(found_.line_log.front()) / 0.02;
        // Fewer samples to lay it through where they are far apart.
        squares += 2.0 * share * share * std::pow(thin_.step / 0.5, 3.0) + 4.0 * direct_.passage_lag * direct_.passage_lag;
    }
    return std::sqrt(squares);
}

Estimates ResultMaker::estimate(std::optional<HeatRelease>& heat, Carried& carried)
{
    const Numbers middle = numbers(heat);
    base_spread_.reset();
    if (heat)
        base_spread_ = heat_noise(*heat);
    carried.covariance = found_.fit.covariance;
    carried.believed = found_.believed;
    UnknownCovariance& covariance = carried.covariance;
    covariance[offset][offset] += direct_.passage_lag * direct_.passage_lag;
    std::array<Unknowns, result_count>& slopes = carried.slopes;
    Unknowns values = found_.fit.values;
    for (std::size_t unknown = 0; unknown < unknown_count; ++unknown) {
        if (!(covariance[unknown][unknown] > 0.0))
            continue;
        Unknowns moved = values;
        moved[unknown] += moved_by[unknown];
        std::optional<HeatRelease> ignored;
        Numbers there = at(moved, {}, heat ? &*heat : nullptr, ignored);
        if (unknown == offset)
            there[index(CardResult::mean_indicated_pressure)] =
                *middle[index(CardResult::mean_indicated_pressure)] +
                weighted_sum(thin_.pressure, work_weights(setting_.cylinder.gear, thin_.angle, thin_.step, moved[offset])) -
                weighted_sum(thin_.pressure, work_weights(setting_.cylinder.gear, thin_.angle, thin_.step, values[offset]));
        for (std::size_t i = 0; i < result_count; ++i)
            if (middle[i] && there[i])
                slopes[i][unknown] = (*there[i] - *middle[i]) / moved_by[unknown];
    }
    std::optional<HeatRelease> ignored;
    const HeatRelease* base = heat ? &*heat : nullptr;
    const Numbers walls = at(values, {1.0 + wall_spread, 0.0}, base, ignored);
    const Numbers drifted = at(values, {1.0, hot_drift}, base, ignored);
    Estimates estimates;
    for (std::size_t i = 0; i < result_count; ++i) {
        if (!middle[i] || !std::isfinite(*middle[i]))
            continue;
        const double own = own_spread(static_cast<CardResult>(i), *middle[i]).value_or(0.0);
        const double wall = walls[i] ? *walls[i] - *middle[i] : 0.0;
        const double hot = drifted[i] ? *drifted[i] - *middle[i] : 0.0;
        carried.own[i] = own;
        carried.walls[i] = wall;
        carried.heated[i] = hot;
        double variance = own * own + wall * wall + hot * hot;
        for (std::size_t a = 0; a < unknown_count; ++a)
            for (std::size_t b = 0; b < unknown_count; ++b)
                variance += slopes[i][a] * covariance[a][b] * slopes[i][b];
        estimates[i] = {*middle[i], coverage * std::sqrt(std::max(variance, 0.0))};
    }
    return estimates;
}

} // namespace evenstroke::indicator
