// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <optional>
#include <span>
#include <vector>

/// Medians, which one odd value in a short row cannot move.
namespace evenstroke::drift {

/// 1.4826 times the median of |x| estimates the sigma of a normal x (1 / 0.67449, its upper quartile).
inline constexpr double median_to_sigma = 1.4826;

/// Median of values in ascending order; the mean of the two middle ones for an even count. Not for an empty
/// span.
inline double median_of_sorted(std::span<const double> sorted)
{
    const std::size_t half = sorted.size() / 2;
    return sorted.size() % 2 != 0 ? sorted[half] : 0.5 * (sorted[half - 1] + sorted[half]);
}

/// Median; the mean of the two middle ones for an even count. Reorders what it is given. Not for an empty
/// span.
inline double median_in_place(std::span<double> values)
{
    constexpr std::size_t few = 16; // so few are sorted faster than selected from
    if (values.size() <= few) {
        for (std::size_t i = 1; i < values.size(); ++i) {
            const double moved = values[i];
            std::size_t to = i;
            for (; to > 0 && values[to - 1] > moved; --to)
                values[to] = values[to - 1];
            values[to] = moved;
        }
        return median_of_sorted(values);
    }
    const auto middle = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
    std::nth_element(values.begin(), middle, values.end());
    if (values.size() % 2 != 0)
        return *middle;
    return 0.5 * (*middle + *std::max_element(values.begin(), middle));
}

inline std::optional<double> median(std::vector<double> values)
{
    if (values.empty())
        return std::nullopt;
    return median_in_place(values);
}

/// Pulls `value` into the band of `reach` around `centre`.
inline double pull_in(double value, double centre, double reach)
{
    return centre + std::clamp(value - centre, -reach, reach);
}

} // namespace evenstroke::drift
