// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/heat/wall_description.h"
#include "core/problem.h"

namespace evenstroke {

/// What cannot be about a wall, in words: what the chain of wall_chain.h cannot be worked out from, a load outside
/// 0 to 150 %, marks that are exchanged.
std::optional<Problem> find_problem(const WallDescription& wall);

} // namespace evenstroke
