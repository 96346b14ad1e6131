// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/curve.h"

#include "core/card/cylinder_model.h"
#include "core/card/least_squares.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {
namespace {

/// Slope of the cubic through 2m + 1 even samples (A. Savitzky, M. J. E. Golay, Anal. Chem. 36, 1964), exact on cubics.
std::vector<double> cubic_slope_weights(int m, double step)
{
    double s2 = 0.0, s4 = 0.0, s6 = 0.0;
    for (int i = -m; i <= m; ++i) {
        const double square = static_cast<double>(i) * i;
        s2 += square;
        s4 += square * square;
        s6 += square * square * square;
    }
    const double divisor = (s2 * s6 - s4 * s4) * step;
    std::vector<double> weights;
    for (int i = -m; i <= m; ++i)
        weights.push_back((s6 * i - s4 * static_cast<double>(i) * i * i) / divisor);
    return weights;
}

/// Value of the parabola through 2m + 1 even samples in their middle.
double smoothed(std::span<const double> p, std::size_t at, std::size_t m)
{
    const double n = 2.0 * static_cast<double>(m) + 1.0;
    const double s2 = static_cast<double>(m * (m + 1)) * n / 3.0;
    const double s4 = s2 * (3.0 * static_cast<double>(m * m) + 3.0 * static_cast<double>(m) - 1.0) / 5.0;
    double sum = 0.0;
    for (std::size_t i = at - m; i <= at + m; ++i) {
        const double from = static_cast<double>(i) - static_cast<double>(at);
        sum += p[i] * (s4 - s2 * from * from);
    }
    return sum / (n * s4 - s2 * s2);
}

} // namespace

Range samples_within(std::span<const double> angle, double from, double to)
{
    const auto first = std::lower_bound(angle.begin(), angle.end(), from - 1e-9);
    const auto last = std::upper_bound(first, angle.end(), to + 1e-9);
    return {static_cast<std::size_t>(first - angle.begin()), static_cast<std::size_t>(last - first)};
}

std::vector<double> work_weights(const SliderCrank& gear, std::span<const double> angle, double step, double offset)
{
    const double scale = step * radians_per_degree / (2.0 * gear.radius()); // dV/V_s = dx/S
    std::vector<double> weights;
    weights.reserve(angle.size());
    for (const double at : angle)
        weights.push_back(scale * gear.motion((at - offset) * radians_per_degree).slope);
    return weights;
}

double weighted_sum(std::span<const double> pressure, std::span<const double> weights)
{
    double sum = 0.0;
    for (std::size_t i = 0; i < pressure.size(); ++i)
        sum += pressure[i] * weights[i];
    return sum;
}

double polygon_pressure(const SliderCrank& gear, std::span<const double> angle, std::span<const double> pressure,
                        double offset)
{
    double sum = 0.0;
    const auto position = [&](std::size_t i) { return gear.position((angle[i] - offset) * radians_per_degree); };
    double before = position(angle.size() - 1), p_before = pressure.back();
    for (std::size_t i = 0; i < angle.size(); ++i) {
        const double here = position(i);
        sum += 0.5 * (pressure[i] + p_before) * (here - before);
        before = here;
        p_before = pressure[i];
    }
    return sum / (2.0 * gear.radius());
}

std::optional<Peak> find_peak(std::span<const double> angle, std::span<const double> pressure, double noise, double from,
                              double to)
{
    const Range range = samples_within(angle, from, to);
    if (range.count < 5)
        return std::nullopt;
    const auto begin = pressure.begin() + static_cast<std::ptrdiff_t>(range.first);
    const auto raw = std::max_element(begin, begin + static_cast<std::ptrdiff_t>(range.count),
                                      [](double a, double b) { return a < b || (std::isnan(a) && !std::isnan(b)); });
    auto top = static_cast<std::size_t>(raw - pressure.begin());
    const double step = (angle.back() - angle.front()) / static_cast<double>(angle.size() - 1);
    const auto m = static_cast<std::size_t>(std::max(1.0, std::round(2.0 / step)));
    // Only where the raw maximum is can the smoothed one be: within two windows of it.
    const std::size_t low = std::max(top > 2 * m ? top - 2 * m : 0, m), high = std::min(top + 2 * m, angle.size() - m - 1);
    double best = -1e9;
    for (std::size_t i = low; i <= high; ++i)
        if (const double value = smoothed(pressure, i, m); value > best && angle[i] >= from && angle[i] <= to)
            best = value, top = i;
    const std::size_t half = std::max<std::size_t>(m, 2);
    if (top < half || top + half >= angle.size())
        return std::nullopt;
    const auto around = [&](std::span<const double> all) { return all.subspan(top - half, 2 * half + 1); };
    const auto fit = fit_parabola(around(angle), around(pressure), angle[top]);
    if (!fit || !std::isfinite(fit->constant))
        return std::nullopt;
    const double count = 2.0 * static_cast<double>(half) + 1.0;
    const double squares = step * step * static_cast<double>(half * (half + 1)) * count / 3.0;
    Peak peak{pressure[top], angle[top], 1.5 * noise / std::sqrt(count), 2.0 * step};
    if (fit->square < 0.0) {
        const double vertex = std::clamp(-0.5 * fit->linear / fit->square, -2.0, 2.0);
        peak.angle = angle[top] + vertex;
        peak.pressure = fit->at(peak.angle);
        peak.angle_spread = noise / std::sqrt(squares) / (2.0 * std::abs(fit->square));
    }
    return peak;
}

std::optional<double> local_pressure(std::span<const double> angle, std::span<const double> pressure, double at,
                                     double half_width)
{
    const Range range = samples_within(angle, at - half_width, at + half_width);
    const auto fit = fit_parabola(angle.subspan(range.first, range.count), pressure.subspan(range.first, range.count), at);
    if (!fit || !std::isfinite(fit->constant))
        return std::nullopt;
    return fit->constant;
}

std::optional<double> steepest_rise(std::span<const double> angle, std::span<const double> pressure, double step)
{
    const int m = std::max(2, static_cast<int>(std::lround(1.0 / step)));
    const std::vector<double> weights = cubic_slope_weights(m, step);
    const Range range = samples_within(angle, -40.0, 40.0);
    std::optional<double> steepest;
    const auto width = static_cast<std::size_t>(m);
    for (std::size_t i = std::max(range.first, width); i < range.first + range.count && i + width < angle.size(); ++i) {
        double slope = 0.0;
        for (std::size_t k = 0; k < weights.size(); ++k)
            slope += weights[k] * pressure[i - width + k];
        if (std::isfinite(slope) && (!steepest || slope > *steepest))
            steepest = slope;
    }
    return steepest;
}

std::optional<double> polytropic_exponent(const SliderCrank& gear, double clearance, std::span<const double> angle,
                                          std::span<const double> pressure, double offset, double zero, double from,
                                          double to)
{
    const Range range = samples_within(angle, from + offset, to + offset);
    LeastSquares<2> rows;
    for (std::size_t i = range.first; i < range.first + range.count; ++i) {
        const double p = pressure[i] - zero;
        if (!(p > 0.0))
            return std::nullopt;
        rows.add({1.0, -std::log(gear.volume((angle[i] - offset) * radians_per_degree, clearance))}, std::log(p));
    }
    const auto solution = rows.solve();
    if (range.count < 5 || !solution)
        return std::nullopt;
    return solution->values[1];
}

} // namespace evenstroke::indicator
