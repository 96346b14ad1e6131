// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/trends/trend_picture.h"

namespace evenstroke {

/// What well-known rules would have said of the line, and where the customary fixed limit lies.
void add_second_opinions(TrendPicture& picture, const Judgement& judgement);

} // namespace evenstroke
