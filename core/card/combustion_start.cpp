// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/combustion.h"

#include <algorithm>
#include <cmath>

namespace evenstroke::indicator {

std::optional<CombustionStart> find_start(std::span<const double> angle, std::span<const double> excess,
                                          std::span<const double> limit, double step)
{
    constexpr double stays = 1.5;    // degrees for which the record must stay above
    constexpr double clear = 0.03;   // of ln p: up to here the rise is laid back to the line
    constexpr double furthest = 4.0; // degrees before the threshold
    const auto in_a_row = static_cast<std::size_t>(std::max(2.0, std::round(stays / step)));
    std::size_t run = 0;
    for (std::size_t i = 0; i < angle.size(); ++i) {
        run = excess[i] > limit[i] ? run + 1 : 0;
        if (run < in_a_row)
            continue;
        const std::size_t first = i + 1 - in_a_row;
        const double high = std::max(clear, 3.0 * limit[first]);
        LeastSquares<2> rows;
        std::size_t last = first;
        for (; last < angle.size(); ++last) {
            rows.add({1.0, angle[last] - angle[first]}, std::sqrt(std::max(excess[last], 0.0)));
            if (excess[last] > high && last >= first + 2)
                break;
        }
        CombustionStart found{angle[first], angle[first]};
        if (const auto line = rows.solve(); line && line->values[1] > 0.0)
            found.start = angle[first] + std::clamp(-line->values[0] / line->values[1], -furthest, 0.0);
        return found;
    }
    return std::nullopt;
}

} // namespace evenstroke::indicator
