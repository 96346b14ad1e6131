// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift_history.h"

#include <optional>
#include <vector>

/// Looks at one reading before anything else does: what was mistyped, exchanged or copied, and whether the
/// load stood still. Doubtful values take no part in anything until the engineer has answered.
namespace evenstroke::drift {

/// What is usual at one place, and how far the typed value is from it.
struct CellOpinion
{
    std::optional<double> centre;   ///< usual deviation; nothing where there is too little to compare with
    double tolerance = 0.0;         ///< one sigma around it
    std::optional<double> distance; ///< u: (deviation - centre) / tolerance of a value that was typed
    double own_offset = 0.0;        ///< a
    std::size_t offset_count = 0;   ///< values a rests on
    std::optional<double> common;   ///< c: what the others do
    bool alone = false;             ///< judged by its own last readings only
};

/// The opinion on all values of one reading.
struct ReadingOpinion
{
    std::vector<std::vector<CellOpinion>> cylinders; ///< [channel][cylinder]
    std::vector<CellOpinion> engine;                 ///< [engine channel]
    std::vector<std::vector<char>> held;             ///< [channel][cylinder] left out until answered
    std::vector<char> engine_held;                   ///< [engine channel]
    std::optional<double> scatter;                   ///< robust sigma of all u; nothing with fewer than 10
    bool unsteady = false;
    std::vector<Doubt> doubts;
};

/// Scatter of a reading, over the usual one, above which the load cannot have stood still.
inline constexpr double unsteady_scatter = 1.7;

class TypingCheck
{
public:
    explicit TypingCheck(const Input& input);

    /// @param history of each channel, holding the readings before this one
    ReadingOpinion look_at(std::size_t reading, const std::vector<ChannelHistory>& history) const;
    /// Remembers what was held back and what the engine values were. To be called once a reading, in order.
    void remember(std::size_t reading, const ReadingOpinion& opinion);

private:
    void judge_cylinders(std::size_t reading, const std::vector<ChannelHistory>& history,
                         ReadingOpinion& opinion) const;
    void judge_scatter(std::size_t reading, ReadingOpinion& opinion) const;
    void doubt_rows(std::size_t reading, const std::vector<ChannelHistory>& history,
                    ReadingOpinion& opinion) const;
    void doubt_cells(std::size_t reading, const std::vector<ChannelHistory>& history,
                     ReadingOpinion& opinion) const;
    void judge_engine(std::size_t reading, ReadingOpinion& opinion) const;

    const Input* input_;
    /// The cell's last value was held back, with this sign of its distance; 0 if it was not.
    /// [channel][cylinder]
    std::vector<std::vector<int>> held_sign_;
    std::vector<int> engine_held_sign_;
    std::vector<std::vector<double>> engine_values_; ///< [engine channel] usable ones so far
    std::vector<NoiseEstimate> engine_noise_;        ///< [engine channel]
};

/// The band in which about 95 of 100 sound values lie.
std::optional<UsualBand> usual_band(const CellOpinion& opinion);

} // namespace evenstroke::drift
