// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/take_in.h"

#include "storage/folders.h"
#include "storage/take_folder.h"
#include "storage/transaction.h"

#include <algorithm>

namespace evenstroke::storage {
namespace {

const std::string not_taken = "nothing was taken in";

FolderReport refused_whole(const std::string& folder, std::string reason, std::string expected)
{
    FolderReport report;
    report.folder = folder;
    report.refused.push_back({folder, 0, "", std::move(reason), std::move(expected)});
    return report;
}

void report_useless(const FoundFolders& found, std::vector<FolderReport>& folders)
{
    for (const std::string& file : found.files)
        folders.push_back(refused_whole(file, "This is a file, not a folder.",
                                        "Take the folder that holds it: what its ship_readings.csv says of the whole ship "
                                        "is taken only with that folder, not with the engines' folders one by one."));
    for (const std::string& folder : found.not_there)
        folders.push_back(
            refused_whole(folder, "There is no folder of this name.", "Check the name of the folder."));
    for (const std::string& folder : found.without_engine)
        folders.push_back(
            refused_whole(folder, "There is no engine in this folder.",
                          "Name a folder with engine.json and readings.csv, or a folder of such folders."));
}

/// The ships of the engines that were taken, each once.
std::vector<Vessel> ships_of(const ShipFolder& folder, const std::vector<Vessel>& vessels)
{
    std::vector<Vessel> ships;
    for (const std::size_t engine : folder.engines) {
        const Vessel& vessel = vessels[engine];
        const bool known =
            std::any_of(ships.begin(), ships.end(), [&](const Vessel& ship) { return ship.id == vessel.id; });
        if (!vessel.id.empty() && !known)
            ships.push_back(vessel);
    }
    return ships;
}

} // namespace

Result<TakeReport> take(History& history, const QStringList& folders, const TakeOptions& options)
{
    if (folders.isEmpty())
        return invalid_input("No folder is named.", "Name the folders to take in.");
    FoundFolders found = find_folders(folders);
    TakeReport report;
    report.ignored = std::move(found.ignored);
    ProgressMeter meter(options.progress, found.bytes);
    // One transaction around all of them, each folder a savepoint in it: a refused folder takes back only
    // itself, and whoever stops the work, or a full disk, finds the history as it was.
    Transaction transaction(history, not_taken);
    BOOST_OUTCOME_TRYV(transaction.begin());
    TakeWriters writers(history, options.by);
    std::vector<Vessel> vessels;
    for (const EngineFolder& folder : found.engines) {
        FolderReport& engine = report.folders.emplace_back();
        engine.folder = folder.shown;
        FolderTaking taking(history, options, writers, meter, engine);
        BOOST_OUTCOME_TRYV(taking.take_engine(folder));
        vessels.push_back(taking.vessel());
        if (meter.stopped())
            break;
    }
    for (const ShipFolder& folder : found.ships) {
        if (meter.stopped())
            break;
        FolderReport& ship = report.folders.emplace_back();
        ship.folder = folder.shown;
        BOOST_OUTCOME_TRYV(FolderTaking(history, options, writers, meter, ship)
                               .take_ship(folder, ships_of(folder, vessels)));
    }
    report_useless(found, report.folders);
    report.cancelled = meter.stopped();
    if (!report.cancelled) {
        BOOST_OUTCOME_TRYV(transaction.commit());
        return report;
    }
    for (FolderReport& folder : report.folders)
        folder.taken = false;
    return report;
}

} // namespace evenstroke::storage
