// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/plain_evaluation.h"

#include "core/card/power_line.h"
#include "core/card/result_catalogue.h"
#include "core/card/trace_cycles.h"
#include "core/plain_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double coverage = 2.0;
constexpr double offset_spread = 0.5;      // degrees: 1° either way at 95 %
constexpr double unknown_zero_spread = 0.5; // bar (common practice, no source)

double deviation(const std::vector<double>& values)
{
    double mean = 0.0, squares = 0.0;
    for (const double v : values)
        mean += v / static_cast<double>(values.size());
    for (const double v : values)
        squares += (v - mean) * (v - mean);
    return values.size() < 2 ? 0.0 : std::sqrt(squares / static_cast<double>(values.size() - 1));
}

void read_peaks(const CleanTrace& trace, DirectReadings& direct)
{
    Peak mean;
    double count = 0.0;
    const auto common = find_peak(trace.angle, trace.mean, trace.noise_mean);
    for (const Cycle& cycle : trace.cycles) {
        const auto peak = common && trace.cycles.size() > 1 ? find_peak_near(trace.angle, cycle.pressure, trace.noise_one, common->angle)
                                 : find_peak(trace.angle, cycle.pressure, trace.noise_one);
        direct.maxima.push_back(peak ? peak->pressure : std::nan(""));
        const bool unlike = std::find(trace.unlike_cycles.begin(), trace.unlike_cycles.end(), cycle.number) !=
                            trace.unlike_cycles.end();
        if (!peak || unlike)
            continue;
        mean.pressure += peak->pressure;
        mean.angle += peak->angle;
        mean.pressure_spread += peak->pressure_spread;
        mean.angle_spread += peak->angle_spread;
        ++count;
    }
    if (!(count > 0.0))
        return;
    const double root = std::sqrt(count);
    direct.peak = Peak{mean.pressure / count, mean.angle / count, mean.pressure_spread / count / root,
                       mean.angle_spread / count / root};
    direct.maximum_spread = deviation(direct.maxima);
    if (!std::isfinite(direct.maximum_spread))
        direct.maximum_spread = 0.0;
}

void put(Evaluation& card, CardResult result, double value, double spread)
{
    if (std::isfinite(value))
        card.results[static_cast<std::size_t>(result)] = Estimate{value, coverage * spread};
}

/// What needs dead centre and zero but no balance.
void fill_readings(Evaluation& card, const Engine& engine, const SliderCrank& gear, const ThinTrace& thin,
                   const DirectReadings& direct, double offset_deviation, double zero_deviation)
{
    const double moved = card.unknowns[offset], off = card.unknowns[zero];
    const double work = mean_indicated(gear, card.trace, moved);
    const auto thin_work = [&](double at) {
        return weighted_sum(thin.pressure, work_weights(gear, thin.angle, thin.step, at));
    };
    const double per_degree = (thin_work(moved + 0.1) - thin_work(moved - 0.1)) / 0.2;
    put(card, CardResult::mean_indicated_pressure, work, std::hypot(per_degree * offset_deviation, 0.1));
    if (direct.peak) {
        put(card, CardResult::maximum_pressure, direct.peak->pressure - off,
            std::hypot(zero_deviation, direct.peak->pressure_spread));
        put(card, CardResult::maximum_pressure_angle, direct.peak->angle - moved,
            std::hypot(offset_deviation, direct.peak->angle_spread));
    }
    if (direct.rise)
        put(card, CardResult::pressure_rise, direct.rise->value, std::hypot(direct.rise->spread, 0.2));
    const double at = engine.expansion_angle_deg;
    const auto there = local_pressure(thin.angle, thin.pressure, at + moved, 2.0);
    const auto later = local_pressure(thin.angle, thin.pressure, at + moved + 1.0, 2.0);
    if (there && later)
        put(card, CardResult::expansion_pressure, *there - off, std::hypot((*later - *there) * offset_deviation, zero_deviation));
}

/// The line and where the record leaves it, a few times in turn.
struct LineFound
{
    PowerLine line;
    std::optional<CombustionStart> start;
};
std::optional<LineFound> find_power_line(const Engine& engine, const SliderCrank& gear, double clearance, const ThinTrace& thin)
{
    LineFound found;
    const double begin = std::max(-60.0, engine.cylinder_closes_deg.value_or(-80.0) + 5.0);
    double end = -14.0;
    for (int round = 0; round < 4; ++round) {
        const Range range = samples_within(thin.angle, begin + found.line.offset, end + found.line.offset);
        found.line.converged = false;
        const auto line = fit_power_line(gear, clearance, std::span(thin.angle).subspan(range.first, range.count),
                                         std::span(thin.pressure).subspan(range.first, range.count), thin.noise, found.line);
        if (!line || !line->converged || std::abs(line->offset) > 3.0)
            return std::nullopt;
        found.line = *line;
        const Range after = samples_within(thin.angle, end + line->offset, 25.0 + line->offset);
        std::vector<double> angle, excess, limit;
        for (std::size_t i = after.first; i < after.first + after.count; ++i) {
            angle.push_back(thin.angle[i] - line->offset);
            const double p = line->pressure(gear.volume(angle.back() * radians_per_degree, clearance));
            excess.push_back(std::log(std::max(thin.pressure[i] - line->zero, 0.2) / p));
            limit.push_back(std::max({0.008, 4.0 * thin.noise / p, 4e-3 * line->misfit}));
        }
        found.start = find_start(angle, excess, limit, thin.step);
        end = found.start ? std::clamp(found.start->threshold - 3.0, -14.0, -2.0) : -3.0;
    }
    return found;
}

} // namespace

DirectReadings read_directly(Evaluation& card, const SliderCrank& gear)
{
    DirectReadings direct;
    CleanTrace& trace = card.trace;
    const std::vector<double> weights = work_weights(gear, trace.angle, trace.step, 0.0);
    for (const Cycle& cycle : trace.cycles)
        direct.work.push_back(cycle.own_angle.empty() ? weighted_sum(cycle.pressure, weights)
                                                      : polygon_pressure(gear, cycle.own_angle, cycle.own_pressure, 0.0));
    if (std::all_of(direct.work.begin(), direct.work.end(), [](double w) { return std::isfinite(w); }))
        average(trace, direct.work);
    read_peaks(trace, direct);
    direct.rise = steepest_rise(trace.angle, trace.mean, trace.step, trace.noise_mean);
    // The weights are at hand; working them out again costs a fifth of a millisecond on a fine four-stroke card.
    card.plain_mean_indicated = trace.uneven ? mean_indicated(gear, trace, 0.0) : weighted_sum(trace.mean, weights);
    card.plain_maximum = direct.peak ? direct.peak->pressure : std::nan("");
    if (trace.cycles.size() > 1)
        card.spread = CycleSpread{deviation(direct.work), deviation(direct.maxima)};
    return direct;
}

namespace {

/// A compression that does not rise as it should is no matter of units where the whole card is turned.
Problem angle_first(Problem problem, const ThinTrace& thin)
{
    constexpr double far = 60.0; // degrees from dead centre: no combustion is as early or late
    const auto most = std::max_element(thin.pressure.begin(), thin.pressure.end());
    if (most == thin.pressure.end())
        return problem;
    const double at = thin.angle[static_cast<std::size_t>(most - thin.pressure.begin())];
    if (std::abs(at) <= far)
        return problem;
    problem.what_happened = "The largest pressure lies at " + short_number_text(std::round(at)) +
                            "°, far from firing dead centre at 0°: most likely the angles are wrong. " + problem.what_happened;
    problem.what_to_do = "Check first what the file calls dead centre, the angle of its first sample, and which way the angles run; "
                         "if they are right, the units of the pressures.";
    return problem;
}

} // namespace

std::optional<Problem> find_unit_problem(const Engine& engine, const Conditions& conditions, const SliderCrank& gear,
                                         const ThinTrace& thin)
{
    constexpr double lowest_charge = 0.55, highest_charge = 12.0, far = 2.5; // bar; factor. Common practice, no source
    if (!engine.compression_ratio || !engine.cylinder_closes_deg)
        return std::nullopt;
    const auto clearance = gear.clearance_volume(*engine.compression_ratio);
    if (!clearance)
        return clearance.error();
    const double closed = gear.volume(*engine.cylinder_closes_deg * radians_per_degree, clearance.value().value());
    LeastSquares<2> rows; // p = zero + charge · (V_closed/V)^1.36
    const Range range = samples_within(thin.angle, -60.0, -15.0);
    for (std::size_t i = range.first; i < range.first + range.count; ++i)
        rows.add({1.0, std::pow(closed / gear.volume(thin.angle[i] * radians_per_degree, clearance.value().value()), 1.36)},
                 thin.pressure[i]);
    const auto line = rows.solve();
    if (!line || !std::isfinite(line->values[1]))
        return std::nullopt;
    const double charge = line->values[1];
    const std::string rising =
        "The compression of the card rises as from a charge of " + short_number_text(std::round(charge * 100.0) / 100.0);
    if (conditions.scavenge_pressure) {
        const double given = in_bar(*conditions.scavenge_pressure), times = charge / given;
        if (times > 1.0 / far && times < far)
            return std::nullopt;
        return angle_first(invalid_input(rising + " bar, but the scavenge pressure given is " + short_number_text(given) + " bar abs.",
                             "Check the unit of the card's pressures and of the scavenge pressure, and the engine's angles."), thin);
    }
    if (charge > lowest_charge && charge < highest_charge)
        return std::nullopt;
    return angle_first(invalid_input(rising + " bar, which no engine has.",
                         "Check the unit of the card's pressures (bar is expected), and the engine's angles."), thin);
}

bool fires_where_it_should(const DirectReadings& direct)
{
    constexpr double earliest = -5.0, latest = 30.0; // degrees; common practice, no source
    return direct.peak && direct.peak->angle >= earliest && direct.peak->angle <= latest;
}

void fill_misplaced(Evaluation& card, const DirectReadings& direct)
{
    if (direct.peak && !fires_where_it_should(direct)) {
        card.remarks.push_back(make_remark("wrong_cylinder_or_mark", {short_number_text(std::round(direct.peak->angle * 10.0) / 10.0)},
                                           direct.peak->angle));
        return;
    }
    fill_undetermined(card, direct);
}

void fill_undetermined(Evaluation& card, const DirectReadings& direct)
{
    if (direct.peak)
        put(card, CardResult::maximum_pressure, direct.peak->pressure,
            std::hypot(unknown_zero_spread, direct.peak->pressure_spread + (card.trace.coarse ? 1.0 : 0.0)));
}

void fill_without_balance(Evaluation& card, const Engine& engine, const Conditions& conditions, const SliderCrank& gear,
                          const ThinTrace& thin, const DirectReadings& direct)
{
    const double own_offset = engine.two_stroke() ? 0.12 : 0.18; // degrees: the straight line's own error, by simulation
    constexpr double own_zero = 0.25, own_compression = 0.0035;  // bar; of the value
    std::optional<LineFound> found;
    double clearance = 0.0;
    if (engine.compression_ratio) {
        clearance = gear.clearance_volume(*engine.compression_ratio).value().value();
        found = find_power_line(engine, gear, clearance, thin);
    }
    if (!found) {
        if (conditions.known_offset)
            card.unknowns[offset] = in_degrees(*conditions.known_offset);
        fill_readings(card, engine, gear, thin, direct, offset_spread, unknown_zero_spread);
        card.remarks.push_back(make_remark("tdc_assumed", {short_number_text(card.unknowns[offset]), short_number_text(2.0 * offset_spread)}));
        return;
    }
    const PowerLine& line = found->line;
    card.method = CalibrationMethod::power_line;
    card.unknowns[offset] = line.offset;
    card.unknowns[zero] = line.zero;
    card.compression_exponent = line.exponent;
    const double offset_deviation = std::hypot(own_offset, std::sqrt(line.covariance[0][0]) * std::max(1.0, line.misfit));
    const double zero_deviation = std::hypot(own_zero, std::sqrt(line.covariance[1][1]) * std::max(1.0, line.misfit));
    put(card, CardResult::offset, line.offset, offset_deviation);
    put(card, CardResult::zero, line.zero, zero_deviation);
    const double top = line.pressure(clearance);
    put(card, CardResult::compression_pressure, top, own_compression * top);
    if (found->start)
        put(card, CardResult::start_of_combustion, found->start->start, std::hypot(offset_deviation, 0.3));
    fill_readings(card, engine, gear, thin, direct, offset_deviation, zero_deviation);
    card.own_offset = card[CardResult::offset];
    card.own_offset_noise = offset_deviation;
    Carried& carried = card.carried.emplace();
    carried.covariance[offset][offset] = offset_deviation * offset_deviation;
    carried.covariance[zero][zero] = zero_deviation * zero_deviation;
    for (std::size_t i = 0; i < result_count; ++i)
        carried.own[i] = card.results[i] ? *card.results[i]->half_width / coverage : 0.0;
}

} // namespace evenstroke::indicator
