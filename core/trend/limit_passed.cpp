// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/limit_passed.h"

#include <algorithm>

namespace evenstroke {

bool limit_is_passed(const Judgement& judgement, const Flag& flag)
{
    const Trend* trend = judgement.find_trend(flag.quantity, flag.subject);
    if (!trend || !flag.time_to_limit)
        return false;
    const auto newest = std::find_if(trend->points.rbegin(), trend->points.rend(),
                                     [](const TrendPoint& p) { return !p.doubtful && !p.unsteady; });
    if (newest == trend->points.rend())
        return false;
    const bool rising = flag.time_to_limit->limit > 0.0;
    for (const AbsoluteLimit& limit : judgement.record->engine.limits)
        if (limit.quantity == quantity(flag.quantity).name && (rising ? limit.high : limit.low))
            return rising ? newest->raw >= *limit.high : newest->raw <= *limit.low;
    const auto value = flag.subject.kind == Place::Kind::cylinder ? newest->apart : newest->deviation;
    // In per cent the trend has another unit than the distance.
    const bool percent = !flag.moved.empty() && flag.moved.front().percent;
    if (percent || !value || !trend->usual_low || !trend->usual_high)
        return false;
    const double mark = 0.5 * (*trend->usual_low + *trend->usual_high) + flag.time_to_limit->limit;
    return rising ? *value >= mark : *value <= mark;
}

} // namespace evenstroke
