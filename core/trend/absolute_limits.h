// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

namespace evenstroke {

/// Readings beyond a limit of the maker or the alarm system speak at once, whatever the trend says.
///
/// A flag `act` starts where none of the place's last six values passed the limit. Values that are in doubt
/// with a likely intended value, or outside the hard range, raise nothing until the engineer answers.
/// Keeps the flags in order of their start.
void add_absolute_limit_flags(Judgement& judgement);

} // namespace evenstroke
