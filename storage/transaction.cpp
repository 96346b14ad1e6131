// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/transaction.h"

#include "storage/backup.h"
#include "storage/names.h"
#include "storage/sql.h"

namespace evenstroke::storage {

Transaction::~Transaction()
{
    if (open_)
        roll_back();
}

Done Transaction::begin()
{
    if (history_.mode() == OpenMode::read_only)
        return Problem{Problem::Kind::storage, "The history is open for reading only, so " + undone_ + ".",
                       "Open it where it may be written to."};
    const int depth = history_.transaction_depth_;
    if (depth == 0) {
        // A copy of the day that cannot be made must not stand in the way of a chief who has a reading to
        // enter.
        if (history_.settings().automatic_backups)
            static_cast<void>(back_up_daily(history_));
        BOOST_OUTCOME_TRYV(run_statement(history_.database(), QStringLiteral("BEGIN IMMEDIATE"), undone_));
    } else {
        BOOST_OUTCOME_TRYV(
            run_statement(history_.database(), QStringLiteral("SAVEPOINT level_%1").arg(depth), undone_));
    }
    ++history_.transaction_depth_;
    open_ = true;
    return done();
}

Done Transaction::commit()
{
    const int depth = history_.transaction_depth_ - 1;
    BOOST_OUTCOME_TRYV(run_statement(
        history_.database(),
        depth == 0 ? QStringLiteral("COMMIT") : QStringLiteral("RELEASE level_%1").arg(depth), undone_));
    --history_.transaction_depth_;
    open_ = false;
    return done();
}

void Transaction::roll_back()
{
    if (!open_)
        return;
    open_ = false;
    const int depth = --history_.transaction_depth_;
    QSqlQuery query(history_.database());
    if (depth == 0) {
        query.exec(
            QStringLiteral("ROLLBACK")); // SQLite may have rolled back by itself, as when the disk is full
    } else {
        query.exec(QStringLiteral("ROLLBACK TO level_%1").arg(depth));
        query.exec(QStringLiteral("RELEASE level_%1").arg(depth));
    }
    history_.names().forget(); // names numbered since `begin` are gone
}

ReadTransaction::ReadTransaction(History& history) : history_(history)
{
    if (history_.transaction_depth_ != 0)
        return; // the transaction under way sees one state anyway
    open_ = QSqlQuery(history_.database()).exec(QStringLiteral("BEGIN"));
    history_.transaction_depth_ += open_ ? 1 : 0;
}

ReadTransaction::~ReadTransaction()
{
    if (!open_)
        return;
    --history_.transaction_depth_;
    QSqlQuery(history_.database()).exec(QStringLiteral("COMMIT"));
}

} // namespace evenstroke::storage
