// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/event_store.h"

#include "core/plain_text.h"
#include "storage/audit_writer.h"
#include "storage/event_rows.h"
#include "storage/reading_change.h"
#include "storage/subject_hash.h"
#include "storage/vessel_store.h"

#include <QUuid>

#include <algorithm>
#include <cmath>

namespace evenstroke::storage {
namespace {

const char* const columns = "SELECT v.id, v.date, v.offset_minutes, v.date_only, v.place, v.kind, v.note, "
                            "v.running_hours, v.done_by, v.part FROM event v ";
const std::string not_saved = "the event was not saved";

Event event_of(const Query& row)
{
    Event event;
    event.id = row.text(0);
    event.date = {time_of(row.integer(1)), row.small(2)};
    event.date_only = row.small(3) != 0;
    event.place = place_of(row.small(4));
    event.kind = row.text(5);
    event.note = row.text(6);
    event.running_hours = row.real(7);
    event.done_by = row.text(8);
    event.part = row.text(9);
    return event;
}

Result<std::vector<Event>> read_events(Query& rows)
{
    std::vector<Event> events;
    while (rows.next())
        events.push_back(event_of(rows));
    BOOST_OUTCOME_TRYV(rows.finished());
    return events;
}

bool concerns_ship(const Event& event)
{
    const EventKind* const kind = find_event_kind(event.kind);
    return kind && kind->concerns == "ship";
}

struct FoundEvent
{
    OwnerKeys owner;
    std::string engine_id;
    Event event;
};

Result<FoundEvent> find_event(History& history, const std::string& event_id)
{
    Query row(history.database(),
              "SELECT v.id, v.date, v.offset_minutes, v.date_only, v.place, v.kind, v.note, v.running_hours, "
              "v.done_by, v.part, "
              "e.vessel_key, e.engine_key, e.id FROM event v JOIN engine e USING (engine_key) WHERE v.id = ?",
              not_saved);
    BOOST_OUTCOME_TRYV(row.run(event_id));
    if (row.next())
        return FoundEvent{{row.integer(10), row.integer(11)}, row.text(12), event_of(row)};
    BOOST_OUTCOME_TRYV(row.finished());
    return Problem{Problem::Kind::not_found, "The event is not in this history.",
                   "Look at the list again; another window may have changed it."};
}

/// Blanks around a text would not come back from a file.
Event trimmed_event(Event event)
{
    for (std::string* const text : {&event.note, &event.done_by, &event.part})
        *text = std::string(trimmed(*text));
    return event;
}

std::string described(const Event& event)
{
    return event.kind + (event.place.number > 0 ? " of " + place_text(event.place) : "") + " on " +
           date_text(event.date.utc);
}

} // namespace

std::optional<Problem> find_event_problem(const Event& event, const Engine& engine)
{
    if (!find_event_kind(event.kind)) {
        std::string kinds;
        for (const EventKind& kind : all_event_kinds())
            kinds += (kinds.empty() ? "" : ", ") + kind.name;
        return invalid_input("The kind of event " + evenstroke::quoted(event.kind) + " is not known.",
                             "Write one of " + kinds + ".");
    }
    if (event.place.kind == Place::Kind::cylinder &&
        (event.place.number < 1 || event.place.number > engine.cylinders))
        return invalid_input("The engine has no cylinder " + std::to_string(event.place.number) + ".",
                             "Write a cylinder from 1 to " + std::to_string(engine.cylinders) + ".");
    if (event.running_hours && !(std::isfinite(*event.running_hours) && *event.running_hours >= 0.0))
        return invalid_input("The running hours are " + number_text(*event.running_hours) +
                                 ", which cannot be.",
                             "Write hours of zero or more, or leave them out.");
    return std::nullopt;
}

bool same_event(const Event& a, const Event& b)
{
    return a.date.utc == b.date.utc && a.date_only == b.date_only && a.place == b.place && a.kind == b.kind &&
           a.note == b.note && a.running_hours == b.running_hours && a.done_by == b.done_by &&
           a.part == b.part;
}

Done insert_event(History& history, qint64 engine_key, const Event& event)
{
    Query add(history.database(),
              "INSERT INTO event (id, engine_key, date, offset_minutes, date_only, place, kind, note, "
              "running_hours, done_by, part) "
              "VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)",
              not_saved);
    return add.run(event.id, engine_key, seconds_of(event.date.utc), event.date.offset_minutes,
                   event.date_only ? 1 : 0, place_code(event.place), event.kind, event.note,
                   event.running_hours, event.done_by, event.part);
}

Done count_event(History& history, qint64 vessel_key, qint64 engine_key, const Event& event)
{
    return count_change(history, {vessel_key, concerns_ship(event) ? 0 : engine_key});
}

Result<std::vector<Event>> load_events(History& history, qint64 engine_key)
{
    Query rows(history.database(),
               QString::fromLatin1(columns) +
                   QStringLiteral("WHERE v.engine_key = ? ORDER BY v.date, v.event_key"),
               "the events were not read");
    BOOST_OUTCOME_TRYV(rows.run(engine_key));
    return read_events(rows);
}

Result<std::vector<Event>> EventStore::load_own(const std::string& engine_id) const
{
    const auto keys = owner_keys(history_, Owner::engine(engine_id));
    if (!keys)
        return keys.error();
    return load_events(history_, keys.value().engine);
}

Result<std::vector<Event>> EventStore::load(const std::string& engine_id) const
{
    const ReadTransaction same_state(history_);
    const auto keys = owner_keys(history_, Owner::engine(engine_id));
    if (!keys)
        return keys.error();
    auto events = load_events(history_, keys.value().engine);
    if (!events)
        return events;
    Query others(history_.database(),
                 QString::fromLatin1(columns) +
                     QStringLiteral("JOIN engine e USING (engine_key) WHERE e.vessel_key = ? AND "
                                    "e.engine_key <> ? ORDER BY v.date, v.event_key"),
                 "the events were not read");
    BOOST_OUTCOME_TRYV(others.run(keys.value().vessel, keys.value().engine));
    const auto shared = read_events(others);
    if (!shared)
        return shared;
    std::vector<Event>& all = events.value();
    for (const Event& event : shared.value()) {
        // The same docking may have been written with each engine.
        const bool known = std::any_of(all.begin(), all.end(), [&](const Event& mine) {
            return mine.kind == event.kind && mine.date.utc == event.date.utc && mine.place == event.place;
        });
        if (!concerns_ship(event) || known)
            continue;
        all.push_back(event);
        all.back().running_hours.reset(); // the other engine's counter
    }
    std::stable_sort(all.begin(), all.end(),
                     [](const Event& a, const Event& b) { return a.date.utc < b.date.utc; });
    return events;
}

Result<std::string> EventStore::add(const std::string& engine_id, const Event& event, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto keys = owner_keys(history_, Owner::engine(engine_id));
    const auto engine = VesselStore(history_).engine(engine_id);
    if (!keys || !engine)
        return keys ? engine.error() : keys.error();
    if (const auto problem = find_event_problem(event, engine.value().engine))
        return *problem;
    Event added = trimmed_event(event);
    added.id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
    BOOST_OUTCOME_TRYV(insert_event(history_, keys.value().engine, added));
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(
        audit.add({"added", "event", added.id, described(added), event_hash(added, engine_id)}));
    BOOST_OUTCOME_TRYV(count_event(history_, keys.value().vessel, keys.value().engine, added));
    BOOST_OUTCOME_TRYV(transaction.commit());
    return added.id;
}

Done EventStore::change(const Event& changed, const Signature& by)
{
    Event event = trimmed_event(changed);
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto found = find_event(history_, event.id);
    if (!found)
        return found.error();
    const FoundEvent& old = found.value();
    if (concerns_ship(old.event) && !event.running_hours)
        event.running_hours = old.event.running_hours; // another engine's diary does not show them
    const auto engine = VesselStore(history_).engine(old.engine_id);
    if (!engine)
        return engine.error();
    if (const auto problem = find_event_problem(event, engine.value().engine))
        return *problem;
    Query change(history_.database(),
                 "UPDATE event SET date = ?, offset_minutes = ?, date_only = ?, place = ?, kind = ?, note = "
                 "?, running_hours = ?, done_by = ?, part = ? WHERE id = ?",
                 not_saved);
    BOOST_OUTCOME_TRYV(change.run(seconds_of(event.date.utc), event.date.offset_minutes,
                                  event.date_only ? 1 : 0, place_code(event.place), event.kind, event.note,
                                  event.running_hours, event.done_by, event.part, event.id));
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(audit.add(
        {"changed", "event", event.id,
         described(old.event) + " (" + old.event.note + ") -> " + described(event) + " (" + event.note + ")",
         event_hash(event, old.engine_id)}));
    BOOST_OUTCOME_TRYV(count_event(history_, old.owner.vessel, old.owner.engine,
                                   concerns_ship(old.event) ? old.event : event));
    return transaction.commit();
}

Done EventStore::remove(const std::string& event_id, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_signature(by, false));
    Transaction transaction(history_, "the event was not removed");
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto found = find_event(history_, event_id);
    if (!found)
        return found.error();
    Query remove(history_.database(), "DELETE FROM event WHERE id = ?", "the event was not removed");
    BOOST_OUTCOME_TRYV(remove.run(event_id));
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(
        audit.add({"removed", "event", event_id,
                   described(found.value().event) + " (" + found.value().event.note + ")", ""}));
    BOOST_OUTCOME_TRYV(
        count_event(history_, found.value().owner.vessel, found.value().owner.engine, found.value().event));
    return transaction.commit();
}

} // namespace evenstroke::storage
