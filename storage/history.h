// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/common.h"

#include <QSqlDatabase>
#include <QString>

#include <memory>

/// The history file (`*.evenstroke`): everything of one ship, or of a fleet ashore, in one SQLite file.
namespace evenstroke::storage {

enum class OpenMode { read_only, read_write };

struct HistorySettings
{
    Clock clock = system_time;
    bool automatic_backups = true; ///< before each migration, and before the first change of a day
    int backups_kept = 7;          ///< in the folder `<name> backups` beside the history
    /// Read every page before trusting the file, once for a state of it. A fleet's file above 48 MB would
    /// keep the first page waiting: there damage shows when it is met, and `verify` looks for it.
    bool check_whole = true;
};

/// One connection to one history. A History belongs to the thread that made it; to read in a worker
/// thread, open the same path again there. One writer and many readers may have the file open; each sees
/// what the others have committed. Closing leaves one file: no journal stays beside it.
class History
{
public:
    /// Makes a new, empty history. @par Problems storage: something stands at the path, or the disk refuses
    static Result<std::unique_ptr<History>> create(const QString& path, HistorySettings settings = {});
    /// Opens a history; one of an older version is brought up to date when opened for writing.
    /// What is refused is not touched. A write that a power cut left half done is taken back, also when
    /// opened for reading only.
    /// @par Problems not_found; damaged_file: not a history or torn; newer_file: of a later program;
    ///      invalid_input: of an older version and opened for reading only; storage
    static Result<std::unique_ptr<History>> open(const QString& path, OpenMode mode,
                                                 HistorySettings settings = {});
    /// Opens the history, or makes it where there is none.
    static Result<std::unique_ptr<History>> open_or_create(const QString& path,
                                                           HistorySettings settings = {});
    /// Closes a history and takes its file away again, where this connection made it: nothing came of it.
    static void remove_new(std::unique_ptr<History> history);
    /// A history that is gone when closed, for tests and for trying things.
    static Result<std::unique_ptr<History>> in_memory(HistorySettings settings = {});
    /// The schema version that this program writes.
    static int newest_version();

    ~History();
    History(const History&) = delete;
    History& operator=(const History&) = delete;

    const QString& path() const { return path_; }
    OpenMode mode() const { return mode_; }
    bool made_now() const { return made_now_; } ///< by `create` or `open_or_create`
    const HistorySettings& settings() const { return settings_; }
    TimePoint now() const { return settings_.clock(); }
    std::string id() const; ///< UUID of the history
    int version() const;    ///< its schema version

    /// Changes whenever another connection has committed something: a cheap question for a timer.
    qint64 seen_change() const;

    /// For the stores of this layer only: nobody else writes SQL.
    QSqlDatabase database() const;

    class Names;
    /// Names of quantities and units as this file numbers them. For the stores of this layer only.
    Names& names();

private:
    friend class Transaction;
    friend class ReadTransaction;
    friend Result<QString> back_up_daily(History& history);
    History(QString path, OpenMode mode, HistorySettings settings);
    Done connect();
    Done check();
    Done bring_up_to_date();
    Done fill_new();
    static Done take_back_cut_write(const QString& path, const HistorySettings& settings);
    static Result<std::unique_ptr<History>> make(const QString& path, HistorySettings settings);

    QString path_, connection_;
    OpenMode mode_;
    HistorySettings settings_;
    bool made_now_ = false;
    int transaction_depth_ = 0;
    qint64 backed_up_day_ = -1; ///< days since 1970, so that the folder is looked at once a day
    std::unique_ptr<Names> names_;
};

} // namespace evenstroke::storage
