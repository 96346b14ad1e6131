// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/explanation/subject_series.h"

/// When the newest change of a subject began, and how large it is in every quantity by now.
namespace evenstroke {

struct ChangeWindow
{
    std::size_t onset = 0;  ///< the first changed reading
    bool ramp = false;      ///< little by little since then; else it came at once
    std::size_t readings = 0; ///< that carry it
    bool at_edge = false;   ///< the earliest onset that was tried: it may have begun before
    double months = 0.0;    ///< from the reading before the onset to the last
    double strength = 0.0;  ///< of the strongest sign, in standard deviations, slow wander allowed for
    double likelihood = 0.0; ///< the same without that: among onsets and shapes the largest fits best
    ChangeVector changes;   ///< as they stand at the last reading
    ChangeVector without_wander; ///< the same with the errors of averaging alone
    std::vector<std::optional<double>> amounts; ///< the same in the unit of the deviation
    /// One a fault that was asked for: logarithm of its probability over "nothing happened", averaged over every onset
    /// and shape, common faults favoured. Empty where one change was asked for by itself.
    std::vector<double> log_weights;
};

/// Readings before the change that a quantity's own usual level needs.
inline constexpr std::size_t level_needs = 4;
/// The longest stretch over which a change is sought.
inline constexpr std::size_t longest_window = 36;

/// Tries every onset within the last 36 readings, as a step and as a ramp, and keeps the strongest.
/// @param faults   those that may be meant
/// @param earliest no onset before this reading
/// @return nothing where no quantity has enough readings before and after
std::optional<ChangeWindow> find_change(const SubjectSeries& series, std::span<const Fault* const> faults,
                                        std::size_t earliest);

/// The change since a given onset; nothing where no quantity has enough readings.
std::optional<ChangeWindow> change_since(const SubjectSeries& series, std::size_t onset, bool ramp);

} // namespace evenstroke
