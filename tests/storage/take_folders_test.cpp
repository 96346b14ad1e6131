// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"

#include <QDir>
#include <QSqlQuery>

#include <tuple>

namespace evenstroke::storage {
namespace {

/// Folders of engines, ships and fleets: which belong together, which are refused, which are left.
class TakingFolders : public StorageTest
{
};

TEST_F(TakingFolders, MergesFoldersOfOneEngineAndKeepsTheNewestParticulars)
{
    write(QStringLiteral("january/engine.json"), engine_json());
    write(QStringLiteral("january/readings.csv"), header + "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n");
    write(QStringLiteral("march/engine.json"),
          engine_json("Quiet Barley", "main engine", R"(, "limits": {"exhaust_temperature": 430})"));
    write(QStringLiteral("march/readings.csv"), header + "2029-03,2029-03-12T08:30Z,speed,,95.1,r/min\n");
    const auto history = memory();
    const QStringList folders = {path(QStringLiteral("january")), path(QStringLiteral("march"))};
    for (int time = 0; time < 2; ++time) {
        EXPECT_FALSE(value_of_result(take(*history, folders)).anything_refused());
        EXPECT_EQ(readings_of(*history).size(), 2U);
        const StoredEngine engine = value_of_result(VesselStore(*history).engine(only_engine(*history)));
        EXPECT_EQ(engine.revision, 2) << "taking the older one again is no new revision";
        EXPECT_EQ(engine.engine.limits.size(), 1U);
    }
}

TEST_F(TakingFolders, RefusesAnotherImoNumberForTheSameName)
{
    const auto json = [](const QByteArray& vessel, const QByteArray& engine) {
        return engine_json("X", engine).replace("\"X\"", vessel);
    };
    write(QStringLiteral("a/engine.json"), json(R"({"name": "Quiet Barley", "imo": "9000001"})", "one"));
    write(QStringLiteral("b/engine.json"), json(R"({"name": "Quiet Barley", "imo": "9000002"})", "two"));
    write(QStringLiteral("c/engine.json"), json(R"({"name": "Loud Barley", "imo": "9000001"})", "three"));
    write(QStringLiteral("d/engine.json"), json(R"({"name": "Quiet Barley", "flag": "none"})", "four"));
    const auto history = memory();
    const TakeReport report =
        value_of_result(take(*history, {path(QStringLiteral("a")), path(QStringLiteral("b")),
                                        path(QStringLiteral("c")), path(QStringLiteral("d"))}));
    EXPECT_TRUE(report.folders[0].taken);
    EXPECT_NE(report.folders[1].refused.front().reason.find("IMO number 9000001, not 9000002"),
              std::string::npos);
    EXPECT_NE(report.folders[2].refused.front().reason.find("as \"Quiet Barley\", not as \"Loud Barley\""),
              std::string::npos);
    EXPECT_TRUE(report.folders[3].taken);
    EXPECT_EQ(value_of_result(VesselStore(*history).find_vessel("Quiet Barley")).flag, "none");
}

TEST_F(TakingFolders, NamesTheFilesItDoesNotRead)
{
    write_ship();
    write(QStringLiteral("ship/notes.txt"), "x");
    write(QStringLiteral("ship/main/photo.jpg"), "x");
    write(QStringLiteral("ship/main/cards/2029-01/readme.txt"), "x");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("ship"));
    EXPECT_FALSE(report.anything_refused());
    ASSERT_EQ(report.ignored.size(), 1U);
    EXPECT_TRUE(report.ignored.front().ends_with("ship/notes.txt"));
    std::string remarks;
    for (const std::string& remark : report.folders[1].remarks)
        remarks += remark + "\n";
    EXPECT_NE(remarks.find("photo.jpg was ignored"), std::string::npos) << remarks;
    EXPECT_NE(remarks.find("readme.txt was ignored"), std::string::npos) << remarks;
    EXPECT_NE(remarks.find("\"colour\" was kept and not used"), std::string::npos) << remarks;
}

TEST_F(TakingFolders, RefusesSharedReadingsOfTwoShips)
{
    write(QStringLiteral("mixed/a/engine.json"), engine_json("Quiet Barley"));
    write(QStringLiteral("mixed/b/engine.json"), engine_json("Amber Mist"));
    write(QStringLiteral("mixed/ship_readings.csv"), "reading,taken_at,quantity,value,unit\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("mixed"));
    ASSERT_EQ(report.folders.size(), 3U);
    EXPECT_NE(
        report.folders[2].refused.front().reason.find("belong to \"Quiet Barley\" and to \"Amber Mist\""),
        std::string::npos);
}

TEST_F(TakingFolders, RefusesACylinderInTheShipsReadings)
{
    write_ship();
    write(QStringLiteral("ship/ship_readings.csv"),
          "reading,taken_at,quantity,value,unit\nnoon,2029-01-12T12:00Z,maximum_pressure,140,bar\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("ship"));
    EXPECT_NE(report.folders[2].refused.front().reason.find("not shared by the ship's engines"),
              std::string::npos);
}

TEST_F(TakingFolders, RefusesACardOfAReadingThatIsNotThere)
{
    write_ship();
    write(QStringLiteral("ship/main/cards/2028-12/A1.csv"), "crank_angle_deg,pressure_bar\n0,100\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("ship"));
    EXPECT_FALSE(report.folders[1].taken);
    EXPECT_TRUE(report.folders[1].refused.front().file.ends_with("cards/2028-12/A1.csv"));
}

TEST_F(TakingFolders, SaysWhichFoldersHoldNoEngine)
{
    QDir().mkpath(path(QStringLiteral("nothing/here")));
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("nothing"));
    ASSERT_EQ(report.folders.size(), 1U);
    EXPECT_FALSE(report.folders.front().taken);
}

TEST_F(TakingFolders, SaysThatAFileIsNoFolderAndWhatIsLostWithoutTheFolderAroundIt)
{
    write_ship();
    const auto history = memory();
    const std::string file = path(QStringLiteral("ship/ship_readings.csv")).toStdString();
    const TakeReport report = value_of_result(take(*history, {path(QStringLiteral("ship/ship_readings.csv")), path(QStringLiteral("ship/main"))}));
    ASSERT_FALSE(report.folders.empty());
    const std::string said = report.folders[report.folders.size() - 1].refused.front().text();
    EXPECT_EQ(said.rfind(file + ": This is a file, not a folder. Take the folder that holds it", 0), 0u) << said;
    EXPECT_NE(said.find("the whole ship"), std::string::npos) << said;
}

TEST_F(TakingFolders, RefusesAFolderThatIsNotThereAndTakesTheOthers)
{
    write_engine(QStringLiteral("good"), header + "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n");
    const auto history = memory();
    const TakeReport report =
        value_of_result(take(*history, {path(QStringLiteral("not there")), path(QStringLiteral("good"))}));
    ASSERT_EQ(report.folders.size(), 2U);
    EXPECT_TRUE(report.anything_refused());
    EXPECT_TRUE(report.anything_taken());
    EXPECT_TRUE(report.folders[0].taken);
    EXPECT_EQ(report.folders[1].refused.front().text(),
              path(QStringLiteral("not there")).toStdString() +
                  ": There is no folder of this name. Check the name of the folder.");
    EXPECT_EQ(report.folders[1].rows().refused, 0) << "a folder is no row";
    EXPECT_EQ(readings_of(*history).size(), 1U);
    const auto none = take(*history, {});
    ASSERT_FALSE(none.has_value());
    EXPECT_EQ(none.error().kind, Problem::Kind::invalid_input);
}

TEST_F(TakingFolders, TakesAFolderThatIsNamedTwiceOrTogetherWithTheOneAroundItOnce)
{
    write_ship();
    for (const QStringList& names :
         {QStringList{QStringLiteral("ship"), QStringLiteral("ship")},
          QStringList{QStringLiteral("ship/main"), QStringLiteral("ship")},
          QStringList{QStringLiteral("ship"), QStringLiteral("ship/main"), QStringLiteral("ship/./main")}}) {
        QStringList folders;
        for (const QString& name : names)
            folders << path(name);
        const auto history = memory();
        const TakeReport report = value_of_result(take(*history, folders));
        EXPECT_EQ(report.folders.size(), 3U) << "two engines and the ship's readings";
        EXPECT_FALSE(report.anything_refused()) << folders.join(QLatin1Char(' ')).toStdString();
    }
}

TEST_F(TakingFolders, CountsTheGoodAndTheBadOfAllFiles)
{
    write_ship();
    write(QStringLiteral("ship/main/events.csv"),
          "date,cylinder,kind,note\n2029-01-20,A2,overhaul,\n2029-01-22,,dance,\n");
    write(QStringLiteral("ship/main/cards/2029-01/A2.csv"), "crank_angle_deg,pressure_bar\n0,x\n");
    const FolderReport whole = take_folder(*memory(), QStringLiteral("ship")).folders[1];
    EXPECT_FALSE(whole.taken);
    EXPECT_EQ(whole.rows().fresh, 15) << "13 values, an event and a card";
    EXPECT_EQ(whole.rows().refused, 2);
    EXPECT_TRUE(whole.remarks.back().ends_with("2 rows refused, 15 good")) << whole.remarks.back();
    const FolderReport kept = take_folder(*memory(), QStringLiteral("ship"), true).folders[1];
    EXPECT_TRUE(kept.taken);
    EXPECT_EQ(kept.values.fresh, 13);
    EXPECT_EQ(kept.events.fresh, 1);
    EXPECT_EQ(kept.events.refused, 1);
    EXPECT_EQ(kept.cards.fresh, 1);
    EXPECT_EQ(kept.cards.refused, 1);
}

TEST_F(TakingFolders, DoesNotBlameTheCardsOfReadingsThatABadRowHeldBack)
{
    write_ship();
    write(QStringLiteral("ship/main/readings.csv"),
          header + "2029-01,2029-01-12T10:30Z,speed,,95.4,r/min\n2029-01,2029-01-12T10:30Z,moonlight,,1,%\n");
    const FolderReport report = take_folder(*memory(), QStringLiteral("ship")).folders[1];
    ASSERT_EQ(report.refused.size(), 1U);
    EXPECT_EQ(report.cards.fresh, 1);
    EXPECT_EQ(report.rows().refused, 1);
}

TEST_F(TakingFolders, NamesTheFileOfABadCardOnceWithItsLine)
{
    write_ship();
    write(QStringLiteral("ship/main/cards/2029-01/A2.csv"), "crank_angle_deg,pressure_bar\n0,101\n1,x\n");
    const FolderReport report = take_folder(*memory(), QStringLiteral("ship")).folders[1];
    ASSERT_EQ(report.refused.size(), 1U);
    EXPECT_EQ(report.refused.front().line, 3);
    EXPECT_NE(report.refused.front().text().find("A2.csv, line 3: The pressure"), std::string::npos)
        << report.refused.front().text();
}

TEST_F(TakingFolders, SaysThatTheDescriptionOfTheEngineChangedAndWhere)
{
    write_engine(QStringLiteral("engine"), header + "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n");
    const auto history = memory();
    EXPECT_TRUE(take_folder(*history, QStringLiteral("engine")).folders.front().remarks.empty());
    write(QStringLiteral("engine/engine.json"),
          engine_json("Quiet Barley", "main engine", R"(, "baseline": [{"load_percent": 50, "speed": 80}])")
              .replace("\"bore_mm\": 600", "\"bore_mm\": 620"));
    const FolderReport changed = take_folder(*history, QStringLiteral("engine")).folders.front();
    EXPECT_TRUE(changed.taken);
    ASSERT_EQ(changed.remarks.size(), 1U);
    EXPECT_EQ(
        changed.remarks.front(),
        "engine.json differs from what the history knew of the engine (baseline, bore_mm); it is kept as "
        "revision 2 of 2030-03-17, and all deviations, past ones too, are judged with it");
    EXPECT_TRUE(take_folder(*history, QStringLiteral("engine")).folders.front().remarks.empty())
        << "the same again is no change";
}

TEST_F(TakingFolders, RefusesToMakeAnotherEngineOfOneThatHasReadings)
{
    write_engine(QStringLiteral("engine"), header + "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n");
    const auto history = memory();
    take_folder(*history, QStringLiteral("engine"));
    for (const auto& [before, now, says] :
         {std::tuple{"two-stroke", "four-stroke", "describes a four-stroke of 6 cylinders"},
          std::tuple{"\"cylinders\": 6", "\"cylinders\": 7", "describes a two-stroke of 7 cylinders"}}) {
        const QByteArray former = engine_json();
        QByteArray other = former;
        ASSERT_TRUE(other.contains(before));
        write(QStringLiteral("engine/engine.json"), other.replace(before, now));
        const FolderReport report = take_folder(*history, QStringLiteral("engine")).folders.front();
        EXPECT_FALSE(report.taken);
        ASSERT_EQ(report.refused.size(), 1U);
        EXPECT_NE(report.refused.front().reason.find(says), std::string::npos)
            << report.refused.front().reason;
        EXPECT_NE(report.refused.front().expected.find("a name of its own"), std::string::npos);
    }
    EXPECT_EQ(value_of_result(VesselStore(*history).engine(only_engine(*history))).revision, 1);
}

TEST_F(TakingFolders, TakesADescriptionOfAnotherCycleWhereNothingWasReadYet)
{
    write(QStringLiteral("engine/engine.json"), engine_json());
    const auto history = memory();
    take_folder(*history, QStringLiteral("engine"));
    write(QStringLiteral("engine/engine.json"), engine_json().replace("two-stroke", "four-stroke"));
    EXPECT_TRUE(take_folder(*history, QStringLiteral("engine")).folders.front().taken);
}

TEST_F(TakingFolders, StoppedHalfwayLeavesTheHistoryAsItWas)
{
    write_ship();
    create();
    const QByteArray before = read(QStringLiteral("ship.evenstroke"));
    for (int steps = 0; steps < 12; ++steps) {
        const auto history = open();
        TakeOptions options;
        int left = steps;
        options.progress = [&](qint64 done, qint64 total) {
            EXPECT_LE(done, total);
            return left-- > 0;
        };
        const TakeReport report = value_of_result(take(*history, {path(QStringLiteral("ship"))}, options));
        EXPECT_TRUE(report.cancelled) << steps;
        EXPECT_EQ(read(QStringLiteral("ship.evenstroke")), before) << steps;
    }
}

TEST_F(TakingFolders, TakesBackTheFolderInWhichSomethingGoesWrongMidway)
{
    write_ship();
    const auto history = create();
    // Stands for whatever may refuse a row late, after readings were written.
    ASSERT_TRUE(
        QSqlQuery(history->database())
            .exec(QStringLiteral(
                "CREATE TEMP TRIGGER late BEFORE INSERT ON card BEGIN SELECT RAISE(ABORT, 'no'); END")));
    const auto report = take(*history, {path(QStringLiteral("ship"))});
    ASSERT_FALSE(report.has_value());
    EXPECT_TRUE(value_of_result(VesselStore(*history).vessels()).empty());
    EXPECT_TRUE(value_of_result(audit_entries(*history)).empty());
    ASSERT_TRUE(QSqlQuery(history->database()).exec(QStringLiteral("DROP TRIGGER late")));
    EXPECT_FALSE(take_folder(*history, QStringLiteral("ship")).anything_refused())
        << "nothing of the first try is in the way";
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

TEST_F(TakingFolders, TakesTheExampleFleet)
{
    const QString fleet = qEnvironmentVariable("EVENSTROKE_CHECK_DATA",
                                               QStringLiteral(EVENSTROKE_SOURCE_DIR "/../shared/data")) +
                          QStringLiteral("/example_fleet");
    if (!QDir(fleet).exists())
        GTEST_SKIP() << "the check data are not here: " << fleet.toStdString();
    const auto history = memory();
    const TakeReport report = value_of_result(take(*history, {fleet}));
    EXPECT_FALSE(report.anything_refused());
    EXPECT_EQ(report.folders.size(), 18U);
    qint64 values = 0;
    for (const FolderReport& folder : report.folders)
        values += folder.values.fresh;
    EXPECT_EQ(values, 55625); // lines of the files without their headers
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

} // namespace
} // namespace evenstroke::storage
