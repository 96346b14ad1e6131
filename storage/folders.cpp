// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/folders.h"

#include "storage/sql.h"

#include <QDir>
#include <QDirIterator>
#include <QFileInfo>

#include <algorithm>
#include <map>

namespace evenstroke::storage {
namespace {

constexpr int deepest = 12; // folders within folders; a fleet has three
const QString document_name = QStringLiteral("engine.json");
const QString ship_name = QStringLiteral("ship_readings.csv");
const QStringList engine_files = {document_name, QStringLiteral("readings.csv"),
                                  QStringLiteral("events.csv")};

class FolderSearch
{
public:
    FoundFolders run(const QStringList& given);

private:
    using Engines = std::vector<std::size_t>; ///< indices into found_.engines
    Engines look_into(const QString& path, const std::string& shown, int depth);
    Engines take_engine(const QDir& folder, const std::string& shown);
    void look_at_ship(const QDir& folder, const std::string& shown, const Engines& engines);

    FoundFolders found_;
    /// The engines below each folder looked into; a link may lead back to where one came from.
    std::map<QString, Engines> seen_;
};

FoundFolders FolderSearch::run(const QStringList& given)
{
    for (const QString& path : given) {
        const std::string shown = from_qt(QDir::cleanPath(path));
        if (QFileInfo(path).isFile())
            found_.files.push_back(shown);
        else if (!QFileInfo(path).isDir())
            found_.not_there.push_back(shown);
        else if (look_into(path, shown, 0).empty())
            found_.without_engine.push_back(shown);
    }
    return std::move(found_);
}

FolderSearch::Engines FolderSearch::look_into(const QString& path, const std::string& shown, int depth)
{
    const QDir folder(path);
    if (depth > deepest)
        return {};
    const auto [entry, is_first] = seen_.try_emplace(folder.canonicalPath());
    Engines& engines = entry->second; // a map's entries stay where they are
    if (!is_first)
        return engines;
    // Readings without an engine.json are an engine's too: they must be refused, not passed over.
    if (folder.exists(document_name) || folder.exists(engine_files[1]))
        return engines = take_engine(folder, shown);
    for (const QString& name : folder.entryList(QDir::Dirs | QDir::NoDotAndDotDot, QDir::Name))
        for (const std::size_t engine :
             look_into(folder.filePath(name), shown + "/" + from_qt(name), depth + 1))
            if (std::find(engines.begin(), engines.end(), engine) == engines.end())
                engines.push_back(engine);
    for (const QString& name : folder.entryList(QDir::Files, QDir::Name))
        if (name != ship_name)
            found_.ignored.push_back(shown + "/" + from_qt(name));
    if (folder.exists(ship_name))
        look_at_ship(folder, shown, engines);
    return engines;
}

FolderSearch::Engines FolderSearch::take_engine(const QDir& folder, const std::string& shown)
{
    EngineFolder engine{folder.path(), shown, folder.exists(document_name), {}};
    for (const QFileInfo& entry : folder.entryInfoList(QDir::AllEntries | QDir::NoDotAndDotDot, QDir::Name)) {
        const bool cards = entry.isDir() && entry.fileName() == QStringLiteral("cards");
        if (!cards && !(entry.isFile() && engine_files.contains(entry.fileName())))
            engine.ignored.push_back(from_qt(entry.fileName()));
        else if (!cards)
            found_.bytes += entry.size();
    }
    QDirIterator cards(folder.filePath(QStringLiteral("cards")), QDir::Files, QDirIterator::Subdirectories);
    while (cards.hasNext())
        found_.bytes += cards.nextFileInfo().size();
    found_.engines.push_back(std::move(engine));
    return {found_.engines.size() - 1};
}

void FolderSearch::look_at_ship(const QDir& folder, const std::string& shown, const Engines& engines)
{
    if (engines.empty()) {
        found_.ignored.push_back(shown + "/" + from_qt(ship_name));
        return;
    }
    found_.bytes += QFileInfo(folder.filePath(ship_name)).size();
    found_.ships.push_back({folder.path(), shown, engines});
}

} // namespace

FoundFolders find_folders(const QStringList& given)
{
    return FolderSearch().run(given);
}

} // namespace evenstroke::storage
