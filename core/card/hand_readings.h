// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/card_review.h"

/// Cards beside what was read by hand at the same reading.
namespace evenstroke::indicator {

/// Where maximum or compression pressure lies off the values read by hand on nearly all cylinders alike: cards of another
/// day or load, or an instrument that is off. One cylinder apart says nothing of that kind.
/// @return nothing with fewer than three cylinders read by hand
std::optional<Remark> remark_on_hand_readings(const std::vector<ReviewedCard>& cards);

} // namespace evenstroke::indicator
