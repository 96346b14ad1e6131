// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <optional>

namespace evenstroke {

struct SoonestLimit
{
    QuantityId quantity = 0;
    TimeToLimit time;
};

/// Of all quantities that clearly move with a creeping flag and have a limit on that side, the one that is there first
/// if the drift goes on; the flag itself speaks of the quantity that leads it. Nothing for a step, or without a limit.
/// Works the drift evidence out anew, which takes about as long as judging the engine.
std::optional<SoonestLimit> find_soonest_limit(const Judgement& judgement, const Flag& flag);

} // namespace evenstroke
