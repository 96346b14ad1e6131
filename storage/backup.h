// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <QStringList>

namespace evenstroke::storage {

/// Writes a whole, compact copy of the history. An existing file is not overwritten.
/// @par Problems storage: the disk refused, or something stands at the path
Done back_up(History& history, const QString& to_path);

/// Copies the history into the folder beside it if there is no copy of today, and keeps the last N.
/// Answers the path of the copy, empty where none was due. Opening for writing does this by itself.
Result<QString> back_up_daily(History& history);

/// Automatic copies, newest first.
QStringList automatic_backups(const QString& history_path);

} // namespace evenstroke::storage
