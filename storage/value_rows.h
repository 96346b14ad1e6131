// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/names.h"
#include "storage/reading_store.h"
#include "storage/sql.h"

#include <optional>
#include <string>
#include <tuple>
#include <vector>

/// Values and readings as the file holds them, before names and units are given their meaning.
namespace evenstroke::storage {

inline constexpr std::size_t longest_reading_name = 100; ///< bytes

/// One row of the table `value`.
struct ValueRow
{
    int quantity_key = 0;
    int place = 0; ///< place_code
    int phase = 1;
    int unit_key = 0; ///< 0: none
    int missing = 0;
    bool confirmed = false;
    std::optional<double> value_si;
    std::string typed, words, place_typed;
    int origin = 0; ///< as Origin

    auto where() const { return std::tuple(quantity_key, place, phase); }
};

/// One row of the table `reading`.
struct ReadingRow
{
    qint64 key = 0;
    std::string id, name;
    StampedTime taken_at;
    ReadingState state = ReadingState::closed;
    TimePoint changed_at{};
};

/// Keys of whoever owns readings; `engine` 0 for the ship's.
struct OwnerKeys
{
    qint64 vessel = 0, engine = 0;
};
Result<OwnerKeys> owner_keys(History& history, const Owner& owner);

/// What a row means; none where this program does not know the quantity or the unit.
std::optional<Value> value_of(const History::Names& names, const ValueRow& row);
/// How a value is stored. Gives new names a number, so it needs a transaction.
Result<ValueRow> row_of(History::Names& names, const Value& value);

/// All of an owner's readings in order of time.
Result<std::vector<ReadingRow>> load_reading_rows(History& history, const OwnerKeys& owner);
Result<ReadingRow> load_reading_row(History& history, const std::string& reading_id);
/// Everybody's readings, by key.
Result<std::vector<ReadingRow>> load_all_reading_rows(History& history);
/// A value out of a row that holds `value_row_columns` from column `first` on.
ValueRow value_row_of(const Query& row, int first);
inline constexpr char value_row_columns[] =
    "quantity_key, place, phase, unit_key, missing, confirmed, value_si, typed, words, place_typed, origin";
/// In the order of the file's own numbering.
Result<std::vector<ValueRow>> load_value_rows(History& history, qint64 reading_key);

/// Adds values many at a time. Ordinary ones (the reading itself, read by somebody, nothing missing, no words) travel as one
/// packed number, the text and the SI value: binding is what costs, so few things are bound.
class ValueInserter
{
public:
    explicit ValueInserter(History& history) : history_(history) {}
    Done add(qint64 reading_key, const ValueRow& row);
    /// Writes what still waits. Without it the last values are lost.
    Done flush();
    /// Drops what still waits: the transaction is taken back.
    void forget() { waiting_.clear(); }

private:
    static constexpr int rows_a_statement = 25;
    struct Waiting
    {
        qint64 packed;
        QString typed;
        std::optional<double> value_si;
    };
    Done add_unusual(qint64 reading_key, const ValueRow& row);
    Done write(std::size_t first, int count, Query& statement);

    History& history_;
    std::optional<Query> many_, one_, unusual_;
    std::vector<Waiting> waiting_;
};

/// Adds rows of readings; answers their keys.
class ReadingInserter
{
public:
    explicit ReadingInserter(History& history) : history_(history) {}
    Result<qint64> add(const OwnerKeys& owner, const ReadingRow& reading);

private:
    History& history_;
    std::optional<Query> statement_;
};

/// Hash of everything that a reading holds, for the audit trail. Sorts the rows.
std::string reading_hash(const History::Names& names, const ReadingRow& reading,
                         std::vector<const ValueRow*> rows);

/// What was judged has changed: counts up the revision of the engine, or of all engines of the vessel.
Done count_change(History& history, const OwnerKeys& owner);

} // namespace evenstroke::storage
