// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/preference_store.h"
#include "storage/schema.h"
#include "storage/sql.h"

#include <QDir>
#include <QFile>
#include <QSqlDatabase>

#include <thread>

namespace evenstroke::storage {
namespace {

class HistoryFile : public StorageTest
{
protected:
    /// A history with one engine and a few readings, closed.
    QByteArray filled()
    {
        QByteArray readings = header;
        for (int month = 1; month <= 9; ++month)
            for (int cylinder = 1; cylinder <= 6; ++cylinder)
                readings += QStringLiteral("2029-0%1,2029-0%1-12T08:30Z,maximum_pressure,%2,14%2.5,bar\n")
                                .arg(month)
                                .arg(cylinder)
                                .toUtf8();
        write_engine(QStringLiteral("engine"), readings);
        const auto history = create();
        EXPECT_FALSE(take_folder(*history, QStringLiteral("engine")).anything_refused());
        return read(QStringLiteral("ship.evenstroke"));
    }
    Problem refused(const QString& name, OpenMode mode = OpenMode::read_write)
    {
        const QByteArray before = read(name);
        auto opened = History::open(path(name), mode, settings());
        EXPECT_FALSE(opened.has_value());
        EXPECT_EQ(read(name), before) << "a refused file must not be touched";
        return opened ? Problem{} : opened.error();
    }
};

TEST_F(HistoryFile, LeavesOneFileBehindWhenClosed)
{
    filled();
    EXPECT_EQ(QDir(path(QStringLiteral("."))).entryList(QDir::Files),
              QStringList{QStringLiteral("ship.evenstroke")});
}

TEST_F(HistoryFile, HasTheApplicationIdAndVersionInItsHeader)
{
    const QByteArray file = filled();
    EXPECT_EQ(file.mid(68, 4), QByteArray("EVST"));
    EXPECT_EQ(file.at(63), History::newest_version());
}

TEST_F(HistoryFile, IsNotMadeOverAFileThatIsThere)
{
    write(QStringLiteral("notes.txt"), "mine");
    const auto made = History::create(path(QStringLiteral("notes.txt")), settings());
    ASSERT_FALSE(made.has_value());
    EXPECT_EQ(made.error().kind, Problem::Kind::storage);
    EXPECT_EQ(read(QStringLiteral("notes.txt")), "mine");
}

TEST_F(HistoryFile, IsNotMadeInAFolderThatIsNotThere)
{
    const auto made = History::create(path(QStringLiteral("no/such/ship.evenstroke")), settings());
    ASSERT_FALSE(made.has_value());
    EXPECT_EQ(made.error().kind, Problem::Kind::storage);
}

TEST_F(HistoryFile, SaysWhenThereIsNone)
{
    const auto opened =
        History::open(path(QStringLiteral("none.evenstroke")), OpenMode::read_only, settings());
    ASSERT_FALSE(opened.has_value());
    EXPECT_EQ(opened.error().kind, Problem::Kind::not_found);
}

TEST_F(HistoryFile, RefusesWhatIsNoHistory)
{
    write(QStringLiteral("letter.evenstroke"), QByteArray(5000, 'x'));
    EXPECT_EQ(refused(QStringLiteral("letter.evenstroke")).kind, Problem::Kind::damaged_file);
    write(QStringLiteral("empty.evenstroke"), "");
    EXPECT_EQ(refused(QStringLiteral("empty.evenstroke")).what_happened, "\"empty.evenstroke\" is empty.");
}

TEST_F(HistoryFile, RefusesAnotherProgramsDatabase)
{
    {
        QSqlDatabase other = QSqlDatabase::addDatabase(QStringLiteral("QSQLITE"), QStringLiteral("other"));
        other.setDatabaseName(path(QStringLiteral("other.evenstroke")));
        ASSERT_TRUE(other.open());
        QSqlQuery(other).exec(QStringLiteral("CREATE TABLE song (name TEXT)"));
    }
    QSqlDatabase::removeDatabase(QStringLiteral("other"));
    EXPECT_EQ(refused(QStringLiteral("other.evenstroke")).what_happened,
              "\"other.evenstroke\" is a database of another program.");
}

TEST_F(HistoryFile, RefusesAFileOfALaterProgram)
{
    QByteArray file = filled();
    file[63] = static_cast<char>(History::newest_version() + 1); // last byte of user_version
    write(QStringLiteral("later.evenstroke"), file);
    const Problem problem = refused(QStringLiteral("later.evenstroke"));
    EXPECT_EQ(problem.kind, Problem::Kind::newer_file);
    EXPECT_NE(problem.what_happened.find("later version"), std::string::npos);
}

TEST_F(HistoryFile, RefusesAFileThatWasCutShort)
{
    const QByteArray file = filled();
    for (const qsizetype size : {qsizetype{150}, file.size() / 2, file.size() - 4096}) {
        write(QStringLiteral("cut.evenstroke"), file.left(size));
        EXPECT_EQ(refused(QStringLiteral("cut.evenstroke")).kind, Problem::Kind::damaged_file) << size;
    }
}

TEST_F(HistoryFile, RefusesFlippedBytesInThePageStructure)
{
    const QByteArray file = filled();
    for (qsizetype page = 1; page < file.size() / 4096; ++page) {
        QByteArray broken = file;
        broken[page * 4096] = static_cast<char>(broken.at(page * 4096) ^ 0x55); // the kind of page
        write(QStringLiteral("flipped.evenstroke"), broken);
        EXPECT_EQ(refused(QStringLiteral("flipped.evenstroke"), OpenMode::read_only).kind,
                  Problem::Kind::damaged_file)
            << page;
    }
}

/// "cut.evenstroke" with the journal of a write that a power cut left half done.
class CutWrite : public HistoryFile
{
protected:
    void SetUp() override
    {
        filled();
        const auto history = open();
        QSqlQuery query(history->database());
        ASSERT_TRUE(
            query.exec(QStringLiteral("PRAGMA cache_size = 2"))); // pages go to the disk before the commit
        ASSERT_TRUE(query.exec(QStringLiteral("BEGIN IMMEDIATE")));
        ASSERT_TRUE(query.exec(QStringLiteral("UPDATE value SET value_si = 0, typed = printf('%9000d', 0)")));
        // The files as they lie on the disk at this moment.
        for (const char* const ending : {"", "-journal"})
            write(QStringLiteral("cut.evenstroke") + QLatin1String(ending),
                  read(QStringLiteral("ship.evenstroke") + QLatin1String(ending)));
        ASSERT_FALSE(read(QStringLiteral("cut.evenstroke-journal")).startsWith(QByteArray(4, '\0')))
            << "nothing was written before the commit";
        query.exec(QStringLiteral("ROLLBACK"));
    }
};

TEST_F(CutWrite, IsTakenBackWhicheverWayTheFileIsOpened)
{
    const QByteArray cut = read(QStringLiteral("cut.evenstroke"));
    const QByteArray journal = read(QStringLiteral("cut.evenstroke-journal"));
    for (const OpenMode mode : {OpenMode::read_write, OpenMode::read_only}) {
        write(QStringLiteral("cut.evenstroke"), cut);
        write(QStringLiteral("cut.evenstroke-journal"), journal);
        const auto opened = open(QStringLiteral("cut.evenstroke"), mode);
        EXPECT_EQ(opened->mode(), mode);
        EXPECT_TRUE(value_of_result(verify(*opened)).sound());
        EXPECT_EQ(readings_of(*opened).front().values.front().typed, "141.5");
        EXPECT_FALSE(QFile::exists(path(QStringLiteral("cut.evenstroke-journal"))));
    }
}

TEST_F(CutWrite, IsExplainedWhereItCannotBeTakenBack)
{
    const QString folder = path(QStringLiteral("write protected"));
    ASSERT_TRUE(QDir().mkpath(folder));
    for (const char* const ending : {"", "-journal"}) {
        const QString name = QStringLiteral("write protected/cut.evenstroke") + QLatin1String(ending);
        write(name, read(QStringLiteral("cut.evenstroke") + QLatin1String(ending)));
        QFile::setPermissions(path(name), QFile::ReadOwner);
    }
    QFile::setPermissions(folder, QFile::ReadOwner | QFile::ExeOwner);
    const bool is_protected = !QFile(folder + QStringLiteral("/x")).open(QIODevice::WriteOnly);
    if (!is_protected) {
        QFile::setPermissions(folder, QFile::ReadOwner | QFile::WriteOwner | QFile::ExeOwner);
        GTEST_SKIP() << "this user may write everywhere, so nothing can be protected";
    }
    const Problem problem = refused(QStringLiteral("write protected/cut.evenstroke"), OpenMode::read_only);
    QFile::setPermissions(folder, QFile::ReadOwner | QFile::WriteOwner | QFile::ExeOwner);
    EXPECT_EQ(problem.kind, Problem::Kind::storage);
    EXPECT_NE(problem.what_happened.find("was cut off"), std::string::npos) << problem.text();
    EXPECT_NE(problem.what_to_do.find("-journal"), std::string::npos);
}

TEST_F(HistoryFile, SaysInPlainWordsThatItIsDamaged)
{
    const QByteArray file = filled();
    QByteArray broken = file;
    const qsizetype page = file.size() / 4096 / 2;
    broken[page * 4096] = static_cast<char>(broken.at(page * 4096) ^ 0x55);
    write(QStringLiteral("flipped.evenstroke"), broken);
    const std::string words = refused(QStringLiteral("flipped.evenstroke"), OpenMode::read_only).text();
    EXPECT_EQ(words.find("database"), std::string::npos) << words;
    EXPECT_EQ(words.find("***"), std::string::npos) << words;
}

TEST_F(HistoryFile, MadeByThisRunCanBeTakenAwayAgain)
{
    History::remove_new(create(QStringLiteral("new.evenstroke")));
    EXPECT_FALSE(QFile::exists(path(QStringLiteral("new.evenstroke"))));
    filled();
    History::remove_new(open());
    EXPECT_TRUE(QFile::exists(path(QStringLiteral("ship.evenstroke")))) << "was there before";
}

TEST_F(HistoryFile, MayHaveAnyNameThatAFileMayHave)
{
    const QString name = QStringLiteral("Schiff ü 100% ?mode=ro#1.evenstroke");
    create(name);
    EXPECT_TRUE(QFile::exists(path(name)));
    EXPECT_EQ(open(name)->version(), History::newest_version());
}

TEST_F(HistoryFile, WritesNothingWhenOpenForReadingOnly)
{
    filled();
    const auto history = open(QStringLiteral("ship.evenstroke"), OpenMode::read_only);
    const Done saved = PreferenceStore(*history).set_choice("", "page", std::string("fleet"));
    ASSERT_FALSE(saved.has_value());
    EXPECT_EQ(saved.error().kind, Problem::Kind::storage);
    EXPECT_EQ(readings_of(*history).size(), 9U);
}

TEST_F(HistoryFile, ShowsASecondWindowWhatTheFirstHasWritten)
{
    filled();
    const auto first = open(), second = open();
    const qint64 seen = second->seen_change();
    expect_done(PreferenceStore(*first).set_choice("", "page", std::string("fleet")));
    EXPECT_NE(second->seen_change(), seen);
    EXPECT_EQ(value_of_result(PreferenceStore(*second).choice("", "page")), "fleet");
}

TEST_F(HistoryFile, ShowsASecondWindowUnitsThatTheFirstHasNamed)
{
    filled();
    const auto first = open(), second = open();
    ASSERT_EQ(readings_of(*second).size(), 9U); // has read the names of units
    write_engine(QStringLiteral("more"), header + "2029-10,2029-10-12T08:30Z,maximum_pressure,1,14.55,MPa\n");
    ASSERT_FALSE(take_folder(*first, QStringLiteral("more")).anything_refused());
    const auto readings = readings_of(*second);
    ASSERT_EQ(readings.size(), 10U);
    const Value* const value = find_value(readings.back(), "maximum_pressure", Place::cylinder(1));
    ASSERT_NE(value, nullptr);
    EXPECT_EQ(unit(value->unit).symbol, "MPa");
}

TEST_F(HistoryFile, IsReadInAnotherThreadThroughAConnectionOfItsOwn)
{
    filled();
    const auto here = open();
    std::size_t readings = 0;
    std::thread worker([&] {
        const auto there =
            History::open(path(QStringLiteral("ship.evenstroke")), OpenMode::read_only, settings());
        readings = there ? readings_of(*there.value()).size() : 0;
    });
    worker.join();
    EXPECT_EQ(readings, 9U);
}

TEST_F(HistoryFile, KeepsForeignKeysChecked)
{
    const auto history = create();
    QSqlQuery query(history->database());
    EXPECT_FALSE(query.exec(QStringLiteral("INSERT INTO event (id, engine_key, date, offset_minutes, "
                                           "date_only, place, kind, note, done_by, part) "
                                           "VALUES ('x', 99, 0, 0, 1, 0, 'note', '', '', '')")));
}

TEST_F(HistoryFile, IsBroughtUpToDateFromVersionOne)
{
    // A file as the first version made it: its tables only.
    {
        QSqlDatabase old = QSqlDatabase::addDatabase(QStringLiteral("QSQLITE"), QStringLiteral("old"));
        old.setDatabaseName(path(QStringLiteral("old.evenstroke")));
        ASSERT_TRUE(old.open());
        expect_done(migrate(old, 0, 1));
        QSqlQuery query(old);
        ASSERT_TRUE(query.exec(QStringLiteral("INSERT INTO property VALUES ('id', 'abc')")));
        ASSERT_TRUE(query.exec(QStringLiteral("INSERT INTO vessel (id, name, imo, flag, class_society, "
                                              "class_number) VALUES ('v', 'Quiet Barley', '', '', '', '')")));
        ASSERT_FALSE(query.exec(QStringLiteral("SELECT * FROM card")));
    }
    QSqlDatabase::removeDatabase(QStringLiteral("old"));
    EXPECT_EQ(refused(QStringLiteral("old.evenstroke"), OpenMode::read_only).kind,
              Problem::Kind::invalid_input);
    const auto history = open(QStringLiteral("old.evenstroke"));
    EXPECT_EQ(history->version(), History::newest_version());
    EXPECT_EQ(history->id(), "abc");
    EXPECT_EQ(value_of_result(VesselStore(*history).vessels()).size(), 1U);
    QSqlQuery query(history->database());
    EXPECT_TRUE(query.exec(QStringLiteral("SELECT * FROM card")));
    EXPECT_TRUE(query.exec(QStringLiteral("PRAGMA foreign_keys")) && query.next() &&
                query.value(0).toInt() == 1);
}

TEST_F(HistoryFile, StaysAtItsVersionWhenAStepDoesNotSucceed)
{
    {
        QSqlDatabase old = QSqlDatabase::addDatabase(QStringLiteral("QSQLITE"), QStringLiteral("old"));
        old.setDatabaseName(path(QStringLiteral("old.evenstroke")));
        ASSERT_TRUE(old.open());
        expect_done(migrate(old, 0, 1));
        QSqlQuery(old).exec(
            QStringLiteral("CREATE TABLE card (in_the_way TEXT)")); // the second step makes this table
    }
    QSqlDatabase::removeDatabase(QStringLiteral("old"));
    const QByteArray before = read(QStringLiteral("old.evenstroke"));
    const auto opened =
        History::open(path(QStringLiteral("old.evenstroke")), OpenMode::read_write, settings());
    ASSERT_FALSE(opened.has_value());
    EXPECT_EQ(read(QStringLiteral("old.evenstroke")), before);
}

TEST_F(HistoryFile, KeepsQuantitiesOfALaterCatalogueAndLeavesThemOut)
{
    filled();
    const auto history = open();
    QSqlQuery query(history->database());
    ASSERT_TRUE(query.exec(QStringLiteral("INSERT INTO quantity_name (name) VALUES ('moon_phase')")));
    ASSERT_TRUE(query.exec(QStringLiteral(
        "INSERT INTO value (reading_key, quantity_key, place, phase, typed, value_si, missing, confirmed) "
        "SELECT 1, quantity_key, 0, 1, '0.5', 0.5, 0, 0 FROM quantity_name WHERE name = 'moon_phase'")));
    EXPECT_EQ(readings_of(*history).front().values.size(), 6U);
    ASSERT_TRUE(
        query.exec(QStringLiteral("SELECT typed FROM value_in_words WHERE quantity = 'moon_phase'")) &&
        query.next());
    EXPECT_EQ(query.value(0).toString(), QStringLiteral("0.5"));
}

} // namespace
} // namespace evenstroke::storage
