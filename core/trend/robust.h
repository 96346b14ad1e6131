// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <limits>
#include <optional>
#include <span>
#include <utility>
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

namespace sorting_network {

/// Pairs that Batcher's odd-even merging compares for `size` values, a power of two (Knuth, The Art of Computer
/// Programming 3, 5.2.2, algorithm M). Always the same ones, so a processor has nothing to guess.
template <std::size_t size> constexpr auto pairs()
{
    constexpr std::size_t most = size * size;
    std::array<std::pair<std::size_t, std::size_t>, most> all{};
    std::size_t count = 0;
    for (std::size_t p = 1; p < size; p *= 2)
        for (std::size_t k = p; k >= 1; k /= 2)
            for (std::size_t j = k % p; j + k < size; j += 2 * k)
                for (std::size_t i = j; i < j + k && i + k < size; ++i)
                    if (i / (2 * p) == (i + k) / (2 * p))
                        all[count++] = {i, i + k};
    return std::pair(all, count);
}

template <std::size_t size, std::size_t... at> void run(double* values, std::index_sequence<at...>)
{
    constexpr auto steps = pairs<size>().first;
    const auto order = [values](std::size_t a, std::size_t b) {
        const double low = std::min(values[a], values[b]), high = std::max(values[a], values[b]);
        values[a] = low;
        values[b] = high;
    };
    (order(steps[at].first, steps[at].second), ...);
}

/// Sorts at most `size` values.
template <std::size_t size> void sort(std::span<double> values)
{
    std::array<double, size> padded;
    std::copy(values.begin(), values.end(), padded.begin());
    std::fill(padded.begin() + static_cast<std::ptrdiff_t>(values.size()), padded.end(), std::numeric_limits<double>::infinity());
    run<size>(padded.data(), std::make_index_sequence<pairs<size>().second>());
    std::copy_n(padded.begin(), values.size(), values.begin());
}

} // namespace sorting_network

/// Median; the mean of the two middle ones for an even count. Reorders what it is given. Not for an empty
/// span.
inline double median_in_place(std::span<double> values)
{
    constexpr std::size_t few = 16; // so few are sorted faster than selected from
    if (values.size() <= few) {
        if (values.size() <= 4)
            sorting_network::sort<4>(values);
        else if (values.size() <= 8)
            sorting_network::sort<8>(values);
        else
            sorting_network::sort<few>(values);
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
