// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/reading_store.h"

#include "storage/transaction.h"
#include "storage/value_rows.h"

namespace evenstroke::storage {
namespace {

const char* const correction_columns =
    "SELECT r.id, c.quantity_key, c.place, c.phase, c.old_typed, c.old_unit_key, c.old_value_si, "
    "c.old_words, c.old_missing, "
    "c.old_origin, "
    "c.new_typed, c.new_unit_key, c.new_value_si, c.new_words, c.new_missing, c.new_origin, c.at, c.who, c.why "
    "FROM correction c JOIN reading r USING (reading_key) ";

ValueRow side_of(const Query& row, int first)
{
    ValueRow value;
    value.quantity_key = row.small(1);
    value.place = row.small(2);
    value.phase = row.small(3);
    value.typed = row.text(first);
    value.unit_key = row.small(first + 1);
    value.value_si = row.real(first + 2);
    value.words = row.text(first + 3);
    value.missing = row.small(first + 4);
    value.origin = row.small(first + 5);
    return value;
}

Result<std::vector<Correction>> corrections_where(History& history, const char* condition,
                                                  const QVariant& key)
{
    const ReadTransaction same_state(history);
    BOOST_OUTCOME_TRYV(history.names().make_ready());
    Query rows(history.database(),
               QString::fromLatin1(correction_columns) + QString::fromLatin1(condition) +
                   QStringLiteral(" ORDER BY c.correction_key"),
               "the corrections were not read");
    rows.bind(0, key);
    BOOST_OUTCOME_TRYV(rows.execute());
    std::vector<Correction> found;
    while (rows.next()) {
        const auto before = value_of(history.names(), side_of(rows, 4));
        const auto after = value_of(history.names(), side_of(rows, 10));
        if (before && after)
            found.push_back(
                {rows.text(0), *before, *after, time_of(rows.integer(16)), {rows.text(17), rows.text(18)}});
    }
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

} // namespace

Result<std::vector<ReadingEntry>> ReadingStore::list(const Owner& owner) const
{
    const auto keys = owner_keys(history_, owner);
    if (!keys)
        return keys.error();
    const bool engine = keys.value().engine != 0;
    Query rows(
        history_.database(),
        QStringLiteral(
            "SELECT id, name, taken_at, offset_minutes, state, changed_at, "
            "(SELECT count(*) FROM value v WHERE v.reading_key = r.reading_key), "
            "(SELECT count(*) FROM correction c WHERE c.reading_key = r.reading_key) FROM reading r WHERE ") +
            (engine ? QStringLiteral("engine_key = ?")
                    : QStringLiteral("vessel_key = ? AND engine_key IS NULL")) +
            QStringLiteral(" ORDER BY taken_at, reading_key"),
        "the list of readings was not read");
    BOOST_OUTCOME_TRYV(rows.run(engine ? keys.value().engine : keys.value().vessel));
    std::vector<ReadingEntry> found;
    while (rows.next())
        found.push_back({rows.text(0),
                         rows.text(1),
                         {time_of(rows.integer(2)), rows.small(3)},
                         static_cast<ReadingState>(rows.small(4)),
                         rows.small(6),
                         rows.small(7),
                         time_of(rows.integer(5))});
    BOOST_OUTCOME_TRYV(rows.finished());
    return found;
}

Result<Reading> ReadingStore::reading(const std::string& reading_id) const
{
    const ReadTransaction same_state(history_);
    const auto head = load_reading_row(history_, reading_id);
    if (!head)
        return head.error();
    const auto rows = load_value_rows(history_, head.value().key);
    if (!rows)
        return rows.error();
    BOOST_OUTCOME_TRYV(history_.names().make_ready());
    Reading reading{head.value().id,
                    head.value().name,
                    head.value().taken_at,
                    head.value().state != ReadingState::draft,
                    {}};
    for (const ValueRow& row : rows.value())
        if (auto value = value_of(history_.names(), row))
            reading.values.push_back(std::move(*value));
    return reading;
}

Result<std::vector<Correction>> ReadingStore::corrections(const std::string& reading_id) const
{
    return corrections_where(history_, "WHERE r.id = ?", to_variant(reading_id));
}

Result<std::vector<Correction>> ReadingStore::corrections_of(const Owner& owner) const
{
    const auto keys = owner_keys(history_, owner);
    if (!keys)
        return keys.error();
    return keys.value().engine != 0
               ? corrections_where(history_, "WHERE r.engine_key = ?", keys.value().engine)
               : corrections_where(history_, "WHERE r.engine_key IS NULL AND r.vessel_key = ?",
                                   keys.value().vessel);
}

} // namespace evenstroke::storage
