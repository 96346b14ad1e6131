// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "fixture.h"

#include "storage/trace_layout.h"

#include <cmath>
#include <functional>

namespace evenstroke::storage {

/// Shaped like a diagram, bar abs; only reading is looked at, so its physics do not matter.
inline double hump(double angle, int cylinder = 1)
{
    const double apart = std::remainder(angle, 360.0);
    return 3.0 + (90.0 + cylinder) * std::exp(-apart * apart / 900.0);
}
inline QByteArray number(double value)
{
    return QByteArray::number(value, 'f', 4);
}
/// Rows from..to in half degrees, each written by the caller.
inline QByteArray rows(double from, double to, const std::function<QByteArray(double)>& row)
{
    QByteArray text;
    for (double angle = from; angle < to - 1e-9; angle += 0.5)
        text += row(angle) + "\n";
    return text;
}

inline Engine two_stroke()
{
    Engine engine;
    engine.kind = EngineKind::two_stroke;
    engine.cylinders = 6;
    return engine;
}

inline TraceLayout in_bar()
{
    TraceLayout layout;
    layout.unit = find_unit("bar").value().id;
    return layout;
}

} // namespace evenstroke::storage
