// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/folders.h"

#include "storage/sql.h"

#include <QDir>
#include <QDirIterator>
#include <QFileInfo>

#include <set>

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
    void look_into(const QString& path, const std::string& shown, int depth);
    void take_engine(const QDir& folder, const std::string& shown);
    void look_at_ship(const QDir& folder, const std::string& shown, std::size_t first_engine);

    FoundFolders found_;
    std::set<QString> seen_; ///< a link may lead back to where one came from
};

FoundFolders FolderSearch::run(const QStringList& given)
{
    for (const QString& path : given) {
        const std::size_t before = found_.engines.size();
        const std::string shown = from_qt(QDir::cleanPath(path));
        look_into(path, shown, 0);
        if (found_.engines.size() == before)
            found_.without_engine.push_back(shown);
    }
    return std::move(found_);
}

void FolderSearch::look_into(const QString& path, const std::string& shown, int depth)
{
    const QDir folder(path);
    if (depth > deepest || !seen_.insert(folder.canonicalPath()).second)
        return;
    // Readings without an engine.json are an engine's too: they must be refused, not passed over.
    if (folder.exists(document_name) || folder.exists(engine_files[1]))
        return take_engine(folder, shown);
    const std::size_t first_engine = found_.engines.size();
    for (const QString& name : folder.entryList(QDir::Dirs | QDir::NoDotAndDotDot, QDir::Name))
        look_into(folder.filePath(name), shown + "/" + from_qt(name), depth + 1);
    for (const QString& name : folder.entryList(QDir::Files, QDir::Name))
        if (name != ship_name)
            found_.ignored.push_back(shown + "/" + from_qt(name));
    if (folder.exists(ship_name))
        look_at_ship(folder, shown, first_engine);
}

void FolderSearch::take_engine(const QDir& folder, const std::string& shown)
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
}

void FolderSearch::look_at_ship(const QDir& folder, const std::string& shown, std::size_t first_engine)
{
    ShipFolder ship{folder.path(), shown, {}};
    for (std::size_t i = first_engine; i < found_.engines.size(); ++i)
        ship.engines.push_back(i);
    if (ship.engines.empty()) {
        found_.ignored.push_back(shown + "/" + from_qt(ship_name));
        return;
    }
    found_.bytes += QFileInfo(folder.filePath(ship_name)).size();
    found_.ships.push_back(std::move(ship));
}

} // namespace

FoundFolders find_folders(const QStringList& given)
{
    return FolderSearch().run(given);
}

} // namespace evenstroke::storage
