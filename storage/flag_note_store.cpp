// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/flag_note_store.h"

#include "core/plain_text.h"
#include "storage/audit_writer.h"
#include "storage/content_hash.h"
#include "storage/event_store.h"
#include "storage/flag_note_rows.h"
#include "storage/reading_change.h"
#include "storage/vessel_store.h"

#include <QUuid>

#include <algorithm>

namespace evenstroke::storage {
namespace {

const std::string not_saved = "the note on the flag was not saved";

const char* action_of(FlagNote::Said said)
{
    switch (said) {
    case FlagNote::Said::seen: return "flag seen";
    case FlagNote::Said::no_work: return "no work was done";
    case FlagNote::Said::withdrawn: return "note withdrawn";
    }
    return "";
}

std::optional<Problem> find_note_problem(const FlagNote& note, const Engine& engine)
{
    if (note.words.empty() && note.said == FlagNote::Said::seen)
        return invalid_input("The note on the flag says nothing, so it was not saved.",
                             "Write what was found or done, in a few words.");
    if (note.subject.kind == Place::Kind::cylinder &&
        (note.subject.number < 1 || note.subject.number > engine.cylinders))
        return invalid_input("The engine has no cylinder " + std::to_string(note.subject.number) + ".",
                             "Write a cylinder from 1 to " + std::to_string(engine.cylinders) + ".");
    return std::nullopt;
}

} // namespace

std::string flag_note_hash(const FlagNote& note, const std::string& engine_id)
{
    ContentHash content;
    content.add(note.id).add(engine_id).add(qint64{place_code(note.subject)});
    content.add(qint64{note.flagged_at.time_since_epoch().count()}).add(qint64{static_cast<int>(note.said)});
    content.add(std::optional(note.evidence)).add(qint64{static_cast<int>(note.level)});
    content.add(note.words).add(note.event_id).add(qint64{note.written_at.time_since_epoch().count()}).add(note.who);
    return content.hex();
}

Result<std::vector<FlagNote>> load_flag_notes(History& history, qint64 engine_key)
{
    Query rows(history.database(),
               "SELECT id, place, flagged_at, said, evidence, level, words, event_id, written_at, who FROM flag_note "
               "WHERE engine_key = ? ORDER BY note_key",
               "the notes on flags were not read");
    BOOST_OUTCOME_TRYV(rows.run(engine_key));
    std::vector<FlagNote> notes;
    while (rows.next()) {
        FlagNote note;
        note.id = rows.text(0);
        note.subject = place_of(rows.small(1));
        note.flagged_at = time_of(rows.integer(2));
        note.said = static_cast<FlagNote::Said>(rows.small(3));
        note.evidence = rows.real(4).value_or(0.0);
        note.level = static_cast<Level>(rows.small(5));
        note.words = rows.text(6);
        note.event_id = rows.text(7);
        note.written_at = time_of(rows.integer(8));
        note.who = rows.text(9);
        notes.push_back(std::move(note));
    }
    BOOST_OUTCOME_TRYV(rows.finished());
    return notes;
}

Result<std::vector<FlagNote>> FlagNoteStore::load(const std::string& engine_id) const
{
    const ReadTransaction same_state(history_);
    const auto keys = owner_keys(history_, Owner::engine(engine_id));
    if (!keys)
        return keys.error();
    return load_flag_notes(history_, keys.value().engine);
}

Result<std::string> FlagNoteStore::add(const std::string& engine_id, const FlagNote& wanted)
{
    FlagNote note = wanted;
    note.words = std::string(trimmed(note.words));
    note.who = std::string(trimmed(note.who));
    const Signature by{note.who, note.words};
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto keys = owner_keys(history_, Owner::engine(engine_id));
    const auto engine = VesselStore(history_).engine(engine_id);
    if (!keys || !engine)
        return keys ? engine.error() : keys.error();
    if (const auto problem = find_note_problem(note, engine.value().engine))
        return *problem;
    if (!note.event_id.empty()) {
        const auto events = EventStore(history_).load(engine_id);
        if (!events)
            return events.error();
        if (std::none_of(events.value().begin(), events.value().end(),
                         [&](const Event& event) { return event.id == note.event_id; }))
            return invalid_input("The event that the note is tied to is not in this engine's diary.",
                                 "Choose one of the diary, or none.");
    }
    note.id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
    note.written_at = std::chrono::floor<std::chrono::seconds>(history_.now());
    Query add(history_.database(),
              "INSERT INTO flag_note (id, engine_key, place, flagged_at, said, evidence, level, words, event_id, "
              "written_at, who) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)",
              not_saved);
    BOOST_OUTCOME_TRYV(add.run(note.id, keys.value().engine, place_code(note.subject), seconds_of(note.flagged_at),
                               static_cast<int>(note.said), note.evidence, static_cast<int>(note.level), note.words,
                               note.event_id, seconds_of(note.written_at), note.who));
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(audit.add({action_of(note.said), "flag note", note.id,
                                  (note.subject.number > 0 ? place_text(note.subject) : std::string("the engine")) +
                                      ", flag of " + date_text(note.flagged_at) + ": " + note.words,
                                  flag_note_hash(note, engine_id)}));
    BOOST_OUTCOME_TRYV(count_change(history_, {keys.value().vessel, keys.value().engine}));
    BOOST_OUTCOME_TRYV(transaction.commit());
    return note.id;
}

} // namespace evenstroke::storage
