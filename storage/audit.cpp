// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/audit.h"

#include "storage/audit_writer.h"
#include "storage/content_hash.h"

namespace evenstroke::storage {

std::string audit_row_hash(const std::string& previous, const AuditedChange& change, qint64 number, qint64 at,
                           const Signature& by)
{
    ContentHash row;
    row.add(previous).add(number).add(at).add(by.who).add(change.action).add(change.subject_kind);
    row.add(change.subject_id).add(change.detail).add(by.why).add(change.content_hash);
    return row.hex();
}

AuditWriter::AuditWriter(History& history, Signature by) : history_(history), by_(std::move(by)) {}

Done AuditWriter::add(const AuditedChange& change)
{
    const char* const not_written = "the change was not written to the audit trail and not made";
    if (!knows_last_) {
        const auto last = audit_state(history_);
        if (!last)
            return last.error();
        number_ = last.value().entries;
        last_hash_ = last.value().last_hash;
        knows_last_ = true;
    }
    if (!insert_)
        insert_.emplace(history_.database(),
                        "INSERT INTO audit (number, at, who, action, subject_kind, subject_id, detail, why, "
                        "content_hash, row_hash) "
                        "VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?)",
                        not_written);
    const qint64 at = seconds_of(history_.now());
    last_hash_ = audit_row_hash(last_hash_, change, ++number_, at, by_);
    return insert_->run(number_, at, by_.who, change.action, change.subject_kind, change.subject_id,
                        change.detail, by_.why, change.content_hash, last_hash_);
}

namespace {

const char* const audit_columns = "SELECT number, at, who, action, subject_kind, subject_id, detail, why, "
                                  "content_hash, row_hash FROM audit ";

AuditEntry entry_of(const Query& row)
{
    return {row.integer(0), time_of(row.integer(1)),
            row.text(2),    row.text(3),
            row.text(4),    row.text(5),
            row.text(6),    row.text(7),
            row.text(8),    row.text(9)};
}

} // namespace

Result<std::vector<AuditEntry>> audit_entries(History& history, const std::string& subject_id, int at_most)
{
    const QString condition =
        subject_id.empty() ? QStringLiteral("WHERE ? = '' ") : QStringLiteral("WHERE subject_id = ? ");
    Query rows(history.database(),
               QString::fromLatin1(audit_columns) + condition +
                   QStringLiteral("ORDER BY number DESC LIMIT ?"),
               "the audit trail was not read");
    BOOST_OUTCOME_TRYV(rows.run(subject_id, at_most));
    std::vector<AuditEntry> entries;
    while (rows.next())
        entries.push_back(entry_of(rows));
    BOOST_OUTCOME_TRYV(rows.finished());
    return entries;
}

Result<AuditFindings> audit_state(History& history)
{
    Query last(history.database(), "SELECT number, row_hash FROM audit ORDER BY number DESC LIMIT 1",
               "the audit trail was not read");
    BOOST_OUTCOME_TRYV(last.run());
    AuditFindings state;
    if (last.next()) {
        state.entries = last.integer(0);
        state.last_hash = last.text(1);
    }
    BOOST_OUTCOME_TRYV(last.finished());
    return state;
}

} // namespace evenstroke::storage
