// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/event_store.h"
#include "storage/sql.h"

#include <QCryptographicHash>

namespace evenstroke::storage {
namespace {

struct Tampering
{
    const char* name;
    std::vector<const char*> statements;
    const char* says; ///< part of a sentence that the check finds
};

class AuditTrail : public StorageTest
{
protected:
    std::unique_ptr<History> filled()
    {
        auto history = memory();
        write_engine(
            QStringLiteral("engine"),
            header +
                "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n2029-02,2029-02-12T08:30Z,speed,,95.1,r/min\n",
            "date,cylinder,kind,note\n2029-01-20,2,overhaul,rings\n");
        write(QStringLiteral("engine/cards/2029-01/1.csv"), "crank_angle_deg,pressure_bar\n-1,100\n0,101\n");
        EXPECT_FALSE(take_folder(*history, QStringLiteral("engine")).anything_refused());
        return history;
    }
};
class TamperedHistory : public AuditTrail, public testing::WithParamInterface<Tampering>
{
};

TEST_F(AuditTrail, HoldsWhoDidWhatAndWhen)
{
    const auto history = filled();
    const auto entries = value_of_result(audit_entries(*history));
    ASSERT_EQ(entries.size(), 6U); // vessel, engine, two readings, an event, a card
    EXPECT_EQ(entries.front().number, 6);
    EXPECT_EQ(entries.back().action, "added");
    EXPECT_EQ(entries.back().subject_kind, "vessel");
    EXPECT_EQ(entries.back().who, "taken in from files");
    EXPECT_EQ(entries.back().at, now_);
    EXPECT_EQ(value_of_result(audit_state(*history)).last_hash, entries.front().row_hash);
}

TEST_F(AuditTrail, IsSoundAsWritten)
{
    const auto history = filled();
    const AuditFindings findings = value_of_result(verify(*history));
    EXPECT_TRUE(findings.sound()) << findings.sentences.front();
    EXPECT_EQ(findings.entries, 6);
    EXPECT_EQ(findings.readings, 2);
    EXPECT_EQ(findings.values, 2);
}

TEST_F(AuditTrail, IsOnlyAddedTo)
{
    const auto history = filled();
    QSqlQuery query(history->database());
    for (const char* const statement :
         {"UPDATE audit SET who = 'nobody'", "DELETE FROM audit", "UPDATE engine_revision SET who = 'nobody'",
          "DELETE FROM engine_revision"})
        EXPECT_FALSE(query.exec(QString::fromLatin1(statement))) << statement;
}

TEST_F(AuditTrail, ChainsItsRowsBySha256OverTheirFields)
{
    // Computed here from the description alone: each field with its length, numbers with a semicolon.
    const auto history = filled();
    const AuditEntry first = value_of_result(audit_entries(*history)).back();
    const auto field = [](const std::string& text) { return std::to_string(text.size()) + ":" + text + ","; };
    const std::string row = field("") + "1;" + std::to_string(now_.time_since_epoch().count()) + ";" +
                            field(first.who) + field(first.action) + field(first.subject_kind) +
                            field(first.subject_id) + field(first.detail) + field(first.why) +
                            field(first.content_hash);
    EXPECT_EQ(QCryptographicHash::hash(QByteArray::fromStdString(row), QCryptographicHash::Sha256)
                  .toHex()
                  .toStdString(),
              first.row_hash);
}

TEST_F(AuditTrail, CheckCanBeStopped)
{
    const auto history = filled();
    EXPECT_FALSE(verify(*history, [](qint64, qint64) { return false; }).has_value());
}

TEST_P(TamperedHistory, IsFoundByTheCheck)
{
    const auto history = filled();
    QSqlQuery query(history->database());
    query.exec(QStringLiteral("PRAGMA foreign_keys = OFF"));
    for (const char* const trigger : {"audit_no_update", "audit_no_delete", "revision_no_update"})
        ASSERT_TRUE(query.exec(QStringLiteral("DROP TRIGGER %1").arg(QLatin1String(trigger))));
    for (const char* const statement : GetParam().statements)
        ASSERT_TRUE(query.exec(QString::fromLatin1(statement)))
            << statement << query.lastError().text().toStdString();
    const AuditFindings findings = value_of_result(verify(*history));
    bool said = false;
    std::string all;
    for (const std::string& sentence : findings.sentences) {
        said = said || sentence.find(GetParam().says) != std::string::npos;
        all += sentence + "\n";
    }
    EXPECT_TRUE(said) << all;
}

INSTANTIATE_TEST_SUITE_P(
    Ways, TamperedHistory,
    testing::Values(
        Tampering{"ValueChanged",
                  {"UPDATE value SET value_si = value_si * 1.01 WHERE reading_key = 1"},
                  "The reading 2029-01 is not as row 3"},
        Tampering{"TypedTextChanged",
                  {"UPDATE value SET typed = '95.5' WHERE reading_key = 2"},
                  "The reading 2029-02 is not as"},
        Tampering{"TimeChanged",
                  {"UPDATE reading SET taken_at = taken_at - 86400 WHERE reading_key = 1"},
                  "The reading 2029-01 is not as"},
        Tampering{"ReadingRemoved",
                  {"DELETE FROM value WHERE reading_key = 2", "DELETE FROM reading WHERE reading_key = 2"},
                  "(2029-02, 1 values) is gone"},
        Tampering{"ReadingWithdrawnInSilence",
                  {"UPDATE reading SET state = 2 WHERE reading_key = 1"},
                  "The reading 2029-01 is not as"},
        Tampering{"ReadingTurnedIntoADraft",
                  {"UPDATE reading SET state = 0 WHERE reading_key = 1"},
                  "The reading 2029-01"},
        Tampering{"ReadingSlippedIn",
                  {"INSERT INTO reading (id, vessel_key, engine_key, name, taken_at, offset_minutes, state, "
                   "changed_at) VALUES ('x', 1, 1, 'new', 0, 0, 1, 0)"},
                  "The reading new is not in the audit trail"},
        Tampering{"EventChanged", {"UPDATE event SET date = date + 86400"}, "The event overhaul"},
        Tampering{"CardChanged", {"UPDATE card SET cylinder = 2"}, "The card of cylinder 2"},
        Tampering{"EngineChanged",
                  {"UPDATE engine SET document = replace(document, '600', '610')"},
                  "The engine main engine is not as"},
        Tampering{
            "VesselRenamed", {"UPDATE vessel SET name = 'Loud Barley'"}, "The vessel Loud Barley is not as"},
        Tampering{"TrailRowChanged",
                  {"UPDATE audit SET who = 'nobody' WHERE number = 3"},
                  "Row 3 of the audit trail"},
        Tampering{"TrailRowRemoved", {"DELETE FROM audit WHERE number = 4"}, "row 4 is missing"},
        Tampering{"TrailCutAtTheEnd",
                  {"DELETE FROM audit WHERE number > 3"},
                  "The reading 2029-02 is not in the audit trail"}),
    [](const auto& one) { return std::string(one.param.name); });

} // namespace
} // namespace evenstroke::storage
