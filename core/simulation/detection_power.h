// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/simulation/exact_intervals.h"
#include "core/simulation/fleet_simulator.h"
#include "core/trend/judgement.h"

#include <functional>
#include <optional>
#include <string>
#include <vector>

/// How good the flags are on an engine like this one: simulated engines with as many cylinders, the same quantities,
/// the scatter learned from its own readings, read as often. So that a superintendent knows what silence means.
namespace evenstroke::simulation {

/// What of an engine decides how well its faults can be found.
struct Likeness
{
    std::size_t cylinders = 0;
    double months_between_readings = 1.0; ///< median of the last two years
    std::size_t readings = 0;             ///< from which scatter and interval were taken
    std::map<std::string, double> cylinder_noise, engine_noise; ///< deviation's unit; quantities with a learned scatter
};
/// Nothing where nothing is watched, or fewer than three readings were taken.
std::optional<Likeness> likeness_of(const Judgement& judgement);

struct FaultPower
{
    Fault fault = Fault::none;
    std::size_t engines = 0, found = 0; ///< `found`: on the right subject within twelve readings
    Interval share{};                   ///< 95 %
    std::size_t median_readings = 0;    ///< from the onset; 0: more than half were never found
};

struct DetectionPower
{
    double engine_years = 0.0;
    std::size_t false_flags = 0, questions = 0;
    Interval false_a_year{}, questions_a_year{}; ///< 95 %
    std::vector<FaultPower> faults;              ///< those whose quantities this engine is read for
    double false_per_year() const { return static_cast<double>(false_flags) / engine_years; }
    double questions_per_year() const { return static_cast<double>(questions) / engine_years; }
};

/// What a simulated fault does, in words: "compression pressure -0.3 bar a month, maximum pressure -0.25 bar".
std::string fault_effect_words(Fault fault);

struct Effort
{
    std::size_t sound_engines = 120, engines_a_fault = 40;
    std::uint64_t seed = 1;
};
/// @param go_on told how many of all simulated engines are judged; answering false ends the run with nothing
std::optional<DetectionPower> measure_detection_power(const Likeness& likeness, const Effort& effort,
                                                      const std::function<bool(std::size_t, std::size_t)>& go_on = {});

} // namespace evenstroke::simulation
