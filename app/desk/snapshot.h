// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

namespace evenstroke {

class Frame;
class Workplace;

/// Nothing may have moved for so long before the picture is taken.
inline constexpr int snapshot_quiet_milliseconds = 300;

/// Waits until all judging is done, saves the window as a picture, and answers the exit code (3: not written).
int take_snapshot(Frame& frame, Workplace& workplace, const QString& file);

} // namespace evenstroke
