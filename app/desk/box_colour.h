// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/theme.h"

namespace evenstroke {

/// The line around a box to be filled in: 3:1 on page and sheet, so that an empty one is seen.
QColor box_colour(ThemeKind kind);

} // namespace evenstroke
