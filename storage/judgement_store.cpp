// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/judgement_store.h"

#include "storage/transaction.h"
#include "storage/value_rows.h"

namespace evenstroke::storage {
namespace {

const std::string not_saved = "the judgement was not kept";
const std::string not_read = "the kept judgements were not read";

/// An empty QByteArray may be null, and would be bound as NULL.
QByteArray not_null(const QByteArray& bytes)
{
    return bytes.isNull() ? QByteArray("") : bytes;
}

} // namespace

Result<std::vector<JudgementEntry>> JudgementStore::all(int method_version) const
{
    Query rows(history_.database(),
               "SELECT e.id, e.name, v.id, v.name, e.input_revision, j.method_version, j.input_revision, "
               "j.computed_at, j.worst_level, j.summary "
               "FROM engine e JOIN vessel v USING (vessel_key) LEFT JOIN judgement j USING (engine_key) "
               "ORDER BY v.name, e.name",
               not_read);
    BOOST_OUTCOME_TRYV(rows.run());
    std::vector<JudgementEntry> entries;
    while (rows.next()) {
        JudgementEntry entry{
            rows.text(0), rows.text(1), rows.text(2), rows.text(3), !rows.is_null(5), false, {}};
        if (entry.stored) {
            entry.judgement = {entry.engine_id,
                               rows.small(5),
                               rows.integer(6),
                               time_of(rows.integer(7)),
                               rows.small(8),
                               rows.bytes(9),
                               {}};
            entry.current = entry.judgement.method_version == method_version &&
                            entry.judgement.input_revision == rows.integer(4);
        }
        entries.push_back(std::move(entry));
    }
    BOOST_OUTCOME_TRYV(rows.finished());
    return entries;
}

Result<std::vector<std::string>> JudgementStore::stale_engines(int method_version) const
{
    Query rows(
        history_.database(),
        "SELECT e.id FROM engine e JOIN vessel v USING (vessel_key) LEFT JOIN judgement j USING (engine_key) "
        "WHERE j.engine_key IS NULL OR j.method_version <> ? OR j.input_revision <> e.input_revision ORDER "
        "BY v.name, e.name",
        not_read);
    BOOST_OUTCOME_TRYV(rows.run(method_version));
    std::vector<std::string> engines;
    while (rows.next())
        engines.push_back(rows.text(0));
    BOOST_OUTCOME_TRYV(rows.finished());
    return engines;
}

Result<StoredJudgement> JudgementStore::load(const std::string& engine_id) const
{
    Query row(history_.database(),
              "SELECT j.method_version, j.input_revision, j.computed_at, j.worst_level, j.summary, d.detail "
              "FROM judgement j JOIN engine e USING (engine_key) LEFT JOIN judgement_detail d USING "
              "(engine_key) WHERE e.id = ?",
              not_read);
    BOOST_OUTCOME_TRYV(row.run(engine_id));
    if (row.next())
        return StoredJudgement{engine_id,    row.small(0), row.integer(1), time_of(row.integer(2)),
                               row.small(3), row.bytes(4), row.bytes(5)};
    BOOST_OUTCOME_TRYV(row.finished());
    return Problem{Problem::Kind::not_found, "No judgement of this engine is kept.", "Judge it first."};
}

Done JudgementStore::save(const StoredJudgement& judgement)
{
    return save_all({judgement});
}

Done JudgementStore::save_all(const std::vector<StoredJudgement>& judgements)
{
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    Query write(
        history_.database(),
        "INSERT INTO judgement (engine_key, method_version, input_revision, computed_at, worst_level, "
        "summary) VALUES (?, ?, ?, ?, ?, ?) "
        "ON CONFLICT (engine_key) DO UPDATE SET method_version = excluded.method_version, input_revision = "
        "excluded.input_revision, "
        "computed_at = excluded.computed_at, worst_level = excluded.worst_level, summary = excluded.summary",
        not_saved);
    Query forget(history_.database(), "DELETE FROM judgement_detail WHERE engine_key = ?", not_saved);
    Query detail(history_.database(), "INSERT INTO judgement_detail (engine_key, detail) VALUES (?, ?)",
                 not_saved);
    for (const StoredJudgement& judgement : judgements) {
        const auto keys = owner_keys(history_, Owner::engine(judgement.engine_id));
        if (!keys)
            return keys.error();
        const qint64 engine = keys.value().engine;
        BOOST_OUTCOME_TRYV(write.run(engine, judgement.method_version, judgement.input_revision,
                                     seconds_of(judgement.computed_at), judgement.worst_level,
                                     not_null(judgement.summary)));
        BOOST_OUTCOME_TRYV(forget.run(engine));
        if (!judgement.detail.isEmpty()) {
            BOOST_OUTCOME_TRYV(detail.run(engine, judgement.detail));
        }
    }
    return transaction.commit();
}

} // namespace evenstroke::storage
