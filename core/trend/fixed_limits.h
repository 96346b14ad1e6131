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
    double own_limit = 0.0; ///< the same in the quantity's own unit, at the newest reading
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
