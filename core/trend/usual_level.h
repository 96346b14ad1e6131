// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

/// How far one reading of a trend stands from the place's own usual level: what marks and "high" or "low" go by.
namespace evenstroke {

/// All in the unit of the deviation.
struct UsualLevel
{
    double value = 0.0; ///< of the reading: `apart` of a cylinder, the deviation of the engine
    double low = 0.0, high = 0.0; ///< the usual range
    double middle() const { return 0.5 * (low + high); }
    double from_usual() const { return value - middle(); }
};

/// @param reading index in the judgement's readings
/// @return nothing where no usual level is known, or the reading belongs to another stretch than the trend's newest
std::optional<UsualLevel> usual_level(const Judgement& judgement, std::size_t reading, QuantityId quantity, Place place);

} // namespace evenstroke
