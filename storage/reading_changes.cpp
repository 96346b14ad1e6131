// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/reading_change.h"
#include "storage/reading_store.h"

#include "core/plain_text.h"

// What may happen to a reading once it is closed, and the closing itself.
namespace evenstroke::storage {
namespace {

Done check_readable(const History::Names& names, const std::vector<ValueRow>& rows)
{
    bool anything = false;
    for (const ValueRow& row : rows) {
        const auto value = value_of(names, row);
        if (!value)
            continue;
        anything = anything || value->value_si || !value->words.empty();
        if (quantity(value->quantity).type == ValueType::number && !value->typed.empty() && !value->value_si)
            return invalid_input(evenstroke::quoted(value->typed) + " at " + value_name(*value) +
                                     " cannot be read as a number.",
                                 "Correct it or empty the box, then close the reading.");
    }
    if (!anything)
        return invalid_input("The reading holds no value.",
                             "Enter at least one value, or throw the draft away.");
    return done();
}

bool says_the_same(const ValueRow& a, const ValueRow& b)
{
    return a.typed == b.typed && a.unit_key == b.unit_key && a.value_si == b.value_si && a.words == b.words &&
           a.missing == b.missing;
}

} // namespace

Done ReadingStore::close(const std::string& reading_id, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    ReadingChange change(history_, "the reading was not closed");
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::draft));
    BOOST_OUTCOME_TRYV(check_readable(history_.names(), change.values()));
    BOOST_OUTCOME_TRYV(change.set_state(ReadingState::closed));
    return change.finish("closed", change.reading().name, by);
}

Done ReadingStore::correct(const std::string& reading_id, const Value& new_value, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, true));
    const Value value = completed(new_value);
    if (value.missing == MissingReason::none && !value.value_si && value.words.empty())
        return invalid_input(value.typed.empty()
                                 ? "The corrected value is empty."
                                 : evenstroke::quoted(value.typed) + " cannot be read as a number.",
                             "Give the right value, or say why there is none.");
    ReadingChange change(history_, "the correction was not saved");
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::closed));
    const auto row = row_of(history_.names(), value);
    if (!row)
        return row.error();
    ValueRow before;
    before.missing = static_cast<int>(MissingReason::not_read);
    if (const ValueRow* const old = change.find(row.value()))
        before = *old;
    if (says_the_same(before, row.value()))
        return invalid_input("The correction says what stands there already.",
                             "Give another value, or leave it as it is.");
    BOOST_OUTCOME_TRYV(keep_correction(history_, change.reading().key, before, row.value(), by));
    BOOST_OUTCOME_TRYV(change.add_value(row.value()));
    const std::string detail = value_name(value) + ": " + value_text(history_.names(), before) + " -> " +
                               value_text(history_.names(), row.value());
    return change.finish("corrected", detail, by);
}

Done ReadingStore::correct_time(const std::string& reading_id, StampedTime taken_at, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, true));
    ReadingChange change(history_, "the reading's time was not corrected");
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::closed));
    const StampedTime before = change.reading().taken_at;
    if (before.utc == taken_at.utc && before.offset_minutes == taken_at.offset_minutes)
        return invalid_input("The reading stands at this time already.",
                             "Give another time, or leave it as it is.");
    BOOST_OUTCOME_TRYV(change.set_time(taken_at));
    const std::string detail = "time of " + change.reading().name + ": " + utc_text(before.utc) + " -> " +
                               utc_text(taken_at.utc);
    return change.finish("corrected", detail, by);
}

Done ReadingStore::set_confirmed(const std::string& reading_id, const ValuePlace& place, bool confirmed,
                                 const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    ReadingChange change(history_, "the confirmation was not saved");
    BOOST_OUTCOME_TRYV(change.begin_unless_withdrawn(reading_id));
    Value where;
    where.quantity = place.quantity;
    where.place = place.place;
    where.phase = place.phase;
    const auto row = row_of(history_.names(), where);
    if (!row)
        return row.error();
    const ValueRow* const found = change.find(row.value());
    if (!found)
        return Problem{Problem::Kind::not_found,
                       "There is no value of " + value_name(where) + " in this reading.",
                       "Look at the reading again; another window may have changed it."};
    if (found->confirmed == confirmed)
        return done();
    ValueRow confirmed_row = *found;
    confirmed_row.confirmed = confirmed;
    BOOST_OUTCOME_TRYV(change.add_value(confirmed_row));
    return change.is_draft() ? change.finish()
                             : change.finish(confirmed ? "confirmed" : "no longer confirmed", value_name(where), by);
}

Done ReadingStore::withdraw(const std::string& reading_id, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, true));
    ReadingChange change(history_, "the reading was not withdrawn");
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::closed));
    BOOST_OUTCOME_TRYV(change.set_state(ReadingState::withdrawn));
    return change.finish("withdrawn", change.reading().name, by);
}

Done ReadingStore::restore(const std::string& reading_id, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, true));
    ReadingChange change(history_, "the reading was not brought back");
    BOOST_OUTCOME_TRYV(change.begin(reading_id, ReadingState::withdrawn));
    BOOST_OUTCOME_TRYV(change.set_state(ReadingState::closed));
    return change.finish("brought back", change.reading().name, by);
}

} // namespace evenstroke::storage
