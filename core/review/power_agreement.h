// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/baseline.h"
#include "core/reading/reading.h"
#include "core/workings/workings.h"

#include <optional>
#include <string>
#include <vector>

/// What the power was, by every way that a reading offers.
namespace evenstroke {

/// One way to the shaft power, in the order of trust (common practice): torque meter; switchboard (generating
/// sets: over the generator's efficiency); indicated power and mechanical efficiency; turbocharger speed and fuel
/// index x speed through the engine's own baseline; fuel consumption through the baseline's specific one; typed load.
struct PowerEstimate
{
    std::string name;  ///< catalogue name: "torsion_meter", "indicated", ...
    std::string words; ///< "Torsion meter"
    std::optional<double> power;      ///< kW
    std::optional<double> half_width; ///< kW at 95 %
    std::string missing;  ///< why it is not known
    std::string remark;   ///< "its own quantity is flagged: left out of the mean"
    bool in_mean = false; ///< counts in the weighted mean
    Workings workings;
};

struct PowerAgreement
{
    std::vector<PowerEstimate> estimates;        ///< in the order of trust
    std::optional<double> typed_power;           ///< kW, from the typed load: what everything is compared at
    std::optional<double> mean, mean_half_width; ///< kW, weighted by 1/U²
    std::optional<double> spread_percent;        ///< largest difference between two known ones, of the mean
    std::optional<std::size_t> doubtful;         ///< index in estimates: the one that stands apart from the others
    bool agrees = true;
    std::string sentence; ///< what they say together, and what to do where they disagree
};

} // namespace evenstroke
