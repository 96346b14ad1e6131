// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/transaction.h"
#include "storage/value_rows.h"

#include <QJsonArray>
#include <QJsonDocument>

#include <algorithm>

// Reading all values of an engine at once: the way every judging begins, so it must be quick.
namespace evenstroke::storage {
namespace {

const char* const not_read = "the readings were not read";

// QtSql makes a QVariant of every column of every row, so small numbers travel in one column, and the texts
// that nearly all values lack travel with the typed text where there are any: as a JSON list, and a bit says
// so.
constexpr int phase_bits = 2, missing_bits = 2, confirmed_bits = 1, origin_bits = 2, texts_bits = 1,
              place_bits = 13, unit_bits = 16;
const char* const packed_values =
    "SELECT v.reading_key, "
    "((((((v.quantity_key << 16 | coalesce(v.unit_key, 0)) << 13 | v.place) << 1 "
    "| (coalesce(v.words, v.place_typed) IS NOT NULL)) << 2 | (v.origin & 3)) << 1 | v.confirmed) << 2 | "
    "v.missing) << 2 | v.phase, "
    "CASE WHEN coalesce(v.words, v.place_typed) IS NULL THEN v.typed "
    "ELSE json_array(v.typed, v.words, v.place_typed) END, "
    "v.value_si "
    "FROM reading r CROSS JOIN value v ON v.reading_key = r.reading_key WHERE r.state = 1 AND ";

/// Answers whether the text column holds the list of all texts.
bool unpack(qint64 packed, ValueRow& row)
{
    const auto take = [&](int bits) {
        const int part = static_cast<int>(packed & ((qint64{1} << bits) - 1));
        packed >>= bits;
        return part;
    };
    row.phase = take(phase_bits);
    row.missing = take(missing_bits);
    row.confirmed = take(confirmed_bits) != 0;
    row.origin = take(origin_bits);
    const bool texts = take(texts_bits) != 0;
    row.place = take(place_bits);
    row.unit_key = take(unit_bits);
    row.quantity_key = static_cast<int>(packed);
    return texts;
}

/// A typed number is a few ASCII characters: no way over the heap.
void assign_text(std::string& to, const QString& from)
{
    to.clear();
    for (const QChar letter : from) {
        if (letter.unicode() >= 0x80) {
            to = from_qt(from);
            return;
        }
        to += static_cast<char>(letter.unicode());
    }
}

void read_row(const Query& rows, ValueRow& row)
{
    const bool texts = unpack(rows.integer(1), row);
    const QString text = rows.raw(2).toString();
    row.value_si = rows.real(3);
    row.words.clear();
    row.place_typed.clear();
    if (!texts)
        return assign_text(row.typed, text);
    const QJsonArray list = QJsonDocument::fromJson(text.toUtf8()).array();
    row.typed = from_qt(list[0].toString());
    row.words = from_qt(list[1].toString());
    row.place_typed = from_qt(list[2].toString());
}

void put_in_walking_order(std::vector<Value>& values)
{
    const auto before = [](const Value& a, const Value& b) {
        return std::tie(a.quantity, a.place, a.phase) < std::tie(b.quantity, b.place, b.phase);
    };
    if (!std::is_sorted(values.begin(), values.end(), before))
        std::sort(values.begin(), values.end(), before);
}

Result<std::vector<Reading>> load_closed(History& history, const OwnerKeys& owner)
{
    const auto heads = load_reading_rows(history, owner);
    if (!heads)
        return heads.error();
    BOOST_OUTCOME_TRYV(history.names().make_ready());
    std::vector<Reading> readings;
    std::vector<qint64> keys;
    for (const ReadingRow& head : heads.value()) {
        if (head.state != ReadingState::closed)
            continue;
        readings.push_back({head.id, head.name, head.taken_at, true, {}});
        keys.push_back(head.key);
    }
    const QString whose = owner.engine != 0 ? QStringLiteral("r.engine_key = ? ")
                                            : QStringLiteral("r.vessel_key = ? AND r.engine_key IS NULL ");
    Query rows(history.database(),
               QString::fromLatin1(packed_values) + whose +
                   QStringLiteral("ORDER BY r.taken_at, r.reading_key"),
               not_read);
    BOOST_OUTCOME_TRYV(rows.run(owner.engine != 0 ? owner.engine : owner.vessel));
    ValueRow row;
    std::size_t at = 0;
    while (rows.next()) {
        const qint64 key = rows.integer(0);
        while (at < keys.size() && keys[at] != key)
            ++at;
        if (at == keys.size())
            break;
        read_row(rows, row);
        if (auto value = value_of(history.names(), row))
            readings[at].values.push_back(std::move(*value));
    }
    BOOST_OUTCOME_TRYV(rows.finished());
    for (Reading& reading : readings)
        put_in_walking_order(reading.values);
    return readings;
}

/// The ship's reading nearest in time, the earlier of two equally near; null beyond 6 h.
const Reading* nearest(const std::vector<Reading>& shared, TimePoint time)
{
    const auto after =
        std::lower_bound(shared.begin(), shared.end(), time,
                         [](const Reading& reading, TimePoint at) { return reading.taken_at.utc < at; });
    const Reading* found = nullptr;
    const auto consider = [&](const Reading& candidate) {
        const auto distance = std::chrono::abs(candidate.taken_at.utc - time);
        if (distance <= shared_within && (!found || distance < std::chrono::abs(found->taken_at.utc - time)))
            found = &candidate;
    };
    if (after != shared.begin())
        consider(*std::prev(after));
    if (after != shared.end())
        consider(*after);
    return found;
}

bool says_something(const Value& value)
{
    return value.value_si.has_value() || !value.words.empty();
}

void lend(const Reading& shared, Reading& reading)
{
    const std::size_t own = reading.values.size();
    for (const Value& value : shared.values) {
        const auto end = reading.values.begin() + static_cast<std::ptrdiff_t>(own);
        const bool has = std::any_of(reading.values.begin(), end, [&](const Value& mine) {
            return mine.quantity == value.quantity && mine.phase == value.phase && says_something(mine);
        });
        if (!has && says_something(value))
            reading.values.push_back(value);
    }
}

} // namespace

Result<std::vector<Reading>> ReadingStore::load_own(const Owner& owner) const
{
    const ReadTransaction same_state(history_);
    const auto keys = owner_keys(history_, owner);
    if (!keys)
        return keys.error();
    return load_closed(history_, keys.value());
}

Result<std::vector<Reading>> ReadingStore::load(const std::string& engine_id) const
{
    const ReadTransaction same_state(history_);
    const auto keys = owner_keys(history_, Owner::engine(engine_id));
    if (!keys)
        return keys.error();
    auto readings = load_closed(history_, keys.value());
    if (!readings)
        return readings;
    const auto shared = load_closed(history_, {keys.value().vessel, 0});
    if (!shared)
        return shared;
    for (Reading& reading : readings.value())
        if (const Reading* const ship = nearest(shared.value(), reading.taken_at.utc))
            lend(*ship, reading);
    return readings;
}

} // namespace evenstroke::storage
