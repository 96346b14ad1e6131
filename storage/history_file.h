// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/common.h"

#include <QString>

namespace evenstroke::storage {

/// What the first hundred bytes of a history say (SQLite file format, sqlite.org/fileformat2.html,
/// section 1.3).
struct HistoryFileHeader
{
    int schema_version = 0;
    quint32 change_counter = 0;
    qint64 size = 0;
    qint64 written_at = 0; ///< milliseconds, as the file system says
    bool operator==(const HistoryFileHeader&) const = default;
};

/// Looks at a file without letting SQLite near it, so that what is refused is not touched.
/// @par Problems not_found; damaged_file: not ours, or shorter than it says; newer_file; storage
Result<HistoryFileHeader> inspect_history_file(const QString& path, int newest_version);

} // namespace evenstroke::storage
