// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/drift_history.h"

#include "core/trend/typing_slips.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::drift {

namespace {

double positive_or_one(double value)
{
    return std::isfinite(value) && value > 0.0 ? value : 1.0;
}

} // namespace

ChannelHistory::ChannelHistory(const Channel& channel, std::size_t readings, std::size_t cylinder_count)
    : input(&channel), cylinders(cylinder_count),
      sound_input(channel.cells.size() == readings * cylinder_count && std::isfinite(channel.noise) &&
                  channel.noise > 0.0),
      deviation(readings * cylinder_count), from_others(readings * cylinder_count), start(cylinder_count, 0),
      check_noise(noise_against_others(positive_or_one(channel.noise), cylinder_count), prior_noise_weight),
      // Alone, the common part of all cylinders stays in: 2.5 times the noise, invented.
      alone_noise(2.5 * positive_or_one(channel.noise), 12.0)
{
}

const Cell* ChannelHistory::cell(std::size_t reading, std::size_t cylinder) const
{
    if (!sound_input)
        return nullptr;
    const Cell& found = input->cells[reading * cylinders + cylinder];
    return found.present ? &found : nullptr;
}

void ChannelHistory::take(std::size_t reading, Row row, bool steady)
{
    const MaybeValues medians = median_of_others(row);
    for (std::size_t j = 0; j < cylinders; ++j) {
        const std::size_t at = reading * cylinders + j;
        deviation[at] = row[j];
        if (row[j] && medians[j])
            from_others[at] = *row[j] - *medians[j];
        if (reading == 0 || start[j] >= reading)
            continue;
        if (deviation[at] && deviation[at - cylinders])
            alone_noise.add_difference(*deviation[at] - *deviation[at - cylinders], steady);
        if (from_others[at] && from_others[at - cylinders])
            check_noise.add_difference(*from_others[at] - *from_others[at - cylinders], steady);
    }
}

void ChannelHistory::take_texts(std::size_t reading)
{
    const Cell* neighbour = nullptr;
    for (std::size_t j = 0; j < cylinders; ++j) {
        const Cell* typed = cell(reading, j);
        if (!typed)
            continue;
        decimals = std::max(decimals, significant_decimals(typed->typed_text));
        if (neighbour) {
            equal.pairs_along_row += 1.0;
            equal.along_row += same_text(*typed, *neighbour) ? 1.0 : 0.0;
        }
        neighbour = typed;
        if (const Cell* before = reading > 0 ? cell(reading - 1, j) : nullptr) {
            equal.pairs_in_time += 1.0;
            equal.in_time += same_text(*typed, *before) ? 1.0 : 0.0;
        }
    }
}

std::optional<double> usable_deviation(const Cell& cell, double noise)
{
    if (!cell.present || cell.held_out || !std::isfinite(cell.deviation))
        return std::nullopt;
    const double reach = 1e9 * positive_or_one(noise);
    return std::clamp(cell.deviation, -reach, reach);
}

} // namespace evenstroke::drift
