// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/self_calibration.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double window_begin = -70.0, earliest_end = -14.0, latest_end = -2.0, quiet_before_start = 3.0; // degrees
constexpr double line_reach = 25.0;
constexpr double unfired_reach = 60.0;
constexpr double largest_offset = 3.0;
constexpr double ratio_spread = 0.017;   // of the entered ratio: as built ± 3 % at 95 % (common practice, no source)
constexpr double drift_spread = 0.1;     // bar in 180°
constexpr double plausible_strain = 12.0; // of the beliefs together, before another ratio is no explanation any more
constexpr double lowest_multiplier = -1.0, highest_multiplier = 4.0;

/// 1° either way where nothing is known of the installation.
double kept_offset_spread(const Setting& setting)
{
    constexpr double unknown = 0.5, least = 0.1; // degrees, one standard deviation
    return setting.known_offset && setting.known_offset_spread ? std::max(*setting.known_offset_spread, least) : unknown;
}

class Calibrator
{
public:
    Calibrator(const ThinTrace& trace, const Setting& setting)
        : trace_(trace), setting_(setting), cylinder_(setting.cylinder), walls_(setting.cylinder)
    {
    }
    std::optional<SelfCalibration> run();

private:
    Beliefs usual_beliefs() const;
    bool fit(const Beliefs& beliefs, double from, double to);
    void find_combustion();
    bool pass(const Beliefs& beliefs);
    void peg();
    bool with_everything_uncertain();
    bool with_angle_alone();
    bool with_offset_kept();
    void take_known_offset();
    void compare_walls();
    double unshared(std::size_t i, std::size_t j) const;
    bool too_much_heat() const;
    double window_start() const { return std::max(window_begin, cylinder_.closes + 5.0); }

    const ThinTrace& trace_;
    const Setting& setting_;
    const Cylinder& cylinder_;
    WallLoss walls_;
    SelfCalibration found_;
};

Beliefs Calibrator::usual_beliefs() const
{
    Beliefs beliefs;
    beliefs[zero] = {found_.pegged_zero, setting_.scavenge ? 0.20 : 1.0, false};
    beliefs[wall_loss] = {1.2, 0.6, false};
    beliefs[ratio] = {0.0, std::nullopt, true};
    beliefs[closing] = {cylinder_.closing_kelvin, std::nullopt, true};
    beliefs[drift] = {0.0, std::nullopt, true};
    return beliefs;
}

/// What the multiplier is at the installation's offset: a leak shows in it then, and not in dead centre.
void Calibrator::compare_walls()
{
    const UnknownCovariance& all = found_.fit.covariance;
    double value = found_.fit.values[wall_loss], variance = all[wall_loss][wall_loss];
    if (setting_.known_offset && setting_.known_offset_spread) {
        const double known = *setting_.known_offset_spread, total = all[offset][offset] + known * known;
        const double gain = all[wall_loss][offset] / total;
        value += gain * (*setting_.known_offset - found_.fit.values[offset]);
        variance -= gain * all[wall_loss][offset];
    }
    const double believed = found_.believed[wall_loss];
    found_.compared_wall = value;
    found_.compared_wall_spread = std::sqrt(std::max(0.0, variance - variance * variance / (believed * believed)));
}

void Calibrator::peg()
{
    const double recorded = found_.fit.values[offset];
    found_.pegged_zero = peg_zero(trace_, setting_, recorded).value_or(0.0);
    const Range range = samples_within(trace_.angle, cylinder_.closes + recorded, cylinder_.closes + recorded + 8.0);
    if (const auto parabola = fit_parabola(std::span(trace_.angle).subspan(range.first, range.count),
                                           std::span(trace_.pressure).subspan(range.first, range.count),
                                           cylinder_.closes + 4.0 + recorded))
        found_.closing_pressure = *parabola;
}

bool Calibrator::fit(const Beliefs& beliefs, double from, double to)
{
    const CompressionWindow window =
        make_window(trace_, found_.closing_pressure, found_.fit.values[offset], from, to);
    const auto fitted = calibrate(cylinder_, walls_, window, beliefs, found_.fit.values);
    if (!fitted || !std::isfinite(fitted->values[offset]) || !std::isfinite(fitted->misfit))
        return false;
    found_.fit = *fitted;
    found_.window = window;
    for (std::size_t i = 0; i < unknown_count; ++i)
        found_.believed[i] = beliefs[i].spread.value_or(0.0) * (beliefs[i].held ? 1.0 : std::sqrt(fitted->widened));
    found_.own_offset = fitted->values[offset];
    found_.own_offset_spread = std::sqrt(fitted->covariance[offset][offset]);
    found_.own_offset_noise = std::sqrt(unshared(offset, offset));
    found_.window_from = from;
    found_.window_to = to;
    found_.end = line_end(cylinder_, walls_, window, found_.fit.values);
    return true;
}

/// Carries the line on and looks where the record leaves it.
void Calibrator::find_combustion()
{
    const Unknowns& x = found_.fit.values;
    const Range range = samples_within(trace_.angle, found_.end.angle + x[offset], line_reach + x[offset]);
    found_.line_angle.clear();
    std::vector<double> excess, limit;
    for (std::size_t i = range.first; i < range.first + range.count; ++i)
        found_.line_angle.push_back(trace_.angle[i] - x[offset]);
    found_.line_log = carry_line(cylinder_, walls_, x, found_.closing_pressure, found_.end.angle,
                                 found_.end.log_pressure, found_.line_angle);
    found_.highest_excess = 0.0;
    for (std::size_t i = 0; i < range.count; ++i) {
        const double angle = found_.line_angle[i], line = std::exp(found_.line_log[i]);
        const double pressure = std::max(trace_.pressure[range.first + i] - zero_at(cylinder_, x, angle), 0.2);
        excess.push_back(std::log(pressure) - found_.line_log[i]);
        const double share = trace_.noise / line;
        // Tied to what the fit leaves on this very card: real compressions scatter more than their noise.
        const double scatter = found_.fit.misfit * std::sqrt(share * share + 5e-4 * 5e-4);
        limit.push_back(std::max({0.006, 4.0 * share, 4.0 * scatter}));
        found_.highest_excess = std::max(found_.highest_excess, excess.back());
    }
    found_.start = find_start(found_.line_angle, excess, limit, trace_.step);
}

bool Calibrator::pass(const Beliefs& beliefs)
{
    find_combustion();
    const double end =
        found_.start ? std::clamp(found_.start->threshold - quiet_before_start, earliest_end, latest_end) : -3.0;
    return fit(beliefs, window_start(), end);
}

bool Calibrator::too_much_heat() const
{
    if (!setting_.fuel_heat || !found_.start)
        return false;
    const HeatInputs inputs{trace_.angle, trace_.pressure,
                            trapped_mass(cylinder_, found_.closing_pressure, found_.fit.values), found_.start->start};
    const auto heat = release_heat(cylinder_, walls_, found_.fit.values, inputs);
    return heat && heat->total > 1.1 * *setting_.fuel_heat;
}

/// Ratio and drift are no longer taken as exact; what they may be by is weighed with everything else.
bool Calibrator::with_everything_uncertain()
{
    Beliefs beliefs = usual_beliefs();
    beliefs[ratio] = {0.0, ratio_spread, false};
    beliefs[drift] = {0.0, drift_spread, false};
    beliefs[closing].spread = setting_.closing_spread;
    if (!fit(beliefs, found_.window_from, found_.window_to) || !found_.fit.converged)
        return false;
    found_.method = CalibrationMethod::energy_balance;
    // A leak of charge looks like more wall loss and draws dead centre early, by 0.05 to 0.3° (calculated examples); one
    // card cannot tell it from another ratio.
    constexpr double beyond_usual = 2.0, drawn_by = 0.12; // multiple of the formula; degrees for each 1 above it
    const double drawn = drawn_by * std::max(0.0, found_.wall_multiplier - beyond_usual);
    found_.fit.covariance[offset][offset] += drawn * drawn;
    found_.own_offset_spread = std::sqrt(found_.fit.covariance[offset][offset]);
    take_known_offset();
    find_combustion();
    return true;
}

/// An entry of the covariance without what ratio and film formula are wrong by, which all cards of the engine share.
double Calibrator::unshared(std::size_t i, std::size_t j) const
{
    const UnknownCovariance& all = found_.fit.covariance;
    double entry = all[i][j];
    for (const Unknown shared : {ratio, wall_loss})
        if (const double believed = found_.believed[shared]; believed > 0.0)
            entry -= all[i][shared] * all[j][shared] / (believed * believed);
    return i == j ? std::max(entry, 0.0) : entry;
}

/// Weighs the installation's offset against the card's own (a Kalman step). What ratio and film formula are wrong by draws
/// all cards of the engine alike, so the installation's offset does not know it better: it stays in the covariance.
void Calibrator::take_known_offset()
{
    if (!setting_.known_offset || !setting_.known_offset_spread)
        return;
    UnknownCovariance& all = found_.fit.covariance;
    Unknowns gain{};
    for (std::size_t i = 0; i < unknown_count; ++i)
        gain[i] = unshared(i, offset);
    const double known = *setting_.known_offset_spread, total = gain[offset] + known * known;
    if (!(total > 0.0))
        return;
    const double away = *setting_.known_offset - found_.fit.values[offset];
    for (std::size_t i = 0; i < unknown_count; ++i)
        found_.fit.values[i] += gain[i] / total * away;
    for (std::size_t i = 0; i < unknown_count; ++i)
        for (std::size_t j = 0; j < unknown_count; ++j)
            all[i][j] -= gain[i] * gain[j] / total;
    // Card and installation further apart than both say: one of them is wrong, and what is taken is less certain.
    constexpr double usual = 2.0;
    if (const double apart = std::abs(away) / std::sqrt(total); apart > usual)
        all[offset][offset] += (apart / usual - 1.0) * gain[offset] * known * known / total;
    found_.end = line_end(cylinder_, walls_, found_.window, found_.fit.values);
}

bool Calibrator::with_angle_alone()
{
    Beliefs beliefs = usual_beliefs();
    beliefs[zero] = {found_.pegged_zero, setting_.scavenge ? 0.20 : 1.0, true};
    beliefs[wall_loss] = {1.0, 0.6, true};
    beliefs[ratio] = {0.0, ratio_spread, true};
    beliefs[drift] = {0.0, 0.15, true};
    beliefs[closing].spread = setting_.closing_spread;
    found_.method = CalibrationMethod::angle_only;
    for (int round = 0; round < 2; ++round) {
        if (!fit(beliefs, window_start(), found_.window_to))
            return false;
        find_combustion();
    }
    return std::abs(found_.fit.values[offset]) <= 1.0;
}

bool Calibrator::with_offset_kept()
{
    Beliefs beliefs = usual_beliefs();
    found_.fit.values[offset] = setting_.known_offset.value_or(0.0);
    peg();
    beliefs[offset] = {setting_.known_offset.value_or(0.0), kept_offset_spread(setting_), true};
    beliefs[zero] = {found_.pegged_zero, setting_.scavenge ? 0.20 : 1.0, true};
    beliefs[wall_loss] = {1.0, 0.6, true};
    beliefs[ratio] = {0.0, ratio_spread, true};
    beliefs[drift] = {0.0, 0.15, true};
    beliefs[closing].spread = setting_.closing_spread;
    found_.method = CalibrationMethod::offset_assumed;
    if (!fit(beliefs, window_start(), found_.window_to))
        return false;
    find_combustion();
    return true;
}

std::optional<SelfCalibration> Calibrator::run()
{
    found_.fit.values = {0.0, 0.0, 1.2, 0.0, 0.0, cylinder_.closing_kelvin, 0.0};
    peg();
    found_.fit.values[zero] = found_.pegged_zero;
    bool stands = fit(usual_beliefs(), window_start(), earliest_end);
    for (int round = 0; round < 3 && stands; ++round) {
        peg();
        stands = pass(usual_beliefs());
    }
    if (stands && !found_.start)
        stands = fit(usual_beliefs(), -unfired_reach, unfired_reach);
    if (!stands || !found_.fit.converged || std::abs(found_.fit.values[offset]) > largest_offset)
        return std::nullopt;
    found_.wall_multiplier = found_.fit.values[wall_loss];
    compare_walls();
    found_.doubtful = !(found_.wall_multiplier >= lowest_multiplier && found_.wall_multiplier <= highest_multiplier) ||
                      too_much_heat();
    const SelfCalibration before = found_;
    const bool unfired = !found_.start;
    if (with_everything_uncertain() &&
        (!found_.doubtful || (found_.fit.strain <= plausible_strain && !too_much_heat()))) {
        if (unfired)
            found_.method = CalibrationMethod::unfired_cycle;
        return found_;
    }
    found_ = before;
    if (with_angle_alone())
        return found_;
    if (with_offset_kept())
        return found_;
    return std::nullopt;
}

} // namespace

std::optional<SelfCalibration> self_calibrate(const ThinTrace& trace, const Setting& setting)
{
    return Calibrator(trace, setting).run();
}

} // namespace evenstroke::indicator
