// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/audit_writer.h"
#include "storage/content_hash.h"
#include "storage/engine_rows.h"
#include "storage/subject_hash.h"
#include "storage/transaction.h"

#include "core/plain_text.h"
#include "core/sentence_words.h"

#include <QUuid>

namespace evenstroke::storage {
namespace {

const std::string not_saved = "the engine was not saved";

struct FoundVessel
{
    qint64 key = 0;
    Vessel vessel;
};

Result<std::optional<FoundVessel>> find(History& history, const char* column, const std::string& value)
{
    Query row(
        history.database(),
        QStringLiteral(
            "SELECT vessel_key, id, name, imo, flag, class_society, class_number FROM vessel WHERE %1 = ?")
            .arg(QLatin1String(column)),
        not_saved);
    BOOST_OUTCOME_TRYV(row.run(value));
    std::optional<FoundVessel> found;
    if (row.next())
        found = FoundVessel{row.integer(0),
                            {row.text(1), row.text(2), row.text(3), row.text(4), row.text(5), row.text(6)}};
    BOOST_OUTCOME_TRYV(row.finished());
    return found;
}

Done write_vessel(History& history, AuditWriter& audit, const Vessel& vessel, bool is_new)
{
    Query write(history.database(),
                is_new ? "INSERT INTO vessel (name, imo, flag, class_society, class_number, id) VALUES (?, "
                         "?, ?, ?, ?, ?)"
                       : "UPDATE vessel SET name = ?, imo = ?, flag = ?, class_society = ?, class_number = ? "
                         "WHERE id = ?",
                "the vessel was not saved");
    BOOST_OUTCOME_TRYV(write.run(vessel.name, vessel.imo, vessel.flag, vessel.class_society,
                                 vessel.class_number, vessel.id));
    return audit.add({is_new ? "added" : "changed", "vessel", vessel.id, vessel.name, vessel_hash(vessel)});
}

/// A ship's IMO number is hers alone and never changes; names do.
std::optional<Problem> find_imo_problem(const std::optional<FoundVessel>& same_name,
                                        const std::optional<FoundVessel>& same_imo, const Vessel& vessel)
{
    if (same_name && !same_name->vessel.imo.empty() && !vessel.imo.empty() &&
        same_name->vessel.imo != vessel.imo)
        return invalid_input("The history knows " + evenstroke::quoted(vessel.name) + " with IMO number " +
                                 same_name->vessel.imo + ", not " + vessel.imo + ".",
                             "Correct the number, or give one of the two ships another name.");
    if (same_imo && same_imo->vessel.name != vessel.name)
        return invalid_input("The history knows the ship with IMO number " + vessel.imo + " as " +
                                 evenstroke::quoted(same_imo->vessel.name) + ", not as " +
                                 evenstroke::quoted(vessel.name) + ".",
                             "Correct the number, or rename the ship in the history first.");
    return std::nullopt;
}

/// Fills what is empty; answers whether anything was filled. What stands already is not written over.
bool complete(Vessel& stored, const Vessel& given, std::vector<std::string>& remarks)
{
    bool changed = false;
    const auto fill = [&](std::string& to, const std::string& from, const char* what) {
        if (to.empty() && !from.empty()) {
            to = from;
            changed = true;
        } else if (!from.empty() && to != from) {
            remarks.push_back(std::string("the history's ") + what + " " + to + " stays in force, not " +
                              from);
        }
    };
    fill(stored.imo, given.imo, "IMO number");
    fill(stored.flag, given.flag, "flag");
    fill(stored.class_society, given.class_society, "class");
    fill(stored.class_number, given.class_number, "class number");
    return changed;
}

Result<FoundVessel> take_vessel(History& history, AuditWriter& audit, const Vessel& given,
                                std::vector<std::string>& remarks)
{
    auto found = find(history, "name", given.name);
    if (!found)
        return found.error();
    std::optional<FoundVessel> same_imo;
    if (!given.imo.empty()) {
        const auto asked = find(history, "imo", given.imo);
        if (!asked)
            return asked.error();
        same_imo = asked.value();
    }
    if (const auto problem = find_imo_problem(found.value(), same_imo, given))
        return *problem;
    if (std::optional<FoundVessel>& stored = found.value()) {
        if (complete(stored->vessel, given, remarks)) {
            BOOST_OUTCOME_TRYV(write_vessel(history, audit, stored->vessel, false));
        }
        return *stored;
    }
    Vessel added = given;
    added.id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
    BOOST_OUTCOME_TRYV(write_vessel(history, audit, added, true));
    const auto written = find(history, "id", added.id);
    if (!written)
        return written.error();
    return *written.value();
}

Done add_revision(History& history, qint64 engine_key, int revision, const std::string& document,
                  const Signature& by)
{
    Query add(history.database(),
              "INSERT INTO engine_revision (engine_key, revision, document, at, who, why) VALUES (?, ?, ?, "
              "?, ?, ?)",
              not_saved);
    return add.run(engine_key, revision, document, seconds_of(history.now()), by.who, by.why);
}

struct FoundEngine
{
    qint64 key = 0;
    std::string id, name, document;
    int revision = 0;
};

Result<SavedEngine> add_engine(History& history, AuditWriter& audit, const FoundVessel& vessel,
                               const EngineDocument& document, const Signature& by)
{
    const std::string id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
    Query add(history.database(),
              "INSERT INTO engine (id, vessel_key, name, document, revision, input_revision) VALUES (?, ?, "
              "?, ?, 1, 1)",
              not_saved);
    BOOST_OUTCOME_TRYV(add.run(id, vessel.key, document.engine.name, document.text));
    BOOST_OUTCOME_TRYV(add_revision(history, add.inserted_key(), 1, document.text, by));
    BOOST_OUTCOME_TRYV(audit.add({"added", "engine", id, document.engine.name + " of " + vessel.vessel.name,
                                  engine_hash(id, document.engine.name, document.text)}));
    return SavedEngine{id, vessel.vessel.id, 1, SavedEngine::Outcome::made};
}

Result<bool> is_former_revision(History& history, const FoundEngine& engine, const std::string& document)
{
    Query rows(history.database(), "SELECT document FROM engine_revision WHERE engine_key = ?", not_saved);
    BOOST_OUTCOME_TRYV(rows.run(engine.key));
    while (rows.next())
        if (same_document(rows.text(0), document))
            return true;
    BOOST_OUTCOME_TRYV(rows.finished());
    return false;
}

/// Cylinders cannot go while readings of them stay.
Done check_cylinders(History& history, const FoundEngine& engine, int cylinders)
{
    Query highest(history.database(),
                  "SELECT max(v.place) FROM reading r JOIN value v USING (reading_key) WHERE r.engine_key = "
                  "? AND v.place BETWEEN 2001 AND 2999",
                  not_saved);
    BOOST_OUTCOME_TRYV(highest.run(engine.key));
    const int used = highest.next() && !highest.is_null(0) ? highest.small(0) - 2000 : 0;
    if (used > cylinders)
        return invalid_input("The history holds readings of cylinder " + std::to_string(used) +
                                 ", but the engine is said to have " + std::to_string(cylinders) +
                                 " cylinders.",
                             "Correct the number of cylinders.");
    return done();
}

/// Readings of four strokes mean nothing to a two-stroke, nor those of seven cylinders to six: a document
/// that says so is of another engine.
Done check_same_engine(History& history, const FoundEngine& engine, const Engine& given)
{
    const auto former = read_engine_document(engine.document, "The engine in the history");
    if (!former)
        return done(); // a document that cannot be read is there to be replaced
    const Engine& known = former.value().engine;
    if (known.kind == given.kind && known.cylinders == given.cylinders)
        return done();
    Query reading(history.database(), "SELECT 1 FROM reading WHERE engine_key = ? LIMIT 1", not_saved);
    BOOST_OUTCOME_TRYV(reading.run(engine.key));
    if (!reading.next())
        return reading.finished();
    const auto kind = [](const Engine& one) {
        return std::string(one.two_stroke() ? "two-stroke" : "four-stroke") + " of " +
               std::to_string(one.cylinders) + " cylinders";
    };
    return invalid_input("The history holds readings of " + evenstroke::quoted(engine.name) + " as a " +
                             kind(known) + ", but engine.json describes a " + kind(given) + ".",
                         "Give another engine a name of its own, or correct cycle and cylinders.");
}

Done change_engine(History& history, AuditWriter& audit, const FoundEngine& engine,
                   const EngineDocument& document, const Signature& by)
{
    BOOST_OUTCOME_TRYV(check_cylinders(history, engine, document.engine.cylinders));
    Query change(history.database(),
                 "UPDATE engine SET name = ?, document = ?, revision = ?, input_revision = input_revision + "
                 "1 WHERE engine_key = ?",
                 not_saved);
    BOOST_OUTCOME_TRYV(change.run(document.engine.name, document.text, engine.revision + 1, engine.key));
    BOOST_OUTCOME_TRYV(add_revision(history, engine.key, engine.revision + 1, document.text, by));
    return audit.add({"changed", "engine", engine.id, "revision " + std::to_string(engine.revision + 1),
                      engine_hash(engine.id, document.engine.name, document.text)});
}

Result<std::optional<FoundEngine>> engine_where(History& history, const char* condition,
                                                const std::string& value, qint64 vessel_key)
{
    Query row(
        history.database(),
        QStringLiteral(
            "SELECT engine_key, id, name, document, revision FROM engine WHERE %1 = ? AND vessel_key = ?")
            .arg(QLatin1String(condition)),
        not_saved);
    BOOST_OUTCOME_TRYV(row.run(value, vessel_key));
    std::optional<FoundEngine> found;
    if (row.next())
        found = FoundEngine{row.integer(0), row.text(1), row.text(2), row.text(3), row.small(4)};
    BOOST_OUTCOME_TRYV(row.finished());
    return found;
}

/// The engines' documents name the vessel too: they follow her particulars, so that files written from the
/// history say what it says.
Done rewrite_documents(History& history, AuditWriter& audit, const Vessel& vessel, const Signature& by)
{
    Query rows(history.database(),
               "SELECT engine_key, e.id, e.name, document, revision FROM engine e JOIN vessel v USING "
               "(vessel_key) WHERE v.id = ?",
               "the vessel was not saved");
    BOOST_OUTCOME_TRYV(rows.run(vessel.id));
    std::vector<FoundEngine> engines;
    while (rows.next())
        engines.push_back({rows.integer(0), rows.text(1), rows.text(2), rows.text(3), rows.small(4)});
    BOOST_OUTCOME_TRYV(rows.finished());
    for (const FoundEngine& engine : engines) {
        auto document = read_engine_document(engine.document, "The document of " + engine.name);
        if (!document)
            return document.error();
        EngineDocument& changed = document.value();
        changed.text = write_engine_document(vessel, changed.engine, engine.document);
        if (!same_document(changed.text, engine.document)) {
            BOOST_OUTCOME_TRYV(change_engine(history, audit, engine, changed, by));
        }
    }
    return done();
}

} // namespace

Result<TakenDocument> take_document(History& history, const EngineDocument& document, AuditWriter& audit)
{
    const Signature& by = audit.by();
    TakenDocument taken;
    const auto vessel = take_vessel(history, audit, document.vessel, taken.remarks);
    if (!vessel)
        return vessel.error();
    const auto found = engine_where(history, "name", document.engine.name, vessel.value().key);
    if (!found)
        return found.error();
    if (!found.value()) {
        const auto added = add_engine(history, audit, vessel.value(), document, by);
        if (!added)
            return added.error();
        taken.saved = added.value();
        return taken;
    }
    const FoundEngine& engine = *found.value();
    taken.saved = {engine.id, vessel.value().vessel.id, engine.revision, SavedEngine::Outcome::same};
    if (same_document(engine.document, document.text))
        return taken;
    const auto former = is_former_revision(history, engine, document.text);
    if (!former)
        return former.error();
    if (former.value()) {
        taken.saved.outcome = SavedEngine::Outcome::earlier;
        taken.remarks.push_back("engine.json is a former revision; revision " +
                                std::to_string(engine.revision) + " stays in force");
        return taken;
    }
    BOOST_OUTCOME_TRYV(check_same_engine(history, engine, document.engine));
    BOOST_OUTCOME_TRYV(change_engine(history, audit, engine, document, by));
    taken.remarks.push_back("engine.json differs from what the history knew of the engine (" +
                            comma_list(changed_keys(engine.document, document.text)) +
                            "); it is kept as revision " + std::to_string(engine.revision + 1) + " of " +
                            date_text(history.now()) +
                            ", and all deviations, past ones too, are judged with it");
    taken.saved.revision = engine.revision + 1;
    taken.saved.outcome = SavedEngine::Outcome::changed;
    return taken;
}

Result<SavedEngine> VesselStore::save_document(const std::string& text, const Signature& by)
{
    const auto document = read_engine_document(text, "engine.json");
    if (!document)
        return document.error();
    if (const auto problems = find_document_problems(document.value()); !problems.empty())
        return invalid_input(problems.front().reason, problems.front().expected);
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    AuditWriter audit(history_, by);
    const auto taken = take_document(history_, document.value(), audit);
    if (!taken)
        return taken.error();
    BOOST_OUTCOME_TRYV(transaction.commit());
    return taken.value().saved;
}

Result<SavedEngine> VesselStore::save_engine(const std::string& vessel_id, const Engine& engine,
                                             const Signature& by)
{
    Transaction transaction(history_, not_saved);
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto vessel = find(history_, "id", vessel_id);
    if (!vessel)
        return vessel.error();
    if (!vessel.value())
        return Problem{Problem::Kind::not_found, "The vessel is not in this history, so " + not_saved + ".",
                       "Add the vessel first."};
    const FoundVessel& ship = *vessel.value();
    const auto found = engine_where(history_, "id", engine.id, ship.key);
    const auto namesake = engine_where(history_, "name", engine.name, ship.key);
    if (!found || !namesake)
        return found ? namesake.error() : found.error();
    if (namesake.value() && namesake.value()->id != engine.id)
        return invalid_input("The vessel has an engine " + evenstroke::quoted(engine.name) + " already.",
                             "Give this one another name.");
    const std::string text =
        write_engine_document(ship.vessel, engine, found.value() ? found.value()->document : std::string());
    const auto document = read_engine_document(text, "The engine");
    if (!document)
        return document.error();
    if (const auto problems = find_document_problems(document.value()); !problems.empty())
        return invalid_input(problems.front().reason, problems.front().expected);
    AuditWriter audit(history_, by);
    SavedEngine saved{engine.id, vessel_id, 1, SavedEngine::Outcome::same};
    if (!found.value()) {
        const auto added = add_engine(history_, audit, ship, document.value(), by);
        if (!added)
            return added.error();
        saved = added.value();
    } else if (saved.revision = found.value()->revision; !same_document(found.value()->document, text)) {
        BOOST_OUTCOME_TRYV(change_engine(history_, audit, *found.value(), document.value(), by));
        saved = {engine.id, vessel_id, saved.revision + 1, SavedEngine::Outcome::changed};
    }
    BOOST_OUTCOME_TRYV(transaction.commit());
    return saved;
}

Result<std::string> VesselStore::save_vessel(const Vessel& vessel, const Signature& by)
{
    if (vessel.name.empty())
        return invalid_input("The vessel has no name.", "Give her name.");
    Transaction transaction(history_, "the vessel was not saved");
    BOOST_OUTCOME_TRYV(transaction.begin());
    const auto same_name = find(history_, "name", vessel.name);
    if (!same_name)
        return same_name.error();
    if (same_name.value() && same_name.value()->vessel.id != vessel.id)
        return invalid_input("A vessel " + evenstroke::quoted(vessel.name) + " is in the history already.",
                             "Choose another name, or change that one.");
    Vessel saved = vessel;
    if (vessel.id.empty())
        saved.id = from_qt(QUuid::createUuid().toString(QUuid::WithoutBraces));
    AuditWriter audit(history_, by);
    BOOST_OUTCOME_TRYV(write_vessel(history_, audit, saved, vessel.id.empty()));
    BOOST_OUTCOME_TRYV(rewrite_documents(history_, audit, saved, by));
    BOOST_OUTCOME_TRYV(transaction.commit());
    return saved.id;
}

} // namespace evenstroke::storage
