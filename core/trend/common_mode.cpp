// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/common_mode.h"

#include "core/trend/robust.h"

#include <array>

namespace evenstroke::drift {

namespace {

/// Median of a sorted list from which the element at `left_out` is thought away (none: size()).
double median_without(std::span<const double> sorted, std::size_t left_out)
{
    const std::size_t count = sorted.size() - (left_out < sorted.size() ? 1 : 0);
    const auto at = [&](std::size_t rank) { return sorted[rank < left_out ? rank : rank + 1]; };
    const std::size_t half = count / 2;
    return count % 2 != 0 ? at(half) : 0.5 * (at(half - 1) + at(half));
}

std::vector<double> sorted_values(Row row)
{
    std::vector<double> sorted;
    sorted.reserve(row.size());
    for (const auto& value : row)
        if (value)
            sorted.push_back(*value);
    std::sort(sorted.begin(), sorted.end());
    return sorted;
}

} // namespace

MaybeValues median_of_others(Row row)
{
    const std::vector<double> sorted = sorted_values(row);
    MaybeValues medians(row.size());
    for (std::size_t j = 0; j < row.size(); ++j) {
        const std::size_t others = sorted.size() - (row[j] ? 1 : 0);
        if (others < others_needed)
            continue;
        const std::size_t own =
            !row[j] ? sorted.size()
                    : static_cast<std::size_t>(std::lower_bound(sorted.begin(), sorted.end(), *row[j]) -
                                               sorted.begin());
        medians[j] = median_without(sorted, own);
    }
    return medians;
}

MaybeValues common_mode(Row row, std::span<const double> own_offset, double noise)
{
    MaybeValues offset_free(row.begin(), row.end());
    for (std::size_t j = 0; j < row.size(); ++j)
        if (offset_free[j])
            *offset_free[j] -= own_offset[j];
    MaybeValues common = median_of_others(offset_free);
    for (std::size_t j = 0; j < row.size(); ++j) {
        if (!common[j])
            continue;
        double sum = 0.0;
        std::size_t count = 0;
        for (std::size_t other = 0; other < row.size(); ++other) {
            if (other == j || !offset_free[other])
                continue;
            sum += std::clamp(*offset_free[other] - *common[j], -2.0 * noise, 2.0 * noise);
            ++count;
        }
        *common[j] += sum / static_cast<double>(count);
    }
    return common;
}

OwnOffset own_offset(std::span<const std::optional<double>> from_others, std::size_t cylinders,
                     std::size_t cylinder, std::size_t first, std::size_t reading)
{
    constexpr std::size_t memory = 12; // readings: a year of monthly ones
    std::array<double, memory> last;
    std::size_t count = 0;
    for (std::size_t i = reading > first + memory ? reading - memory : first; i < reading; ++i)
        if (const auto& value = from_others[i * cylinders + cylinder])
            last[count++] = *value;
    if (count < 2)
        return {0.0, count};
    return {median_in_place(std::span(last.data(), count)), count};
}

} // namespace evenstroke::drift
