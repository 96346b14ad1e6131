// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

namespace evenstroke {

/// Whether the newest usable reading is beyond the limit already: the engine's own where it has one on that side, else
/// the customary one, counted from the place's level before the change.
bool limit_is_passed(const Judgement& judgement, const Flag& flag);

} // namespace evenstroke
