// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <QStringList>

namespace evenstroke::storage {

/// Writes a vessel again as files that `take` understands: a folder for each engine with engine.json,
/// readings.csv, events.csv and cards, and ship_readings.csv beside them. Taking them in again changes
/// nothing. The folder is made; existing files are not overwritten. Answers the files written.
/// @par Problems storage; not_found: no such vessel
Result<QStringList> hand_out(History& history, const std::string& vessel_id, const QString& folder,
                             const Progress& progress = {});

} // namespace evenstroke::storage
