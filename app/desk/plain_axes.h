// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

class QCustomPlot;

namespace evenstroke {

/// Axes of a small plot beside a table, in the colours in force: titles with the unit, few round numbers, lines across.
void style_plain_axes(QCustomPlot& plot, int ticks);

} // namespace evenstroke
