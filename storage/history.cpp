// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/history.h"

#include "storage/backup.h"
#include "storage/history_file.h"
#include "storage/names.h"
#include "storage/schema.h"
#include "storage/sql.h"
#include "storage/transaction.h"

#include <QFile>
#include <QFileInfo>
#include <QMutex>
#include <QUuid>

#include <map>

namespace evenstroke::storage {
namespace {

const std::string not_opened = "the history was not opened";
const QString memory = QStringLiteral(":memory:");
constexpr qint64 largest_checked = 48 << 20; // bytes; about a quarter of a second

/// States of files that this process has read from end to end, so that worker threads open at once.
class CheckedFiles
{
public:
    bool knows(const QString& path, const HistoryFileHeader& header)
    {
        const QMutexLocker lock(&mutex_);
        const auto found = states_.find(path);
        return found != states_.end() && found->second == header;
    }
    void remember(const QString& path, const HistoryFileHeader& header)
    {
        const QMutexLocker lock(&mutex_);
        states_[path] = header;
    }

private:
    QMutex mutex_;
    std::map<QString, HistoryFileHeader> states_;
};
CheckedFiles& checked_files()
{
    static CheckedFiles files;
    return files;
}

} // namespace

History::History(QString path, OpenMode mode, HistorySettings settings)
    : path_(std::move(path)),
      connection_(QStringLiteral("history-") + QUuid::createUuid().toString(QUuid::WithoutBraces)),
      mode_(mode), settings_(std::move(settings)), names_(std::make_unique<Names>(*this))
{
}

History::~History()
{
    names_.reset();
    {
        QSqlDatabase open = database();
        open.close();
    }
    QSqlDatabase::removeDatabase(connection_);
}

QSqlDatabase History::database() const
{
    return QSqlDatabase::database(connection_, false);
}

History::Names& History::names()
{
    return *names_;
}

int History::newest_version()
{
    return newest_schema_version();
}

Done History::connect()
{
    QSqlDatabase database = QSqlDatabase::addDatabase(QStringLiteral("QSQLITE"), connection_);
    database.setDatabaseName(path_);
    QString options = QStringLiteral("QSQLITE_BUSY_TIMEOUT=5000");
    if (mode_ == OpenMode::read_only)
        options += QStringLiteral(";QSQLITE_OPEN_READONLY");
    database.setConnectOptions(options);
    if (!database.open())
        return storage_problem(database.lastError(), not_opened);
    // What SQLite keeps for a connection, not in the file. Nothing may be left beside the file, not even on a
    // crash of the machine: temporary tables stay in memory.
    for (const char* pragma :
         {"PRAGMA foreign_keys = ON", "PRAGMA synchronous = FULL", "PRAGMA trusted_schema = OFF",
          "PRAGMA cell_size_check = ON", "PRAGMA temp_store = MEMORY"}) {
        BOOST_OUTCOME_TRYV(run_statement(database, QString::fromLatin1(pragma), not_opened));
    }
    return done();
}

Done History::check()
{
    QSqlQuery query(database());
    if (!query.exec(QStringLiteral("PRAGMA quick_check(1)")) || !query.next())
        return storage_problem(query.lastError(), not_opened);
    if (query.value(0).toString() != QStringLiteral("ok"))
        return Problem{Problem::Kind::damaged_file,
                       "\"" + from_qt(QFileInfo(path_).fileName()) +
                           "\" is damaged: its pages do not fit together.",
                       "Open the newest backup beside it, and keep the damaged file."};
    return done();
}

Done History::fill_new()
{
    Transaction transaction(*this, "the history was not made");
    BOOST_OUTCOME_TRYV(transaction.begin());
    // In the order of the log sheet, so that a reading's values lie in that order in the file.
    for (const Quantity& quantity : all_quantities())
        if (const auto key = names_->quantity_key(quantity.name); !key)
            return key.error();
    Query add(database(), "INSERT INTO property (name, content) VALUES (?, ?)", "the history was not made");
    BOOST_OUTCOME_TRYV(add.run("id", from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces))));
    BOOST_OUTCOME_TRYV(add.run("made_at", utc_text(now())));
    return transaction.commit();
}

Result<std::unique_ptr<History>> History::make(const QString& path, HistorySettings settings)
{
    std::unique_ptr<History> history(new History(path, OpenMode::read_write, std::move(settings)));
    history->made_now_ = true;
    history->backed_up_day_ = seconds_of(history->now()) / 86400; // nothing to copy on the first day
    Done made = history->connect();
    if (made)
        made = migrate(history->database(), 0);
    if (made)
        made = history->fill_new();
    if (!made)
        return made.error();
    return history;
}

Result<std::unique_ptr<History>> History::create(const QString& path, HistorySettings settings)
{
    if (QFileInfo::exists(path))
        return Problem{Problem::Kind::storage, "\"" + from_qt(path) + "\" is there already.",
                       "Choose another name, or open the file."};
    auto history = make(path, std::move(settings));
    if (!history)
        QFile::remove(path);
    return history;
}

Result<std::unique_ptr<History>> History::in_memory(HistorySettings settings)
{
    settings.automatic_backups = false;
    return make(memory, std::move(settings));
}

/// What was cut off half-way can be taken back only by a connection that may write: SQLite refuses to read a
/// file with such a journal otherwise. A journal of somebody who is writing now is left to him by its lock.
Done History::take_back_cut_write(const QString& path, const HistorySettings& settings)
{
    History writing(path, OpenMode::read_write, settings);
    BOOST_OUTCOME_TRYV(writing.connect());
    const auto read = ask_number(writing.database(), QStringLiteral("PRAGMA schema_version"), not_opened);
    if (read)
        return done();
    if (read.error().kind != Problem::Kind::storage)
        return read.error();
    return Problem{
        Problem::Kind::storage,
        "The last write to \"" + from_qt(QFileInfo(path).fileName()) +
            "\" was cut off, and it cannot be taken back here, so " + not_opened + ".",
        "Copy the file and the one beside it that ends in -journal together to a folder that may be "
        "written to, and open the copy."};
}

Result<std::unique_ptr<History>> History::open(const QString& path, OpenMode mode, HistorySettings settings)
{
    auto header = inspect_history_file(path, newest_schema_version());
    if (header && mode == OpenMode::read_only && QFile::exists(path + QStringLiteral("-journal"))) {
        BOOST_OUTCOME_TRYV(take_back_cut_write(path, settings));
        header = inspect_history_file(path, newest_schema_version());
    }
    if (!header)
        return header.error();
    std::unique_ptr<History> history(new History(path, mode, std::move(settings)));
    BOOST_OUTCOME_TRYV(history->connect());
    const QString canonical = QFileInfo(path).canonicalFilePath();
    const bool large = header.value().size > largest_checked;
    if (history->settings_.check_whole && !large && !checked_files().knows(canonical, header.value())) {
        BOOST_OUTCOME_TRYV(history->check());
        checked_files().remember(canonical, header.value());
    }
    if (history->version() < newest_schema_version()) {
        BOOST_OUTCOME_TRYV(history->bring_up_to_date());
    }
    BOOST_OUTCOME_TRYV(history->names_->refresh());
    return history;
}

Done History::bring_up_to_date()
{
    if (mode_ == OpenMode::read_only)
        return invalid_input("The history is of an older version and is open for reading only.",
                             "Open it once where it may be written to; it is then brought up to date.");
    if (settings_.automatic_backups) {
        const auto copied = back_up_before_migration(*this);
        if (!copied)
            return copied.error();
    }
    return migrate(database(), version());
}

void History::remove_new(std::unique_ptr<History> history)
{
    if (!history->made_now() || history->path() == memory)
        return;
    const QString path = history->path();
    history.reset();
    QFile::remove(path);
}

Result<std::unique_ptr<History>> History::open_or_create(const QString& path, HistorySettings settings)
{
    if (QFileInfo::exists(path))
        return open(path, OpenMode::read_write, std::move(settings));
    return create(path, std::move(settings));
}

std::string History::id() const
{
    Query query(database(), "SELECT content FROM property WHERE name = 'id'", not_opened);
    return query.run() && query.next() ? query.text(0) : std::string();
}

int History::version() const
{
    const auto version = ask_number(database(), QStringLiteral("PRAGMA user_version"), not_opened);
    return version ? static_cast<int>(version.value()) : 0;
}

qint64 History::seen_change() const
{
    const auto seen = ask_number(database(), QStringLiteral("PRAGMA data_version"), not_opened);
    return seen ? seen.value() : -1;
}

} // namespace evenstroke::storage
