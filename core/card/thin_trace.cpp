// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/self_calibration.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {

ThinTrace make_thin(const CleanTrace& trace)
{
    constexpr double wanted = 0.5, noise_floor = 0.03; // degrees, bar
    const auto block = static_cast<std::size_t>(std::max(1.0, std::floor(wanted / trace.step + 1e-6)));
    ThinTrace thin;
    thin.step = trace.step * static_cast<double>(block);
    thin.noise = std::max(noise_floor, trace.noise_mean / std::sqrt(static_cast<double>(block)));
    const std::size_t count = trace.angle.size() / block;
    std::vector<double> mean(count, 0.0);
    for (std::size_t i = 0; i < count; ++i) {
        thin.angle.push_back(trace.angle[i * block] + 0.5 * trace.step * static_cast<double>(block - 1));
        for (std::size_t k = 0; k < block; ++k)
            mean[i] += trace.mean[i * block + k] / static_cast<double>(block);
    }
    thin.pressure = mean;
    const double m = static_cast<double>(block);
    const double bend = (1.0 - 1.0 / (m * m)) / 24.0; // of the second difference between blocks
    for (std::size_t i = 1; i + 1 < count; ++i)
        if (const double p = mean[i] - bend * (mean[i + 1] - 2.0 * mean[i] + mean[i - 1]); std::isfinite(p))
            thin.pressure[i] = p;
    return thin;
}

CompressionWindow make_window(const ThinTrace& trace, const Parabola& closing_pressure, double recorded_offset, double from,
                              double to)
{
    const Range range = samples_within(trace.angle, from + recorded_offset, to + recorded_offset);
    return {std::span(trace.angle).subspan(range.first, range.count),
            std::span(trace.pressure).subspan(range.first, range.count), trace.noise, closing_pressure};
}

std::optional<double> peg_zero(const ThinTrace& trace, const Setting& setting, double recorded_offset)
{
    if (!setting.scavenge)
        return std::nullopt;
    const Cylinder& cylinder = setting.cylinder;
    // Pressure at closing over that of the charge: 1.02 and 1.00, common practice, no source.
    const double closed = (cylinder.two_stroke ? 1.02 : 1.0) * *setting.scavenge;
    const double clearance = cylinder.clearance(cylinder.compression_ratio);
    const double at_closing = cylinder.gear.volume(cylinder.closes * radians_per_degree, clearance);
    const Range range =
        samples_within(trace.angle, cylinder.closes + 2.0 + recorded_offset, cylinder.closes + 14.0 + recorded_offset);
    double sum = 0.0;
    for (std::size_t i = range.first; i < range.first + range.count; ++i) {
        const double volume = cylinder.gear.volume((trace.angle[i] - recorded_offset) * radians_per_degree, clearance);
        sum += trace.pressure[i] - closed * std::pow(at_closing / volume, 1.38);
    }
    if (range.count < 3 || !std::isfinite(sum))
        return std::nullopt;
    return sum / static_cast<double>(range.count);
}

} // namespace evenstroke::indicator
