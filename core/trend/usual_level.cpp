// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/usual_level.h"

#include <algorithm>

namespace evenstroke {

std::optional<UsualLevel> usual_level(const Judgement& judgement, std::size_t reading, QuantityId quantity, Place place)
{
    const Trend* trend = judgement.find_trend(quantity, place);
    if (!trend || !trend->usual_low || !trend->usual_high)
        return std::nullopt;
    const auto point = std::find_if(trend->points.begin(), trend->points.end(),
                                    [&](const TrendPoint& one) { return one.reading == reading; });
    if (point == trend->points.end() || point->stretch != trend->points.back().stretch)
        return std::nullopt;
    const auto& value = place.kind == Place::Kind::cylinder ? point->apart : point->deviation;
    if (!value)
        return std::nullopt;
    return UsualLevel{*value, *trend->usual_low, *trend->usual_high};
}

} // namespace evenstroke
