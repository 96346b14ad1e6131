// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/review/power_agreement.h"
#include "core/review/power_inputs.h"

#include <string>
#include <vector>

/// The single ways to the power of one reading; what they say together is in power_agreement.cpp.
namespace evenstroke::power_ways {

/// Half-widths that nobody enters (common practice, no source).
inline constexpr double usual_generator_efficiency = 0.95;
inline constexpr double usual_generator_half_width = 0.02;    ///< of the usual one
inline constexpr double entered_generator_half_width = 0.01;  ///< of one entered
inline constexpr double mechanical_efficiency_half_width = 0.01;
inline constexpr double friction_half_width = 0.5;            ///< bar, of the usual friction pressure

/// One way with what keeps it out of the mean.
struct Way
{
    PowerEstimate estimate;
    std::vector<std::string> rests_on; ///< names of the quantities whose suspicion makes it blind
    bool of_cylinders = false;         ///< formed of the cylinders' values, so that suspicion of one counts
    bool repeats = false;   ///< the same measurement as another one
    std::string repeats_of; ///< its words
};

/// A way without its numbers yet.
Way begin(std::string name, std::string words, std::string formula, std::vector<std::string> rests_on);
/// Not known, and why, in few words: "no speed was read".
Way without(Way way, const std::string& missing);
/// Works the formula out, with its half-width and its sheet. kW.
Way finish(Way way, PowerInputs& of, const Formula& formula);

/// In the order of trust; a way that the engine has no use for (the switchboard of a propulsion engine) is not
/// there, one whose values were not read is there with what is missing.
std::vector<Way> find_ways(const Engine& engine, const Baseline& baseline, const Reading& reading,
                           const Conditions& conditions, const BaselineScatter& scatter);

} // namespace evenstroke::power_ways
