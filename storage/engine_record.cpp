// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/engine_record.h"

#include "storage/event_store.h"
#include "storage/flag_note_store.h"
#include "storage/reading_store.h"
#include "storage/sql.h"
#include "storage/transaction.h"
#include "storage/vessel_store.h"

namespace evenstroke::storage {

Result<LoadedRecord> load_record(History& history, const std::string& engine_id)
{
    const ReadTransaction same_state(history);
    auto engine = VesselStore(history).engine(engine_id);
    if (!engine)
        return engine.error();
    auto readings = ReadingStore(history).load(engine_id);
    if (!readings)
        return readings.error();
    auto events = EventStore(history).load(engine_id);
    if (!events)
        return events.error();
    auto notes = FlagNoteStore(history).load(engine_id);
    if (!notes)
        return notes.error();
    Query revision(history.database(), "SELECT input_revision FROM engine WHERE id = ?",
                   "the engine was not read");
    BOOST_OUTCOME_TRYV(revision.run(engine_id));
    if (!revision.next())
        return revision.problem();
    auto record = std::make_shared<EngineRecord>();
    record->vessel = std::move(engine.value().vessel);
    record->engine = std::move(engine.value().engine);
    record->readings = std::move(readings.value());
    record->events = std::move(events.value());
    record->notes = std::move(notes.value());
    return LoadedRecord{std::move(record), revision.integer(0)};
}

} // namespace evenstroke::storage
