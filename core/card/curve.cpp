// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/curve.h"

#include "core/card/cylinder_model.h"
#include "core/card/least_squares.h"
#include "core/engine/even_motion.h"

#include <algorithm>
#include <cmath>
#include <numeric>

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

/// Samples either side of the peak: within 2°, or 1° where the noise allows it, as a sharp peak is no parabola for long.
std::size_t peak_window(double step, double noise)
{
    constexpr double quiet = 0.02; // bar that the narrow window may leave of the noise
    const double narrow = std::max(2.0, std::round(1.0 / step));
    const bool enough = noise / std::sqrt(2.0 * narrow + 1.0) < quiet;
    return static_cast<std::size_t>(enough ? narrow : std::max(2.0, std::round(2.0 / step)));
}

/// Vertex of the parabola through the samples around one of them.
std::optional<Peak> vertex(std::span<const double> angle, std::span<const double> pressure, double noise, std::size_t top,
                           std::size_t half)
{
    const auto around = [&](std::span<const double> all) { return all.subspan(top - half, 2 * half + 1); };
    const auto fit = fit_parabola(around(angle), around(pressure), angle[top]);
    if (!fit || !std::isfinite(fit->constant))
        return std::nullopt;
    const double step = (angle.back() - angle.front()) / static_cast<double>(angle.size() - 1);
    const double count = 2.0 * static_cast<double>(half) + 1.0;
    const double squares = step * step * static_cast<double>(half * (half + 1)) * count / 3.0;
    Peak peak{pressure[top], angle[top], 1.5 * noise / std::sqrt(count), 2.0 * step};
    if (fit->square < 0.0) {
        peak.angle = angle[top] + std::clamp(-0.5 * fit->linear / fit->square, -2.0, 2.0);
        peak.angle_spread = noise / std::sqrt(squares) / (2.0 * std::abs(fit->square));
        // The square of the slope's noise always lifts the vertex.
        peak.pressure = fit->at(peak.angle) - std::min(std::abs(fit->square) * peak.angle_spread * peak.angle_spread,
                                                       peak.pressure_spread);
    }
    return peak;
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
    std::vector<double> weights(angle.size());
    if (!angle.empty())
        follow_evenly(gear, (angle.front() - offset) * radians_per_degree, step * radians_per_degree, angle.size(),
                      [&](std::size_t i, const CrankMotion& crank) { weights[i] = scale * crank.slope; });
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
    const std::size_t half = peak_window(step, noise);
    if (top < half || top + half >= angle.size())
        return std::nullopt;
    return vertex(angle, pressure, noise, top, half);
}

std::optional<Peak> find_peak_near(std::span<const double> angle, std::span<const double> pressure, double noise,
                                   double near)
{
    constexpr double too_far = 1.5; // degrees
    const double step = (angle.back() - angle.front()) / static_cast<double>(angle.size() - 1);
    const std::size_t half = peak_window(step, noise);
    const auto top = static_cast<std::ptrdiff_t>(std::llround((near - angle.front()) / step));
    if (top >= static_cast<std::ptrdiff_t>(half) && top + static_cast<std::ptrdiff_t>(half) < static_cast<std::ptrdiff_t>(angle.size())) {
        const auto peak = vertex(angle, pressure, noise, static_cast<std::size_t>(top), half);
        if (peak && std::abs(peak->angle - near) <= too_far)
            return peak;
    }
    return find_peak(angle, pressure, noise);
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

std::optional<Rise> steepest_rise(std::span<const double> angle, std::span<const double> pressure, double step,
                                  double noise)
{
    constexpr double quiet = 0.06; // bar a degree of noise that the narrow window may leave
    int m = std::max(2, static_cast<int>(std::lround(1.0 / step)));
    std::vector<double> weights = cubic_slope_weights(m, step);
    const auto noise_of = [&] {
        return noise * std::sqrt(std::inner_product(weights.begin(), weights.end(), weights.begin(), 0.0));
    };
    if (step < 0.9 && noise_of() > quiet) {
        m = std::max(3, static_cast<int>(std::lround(2.0 / step)));
        weights = cubic_slope_weights(m, step);
    }
    const Range range = samples_within(angle, -40.0, 40.0);
    std::optional<Rise> steepest;
    const auto width = static_cast<std::size_t>(m);
    for (std::size_t i = std::max(range.first, width); i < range.first + range.count && i + width < angle.size(); ++i) {
        const double slope = std::inner_product(weights.begin(), weights.end(), pressure.begin() + static_cast<std::ptrdiff_t>(i - width), 0.0);
        if (std::isfinite(slope) && (!steepest || slope > steepest->value))
            steepest = Rise{slope, noise_of()};
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
