// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <optional>
#include <string>
#include <vector>

/// A second opinion that is only shown: the customary fixed distance of one cylinder from the mean of the others. It
/// knows nothing of lasting differences between cylinders, so it speaks often without cause (about five times a year on
/// a sound engine in simulations) and raises no flag here.
namespace evenstroke {

struct FixedLimitOpinion
{
    double limit = 0.0;     ///< in `unit`, either way
    /// Where the rule begins to speak at one reading, on the scale of `apart`. It moves from reading to reading: a share of
    /// the mean changes with the load, and the rule goes by the others' mean where `apart` goes by their median.
    struct Edge
    {
        std::size_t reading = 0;
        double low = 0.0, high = 0.0;
    };
    std::vector<Edge> edges; ///< in order of reading
    std::string unit;       ///< "bar", "°C", "%"
    bool percent = false;   ///< of the mean of the others
    std::string source;
    std::vector<std::size_t> began; ///< readings at which it would have begun to speak, in order
    std::size_t beyond = 0; ///< readings beyond it
    bool now = false;       ///< the newest reading of this cylinder is beyond it
};

/// Nothing where there is no custom for the quantity, the place is no cylinder, or it has no trend.
std::optional<FixedLimitOpinion> fixed_limit_opinion(const Judgement& judgement, QuantityId quantity, Place place);

} // namespace evenstroke
