// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/sql.h"

namespace evenstroke::storage {
namespace {

/// SQLite's primary result codes (sqlite3.h); an extended code carries one in its low byte.
enum Code {
    busy = 5,
    locked = 6,
    read_only = 8,
    disk_io = 10,
    corrupt = 11,
    full = 13,
    cannot_open = 14,
    not_a_database = 26
};

std::string sentence(std::string reason, const std::string& undone)
{
    return std::move(reason) + ", so " + undone + ".";
}

} // namespace

Problem storage_problem(const QSqlError& said, const std::string& undone)
{
    bool is_number = false;
    const int code = said.nativeErrorCode().toInt(&is_number) & 0xff;
    const auto problem = [&](Problem::Kind kind, const char* reason, const char* advice) {
        return Problem{kind, sentence(reason, undone), advice};
    };
    using enum Problem::Kind;
    switch (is_number ? code : 0) {
    case full:
        return problem(storage, "The disk is full",
                       "Make room on the disk and try again; the history is as it was.");
    case read_only:
        return problem(storage, "The history cannot be written to",
                       "Check the rights of the file and of its folder, or copy it to a place of your own.");
    case busy:
    case locked:
        return problem(storage, "Another window or program is writing to the history",
                       "Wait until it has finished and try again.");
    case disk_io:
        return problem(storage, "The disk stopped answering",
                       "Check that the disk or stick is in place and sound, then try again.");
    case cannot_open:
        return problem(storage, "The file cannot be opened",
                       "Check that the folder is there and that you may use it.");
    case corrupt:
        return problem(damaged_file, "The history file is damaged",
                       "Open the newest backup beside it, and keep the damaged file.");
    case not_a_database:
        return problem(damaged_file, "The file is not a history", "Choose a file that ends in .evenstroke.");
    default:
        break;
    }
    const std::string words =
        from_qt(said.databaseText().isEmpty() ? said.driverText() : said.databaseText());
    return {storage, sentence("The history file answered \"" + words + "\"", undone),
            "Try again, and keep this sentence for whoever helps you."};
}

std::string from_qt(const QString& text)
{
    const QByteArray utf8 = text.toUtf8();
    return std::string(utf8.constData(), static_cast<std::size_t>(utf8.size()));
}

Query::Query(const QSqlDatabase& database, const QString& statement, std::string undone)
    : query_(database), undone_(std::move(undone))
{
    query_.setForwardOnly(true);
    prepared_ = query_.prepare(statement);
}

Done Query::execute()
{
    if (!prepared_ || !query_.exec())
        return problem();
    return done();
}

Done Query::finished() const
{
    if (query_.lastError().type() != QSqlError::NoError)
        return problem();
    return done();
}

std::optional<double> Query::real(int column) const
{
    const QVariant value = query_.value(column);
    return value.isNull() ? std::nullopt : std::optional(value.toDouble());
}

Done run_statement(const QSqlDatabase& database, const QString& statement, const std::string& undone)
{
    QSqlQuery query(database);
    if (!query.exec(statement))
        return storage_problem(query.lastError(), undone);
    return done();
}

Result<qint64> ask_number(const QSqlDatabase& database, const QString& statement, const std::string& undone)
{
    QSqlQuery query(database);
    if (!query.exec(statement) || !query.next())
        return storage_problem(query.lastError(), undone);
    return query.value(0).toLongLong();
}

} // namespace evenstroke::storage
