// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <QStringList>

namespace evenstroke::storage {

/// Writes a whole, compact copy of the history. An existing file is not overwritten.
/// @par Problems storage: the disk refused, or something stands at the path
Done back_up(History& history, const QString& to_path);

/// Copies the history into the folder beside it if there is no copy of today, and keeps the last N.
/// Answers the path of the copy, empty where none was due. The first change of a day does this by itself;
/// a fleet's large history is better copied beforehand on a worker thread.
Result<QString> back_up_daily(History& history);

/// Copies the history before its tables change. Answers the path of the copy.
Result<QString> back_up_before_migration(History& history);

/// Automatic copies, newest first.
QStringList automatic_backups(const QString& history_path);

} // namespace evenstroke::storage
