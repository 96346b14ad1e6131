// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/power_line.h"

#include "core/card/cylinder_model.h"

#include <algorithm>
#include <array>

namespace evenstroke::indicator {
namespace {

constexpr double lowest_pressure = 0.2; // bar
constexpr double model_scatter = 1e-3;  // of ln p
constexpr int most_rounds = 30;
constexpr Row<4> largest_step{0.7, 2.0, 0.1, 1e9};
constexpr Row<4> small_enough{1e-9, 1e-9, 1e-10, 1e9};

} // namespace

std::optional<PowerLine> fit_power_line(const SliderCrank& gear, double clearance, std::span<const double> angle,
                                        std::span<const double> pressure, double noise, const PowerLine& start)
{
    if (angle.size() < 20)
        return std::nullopt;
    PowerLine line = start;
    for (int round = 0; round < most_rounds && !line.converged; ++round) {
        LeastSquares<4> rows;
        double squares = 0.0;
        for (std::size_t i = 0; i < angle.size(); ++i) {
            const CrankMotion crank = gear.motion((angle[i] - line.offset) * radians_per_degree);
            const double volume = clearance + gear.area() * crank.position;
            const double p = std::max(pressure[i] - line.zero, lowest_pressure);
            const double share = noise / p, weight = 1.0 / std::sqrt(share * share + model_scatter * model_scatter);
            const double residual = std::log(p) + line.exponent * std::log(volume) - line.level;
            const double turn = -line.exponent * gear.area() * crank.slope * radians_per_degree / volume;
            rows.add({weight * turn, -weight / p, weight * std::log(volume), -weight}, -weight * residual);
            squares += weight * residual * weight * residual;
        }
        const auto step = rows.solve();
        if (!step)
            return std::nullopt;
        const std::array<double*, 4> unknown{&line.offset, &line.zero, &line.exponent, &line.level};
        line.converged = true;
        for (std::size_t i = 0; i < unknown.size(); ++i) {
            const double move = std::clamp(step->values[i], -largest_step[i], largest_step[i]);
            *unknown[i] += move;
            line.converged = line.converged && std::abs(move) < small_enough[i];
        }
        line.covariance = step->covariance;
        line.misfit = std::sqrt(squares / static_cast<double>(angle.size()));
    }
    return line;
}

} // namespace evenstroke::indicator
