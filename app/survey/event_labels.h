// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/survey/report_type.h"
#include "core/survey/report_blocks.h"

#include <QString>

#include <vector>

namespace evenstroke {

/// Margins of a plot over time, in points: the scale at the left, the labels at the ends of the lines at the right.
inline constexpr double plot_margin_left = 36.0, plot_margin_right = 96.0;

/// What stands at the tick of each event of a plot over time.
struct EventLabels
{
    std::vector<QString> at_tick;  ///< one an event: its word, a number, or nothing where a neighbour speaks for it
    std::vector<bool> is_number;
    QString key;                   ///< "1 2031-03-14 fuel valves changed · 2 …"; empty where every tick has its word
};

/// A word stands at a tick where it ends before the next one; else a number does, and the key says what it means.
/// @param width of the whole plot, in points
EventLabels label_events(const report::Plot& plot, double width, const TextMeasure& measure);

} // namespace evenstroke
