// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>
#include <QStringList>

#include <string>
#include <vector>

namespace evenstroke::storage {

/// One folder that holds an engine's files.
struct EngineFolder
{
    QString path;
    std::string shown;                ///< as sentences name it
    bool has_document = true;         ///< false: readings without an engine.json
    std::vector<std::string> ignored; ///< entries that are no files of an engine
};

/// ship_readings.csv and the engines beside it.
struct ShipFolder
{
    QString path;
    std::string shown;
    std::vector<std::size_t> engines; ///< indices of the engine folders below
};

struct FoundFolders
{
    std::vector<EngineFolder> engines;
    std::vector<ShipFolder> ships;
    std::vector<std::string> not_there;      ///< of the folders given, those that do not exist
    std::vector<std::string> files;          ///< of the folders given, those that are files
    std::vector<std::string> without_engine; ///< of the folders given, those that hold none
    std::vector<std::string> ignored;        ///< files that belong to no engine
    qint64 bytes = 0;                        ///< of all files that will be read
};

/// Looks through folders of folders, in the order of their names. A folder named twice, or within another
/// that is named too, is found once.
FoundFolders find_folders(const QStringList& given);

} // namespace evenstroke::storage
