// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/reading_change.h"

#include "core/plain_text.h"
#include "storage/sql.h"

#include <algorithm>

namespace evenstroke::storage {
namespace {

const char* state_words(ReadingState state)
{
    switch (state) {
    case ReadingState::draft:
        return "still a draft";
    case ReadingState::closed:
        return "closed";
    case ReadingState::withdrawn:
        return "withdrawn";
    }
    return "";
}

Result<OwnerKeys> owner_of(History& history, qint64 reading_key)
{
    Query row(history.database(),
              "SELECT vessel_key, coalesce(engine_key, 0) FROM reading WHERE reading_key = ?",
              "the reading was not read");
    BOOST_OUTCOME_TRYV(row.run(reading_key));
    if (!row.next())
        return row.problem();
    return OwnerKeys{row.integer(0), row.integer(1)};
}

} // namespace

Done ReadingChange::begin(const std::string& reading_id, ReadingState state)
{
    BOOST_OUTCOME_TRYV(transaction_.begin());
    BOOST_OUTCOME_TRYV(history_.names().make_ready());
    auto row = load_reading_row(history_, reading_id);
    if (!row)
        return row.error();
    reading_ = std::move(row.value());
    if (reading_.state != state)
        return invalid_input("The reading " + evenstroke::quoted(reading_.name) + " is " +
                                 state_words(reading_.state) + ", so " + undone_ + ".",
                             reading_.state == ReadingState::closed
                                 ? "Correct its values one by one; the old ones are kept."
                                 : "Close it or bring it back first.");
    const auto owner = owner_of(history_, reading_.key);
    auto values = load_value_rows(history_, reading_.key);
    if (!owner || !values)
        return owner ? values.error() : owner.error();
    owner_ = owner.value();
    values_ = std::move(values.value());
    return done();
}

Done ReadingChange::begin_unless_withdrawn(const std::string& reading_id)
{
    const auto row = load_reading_row(history_, reading_id);
    if (!row)
        return row.error();
    return begin(reading_id, row.value().state == ReadingState::draft ? ReadingState::draft : ReadingState::closed);
}

ValueRow* ReadingChange::find(const ValueRow& where)
{
    const auto found = std::find_if(values_.begin(), values_.end(),
                                    [&](const ValueRow& row) { return row.where() == where.where(); });
    return found == values_.end() ? nullptr : &*found;
}

Done ReadingChange::remove_value(const ValueRow& where)
{
    Query remove(history_.database(),
                 "DELETE FROM value WHERE reading_key = ? AND quantity_key = ? AND place = ? AND phase = ?",
                 undone_);
    BOOST_OUTCOME_TRYV(remove.run(reading_.key, where.quantity_key, where.place, where.phase));
    std::erase_if(values_, [&](const ValueRow& row) { return row.where() == where.where(); });
    return done();
}

Done ReadingChange::add_value(const ValueRow& value)
{
    BOOST_OUTCOME_TRYV(remove_value(value));
    ValueInserter insert(history_);
    BOOST_OUTCOME_TRYV(insert.add(reading_.key, value));
    values_.push_back(value);
    return insert.flush();
}

Done ReadingChange::set_state(ReadingState state)
{
    Query change(history_.database(), "UPDATE reading SET state = ? WHERE reading_key = ?", undone_);
    reading_.state = state;
    return change.run(static_cast<int>(state), reading_.key);
}

Done ReadingChange::set_time(StampedTime taken_at)
{
    Query change(history_.database(),
                 "UPDATE reading SET taken_at = ?, offset_minutes = ? WHERE reading_key = ?", undone_);
    reading_.taken_at = taken_at;
    return change.run(seconds_of(taken_at.utc), taken_at.offset_minutes, reading_.key);
}

Done ReadingChange::touch()
{
    Query change(history_.database(), "UPDATE reading SET changed_at = ? WHERE reading_key = ?", undone_);
    return change.run(seconds_of(history_.now()), reading_.key);
}

Done ReadingChange::finish()
{
    BOOST_OUTCOME_TRYV(touch());
    return transaction_.commit();
}

Done ReadingChange::finish(const char* action, const std::string& detail, const Signature& by)
{
    std::vector<const ValueRow*> rows;
    for (const ValueRow& row : values_)
        rows.push_back(&row);
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(
        audit.add({action, "reading", reading_.id, detail, reading_hash(history_.names(), reading_, rows)}));
    BOOST_OUTCOME_TRYV(count_change(history_, owner_));
    return finish();
}

Value completed(Value value)
{
    const Quantity& q = quantity(value.quantity);
    if (q.type != ValueType::number || value.value_si || value.typed.empty())
        return value;
    if (value.kind == PressureKind::none)
        value.kind = q.kind;
    const auto number = parse_number(value.typed);
    if (!number.has_value())
        return value;
    const auto value_si = to_si_checked(number.value(), {value.unit, value.kind});
    if (!value_si.has_value())
        return value;
    value.number = number.value();
    value.value_si = value_si.value();
    return value;
}

Done keep_correction(History& history, qint64 reading_key, const ValueRow& before, const ValueRow& after,
                     const Signature& by)
{
    Query keep(history.database(),
               "INSERT INTO correction (reading_key, quantity_key, place, phase, old_typed, old_unit_key, "
               "old_value_si, old_words, old_missing, "
               "old_origin, new_typed, new_unit_key, new_value_si, new_words, new_missing, new_origin, at, who, why) "
               "VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)",
               "the correction was not saved");
    const auto unit = [](const ValueRow& row) {
        return row.unit_key == 0 ? std::nullopt : std::optional(row.unit_key);
    };
    const auto words = [](const ValueRow& row) {
        return row.words.empty() ? std::nullopt : std::optional(row.words);
    };
    return keep.run(reading_key, after.quantity_key, after.place, after.phase, before.typed, unit(before),
                    before.value_si, words(before), before.missing, before.origin, after.typed, unit(after),
                    after.value_si, words(after), after.missing, after.origin, seconds_of(history.now()), by.who, by.why);
}

std::string value_text(const History::Names& names, const ValueRow& row)
{
    if (row.missing != 0) {
        const char* const words[] = {"", "not fitted", "not read", "out of order"};
        return words[std::min(row.missing, 3)];
    }
    const UnitInFile* const unit = names.unit(row.unit_key);
    return row.typed + (unit && !unit->written.empty() ? " " + unit->written : "") +
           (row.typed.empty() ? row.words : "");
}

Done check_signature(const Signature& by, bool with_reason)
{
    if (by.who.empty())
        return invalid_input("Nobody has signed the change.", "Give the name of who makes it.");
    if (with_reason && by.why.empty())
        return invalid_input("No reason is given for the change.",
                             "Say in a few words why; it is kept with the old value.");
    return done();
}

std::string value_name(const Value& value)
{
    const std::string& name = quantity(value.quantity).name;
    return value.place.number == 0 ? name : name + " of " + place_text(value.place);
}

} // namespace evenstroke::storage
