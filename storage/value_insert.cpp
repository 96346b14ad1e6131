// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/value_rows.h"

namespace evenstroke::storage {
namespace {

const std::string not_saved = "the values were not saved";
const char* const value_columns =
    "INSERT INTO value (reading_key, quantity_key, place, phase, typed, unit_key, value_si, words, missing, "
    "confirmed, place_typed, origin) ";

// One ordinary value's keys in 63 bits: reading, quantity 12, unit 12, place 13.
constexpr int place_bits = 13, key_bits = 12;
constexpr qint64 most_keys = (qint64{1} << key_bits) - 1;
constexpr qint64 most_readings = (qint64{1} << (63 - place_bits - 2 * key_bits)) - 1;

bool is_ordinary(qint64 reading_key, const ValueRow& row)
{
    return row.phase == static_cast<int>(Phase::reading) && row.missing == 0 && !row.confirmed &&
           row.words.empty() && row.place_typed.empty() && row.origin == 0 && row.quantity_key <= most_keys &&
           row.unit_key <= most_keys && reading_key <= most_readings;
}

qint64 packed(qint64 reading_key, const ValueRow& row)
{
    return ((((reading_key << key_bits) | row.quantity_key) << key_bits | row.unit_key) << place_bits) |
           row.place;
}

QString ordinary_statement(int rows)
{
    QString statement = QStringLiteral("WITH given (p, typed, value_si) AS (VALUES (?, ?, ?)");
    for (int row = 1; row < rows; ++row)
        statement += QStringLiteral(", (?, ?, ?)");
    return statement + QStringLiteral(") ") + QLatin1String(value_columns) +
           QStringLiteral("SELECT p >> 37, (p >> 25) & 4095, p & 8191, 1, typed, nullif((p >> 13) & 4095, "
                          "0), value_si, NULL, 0, 0, NULL, 0 FROM given");
}

} // namespace

Done ValueInserter::add(qint64 reading_key, const ValueRow& row)
{
    if (!is_ordinary(reading_key, row))
        return add_unusual(reading_key, row);
    waiting_.push_back({packed(reading_key, row), to_qt(row.typed), row.value_si});
    if (waiting_.size() < rows_a_statement)
        return done();
    if (!many_)
        many_.emplace(history_.database(), ordinary_statement(rows_a_statement), not_saved);
    BOOST_OUTCOME_TRYV(write(0, rows_a_statement, *many_));
    waiting_.clear();
    return done();
}

Done ValueInserter::flush()
{
    if (!waiting_.empty() && !one_)
        one_.emplace(history_.database(), ordinary_statement(1), not_saved);
    for (std::size_t i = 0; i < waiting_.size(); ++i) {
        BOOST_OUTCOME_TRYV(write(i, 1, *one_));
    }
    waiting_.clear();
    return done();
}

Done ValueInserter::write(std::size_t first, int count, Query& statement)
{
    int at = 0;
    for (std::size_t i = first; i < first + static_cast<std::size_t>(count); ++i) {
        statement.bind(at++, to_variant(waiting_[i].packed));
        statement.bind(at++, waiting_[i].typed);
        statement.bind(at++, to_variant(waiting_[i].value_si));
    }
    return statement.execute();
}

Done ValueInserter::add_unusual(qint64 reading_key, const ValueRow& row)
{
    if (!unusual_)
        unusual_.emplace(history_.database(),
                         QLatin1String(value_columns) +
                             QStringLiteral("VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)"),
                         not_saved);
    const auto if_any = [](const std::string& text) {
        return text.empty() ? std::nullopt : std::optional(text);
    };
    const auto unit_key = row.unit_key == 0 ? std::nullopt : std::optional(row.unit_key);
    return unusual_->run(reading_key, row.quantity_key, row.place, row.phase, row.typed, unit_key,
                         row.value_si, if_any(row.words), row.missing, row.confirmed ? 1 : 0,
                         if_any(row.place_typed), row.origin);
}

Result<qint64> ReadingInserter::add(const OwnerKeys& owner, const ReadingRow& reading)
{
    if (!statement_)
        statement_.emplace(history_.database(),
                           "INSERT INTO reading (id, vessel_key, engine_key, name, taken_at, offset_minutes, "
                           "state, changed_at) VALUES (?, ?, ?, ?, ?, ?, ?, ?)",
                           "the reading was not saved");
    const std::optional<qint64> engine = owner.engine == 0 ? std::nullopt : std::optional(owner.engine);
    BOOST_OUTCOME_TRYV(statement_->run(reading.id, owner.vessel, engine, reading.name,
                                       seconds_of(reading.taken_at.utc), reading.taken_at.offset_minutes,
                                       static_cast<int>(reading.state), seconds_of(reading.changed_at)));
    return statement_->inserted_key();
}

} // namespace evenstroke::storage
