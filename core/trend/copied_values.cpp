// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/copied_values.h"

#include "core/trend/drift_history.h"
#include "core/trend/typing_slips.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>

namespace evenstroke::drift {

namespace {

// False doubts to be had at most: one row in ten thousand, one sheet in a million. Chosen, no source.
constexpr double unlikely_row = 1e-4, unlikely_repeat = 1e-6, unlikely_sheet_sigmas = 5.0;

/// Chance that two rounded normal values of this spread are equal. An instrument whose steps are wider than
/// what it measures shows the same rows again and again: there it is 1.
double chance_by_rounding(const ChannelHistory& history, const Cell& cell, double spread)
{
    const int decimals = std::max(history.decimals, significant_decimals(cell.typed_text));
    const double step = std::pow(10.0, -decimals) * std::abs(cell.scale);
    const double chance = step / (2.0 * std::sqrt(std::numbers::pi) * spread);
    const bool calm = step > 1.5 * history.check_noise.value();
    return std::isfinite(chance) && !calm ? std::min(chance, 1.0) : 1.0;
}

/// Chance of equal values; the figure from rounding counts like 10 pairs. A coarse instrument may also be a
/// calm one, so that equal values are the rule: nothing can be said until there is experience.
double with_experience(double by_rounding, double equal, double pairs)
{
    constexpr double weight = 10.0, coarse = 0.05, pairs_needed = 60.0;
    if (by_rounding > coarse && pairs < pairs_needed)
        return 1.0;
    return (by_rounding * weight + equal) / (weight + pairs);
}

bool alike_along_row(const ChannelHistory& history, const std::vector<const Cell*>& row)
{
    const Cell& first = *row.front();
    if (!std::all_of(row.begin(), row.end(), [&](const Cell* cell) { return same_text(*cell, first); }))
        return false;
    const double spread = std::hypot(history.input->noise, history.input->offset_spread);
    const double by_rounding = chance_by_rounding(history, first, spread);
    const double pair = std::max(
        by_rounding, with_experience(by_rounding, history.equal.along_row, history.equal.pairs_along_row));
    // n rounded normals fall into one step with (step / (sigma sqrt(2 pi)))^(n-1) / sqrt(n), and
    // a pair with step / (2 sigma sqrt(pi)).
    const double count = static_cast<double>(row.size());
    return std::pow(std::numbers::sqrt2 * pair, count - 1.0) / std::sqrt(count) < unlikely_row;
}

/// Boxes of one row that were read now and before: how many are equal, and how likely one is by chance.
struct Repeats
{
    std::size_t boxes = 0, equal = 0;
    double chance = 1.0;
};

Repeats repeats_of(const ChannelHistory& history, std::size_t reading)
{
    Repeats repeats;
    const Cell* example = nullptr;
    for (std::size_t j = 0; j < history.cylinders && reading > 0; ++j) {
        const Cell *now = history.cell(reading, j), *before = history.cell(reading - 1, j);
        if (!now || !before || now->confirmed)
            continue;
        example = now;
        ++repeats.boxes;
        repeats.equal += same_text(*now, *before) ? 1 : 0;
    }
    if (example)
        repeats.chance = with_experience(chance_by_rounding(history, *example, history.input->noise),
                                         history.equal.in_time, history.equal.pairs_in_time);
    return repeats;
}

} // namespace

bool same_text(const Cell& one, const Cell& other)
{
    return one.typed_text == other.typed_text && one.typed_number == other.typed_number;
}

bool row_is_copied(const ChannelHistory& history, std::size_t reading)
{
    std::vector<const Cell*> row;
    for (std::size_t j = 0; j < history.cylinders; ++j)
        if (const Cell* cell = history.cell(reading, j); cell && !cell->confirmed)
            row.push_back(cell);
    if (row.size() < 3)
        return false;
    if (alike_along_row(history, row))
        return true;
    const Repeats repeats = repeats_of(history, reading);
    return repeats.boxes >= 4 && repeats.equal == repeats.boxes &&
           std::pow(repeats.chance, static_cast<double>(repeats.boxes)) < unlikely_repeat;
}

bool boxes_are_copied(const std::vector<ChannelHistory>& history, std::size_t reading)
{
    constexpr std::size_t boxes_needed = 10;
    std::size_t boxes = 0, equal = 0;
    double usual = 0.0, variance = 0.0;
    for (const ChannelHistory& channel : history) {
        const Repeats repeats = repeats_of(channel, reading);
        boxes += repeats.boxes;
        equal += repeats.equal;
        usual += static_cast<double>(repeats.boxes) * repeats.chance;
        variance += static_cast<double>(repeats.boxes) * repeats.chance * (1.0 - repeats.chance);
    }
    return boxes >= boxes_needed && 2 * equal > boxes &&
           static_cast<double>(equal) - usual > unlikely_sheet_sigmas * std::sqrt(variance);
}

} // namespace evenstroke::drift
