// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <QString>

namespace evenstroke {

/// Since when a standing flag has the level it has: "watch since 8 Sep 2030", "act since 3 Nov 2030 (began
/// 8 Sep 2030 as watch)". A flag that rose is never dated back to its beginning.
QString standing_words(const Judgement& judgement, const Flag& flag);

/// What was last said of a flag: "12 Nov 2030, A. Chief: fuel valve changed (with fuel valves of 10 Nov 2030)."
QString note_words(const Judgement& judgement, const Flag& flag);

} // namespace evenstroke
