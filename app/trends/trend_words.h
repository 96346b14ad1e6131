// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/trends/trend_picture.h"

/// The words of the trend page; for its own source files.
namespace evenstroke {

/// Headline, flags, time to the limit, what fits, what to check, cautions.
void add_trend_words(TrendPicture& picture, const Judgement& judgement, const Trend& trend);
QString spoken_point(const TrendPicture& picture, const PicturePoint& shown);
/// "3 to 11 months", "less than a month", "more than ten years"
QString months_text(const TimeToLimit& limit);

} // namespace evenstroke
