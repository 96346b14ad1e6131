// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/baseline.h"
#include "core/reading/reading.h"
#include "core/workings/workings.h"

#include <map>
#include <optional>
#include <span>
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
    bool suspected = false; ///< its own quantity is under suspicion, or it repeats one that is
    Workings workings;
};

struct PowerAgreement
{
    std::vector<PowerEstimate> estimates;        ///< in the order of trust
    std::optional<double> typed_power;           ///< kW, from the typed load: what everything is compared at
    std::optional<double> mean, mean_half_width; ///< kW, weighted by 1/U²
    /// Largest difference between two known ones, of the mean; those under suspicion do not count.
    std::optional<double> spread_percent;
    std::optional<std::size_t> doubtful;         ///< index in estimates: the one that stands apart from the others
    bool agrees = true;
    bool load_doubtful = false; ///< the load that everything is compared at is doubtful, or comes from what is
    std::string sentence; ///< what they say together, and what to do where they disagree
};

/// A quantity that does not tell the power now: a flag says that it moved, or its value is in doubt.
struct SuspectedQuantity
{
    QuantityId quantity = 0;
    Place place;
    std::string why; ///< "a flag says that it has moved", behind the quantity's name and a colon
};

/// How far sound readings lie off the baseline, by quantity name: half-width at 95 % in the quantity's own unit.
using BaselineScatter = std::map<std::string, double, std::less<>>;

/// All ways to the power of one reading, side by side.
///
/// The mean is formed of those ways that are independent of each other and not under suspicion. One of three or
/// more is doubtful where it lies apart from the mean of the others by more than their combined half-widths, made
/// wider by the number of ways (Šidák), so that of sound readings 95 of 100 agree; two that differ by more than
/// 5 % are both named (common practice). The load is never changed by the program.
/// @param scatter of what is not named here, two of the noise that drift judging starts with is taken
PowerAgreement agree_on_power(const Engine& engine, const Baseline& baseline, const Reading& reading,
                              std::span<const SuspectedQuantity> suspected, const BaselineScatter& scatter = {});

} // namespace evenstroke
