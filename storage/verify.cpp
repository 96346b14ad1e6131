// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/audit.h"

#include "storage/audit_writer.h"
#include "storage/card_rows.h"
#include "storage/content_hash.h"
#include "storage/event_rows.h"
#include "storage/flag_note_rows.h"
#include "storage/healthy_card_rows.h"
#include "storage/subject_hash.h"
#include "storage/transaction.h"
#include "storage/value_rows.h"
#include "storage/vessel_store.h"

#include <map>

namespace evenstroke::storage {
namespace {

const std::string not_verified = "the history was not checked to the end";
constexpr std::size_t most_sentences = 200; // of a file that does not fit at all, the first ones say enough

/// What the newest row of the trail says about a subject.
struct Claim
{
    qint64 number = 0;
    std::string kind, hash, detail;
    bool met = false;
};

class Verification
{
public:
    Verification(History& history, const Progress& progress) : history_(history), progress_(progress) {}
    Result<AuditFindings> run();

private:
    Done follow_chain();
    Done check_file();
    Done check_vessels();
    Done check_engines();
    Done check_readings();
    void check_reading(const ReadingRow& reading, const std::vector<ValueRow>& values);
    Done check_events();
    Done check_flag_notes();
    Done check_cards();
    Done check_healthy_cards();
    void compare(const std::string& kind, const std::string& id, const std::string& hash,
                 const std::string& name);
    void say(std::string sentence);
    Done go_on();

    History& history_;
    const Progress& progress_;
    AuditFindings findings_;
    std::map<std::string, Claim> claims_; ///< by id of the subject
    qint64 total_ = 0;
};

void Verification::say(std::string sentence)
{
    if (findings_.sentences.size() < most_sentences)
        findings_.sentences.push_back(std::move(sentence));
}

Done Verification::go_on()
{
    if (progress_ && !progress_(findings_.readings, total_))
        return Problem{Problem::Kind::storage, "The check was stopped, so " + not_verified + ".",
                       "Start it again when there is time."};
    return done();
}

Done Verification::check_file()
{
    Query pages(history_.database(), "PRAGMA integrity_check(20)", not_verified);
    BOOST_OUTCOME_TRYV(pages.run());
    while (pages.next())
        if (pages.text(0) != "ok")
            say("The file itself is damaged: " + pages.text(0) + ".");
    BOOST_OUTCOME_TRYV(pages.finished());
    Query links(history_.database(), "PRAGMA foreign_key_check", not_verified);
    BOOST_OUTCOME_TRYV(links.run());
    while (links.next())
        say("A row of the table " + links.text(0) + " points at one that is not there.");
    return links.finished();
}

Done Verification::follow_chain()
{
    Query rows(history_.database(),
               "SELECT number, at, who, action, subject_kind, subject_id, detail, why, content_hash, "
               "row_hash FROM audit ORDER BY number",
               not_verified);
    BOOST_OUTCOME_TRYV(rows.run());
    std::string previous;
    qint64 expected = 1;
    while (rows.next()) {
        const qint64 number = rows.integer(0);
        if (number != expected)
            say("The audit trail has a gap: row " + std::to_string(expected) + " is missing.");
        expected = number + 1;
        const std::string action = rows.text(3), kind = rows.text(4);
        const AuditedChange change{action.c_str(), kind.c_str(), rows.text(5), rows.text(6), rows.text(8)};
        const std::string stored = rows.text(9);
        if (audit_row_hash(previous, change, number, rows.integer(1), {rows.text(2), rows.text(7)}) != stored)
            say("Row " + std::to_string(number) + " of the audit trail (" + action + ", " + change.detail +
                ") was altered, or the row before it.");
        previous = stored;
        claims_[change.subject_id] = {number, kind, change.content_hash, change.detail, false};
        ++findings_.entries;
    }
    findings_.last_hash = previous;
    return rows.finished();
}

void Verification::compare(const std::string& kind, const std::string& id, const std::string& hash,
                           const std::string& name)
{
    const auto claim = claims_.find(id);
    if (claim == claims_.end()) {
        say("The " + kind + " " + name + " is not in the audit trail.");
        return;
    }
    claim->second.met = true;
    if (claim->second.hash != hash)
        say("The " + kind + " " + name + " is not as row " + std::to_string(claim->second.number) +
            " of the audit trail left it.");
}

Done Verification::check_vessels()
{
    const auto vessels = VesselStore(history_).vessels();
    if (!vessels)
        return vessels.error();
    for (const Vessel& vessel : vessels.value())
        compare("vessel", vessel.id, vessel_hash(vessel), vessel.name);
    return done();
}

Done Verification::check_engines()
{
    Query rows(history_.database(),
               "SELECT e.id, e.name, e.document, r.document FROM engine e LEFT JOIN engine_revision r ON "
               "r.engine_key = e.engine_key AND r.revision = e.revision",
               not_verified);
    BOOST_OUTCOME_TRYV(rows.run());
    while (rows.next()) {
        compare("engine", rows.text(0), engine_hash(rows.text(0), rows.text(1), rows.text(2)), rows.text(1));
        if (rows.text(2) != rows.text(3))
            say("The particulars of " + rows.text(1) + " are not those of their newest revision.");
    }
    return rows.finished();
}

void Verification::check_reading(const ReadingRow& reading, const std::vector<ValueRow>& values)
{
    // Of a draft the trail holds no content.
    std::string hash;
    if (reading.state != ReadingState::draft) {
        std::vector<const ValueRow*> pointers;
        for (const ValueRow& row : values)
            pointers.push_back(&row);
        hash = reading_hash(history_.names(), reading, std::move(pointers));
        findings_.values += static_cast<qint64>(values.size());
        ++findings_.readings;
    }
    compare("reading", reading.id, hash, reading.name);
}

/// Readings and all values side by side, both in the order of their keys: one pass over the file.
Done Verification::check_readings()
{
    const auto readings = load_all_reading_rows(history_);
    if (!readings)
        return readings.error();
    total_ = static_cast<qint64>(readings.value().size());
    Query rows(history_.database(),
               QLatin1String("SELECT reading_key, ") + QLatin1String(value_row_columns) +
                   QLatin1String(" FROM value ORDER BY reading_key"),
               not_verified);
    BOOST_OUTCOME_TRYV(rows.run());
    bool more = rows.next();
    std::vector<ValueRow> values;
    for (const ReadingRow& reading : readings.value()) {
        values.clear();
        for (; more && rows.integer(0) <= reading.key; more = rows.next())
            if (rows.integer(0) == reading.key) // a value of no reading was named by the check of the file
                values.push_back(value_row_of(rows, 1));
        check_reading(reading, values);
        if (findings_.readings % 256 == 0) {
            BOOST_OUTCOME_TRYV(go_on());
        }
    }
    return rows.finished();
}

Done Verification::check_events()
{
    Query rows(history_.database(), "SELECT engine_key, id FROM engine", not_verified);
    BOOST_OUTCOME_TRYV(rows.run());
    while (rows.next()) {
        const auto events = load_events(history_, rows.integer(0));
        if (!events)
            return events.error();
        for (const Event& event : events.value())
            compare("event", event.id, event_hash(event, rows.text(1)),
                    event.kind + " of " + date_text(event.date.utc));
    }
    return rows.finished();
}

Done Verification::check_flag_notes()
{
    Query rows(history_.database(), "SELECT engine_key, id FROM engine", not_verified);
    BOOST_OUTCOME_TRYV(rows.run());
    while (rows.next()) {
        const auto notes = load_flag_notes(history_, rows.integer(0));
        if (!notes)
            return notes.error();
        for (const FlagNote& note : notes.value())
            compare("flag note", note.id, flag_note_hash(note, rows.text(1)), "on the flag of " + date_text(note.flagged_at));
    }
    return rows.finished();
}

Done Verification::check_cards()
{
    Query rows(history_.database(),
               "SELECT c.id, r.name, c.cylinder, c.trace FROM card c JOIN reading r USING (reading_key) UNION ALL "
               "SELECT w.id, r.name, w.cylinder, w.trace FROM withdrawn_card w JOIN reading r USING (reading_key)",
               not_verified);
    BOOST_OUTCOME_TRYV(rows.run());
    while (rows.next())
        compare("card", rows.text(0), packed_card_hash(rows.text(0), rows.small(2), rows.bytes(3)),
                "of cylinder " + rows.text(2) + " in " + rows.text(1));
    return rows.finished();
}

Done Verification::check_healthy_cards()
{
    const auto sayings = load_healthy_sayings(history_);
    if (!sayings)
        return sayings.error();
    for (const HealthySaying& saying : sayings.value())
        compare("word on cards", saying.id, healthy_saying_hash(saying), "of " + date_text(saying.at));
    return done();
}

Result<AuditFindings> Verification::run()
{
    const ReadTransaction same_state(history_);
    BOOST_OUTCOME_TRYV(history_.names().make_ready());
    BOOST_OUTCOME_TRYV(check_file());
    BOOST_OUTCOME_TRYV(follow_chain());
    BOOST_OUTCOME_TRYV(check_vessels());
    BOOST_OUTCOME_TRYV(check_engines());
    BOOST_OUTCOME_TRYV(check_readings());
    BOOST_OUTCOME_TRYV(check_events());
    BOOST_OUTCOME_TRYV(check_flag_notes());
    BOOST_OUTCOME_TRYV(check_cards());
    BOOST_OUTCOME_TRYV(check_healthy_cards());
    BOOST_OUTCOME_TRYV(go_on());
    for (const auto& [id, claim] : claims_)
        if (!claim.met && !claim.hash.empty())
            say("The " + claim.kind + " of row " + std::to_string(claim.number) + " of the audit trail (" +
                claim.detail + ") is gone.");
    return std::move(findings_);
}

} // namespace

Result<AuditFindings> verify(History& history, const Progress& progress)
{
    return Verification(history, progress).run();
}

} // namespace evenstroke::storage
