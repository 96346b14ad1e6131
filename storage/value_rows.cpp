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

QString insert_statement(int rows)
{
    QString statement = QStringLiteral("INSERT INTO value (reading_key, quantity_key, place, phase, typed, "
                                       "unit_key, value_si, words, missing, confirmed, place_typed) VALUES ");
    for (int row = 0; row < rows; ++row)
        statement +=
            row == 0 ? QStringLiteral("(?,?,?,?,?,?,?,?,?,?,?)") : QStringLiteral(",(?,?,?,?,?,?,?,?,?,?,?)");
    return statement;
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

Result<std::vector<ValueRow>> load_value_rows(History& history, qint64 reading_key)
{
    Query rows(history.database(),
               "SELECT quantity_key, place, phase, unit_key, missing, confirmed, value_si, typed, words, "
               "place_typed FROM value WHERE reading_key = ?",
               "the values were not read");
    BOOST_OUTCOME_TRYV(rows.run(reading_key));
    std::vector<ValueRow> values;
    while (rows.next())
        values.push_back({rows.small(0), rows.small(1), rows.small(2), rows.small(3), rows.small(4),
                          rows.small(5) != 0, rows.real(6), rows.text(7), rows.text(8), rows.text(9)});
    BOOST_OUTCOME_TRYV(rows.finished());
    return values;
}

Done ValueInserter::add(qint64 reading_key, const ValueRow& row)
{
    waiting_.emplace_back(reading_key, row);
    if (waiting_.size() < rows_a_statement)
        return done();
    if (!full_)
        full_.emplace(history_.database(), insert_statement(rows_a_statement), not_saved);
    BOOST_OUTCOME_TRYV(write(0, rows_a_statement, *full_));
    waiting_.clear();
    return done();
}

Done ValueInserter::flush()
{
    if (waiting_.empty())
        return done();
    const int rest = static_cast<int>(waiting_.size());
    Query statement(history_.database(), insert_statement(rest), not_saved);
    BOOST_OUTCOME_TRYV(write(0, rest, statement));
    waiting_.clear();
    return done();
}

Done ValueInserter::write(std::size_t first, int count, Query& statement)
{
    int at = 0;
    for (std::size_t i = first; i < first + static_cast<std::size_t>(count); ++i) {
        const auto& [reading_key, row] = waiting_[i];
        const auto text_or_null = [](const std::string& text) {
            return text.empty() ? QVariant() : to_variant(text);
        };
        statement.bind(at++, to_variant(reading_key));
        statement.bind(at++, row.quantity_key);
        statement.bind(at++, row.place);
        statement.bind(at++, row.phase);
        statement.bind(at++, to_variant(row.typed));
        statement.bind(at++, row.unit_key == 0 ? QVariant() : QVariant(row.unit_key));
        statement.bind(at++, to_variant(row.value_si));
        statement.bind(at++, text_or_null(row.words));
        statement.bind(at++, row.missing);
        statement.bind(at++, row.confirmed ? 1 : 0);
        statement.bind(at++, text_or_null(row.place_typed));
    }
    return statement.execute();
}

Result<qint64> insert_reading(History& history, const OwnerKeys& owner, const ReadingRow& reading)
{
    Query add(history.database(),
              "INSERT INTO reading (id, vessel_key, engine_key, name, taken_at, offset_minutes, state, "
              "changed_at) VALUES (?, ?, ?, ?, ?, ?, ?, ?)",
              "the reading was not saved");
    const std::optional<qint64> engine = owner.engine == 0 ? std::nullopt : std::optional(owner.engine);
    BOOST_OUTCOME_TRYV(add.run(reading.id, owner.vessel, engine, reading.name,
                               seconds_of(reading.taken_at.utc), reading.taken_at.offset_minutes,
                               static_cast<int>(reading.state), seconds_of(reading.changed_at)));
    return add.inserted_key();
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
