// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/remarks.h"

#include "core/card/result_catalogue.h"
#include "core/plain_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

std::string shown(double number) { return short_number_text(std::round(number * 100.0) / 100.0); }

const char* method_sentence(CalibrationMethod method)
{
    switch (method) {
    case CalibrationMethod::angle_only:
        return "Zero and wall loss are held and only dead centre is found from the card.";
    case CalibrationMethod::offset_assumed:
        return "Dead centre is not found from the card, and what it may be off by is carried into the results.";
    default:
        break;
    }
    return "Another ratio, within what is usual, is taken into account, and the uncertainty is wider.";
}

void remark_on_zero(Evaluation& card, const Setting& setting, const SelfCalibration& found)
{
    constexpr double believed = 0.20, pull_worth_saying = 4.0, bar_worth_saying = 0.5;
    if (!setting.scavenge || found.method != CalibrationMethod::energy_balance || found.doubtful)
        return;
    const double away = found.pegged_zero - found.fit.values[zero];
    const double left = std::sqrt(std::max(believed * believed - found.fit.covariance[zero][zero], 0.01));
    if (std::abs(away) > pull_worth_saying * left && std::abs(away) > bar_worth_saying)
        card.remarks.push_back(
            make_remark("charge_pressure_doubtful", {shown(std::abs(away)), away > 0.0 ? "above" : "below"}));
}

/// Gas exchange happens near the charge pressure; two-strokes only, whose exhaust is held near it.
void remark_on_drift(Evaluation& card, const ThinTrace& thin, const Setting& setting, const SelfCalibration& found)
{
    constexpr double lowest = 0.80, highest = 1.2, least = 0.4; // of the charge pressure; bar
    const Cylinder& cylinder = setting.cylinder;
    const double moved = found.fit.values[offset], half = 0.5 * cylinder.period();
    const auto mean_within = [&](double from, double to) -> std::optional<double> {
        const Range range = samples_within(thin.angle, from + moved, to + moved);
        double sum = 0.0;
        for (std::size_t i = range.first; i < range.first + range.count; ++i)
            sum += thin.pressure[i];
        if (range.count < 3 || !std::isfinite(sum))
            return std::nullopt;
        return sum / static_cast<double>(range.count);
    };
    if (setting.scavenge && cylinder.two_stroke)
        if (const auto p = mean_within(-170.0, cylinder.closes - 25.0)) {
            const double off = *p - found.fit.values[zero] - *setting.scavenge;
            if ((off < (lowest - 1.0) * *setting.scavenge || off > (highest - 1.0) * *setting.scavenge) && std::abs(off) > least)
                card.remarks.push_back(make_remark("thermal_drift", {shown(std::abs(off)), off > 0.0 ? "above" : "below"}, 180.0));
        }
    const auto begin = mean_within(-half - moved, -half - moved + 3.0), end = mean_within(half - moved - 3.5, half - moved);
    const double samples = std::max(1.0, 3.0 / thin.step);
    if (begin && end && std::abs(*end - *begin) > 0.4 + 4.0 * thin.noise * std::sqrt(2.0 / samples))
        card.remarks.push_back(make_remark("trace_does_not_close", {shown(std::abs(*end - *begin))}, half));
}

} // namespace

void remark_on_compression(Evaluation& card, const ThinTrace& thin, const Setting& setting, const SelfCalibration& found,
                           const std::optional<Ringing>& ringing)
{
    constexpr double ratio_worth_saying = 0.02;
    if (found.doubtful) {
        card.remarks.push_back(
            make_remark("geometry_or_zero_doubtful", {shown(found.wall_multiplier), method_sentence(found.method)}));
        const double relative = found.fit.values[ratio], entered = setting.cylinder.compression_ratio;
        if (found.method == CalibrationMethod::energy_balance && std::abs(relative) > ratio_worth_saying)
            card.remarks.push_back(make_remark("compression_ratio_doubtful", {shown(entered * (1.0 + relative)), shown(entered)}));
    }
    if (found.method == CalibrationMethod::offset_assumed)
        card.remarks.push_back(make_remark("tdc_assumed", {shown(found.fit.values[offset]), shown(2.0 * std::sqrt(found.fit.covariance[offset][offset]))}));
    remark_on_zero(card, setting, found);
    remark_on_drift(card, thin, setting, found);
    if (ringing)
        card.remarks.push_back(make_remark("passage_resonance", {short_number_text(std::round(ringing->frequency))},
                                           card[CardResult::maximum_pressure_angle]->value));
}

void remark_on_heat(Evaluation& card)
{
    constexpr double worth_saying = 1.15; // share of the fuel is 4 % off on nine of ten cards, and cylinders differ
    if (card.heat_over_fuel && *card.heat_over_fuel > worth_saying)
        card.remarks.push_back(make_remark("heat_above_fuel", {short_number_text(std::round(100.0 * *card.heat_over_fuel))}));
}

void remark_on_combustion(Evaluation& card, const SelfCalibration& found)
{
    constexpr double early = -10.0, late = 10.0, late_half = 35.0, long_way = 80.0, late_share = 0.15; // degrees; 1
    if (!found.start) {
        card.remarks.push_back(make_remark("no_combustion", {}));
        return;
    }
    const double start = found.start->start;
    constexpr double well_after = 4.0; // degrees from the compression's peak
    if (card.firing_peak && start > card[CardResult::maximum_pressure_angle]->value + well_after) {
        card.remarks.push_back(make_remark("maximum_not_from_combustion",
                                           {shown(start), shown(card.firing_peak->pressure), shown(card.firing_peak->angle)},
                                           card.firing_peak->angle));
    } else if (start > late || (card[CardResult::ca50] && card[CardResult::ca50]->value > late_half)) {
        const auto& half = card[CardResult::ca50];
        card.remarks.push_back(make_remark("combustion_late", {shown(start), half ? shown(half->value) : "an angle not known"}, start));
    }
    if (start < early && found.method != CalibrationMethod::offset_assumed)
        card.remarks.push_back(make_remark("combustion_early", {shown(start)}, start));
    if (!card.heat || found.doubtful || found.method == CalibrationMethod::offset_assumed)
        return;
    const HeatRelease& heat = *card.heat;
    if (heat.ca10 && heat.ca90 && *heat.ca90 - *heat.ca10 > long_way)
        card.remarks.push_back(make_remark("long_burning", {shown(*heat.ca90 - *heat.ca10)}, *heat.ca90));
    const auto at = std::lower_bound(heat.angle.begin(), heat.angle.end(), start + 65.0) - heat.angle.begin();
    if (at >= static_cast<std::ptrdiff_t>(heat.angle.size()) || !(heat.total > 0.0))
        return;
    const double share = 1.0 - heat.fuel[static_cast<std::size_t>(at)] * fuel_heat / heat.total;
    if (share > late_share)
        card.remarks.push_back(make_remark("late_heat", {short_number_text(std::round(100.0 * share))}, start + 65.0));
}

} // namespace evenstroke::indicator
