// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/schema.h"

#include "storage/sql.h"

namespace evenstroke::storage {
namespace {

const std::string not_migrated = "the history was not brought up to date";

/// Foreign keys off while tables are rebuilt; SQLite ignores this pragma inside a transaction.
class ForeignKeysOff
{
public:
    explicit ForeignKeysOff(const QSqlDatabase& database) : database_(database)
    {
        QSqlQuery(database_).exec(QStringLiteral("PRAGMA foreign_keys = OFF"));
    }
    ~ForeignKeysOff() { QSqlQuery(database_).exec(QStringLiteral("PRAGMA foreign_keys = ON")); }
    ForeignKeysOff(const ForeignKeysOff&) = delete;
    ForeignKeysOff& operator=(const ForeignKeysOff&) = delete;

private:
    QSqlDatabase database_;
};

Done run_step(const QSqlDatabase& database, const Migration& step)
{
    for (const char* statement : step.statements) {
        BOOST_OUTCOME_TRYV(run_statement(database, QString::fromUtf8(statement), not_migrated));
    }
    QSqlQuery links(database);
    if (!links.exec(QStringLiteral("PRAGMA foreign_key_check")))
        return storage_problem(links.lastError(), not_migrated);
    if (links.next())
        return Problem{Problem::Kind::damaged_file,
                       "A row of the history points at one that is not there, so " + not_migrated + ".",
                       "Open the newest backup beside it, and keep this file."};
    links.finish();
    // Inside the transaction: rolled back with the rest.
    BOOST_OUTCOME_TRYV(run_statement(
        database, QStringLiteral("PRAGMA application_id = %1").arg(history_application_id), not_migrated));
    return run_statement(database, QStringLiteral("PRAGMA user_version = %1").arg(step.to_version),
                         not_migrated);
}

} // namespace

Done migrate(QSqlDatabase database, int from_version, int up_to)
{
    const ForeignKeysOff off(database);
    for (const Migration& step : all_migrations()) {
        if (step.to_version <= from_version || step.to_version > up_to)
            continue;
        BOOST_OUTCOME_TRYV(run_statement(database, QStringLiteral("BEGIN IMMEDIATE"), not_migrated));
        Done ran = run_step(database, step);
        if (ran)
            ran = run_statement(database, QStringLiteral("COMMIT"), not_migrated);
        if (!ran) {
            QSqlQuery(database).exec(QStringLiteral("ROLLBACK"));
            return ran;
        }
    }
    return done();
}

} // namespace evenstroke::storage
