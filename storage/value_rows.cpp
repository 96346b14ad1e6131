// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/value_rows.h"

#include "storage/content_hash.h"

#include <algorithm>

namespace evenstroke::storage {
namespace {

const char* const reading_columns =
    "SELECT reading_key, id, name, taken_at, offset_minutes, state, changed_at FROM reading ";

ReadingRow reading_of(const Query& row)
{
    return {row.integer(0),
            row.text(1),
            row.text(2),
            {time_of(row.integer(3)), row.small(4)},
            static_cast<ReadingState>(row.small(5)),
            time_of(row.integer(6))};
}

const std::string not_saved = "the values were not saved";

} // namespace

Result<OwnerKeys> owner_keys(History& history, const Owner& owner)
{
    const bool engine = owner.kind == Owner::Kind::engine;
    Query find(history.database(),
               engine ? "SELECT vessel_key, engine_key FROM engine WHERE id = ?"
                      : "SELECT vessel_key, 0 FROM vessel WHERE id = ?",
               "the engine was not found");
    BOOST_OUTCOME_TRYV(find.run(owner.id));
    if (find.next())
        return OwnerKeys{find.integer(0), find.integer(1)};
    BOOST_OUTCOME_TRYV(find.finished());
    return Problem{Problem::Kind::not_found,
                   engine ? "The engine is not in this history." : "The vessel is not in this history.",
                   "Look at the list again; another window may have changed it."};
}

Result<std::vector<ReadingRow>> load_reading_rows(History& history, const OwnerKeys& owner)
{
    const bool engine = owner.engine != 0;
    Query rows(history.database(),
               QString::fromLatin1(reading_columns) +
                   (engine ? QStringLiteral("WHERE engine_key = ? ")
                           : QStringLiteral("WHERE vessel_key = ? AND engine_key IS NULL ")) +
                   QStringLiteral("ORDER BY taken_at, reading_key"),
               "the readings were not read");
    BOOST_OUTCOME_TRYV(rows.run(engine ? owner.engine : owner.vessel));
    std::vector<ReadingRow> readings;
    while (rows.next())
        readings.push_back(reading_of(rows));
    BOOST_OUTCOME_TRYV(rows.finished());
    return readings;
}

Result<ReadingRow> load_reading_row(History& history, const std::string& reading_id)
{
    Query row(history.database(), QString::fromLatin1(reading_columns) + QStringLiteral("WHERE id = ?"),
              "the reading was not read");
    BOOST_OUTCOME_TRYV(row.run(reading_id));
    if (row.next())
        return reading_of(row);
    BOOST_OUTCOME_TRYV(row.finished());
    return Problem{Problem::Kind::not_found, "The reading is not in this history.",
                   "Look at the list again; another window may have changed it."};
}

ValueRow value_row_of(const Query& row, int first)
{
    return {row.small(first),     row.small(first + 1),      row.small(first + 2), row.small(first + 3),
            row.small(first + 4), row.small(first + 5) != 0, row.real(first + 6),  row.text(first + 7),
            row.text(first + 8),  row.text(first + 9),      row.small(first + 10)};
}

Result<std::vector<ReadingRow>> load_all_reading_rows(History& history)
{
    Query rows(history.database(),
               QString::fromLatin1(reading_columns) + QStringLiteral("ORDER BY reading_key"),
               "the readings were not read");
    BOOST_OUTCOME_TRYV(rows.run());
    std::vector<ReadingRow> readings;
    while (rows.next())
        readings.push_back(reading_of(rows));
    BOOST_OUTCOME_TRYV(rows.finished());
    return readings;
}

Result<std::vector<ValueRow>> load_value_rows(History& history, qint64 reading_key)
{
    Query rows(history.database(),
               QLatin1String("SELECT ") + QLatin1String(value_row_columns) +
                   QLatin1String(" FROM value WHERE reading_key = ?"),
               "the values were not read");
    BOOST_OUTCOME_TRYV(rows.run(reading_key));
    std::vector<ValueRow> values;
    while (rows.next())
        values.push_back(value_row_of(rows, 0));
    BOOST_OUTCOME_TRYV(rows.finished());
    return values;
}

std::string reading_hash(const History::Names& names, const ReadingRow& reading,
                         std::vector<const ValueRow*> rows)
{
    const auto rank = [&](const ValueRow* row) {
        const QuantityInFile* quantity = names.quantity(row->quantity_key);
        return std::tuple(quantity ? quantity->rank : -1, row->place, row->phase);
    };
    const auto before = [&](const ValueRow* a, const ValueRow* b) { return rank(a) < rank(b); };
    std::sort(rows.begin(), rows.end(), before);
    ContentHash content;
    content.add(reading.id)
        .add(reading.name)
        .add(seconds_of(reading.taken_at.utc))
        .add(qint64{reading.taken_at.offset_minutes});
    content.add(static_cast<qint64>(reading.state));
    for (const ValueRow* row : rows) {
        const QuantityInFile* quantity = names.quantity(row->quantity_key);
        const UnitInFile* unit = names.unit(row->unit_key);
        content.add(quantity ? std::string_view(quantity->name) : "?")
            .add(qint64{row->place})
            .add(qint64{row->phase});
        content.add(row->typed)
            .add(unit ? std::string_view(unit->written) : "")
            .add(row->value_si)
            .add(row->words);
        content.add(qint64{row->missing}).add(qint64{row->confirmed}).add(row->place_typed);
        if (row->origin != 0) // values that were read keep the hash of the time before there were others
            content.add("origin").add(qint64{row->origin});
    }
    return content.hex();
}

Done count_change(History& history, const OwnerKeys& owner)
{
    Query count(history.database(),
                owner.engine != 0
                    ? "UPDATE engine SET input_revision = input_revision + 1 WHERE engine_key = ?"
                    : "UPDATE engine SET input_revision = input_revision + 1 WHERE vessel_key = ?",
                "the change was not saved");
    return count.run(owner.engine != 0 ? owner.engine : owner.vessel);
}

} // namespace evenstroke::storage
