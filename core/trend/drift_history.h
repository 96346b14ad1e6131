// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/common_mode.h"
#include "core/trend/copied_values.h"
#include "core/trend/drift.h"
#include "core/trend/noise.h"

#include <cstddef>
#include <vector>

/// What is known of an engine after each reading: grows a row at a time, so that no later reading can
/// reach back.
namespace evenstroke::drift {

/// Weight of the catalogue's noise against the engine's own, in differences between readings.
inline constexpr double prior_noise_weight = 30.0;

/// Whether the flag at `at` is set; flags that were left empty, or are of the wrong length, are not.
inline bool is_set(const std::vector<char>& flags, std::size_t at, std::size_t wanted_size)
{
    return flags.size() == wanted_size && flags[at] != 0;
}

/// One per-cylinder quantity so far.
struct ChannelHistory
{
    ChannelHistory(const Channel& channel, std::size_t readings, std::size_t cylinders);

    const Channel* input;
    std::size_t cylinders;
    bool sound_input;               ///< vectors of the right length, noise positive
    MaybeValues deviation;          ///< (T x N) values that may be used
    MaybeValues from_others;        ///< (T x N) deviation minus the median of the others
    std::vector<std::size_t> start; ///< (N) first reading after the last recorded work
    NoiseEstimate check_noise;      ///< of `from_others`
    NoiseEstimate alone_noise;      ///< of `deviation` itself: for places without others to compare with
    int decimals = 0;               ///< most digits after the point seen so far
    EqualValues equal;              ///< how often values were alike: coarse instruments repeat themselves

    const Cell* cell(std::size_t reading, std::size_t cylinder) const;
    /// Keeps the usable values of a reading and learns the noise from them.
    /// @param row    what may be used, shape (N)
    /// @param steady neither this reading nor the one before was unsteady
    void take(std::size_t reading, Row row, bool steady);
    /// Learns how finely the instrument shows and how often values are alike.
    void take_texts(std::size_t reading);
};

/// A cell's deviation if it can be reckoned with: taken, possible, finite; pulled in to a thousand million
/// sigmas so that no square overflows.
std::optional<double> usable_deviation(const Cell& cell, double noise);

} // namespace evenstroke::drift
