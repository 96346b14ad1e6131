// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <QStringList>

#include <string>
#include <vector>

/// Taking folders of files into a history: engine.json, readings.csv, events.csv, ship_readings.csv, cards.
namespace evenstroke::storage {

struct TakeOptions
{
    bool keep_good = false; ///< leave out bad rows, name them, and take the rest
    Signature by{"taken in from files", ""};
    Progress progress; ///< in bytes read; false: the whole taking-in leaves the history as it was
};

/// One row that cannot be taken.
struct RefusedRow
{
    std::string file;         ///< as found under the folder: "engine-04/readings.csv"
    qint64 line = 0;          ///< counts from 1; 0: the file as a whole
    std::string value;        ///< the text in question, shortened
    std::string reason;       ///< one sentence
    std::string expected;     ///< what would be right
    std::string text() const; ///< "engine-04/readings.csv, line 12: ..."
};

struct TakeCounts
{
    qint64 fresh = 0, same = 0, refused = 0;
    TakeCounts& operator+=(const TakeCounts& other);
};

/// One engine's folder, or the files of a ship beside the engines' folders.
struct FolderReport
{
    std::string folder; ///< as given, or below what was given
    std::string vessel_name, engine_name;
    std::string engine_id;            ///< empty for a ship's files
    bool taken = false;               ///< false: refused whole, nothing of it is in the history
    TakeCounts values, events, cards; ///< where the folder was not taken, `fresh` counts the good rows
    std::vector<RefusedRow> refused;  ///< at most the first 1000 of a file; the counts hold all
    std::vector<std::string> remarks; ///< files ignored, keys kept unread, a former revision
    TakeCounts rows() const;          ///< of all the files; a card is one
    bool anything_refused() const { return !taken || rows().refused > 0; }
};

struct TakeReport
{
    std::vector<FolderReport> folders;
    std::vector<std::string> ignored; ///< files that belong to no engine
    bool cancelled = false;
    bool anything_refused() const;
    bool anything_taken() const; ///< a folder of which something was new or known already
};

/// Takes engine folders, ships' folders and fleets in. Each engine's folder is all or nothing; a bad one does
/// not stop the others, and neither does one that is not there. Taking the same again changes nothing.
/// @par Problems storage: the disk refused, then the history is as it was; invalid_input: no folder is named
Result<TakeReport> take(History& history, const QStringList& folders, const TakeOptions& options = {});

} // namespace evenstroke::storage
