// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/card_rows.h"
#include "storage/reading_change.h"
#include "storage/reading_store.h"

#include "core/plain_text.h"

#include <QUuid>

namespace evenstroke::storage {
namespace {

const std::string not_saved = "the draft was not saved";

bool is_empty(const Value& value)
{
    return value.typed.empty() && value.words.empty() && value.missing == MissingReason::none;
}

/// Names are unique within an engine, drafts included: files know a reading by its name.
Done check_name(History& history, const OwnerKeys& owner, const std::string& name, const std::string& own_id)
{
    if (name.empty() || name.size() > longest_reading_name || name != trimmed(name))
        return invalid_input("The name " + evenstroke::quoted(name) +
                                 " is empty, too long or has blanks around it.",
                             "Give it a name, such as its month: 2026-03.");
    const auto readings = load_reading_rows(history, owner);
    if (!readings)
        return readings.error();
    for (const ReadingRow& reading : readings.value())
        if (reading.name == name && reading.id != own_id)
            return invalid_input("There is a reading " + evenstroke::quoted(name) + " already, of " +
                                     utc_text(reading.taken_at.utc) + ".",
                                 "Give this one another name.");
    return done();
}

Done save_head(History& history, const ReadingRow& row, const std::string& name, StampedTime taken_at)
{
    Query change(history.database(),
                 "UPDATE reading SET name = ?, taken_at = ?, offset_minutes = ? WHERE reading_key = ?",
                 not_saved);
    return change.run(name, seconds_of(taken_at.utc), taken_at.offset_minutes, row.key);
}

} // namespace

Result<Reading> ReadingStore::make_draft(const Owner& owner, const std::string& name, StampedTime taken_at,
                                         const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto keys = owner_keys(history_, owner);
    if (!keys)
        return keys.error();
    BOOST_OUTCOME_TRYV(check_name(history_, keys.value(), name, ""));
    const ReadingRow row{0,
                         from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces)),
                         name,
                         taken_at,
                         ReadingState::draft,
                         history_.now()};
    const auto key = ReadingInserter(history_).add(keys.value(), row);
    if (!key)
        return key.error();
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(audit.add({"begun", "reading", row.id, name, ""}));
    BOOST_OUTCOME_TRYV(transaction.commit());
    return Reading{row.id, name, taken_at, false, {}};
}

Done ReadingStore::rename_draft(const std::string& reading_id, const std::string& name, StampedTime taken_at)
{
    ReadingChange change(history_, not_saved);
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::draft));
    BOOST_OUTCOME_TRYV(check_name(history_, change.owner(), name, reading_id));
    BOOST_OUTCOME_TRYV(save_head(history_, change.reading(), name, taken_at));
    return change.finish();
}

Done ReadingStore::save_value(const std::string& reading_id, const Value& value)
{
    ReadingChange change(history_, "the value was not saved");
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::draft));
    const auto row = row_of(history_.names(), completed(value));
    if (!row)
        return row.error();
    BOOST_OUTCOME_TRYV(is_empty(value) ? change.remove_value(row.value()) : change.add_value(row.value()));
    return change.finish();
}

Done ReadingStore::save_draft(const Reading& draft)
{
    ReadingChange change(history_, not_saved);
    BOOST_OUTCOME_TRYV(change.begin(draft.id, ReadingState::draft));
    BOOST_OUTCOME_TRYV(check_name(history_, change.owner(), draft.name, draft.id));
    BOOST_OUTCOME_TRYV(save_head(history_, change.reading(), draft.name, draft.taken_at));
    Query empty(history_.database(), "DELETE FROM value WHERE reading_key = ?", not_saved);
    BOOST_OUTCOME_TRYV(empty.run(change.reading().key));
    ValueInserter insert(history_);
    for (const Value& value : draft.values) {
        if (is_empty(value))
            continue;
        const auto row = row_of(history_.names(), completed(value));
        if (!row)
            return row.error();
        BOOST_OUTCOME_TRYV(insert.add(change.reading().key, row.value()));
    }
    BOOST_OUTCOME_TRYV(insert.flush());
    return change.finish();
}

Done ReadingStore::discard_draft(const std::string& reading_id, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    Transaction transaction(history_, "the draft was not thrown away");
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto row = load_reading_row(history_, reading_id);
    if (!row)
        return row.error();
    if (row.value().state != ReadingState::draft)
        return invalid_input("The reading " + evenstroke::quoted(row.value().name) +
                                 " is closed and cannot be thrown away.",
                             "Withdraw it with a reason; it then stays in the file.");
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(throw_cards_away(history_, row.value().key, audit));
    for (const char* const statement :
         {"DELETE FROM value WHERE reading_key = ?", "DELETE FROM reading WHERE reading_key = ?"}) {
        Query remove(history_.database(), statement, "the draft was not thrown away");
        BOOST_OUTCOME_TRYV(remove.run(row.value().key));
    }
    BOOST_OUTCOME_TRYV(audit.add({"thrown away", "reading", reading_id, row.value().name, ""}));
    return transaction.commit();
}

} // namespace evenstroke::storage
