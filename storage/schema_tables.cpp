// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/schema.h"

namespace evenstroke::storage {
namespace {

// Rows are linked by small integer keys, which are this file's own; `id` is the UUID that names the same
// thing in every file, so that ship and shore merge without renumbering. Times are seconds since 1970 UTC.
// place: kind * 1000 + number; kind 0 engine, 1 ship, 2 cylinder, 3 turbocharger, 4 cooler.
// phase: 0 before, 1 reading, 2 after. state: 0 draft, 1 closed, 2 withdrawn.
// missing: 0 none, 1 not fitted, 2 not read, 3 out of order.

const std::vector<const char*> first_tables = {
    R"(CREATE TABLE property (name TEXT PRIMARY KEY, content TEXT NOT NULL) STRICT)",
    R"(CREATE TABLE quantity_name (quantity_key INTEGER PRIMARY KEY, name TEXT NOT NULL UNIQUE) STRICT)",
    R"(CREATE TABLE unit_name (unit_key INTEGER PRIMARY KEY, written TEXT NOT NULL UNIQUE) STRICT)",
    R"(CREATE TABLE vessel (
        vessel_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE, name TEXT NOT NULL UNIQUE,
        imo TEXT NOT NULL, flag TEXT NOT NULL, class_society TEXT NOT NULL, class_number TEXT NOT NULL) STRICT)",
    R"(CREATE TABLE engine (
        engine_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE,
        vessel_key INTEGER NOT NULL REFERENCES vessel, name TEXT NOT NULL,
        document TEXT NOT NULL, revision INTEGER NOT NULL,
        input_revision INTEGER NOT NULL, -- counts every change of what is judged
        UNIQUE (vessel_key, name)) STRICT)",
    R"(CREATE TABLE engine_revision (
        engine_key INTEGER NOT NULL REFERENCES engine, revision INTEGER NOT NULL, document TEXT NOT NULL,
        at INTEGER NOT NULL, who TEXT NOT NULL, why TEXT NOT NULL,
        PRIMARY KEY (engine_key, revision)) STRICT, WITHOUT ROWID)",
    R"(CREATE TABLE reading (
        reading_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE,
        vessel_key INTEGER NOT NULL REFERENCES vessel,
        engine_key INTEGER REFERENCES engine, -- NULL: shared by the ship's engines
        name TEXT NOT NULL, taken_at INTEGER NOT NULL, offset_minutes INTEGER NOT NULL,
        state INTEGER NOT NULL CHECK (state IN (0, 1, 2)), changed_at INTEGER NOT NULL) STRICT)",
    R"(CREATE UNIQUE INDEX reading_of_engine ON reading (engine_key, name) WHERE engine_key IS NOT NULL)",
    R"(CREATE UNIQUE INDEX reading_of_ship ON reading (vessel_key, name) WHERE engine_key IS NULL)",
    R"(CREATE INDEX reading_in_time ON reading (engine_key, taken_at))",
    R"(CREATE TABLE value (
        reading_key INTEGER NOT NULL REFERENCES reading,
        quantity_key INTEGER NOT NULL REFERENCES quantity_name,
        place INTEGER NOT NULL, phase INTEGER NOT NULL,
        typed TEXT NOT NULL,                        -- as typed, never rewritten
        unit_key INTEGER REFERENCES unit_name,      -- as typed; NULL: no unit
        value_si REAL,                              -- what the text means; NULL: words, or missing
        words TEXT,                                 -- choices and words
        missing INTEGER NOT NULL, confirmed INTEGER NOT NULL,
        place_typed TEXT,                           -- where the file wrote the place in another way
        PRIMARY KEY (reading_key, quantity_key, place, phase)) STRICT, WITHOUT ROWID)",
    R"(CREATE TABLE correction (
        correction_key INTEGER PRIMARY KEY, reading_key INTEGER NOT NULL REFERENCES reading,
        quantity_key INTEGER NOT NULL REFERENCES quantity_name, place INTEGER NOT NULL, phase INTEGER NOT NULL,
        old_typed TEXT NOT NULL, old_unit_key INTEGER REFERENCES unit_name, old_value_si REAL, old_words TEXT,
        old_missing INTEGER NOT NULL,
        new_typed TEXT NOT NULL, new_unit_key INTEGER REFERENCES unit_name, new_value_si REAL, new_words TEXT,
        new_missing INTEGER NOT NULL,
        at INTEGER NOT NULL, who TEXT NOT NULL, why TEXT NOT NULL) STRICT)",
    R"(CREATE INDEX correction_of_reading ON correction (reading_key))",
    R"(CREATE TABLE event (
        event_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE,
        engine_key INTEGER NOT NULL REFERENCES engine,
        date INTEGER NOT NULL, offset_minutes INTEGER NOT NULL, date_only INTEGER NOT NULL,
        place INTEGER NOT NULL, kind TEXT NOT NULL, note TEXT NOT NULL, running_hours REAL,
        done_by TEXT NOT NULL, part TEXT NOT NULL) STRICT)",
    R"(CREATE INDEX event_in_time ON event (engine_key, date))",
    R"(CREATE TABLE chosen_unit (
        engine_key INTEGER NOT NULL REFERENCES engine, quantity_key INTEGER NOT NULL REFERENCES quantity_name,
        place_kind INTEGER NOT NULL, unit_key INTEGER NOT NULL REFERENCES unit_name,
        PRIMARY KEY (engine_key, quantity_key, place_kind)) STRICT, WITHOUT ROWID)",
    R"(CREATE TABLE choice (
        engine_id TEXT NOT NULL, name TEXT NOT NULL, content TEXT NOT NULL,
        PRIMARY KEY (engine_id, name)) STRICT, WITHOUT ROWID)",
    R"(CREATE TABLE judgement (
        engine_key INTEGER PRIMARY KEY REFERENCES engine, method_version INTEGER NOT NULL,
        input_revision INTEGER NOT NULL, computed_at INTEGER NOT NULL, worst_level INTEGER NOT NULL,
        summary BLOB NOT NULL) STRICT)",
    // The bulk stands in a table of its own, so that the fleet page turns few pages of the file.
    R"(CREATE TABLE judgement_detail (
        engine_key INTEGER PRIMARY KEY REFERENCES engine, detail BLOB NOT NULL) STRICT)",
    R"(CREATE TABLE audit (
        number INTEGER PRIMARY KEY, at INTEGER NOT NULL, who TEXT NOT NULL, action TEXT NOT NULL,
        subject_kind TEXT NOT NULL, subject_id TEXT NOT NULL, detail TEXT NOT NULL, why TEXT NOT NULL,
        content_hash TEXT NOT NULL, row_hash TEXT NOT NULL) STRICT)",
    R"(CREATE INDEX audit_of_subject ON audit (subject_id))",
    R"(CREATE TRIGGER audit_no_update BEFORE UPDATE ON audit
        BEGIN SELECT RAISE(ABORT, 'the audit trail is only added to'); END)",
    R"(CREATE TRIGGER audit_no_delete BEFORE DELETE ON audit
        BEGIN SELECT RAISE(ABORT, 'the audit trail is only added to'); END)",
    R"(CREATE TRIGGER correction_no_update BEFORE UPDATE ON correction
        BEGIN SELECT RAISE(ABORT, 'corrections are only added to'); END)",
    R"(CREATE TRIGGER correction_no_delete BEFORE DELETE ON correction
        BEGIN SELECT RAISE(ABORT, 'corrections are only added to'); END)",
    R"(CREATE TRIGGER revision_no_update BEFORE UPDATE ON engine_revision
        BEGIN SELECT RAISE(ABORT, 'revisions are only added to'); END)",
    R"(CREATE TRIGGER revision_no_delete BEFORE DELETE ON engine_revision
        BEGIN SELECT RAISE(ABORT, 'revisions are only added to'); END)",
    // For people who look into the file with another tool.
    R"(CREATE VIEW value_in_words AS
        SELECT vessel.name AS vessel, engine.name AS engine, reading.name AS reading,
            strftime('%Y-%m-%dT%H:%MZ', reading.taken_at, 'unixepoch') AS taken_at,
            quantity_name.name AS quantity, value.place AS place, value.typed AS typed,
            unit_name.written AS unit, value.value_si AS value_si, value.words AS words
        FROM value JOIN reading USING (reading_key) JOIN vessel ON vessel.vessel_key = reading.vessel_key
            LEFT JOIN engine ON engine.engine_key = reading.engine_key
            JOIN quantity_name USING (quantity_key) LEFT JOIN unit_name USING (unit_key))",
};

const std::vector<const char*> card_tables = {
    R"(CREATE TABLE card (
        card_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE,
        reading_key INTEGER NOT NULL REFERENCES reading, cylinder INTEGER NOT NULL,
        samples INTEGER NOT NULL, trace BLOB NOT NULL, -- packed, see card_packing.h
        UNIQUE (reading_key, cylinder)) STRICT)",
};

// said: 0 seen, 1 no work was done, 2 withdrawn. level: as in core/trend/judgement.h.
const std::vector<const char*> flag_note_tables = {
    R"(CREATE TABLE flag_note (
        note_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE, engine_key INTEGER NOT NULL REFERENCES engine,
        place INTEGER NOT NULL, flagged_at INTEGER NOT NULL, said INTEGER NOT NULL, evidence REAL NOT NULL,
        level INTEGER NOT NULL, words TEXT NOT NULL, event_id TEXT NOT NULL, written_at INTEGER NOT NULL,
        who TEXT NOT NULL) STRICT)",
    R"(CREATE INDEX flag_note_of_engine ON flag_note (engine_key))",
    R"(CREATE TRIGGER flag_note_no_update BEFORE UPDATE ON flag_note
        BEGIN SELECT RAISE(ABORT, 'notes on flags are only added to'); END)",
    R"(CREATE TRIGGER flag_note_no_delete BEFORE DELETE ON flag_note
        BEGIN SELECT RAISE(ABORT, 'notes on flags are only added to'); END)",
};

// origin: 0 read by somebody, 1 from an indicator card (Origin in core/reading/reading.h).
const std::vector<const char*> card_result_tables = {
    R"(ALTER TABLE value ADD COLUMN origin INTEGER NOT NULL DEFAULT 0)",
    R"(ALTER TABLE correction ADD COLUMN old_origin INTEGER NOT NULL DEFAULT 0)",
    R"(ALTER TABLE correction ADD COLUMN new_origin INTEGER NOT NULL DEFAULT 0)",
    R"(CREATE TABLE healthy_cards (
        saying_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE, reading_key INTEGER NOT NULL REFERENCES reading,
        healthy INTEGER NOT NULL CHECK (healthy IN (0, 1)), -- 0: taken back
        words TEXT NOT NULL, said_at INTEGER NOT NULL, who TEXT NOT NULL) STRICT)",
    R"(CREATE INDEX healthy_cards_of_reading ON healthy_cards (reading_key))",
    R"(CREATE TRIGGER healthy_cards_no_update BEFORE UPDATE ON healthy_cards
        BEGIN SELECT RAISE(ABORT, 'what was said of cards is only added to'); END)",
    R"(CREATE TRIGGER healthy_cards_no_delete BEFORE DELETE ON healthy_cards
        BEGIN SELECT RAISE(ABORT, 'what was said of cards is only added to'); END)",
};

// Tables of their own, so that whoever asks for a reading's cards never meets one that was taken out of use.
const std::vector<const char*> withdrawn_card_tables = {
    R"(CREATE TABLE withdrawn_card (
        withdrawn_key INTEGER PRIMARY KEY, id TEXT NOT NULL UNIQUE, reading_key INTEGER NOT NULL REFERENCES reading,
        cylinder INTEGER NOT NULL, samples INTEGER NOT NULL, trace BLOB NOT NULL, -- as in card
        withdrawn_at INTEGER NOT NULL, who TEXT NOT NULL, why TEXT NOT NULL) STRICT)",
    R"(CREATE INDEX withdrawn_card_of_reading ON withdrawn_card (reading_key))",
};

} // namespace

std::span<const Migration> all_migrations()
{
    static const std::vector<Migration> steps = {
        {1, "readings, events and their audit trail", first_tables},
        {2, "indicator cards", card_tables},
        {3, "notes on flags", flag_note_tables},
        {4, "values that come from cards, and cards called healthy", card_result_tables},
        {5, "cards that were withdrawn", withdrawn_card_tables},
    };
    return steps;
}

int newest_schema_version()
{
    return all_migrations().back().to_version;
}

} // namespace evenstroke::storage
