// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/common.h"

#include <QSqlDatabase>

#include <span>
#include <vector>

/// The tables of the history file, as numbered steps. A step that was released is never edited again.
namespace evenstroke::storage {

/// "EVST", in the header of each of our files: tells a history from another program's database.
inline constexpr qint64 history_application_id = 0x45565354;

struct Migration
{
    int to_version;
    const char* purpose; ///< completes "brought up to date: "
    std::vector<const char*> statements;
};
std::span<const Migration> all_migrations();
int newest_schema_version();

/// Runs the steps above `from_version`, each in a transaction of its own that also sets the version. Links
/// are checked before each commit. Leaves foreign keys switched on.
/// @param up_to  for tests that need a file of an older version
Done migrate(QSqlDatabase database, int from_version, int up_to = newest_schema_version());

} // namespace evenstroke::storage
