// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <vector>

/// Values that nobody read: one box copied over the whole row, or last month's sheet copied again.
///
/// Equal numbers are also what a coarse thermometer shows. So each finding asks how likely it is by chance,
/// from the digits that the instrument shows, its scatter, and how often values were equal on this engine.
namespace evenstroke::drift {

struct Cell;
struct ChannelHistory;

/// To the last digit.
bool same_text(const Cell& one, const Cell& other);

/// Every cylinder of a row shows the same, or the same as at the reading before, to the last digit.
bool row_is_copied(const ChannelHistory& history, std::size_t reading);

/// More than half of all boxes of the cylinders show what they showed at the reading before.
bool boxes_are_copied(const std::vector<ChannelHistory>& history, std::size_t reading);

/// How often values of one quantity have been equal so far.
struct EqualValues
{
    double along_row = 0.0, pairs_along_row = 0.0; ///< neighbouring cylinders at one reading
    double in_time = 0.0, pairs_in_time = 0.0;     ///< one cylinder at two readings in a row
};

} // namespace evenstroke::drift
