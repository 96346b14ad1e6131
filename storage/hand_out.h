// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"
#include "storage/history.h"

#include <QStringList>

#include <string>
#include <vector>

namespace evenstroke::storage {

/// Writes a vessel again as files that `take` understands: a folder for each engine with engine.json,
/// readings.csv, events.csv and cards, and ship_readings.csv beside them. Taking them in again changes
/// nothing. The folder is made; existing files are not overwritten. Answers the files written.
/// @par Problems storage; not_found: no such vessel
Result<QStringList> hand_out(History& history, const std::string& vessel_id, const QString& folder,
                             const Progress& progress = {});

/// The values of a reading as lines of a readings.csv with its nine usual columns (reading, taken_at, quantity,
/// cylinder, value, unit, phase, text, missing_reason), the time in UTC, each ended by a line feed. Where a value
/// came from is not among them.
std::vector<std::string> value_lines(const Reading& reading, const Engine& engine);

} // namespace evenstroke::storage
