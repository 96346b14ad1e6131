// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/evaluation.h"

#include "core/card/card_forces.h"
#include "core/card/plain_evaluation.h"
#include "core/card/remarks.h"
#include "core/card/result_catalogue.h"
#include "core/card/trace_cycles.h"
#include "core/plain_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double two_stroke_wall = 545.0, four_stroke_wall = 500.0; // K, common practice, no source
constexpr double usual_closing = 345.0;                              // K, common practice, no source
constexpr double known_spread = 5.2, assumed_spread = 15.0;          // K, one standard deviation

/// What the energy balance needs, as far as it is known; nothing where it lacks something.
std::optional<Setting> find_setting(const Engine& engine, const Conditions& conditions, const SliderCrank& gear,
                                    Evaluation& card)
{
    if (!engine.compression_ratio) {
        card.remarks.push_back(make_remark("compression_ratio_not_known", {}));
        return std::nullopt;
    }
    const bool timed = engine.cylinder_closes_deg && engine.cylinder_opens_deg;
    if (!timed)
        card.remarks.push_back(make_remark("closing_not_known", {}));
    double speed = conditions.speed ? conditions.speed->value() * 60.0 : 0.0;
    if (!conditions.speed && engine.rated_speed.value() > 0.0) {
        speed = engine.rated_speed.value() * 60.0;
        card.remarks.push_back(make_remark("speed_assumed", {short_number_text(speed)}));
    } else if (!(speed > 0.0)) {
        card.remarks.push_back(make_remark("speed_not_known", {}));
    }
    if (!timed || !(speed > 0.0))
        return std::nullopt;
    Setting setting{{gear}, {}, known_spread, {}, {}, true, true};
    setting.cylinder.compression_ratio = *engine.compression_ratio;
    setting.cylinder.closes = *engine.cylinder_closes_deg;
    setting.cylinder.opens = *engine.cylinder_opens_deg;
    setting.cylinder.two_stroke = engine.two_stroke();
    setting.cylinder.speed_rpm = speed;
    setting.cylinder.wall_kelvin = engine.two_stroke() ? two_stroke_wall : four_stroke_wall;
    setting.cylinder.closing_kelvin = usual_closing;
    setting.closing_known = conditions.charge_temperature.has_value();
    if (setting.closing_known)
        setting.cylinder.closing_kelvin = conditions.charge_temperature->value();
    else {
        setting.closing_spread = assumed_spread;
        card.remarks.push_back(make_remark("charge_temperature_not_known", {}));
    }
    if (conditions.scavenge_pressure)
        setting.scavenge = in_bar(*conditions.scavenge_pressure);
    else
        card.remarks.push_back(make_remark("zero_not_referenced", {}));
    if (conditions.fuel_heat)
        setting.fuel_heat = conditions.fuel_heat->value();
    if (conditions.known_offset)
        setting.known_offset = in_degrees(*conditions.known_offset);
    if (conditions.known_offset_spread)
        setting.known_offset_spread = in_degrees(*conditions.known_offset_spread);
    return setting;
}

void withhold(Evaluation& card, std::initializer_list<CardResult> results)
{
    for (const CardResult result : results)
        card.results[static_cast<std::size_t>(result)].reset();
}

void fill_line(Evaluation& card, const Cylinder& cylinder, const SelfCalibration& found)
{
    const WallLoss walls(cylinder);
    std::vector<double> before;
    for (double angle = found.end.angle; angle > cylinder.closes; angle -= 1.0)
        before.push_back(angle);
    const auto back = carry_line(cylinder, walls, found.fit.values, found.closing_pressure, found.end.angle,
                                 found.end.log_pressure, before);
    for (std::size_t i = before.size(); i-- > 0;) {
        card.line_angle.push_back(before[i]);
        card.line_pressure.push_back(std::exp(back[i]));
    }
    for (std::size_t i = 0; i < found.line_angle.size(); ++i)
        if (found.line_angle[i] > found.end.angle) {
            card.line_angle.push_back(found.line_angle[i]);
            card.line_pressure.push_back(std::exp(found.line_log[i]));
        }
}

void fill_exponents(Evaluation& card, const Cylinder& cylinder)
{
    const double clearance = cylinder.clearance(cylinder.compression_ratio * (1.0 + card.unknowns[ratio]));
    const auto exponent = [&](double from, double to) {
        return polytropic_exponent(cylinder.gear, clearance, card.trace.angle, card.trace.mean, card.unknowns[offset],
                                   zero_at(cylinder, card.unknowns, 0.5 * (from + to)), from, to);
    };
    card.compression_exponent = exponent(-45.0, -15.0);
    card.expansion_exponent = exponent(60.0, cylinder.opens - 4.0);
    if (const auto p = local_pressure(card.trace.angle, card.trace.mean, cylinder.opens - 1.0 + card.unknowns[offset], 2.0))
        card.opening_pressure = *p - card.unknowns[zero];
}

/// The largest pressure before combustion has begun is that of compression; the flame has its own hump.
void find_firing_peak(Evaluation& card, const SelfCalibration& found)
{
    const auto& angle = card[CardResult::maximum_pressure_angle];
    if (!angle || !found.start || found.start->start < angle->value + 1.0)
        return;
    const double moved = card.unknowns[offset], from = found.start->start + 2.0 + moved;
    auto peak = find_peak(card.trace.angle, card.trace.mean, card.trace.noise_mean, from, from + 50.0);
    if (!peak)
        return;
    peak->angle -= moved;
    peak->pressure -= card.unknowns[zero];
    card.firing_peak = peak;
}

/// Rings the passage after the flame's own peak?
std::optional<Ringing> find_passage(const Evaluation& card, const Setting& setting, const DirectReadings& direct,
                                    const SelfCalibration& found)
{
    if (!direct.peak || !found.start || !setting.speed_known)
        return std::nullopt;
    const double start = found.start->start + found.fit.values[offset];
    double peak = direct.peak->angle;
    if (start > peak) // the largest pressure is that of compression
        if (const auto own = find_peak(card.trace.angle, card.trace.mean, card.trace.noise_mean, start + 2.0, start + 52.0))
            peak = own->angle;
    return start > peak ? std::nullopt
                        : find_ringing(card.trace.angle, card.trace.mean, peak, card.trace.noise_mean, setting.cylinder.speed_rpm);
}

void fill_calibrated(Evaluation& card, const Engine& engine, const Setting& setting, const ThinTrace& thin,
                     DirectReadings direct, const SelfCalibration& found)
{
    const auto ringing = find_passage(card, setting, direct, found);
    if (ringing) {
        direct.passage_lag = ringing->lag;
        direct.passage_swing = 3.0 * ringing->amplitude; // at the peak it swings more than on average after it
    }
    ResultMaker maker(engine, card.trace, thin, direct, setting, found);
    card.method = found.method;
    card.unknowns = found.fit.values;
    card.wall_multiplier = found.wall_multiplier;
    card.compared_wall = found.compared_wall;
    card.compared_wall_spread = found.compared_wall_spread;
    card.misfit = found.fit.misfit;
    card.window_from = found.window_from;
    card.window_to = found.window_to;
    card.carried.emplace();
    card.results = maker.estimate(card.heat, *card.carried);
    if (found.method != CalibrationMethod::offset_assumed)
        card.own_offset = Estimate{found.own_offset, 2.0 * found.own_offset_spread};
    card.own_offset_noise = found.own_offset_noise;
    if (found.method == CalibrationMethod::offset_assumed)
        withhold(card, {CardResult::start_of_combustion});
    if (!setting.closing_known)
        withhold(card, {CardResult::trapped_mass, CardResult::dead_centre_temperature, CardResult::maximum_temperature});
    if (card.heat && setting.fuel_heat && *setting.fuel_heat > 0.0)
        card.heat_over_fuel = card.heat->total / *setting.fuel_heat;
    fill_line(card, setting.cylinder, found);
    fill_exponents(card, setting.cylinder);
    find_firing_peak(card, found);
    remark_on_compression(card, thin, setting, found, ringing);
    remark_on_combustion(card, found);
    remark_on_heat(card);
}

} // namespace

Result<Evaluation> evaluate(const Engine& engine, const Conditions& conditions, const Trace& trace)
{
    const Result<SliderCrank> gear = SliderCrank::make(engine.bore, engine.stroke, engine.rod_length);
    if (!gear)
        return gear.error();
    if (engine.compression_ratio)
        if (const auto clearance = gear.value().clearance_volume(*engine.compression_ratio); !clearance)
            return clearance.error();
    auto cleaned = clean(trace, {engine.two_stroke(), engine.cylinder_closes_deg, engine.cylinder_opens_deg});
    if (!cleaned)
        return cleaned.error();
    Evaluation card;
    card.trace = std::move(cleaned.value());
    card.cycles = card.trace.cycles.size();
    card.closes = engine.cylinder_closes_deg;
    card.opens = engine.cylinder_opens_deg;
    card.expansion_angle = engine.expansion_angle_deg;
    const DirectReadings direct = read_directly(card, gear.value());
    const ThinTrace thin = make_thin(card.trace);
    if (auto problem = find_unit_problem(engine, conditions, gear.value(), thin))
        return *std::move(problem);
    remark_on_trace(card, gear.value(), direct);
    if (conditions.barometer_assumed)
        card.remarks.push_back(make_remark("barometer_assumed", {}));
    if (!direct.peak || card.trace.coarse || !fires_where_it_should(direct)) {
        fill_misplaced(card, direct);
        return card;
    }
    const auto setting = find_setting(engine, conditions, gear.value(), card);
    if (!setting) {
        fill_without_balance(card, engine, conditions, gear.value(), thin, direct);
        card.forces = card_forces(engine, conditions, card);
        return card;
    }
    if (auto found = self_calibrate(thin, *setting)) {
        fill_calibrated(card, engine, *setting, thin, direct, *found);
        card.forces = card_forces(engine, conditions, card);
        return card;
    }
    card.remarks.push_back(make_remark("tdc_not_determined", {}));
    fill_undetermined(card, direct);
    return card;
}

} // namespace evenstroke::indicator
