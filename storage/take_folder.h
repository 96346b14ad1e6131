// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/engine_json.h"
#include "storage/folders.h"
#include "storage/refusals.h"
#include "storage/take_writers.h"
#include "storage/value_rows.h"

#include <QFileInfo>

#include <optional>
#include <set>

namespace evenstroke::storage {

/// Takes one folder into a history, within the transaction of the whole taking-in. Answers a Problem only
/// where the disk refused; what is the matter with the files stands in the report.
class FolderTaking
{
public:
    FolderTaking(History& history, const TakeOptions& options, TakeWriters& writers, ProgressMeter& meter,
                 FolderReport& report)
        : history_(history), options_(options), writers_(writers), meter_(meter), report_(report)
    {
        writers_.forget();
    }

    Done take_engine(const EngineFolder& folder);
    /// @param vessels  those of the engines beside the file that were taken
    Done take_ship(const ShipFolder& folder, const std::vector<Vessel>& vessels);
    const Vessel& vessel() const { return vessel_; }

private:
    std::optional<EngineDocument> read_document(const EngineFolder& folder);
    Done take_files(const EngineFolder& folder, const EngineDocument& document);
    Done take_readings(const QString& path, const std::string& shown, const Engine* engine,
                       const OwnerKeys& owner);
    Done take_events(const QString& path, const std::string& shown, const Engine& engine,
                     const OwnerKeys& owner);
    Done take_cards(const QString& path, const std::string& shown, const Engine& engine,
                    const OwnerKeys& owner);
    Done take_card(const QFileInfo& file, const std::string& reading, qint64 reading_key,
                   const Engine& engine, Refusals& refusals);
    bool is_refused();
    Refusals refusals_of(const std::string& shown, const char* file);
    void remark_columns(const std::string& file, const std::vector<std::string>& columns);

    History& history_;
    const TakeOptions& options_;
    TakeWriters& writers_;
    ProgressMeter& meter_;
    FolderReport& report_;
    Vessel vessel_;
    std::set<std::string> unwritten_readings_; ///< of a file that is refused: their cards are looked at too
};

} // namespace evenstroke::storage
