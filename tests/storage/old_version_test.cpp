// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/card_store.h"
#include "storage/content_hash.h"
#include "storage/flag_note_store.h"
#include "storage/healthy_cards.h"
#include "storage/schema.h"
#include "storage/value_rows.h"

#include <QSqlError>
#include <QSqlQuery>

namespace evenstroke::storage {
namespace {

/// Files of earlier versions hold the tables of their time and what could be entered then.
class OldVersion : public StorageTest
{
protected:
    /// A file as an earlier version wrote it: its own tables, and of a filled history the columns that it
    /// knew.
    void write_old(int version)
    {
        QSqlDatabase old = QSqlDatabase::addDatabase(QStringLiteral("QSQLITE"), QStringLiteral("old"));
        old.setDatabaseName(path(QStringLiteral("old.evenstroke")));
        ASSERT_TRUE(old.open());
        expect_done(migrate(old, 0, version));
        run(old, QStringLiteral("PRAGMA foreign_keys = OFF"));
        run(old, QStringLiteral("ATTACH '%1' AS filled").arg(path(QStringLiteral("ship.evenstroke"))));
        for (const QString& table :
             first_columns(old, QStringLiteral("SELECT name FROM main.sqlite_master WHERE type = 'table'"))) {
            const QString columns =
                first_columns(old,
                              QStringLiteral("SELECT name FROM pragma_table_info('%1', 'main')").arg(table))
                    .join(QLatin1Char(','));
            run(old, QStringLiteral("INSERT INTO main.%1 (%2) SELECT %2 FROM filled.%1").arg(table, columns));
        }
    }
    void TearDown() override { QSqlDatabase::removeDatabase(QStringLiteral("old")); }

    static void run(const QSqlDatabase& database, const QString& statement)
    {
        QSqlQuery query(database);
        ASSERT_TRUE(query.exec(statement)) << query.lastError().text().toStdString();
    }
    static QStringList first_columns(const QSqlDatabase& database, const QString& question)
    {
        QStringList names;
        QSqlQuery query(database);
        EXPECT_TRUE(query.exec(question)) << query.lastError().text().toStdString();
        while (query.next())
            names << query.value(0).toString();
        return names;
    }
};

TEST_F(OldVersion, ThreeIsBroughtUpToDateAndStaysSound)
{
    write_ship();
    std::vector<Reading> readings_before;
    std::string engine;
    {
        const auto history = create();
        take_folder(*history, QStringLiteral("ship"));
        engine = value_of_result(VesselStore(*history).find_engine("main engine", "Quiet Barley")).id;
        FlagNote note;
        note.words = "seen";
        note.who = "A. Chief";
        note.evidence = 4.0;
        value_of_result(FlagNoteStore(*history).add(engine, note));
        Value value = *find_value(value_of_result(ReadingStore(*history).load(engine)).front(), "speed");
        value.typed = "95.5";
        value.number.reset();
        value.value_si.reset();
        expect_done(ReadingStore(*history).correct(
            value_of_result(ReadingStore(*history).load(engine)).front().id, value, chief_));
        readings_before = value_of_result(ReadingStore(*history).load(engine));
    }
    write_old(3);
    QSqlDatabase::database(QStringLiteral("old")).close();
    const auto history = open(QStringLiteral("old.evenstroke"));
    EXPECT_EQ(history->version(), History::newest_version());
    const AuditFindings findings = value_of_result(verify(*history));
    EXPECT_TRUE(findings.sound()) << (findings.sentences.empty() ? "" : findings.sentences.front());
    const auto readings = value_of_result(ReadingStore(*history).load(engine));
    ASSERT_EQ(readings.size(), readings_before.size());
    EXPECT_EQ(readings.front().values.size(), readings_before.front().values.size());
    for (const Value& value : readings.front().values)
        EXPECT_EQ(value.origin, Origin::read);
    EXPECT_EQ(value_of_result(ReadingStore(*history).corrections(readings.front().id)).size(), 1U);
    EXPECT_EQ(value_of_result(FlagNoteStore(*history).load(engine)).size(), 1U);
    EXPECT_EQ(value_of_result(CardStore(*history).list(engine)).size(), 1U);
    EXPECT_TRUE(value_of_result(HealthyCardStore(*history).list(engine)).empty());
}

TEST_F(OldVersion, HashesOfValuesThatWereReadStayAsTheTrailHasThem)
{
    const auto history = memory();
    const ReadingRow reading{
        1, "r", "2029-01", {TimePoint(std::chrono::seconds(1'800'000'000)), 60}, ReadingState::closed, {}};
    ValueRow row;
    row.quantity_key = 999; // no quantity of this file: hashed as "?"
    row.place = 2004;
    row.typed = "141.5";
    row.value_si = 0.5;
    // By hand from the fields as version 3 hashed them: SHA-256 of
    // 1:r,7:2029-01,1800000000;60;1;1:?,2004;1;5:141.5,0:,3fe0000000000000;0:,0;0;0:,
    expect_done(history->names().make_ready());
    EXPECT_EQ(reading_hash(history->names(), reading, {&row}),
              "b212f76b306e74803531275594d692ffa1f2b9339aaecc999c0fd97f31b9ea87");
    row.origin = static_cast<int>(Origin::card);
    EXPECT_NE(reading_hash(history->names(), reading, {&row}),
              "b212f76b306e74803531275594d692ffa1f2b9339aaecc999c0fd97f31b9ea87");
}

} // namespace
} // namespace evenstroke::storage
