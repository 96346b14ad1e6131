// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/simulation/detection_power.h"

#include <QString>

namespace evenstroke {

/// One row of what was measured.
struct DetectionRow
{
    QString what, remark; ///< "slow ring wear"; what the simulated fault does
    QString measured;     ///< "28 of 40, 70 %"
    QString interval;     ///< "53 to 83 %"
    QString half_found;   ///< "11 readings"
};

struct DetectionText
{
    QString title, engine, sound, meaning, assumptions;
    std::vector<DetectionRow> alarms, faults;
};

/// @param engine_words "Main engine of the Amber Mist"
DetectionText detection_text(const QString& engine_words, const simulation::Likeness& likeness,
                             const std::optional<simulation::DetectionPower>& power);
/// The text and its tables as plain lines with tabs, for the clipboard.
QString detection_plain(const DetectionText& text);

} // namespace evenstroke
