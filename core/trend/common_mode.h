// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <optional>
#include <span>
#include <vector>

/// What all cylinders of an engine share at one reading: load, air, fuel, the clock of the timing chain.
/// A cylinder is compared with what the others do, so that a change of the whole engine is no news about it.
namespace evenstroke::drift {

using Row = std::span<const std::optional<double>>; ///< one value a cylinder, shape (N)
using MaybeValues = std::vector<std::optional<double>>;

/// Values of at least so many other cylinders are needed to say what is common.
inline constexpr std::size_t others_needed = 3;

/// For each cylinder the median over the others that have a value; nothing where fewer than three do.
/// A cylinder without a value of its own gets one too.
MaybeValues median_of_others(Row row);

/// Mean over the others, each without its own lasting offset and pulled in to two noise sigmas around
/// their median: nearly the mean's small noise with the median's resistance to one odd value.
/// @param own_offset usual difference from the others, shape (N)
/// @param noise      one sigma of a value against the others
MaybeValues common_mode(Row row, std::span<const double> own_offset, double noise);

/// A place's usual difference from the others, learned from the last readings of its segment.
struct OwnOffset
{
    double amount = 0.0;   ///< 0 until two values are there
    std::size_t count = 0; ///< values it rests on
};
/// @param from_others (at least `reading` x N) differences from the median of the others
/// @param first       first reading of the segment
OwnOffset own_offset(std::span<const std::optional<double>> from_others, std::size_t cylinders,
                     std::size_t cylinder, std::size_t first, std::size_t reading);

} // namespace evenstroke::drift
