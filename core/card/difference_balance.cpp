// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/difference_balance.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

constexpr double unknown_offset = 0.5, unknown_zero = 0.5; // degrees, bar: where no fit found them
constexpr double usual_cycle_scatter = 0.01;               // of the work of one cycle (common practice, no source)

double scatter_of(const Evaluation& card)
{
    const auto& work = card[CardResult::mean_indicated_pressure];
    double one = usual_cycle_scatter;
    if (card.spread && work && work->value > 1.0)
        one = std::clamp(card.spread->mean_indicated / work->value, 0.0, 0.2);
    return one / std::sqrt(static_cast<double>(std::max<std::size_t>(card.cycles, 1)));
}

} // namespace

DifferenceMember::DifferenceMember(const Evaluation& evaluated, double weighs)
    : card(&evaluated), curve(evaluated), weight(weighs), cycle_scatter(scatter_of(evaluated))
{
    if (!evaluated.carried) {
        own[offset][offset] = unknown_offset * unknown_offset;
        own[zero][zero] = unknown_zero * unknown_zero;
        return;
    }
    own = evaluated.carried->covariance;
    constexpr Unknown alike[] = {ratio, wall_loss};
    for (std::size_t k = 0; k < shared.size(); ++k) {
        const double believed = evaluated.carried->believed[alike[k]];
        if (!(believed > 0.0))
            continue;
        for (std::size_t i = 0; i < unknown_count; ++i)
            shared[k][i] = evaluated.carried->covariance[i][alike[k]] / believed;
        for (std::size_t i = 0; i < unknown_count; ++i)
            for (std::size_t j = 0; j < unknown_count; ++j)
                own[i][j] -= shared[k][i] * shared[k][j];
    }
}

double DifferenceMember::combustion(double true_angle) const
{
    if (!curve.has_line() || !curve.closed(true_angle))
        return 0.0;
    return fuel_ratio * (curve.pressure(true_angle) - curve.unfired(true_angle));
}

double DifferenceMember::brought(double true_angle) const
{
    double pressure = curve.pressure(true_angle);
    if (!curve.has_line())
        return pressure;
    const double line = curve.unfired(true_angle);
    pressure += (charge_ratio - 1.0) * line;
    if (curve.closed(true_angle))
        pressure += (fuel_ratio - 1.0) * (curve.pressure(true_angle) - line);
    return pressure;
}

Unknowns DifferenceMember::pressure_slopes(double true_angle) const
{
    Unknowns slopes{};
    slopes[offset] = curve.slope(true_angle);
    slopes[zero] = -1.0;
    slopes[drift] = -curve.drift_share(true_angle);
    return slopes;
}

double shared_variance(const std::vector<DifferenceMember>& members, const std::vector<Unknowns>& slopes)
{
    double variance = 0.0;
    std::array<double, 2> together{};
    for (std::size_t m = 0; m < members.size(); ++m) {
        const DifferenceMember& member = members[m];
        double own = 0.0;
        for (std::size_t i = 0; i < unknown_count; ++i) {
            if (slopes[m][i] == 0.0)
                continue;
            for (std::size_t k = 0; k < together.size(); ++k)
                together[k] += member.weight * slopes[m][i] * member.shared[k][i];
            for (std::size_t j = 0; j < unknown_count; ++j)
                own += slopes[m][i] * member.own[i][j] * slopes[m][j];
        }
        variance += member.weight * member.weight * std::max(own, 0.0);
    }
    for (const double t : together)
        variance += t * t;
    return variance;
}

} // namespace evenstroke::indicator
