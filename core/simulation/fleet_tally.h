// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/simulation/exact_intervals.h"
#include "core/simulation/fleet_simulator.h"

#include <cstddef>
#include <map>
#include <string>
#include <vector>

namespace evenstroke::simulation {

/// Counts how flags, questions and doubts agree with the truth.
///
/// A flag before the onset of the fault (or on an engine without one) is false, also where work that nobody
/// wrote down explains it. A question is counted apart; it is true with such work on its cylinder in the 18
/// months before. A fault is found at the n-th reading from its onset on, by a flag on the right subject.
struct Tally
{
    std::size_t engines = 0, readings = 0;
    double engine_years = 0.0; ///< until the onset
    std::size_t false_cylinder = 0, false_engine = 0, false_after_work = 0;
    std::size_t questions = 0, true_questions = 0;
    std::size_t faults = 0, found_within_12 = 0, found_or_asked_within_12 = 0;
    std::size_t flags_elsewhere = 0;                             ///< within 12 readings of an onset
    std::vector<std::size_t> delays;                             ///< 0: never found
    std::map<drift::Verdict, std::size_t> errors, caught, named; ///< by kind of typing error
    std::size_t large_slips = 0, large_slips_caught = 0; ///< single values off by 6 noise units or more
    std::size_t doubts = 0, doubts_without_cause = 0;    ///< rows; unsteady readings apart
    std::size_t unsteady = 0, unsteady_marked = 0, unsteady_wrongly = 0;

    void add(const SimulatedEngine& engine, const drift::Output& output);
    void add(const Tally& other);

    double false_per_year() const
    {
        return static_cast<double>(false_cylinder + false_engine) / engine_years;
    }
    double questions_per_year() const { return static_cast<double>(questions) / engine_years; }
    double share_within_12() const
    {
        return static_cast<double>(found_within_12) / static_cast<double>(faults);
    }
    /// Share of typing errors caught, of the kinds given.
    double share_caught(const std::vector<drift::Verdict>& kinds) const;
    double share_of_large_slips() const
    {
        return static_cast<double>(large_slips_caught) / static_cast<double>(large_slips);
    }
    double doubts_without_cause_per_100() const
    {
        return 100.0 * static_cast<double>(doubts_without_cause) / static_cast<double>(readings);
    }
    /// The delay that so many per cent of the faults do not exceed; 0: more than the rest were never found.
    std::size_t delay_at(double share) const;
};

/// Simulates engines `seed`, `seed + 1`, ... of a recipe and judges them.
Tally judge_fleet(const Recipe& recipe, std::size_t engines, std::uint64_t seed);

} // namespace evenstroke::simulation
