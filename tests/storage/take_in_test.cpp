// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "core/reading/typed_number.h"
#include "core/trend/conditions.h"
#include "storage/audit.h"
#include "storage/card_store.h"
#include "storage/event_store.h"
#include "storage/sql.h"

#include <QDir>

#include <tuple>

namespace evenstroke::storage {
namespace {

class TakingIn : public StorageTest
{
protected:
    std::string engine_named(History& history, const char* name)
    {
        return value_of_result(VesselStore(history).find_engine(name)).id;
    }
};

TEST_F(TakingIn, KeepsWhatWasTypedBesideWhatItMeans)
{
    write_ship();
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("ship"));
    EXPECT_FALSE(report.anything_refused());
    const auto readings = value_of_result(
        ReadingStore(*history).load_own(Owner::engine(engine_named(*history, "main engine"))));
    ASSERT_EQ(readings.size(), 2U);
    const Reading& reading = readings.front();
    EXPECT_EQ(utc_text(reading.taken_at.utc), "2029-01-12T08:30Z");
    EXPECT_EQ(reading.taken_at.offset_minutes, 120);
    EXPECT_EQ(reading.values.size(), 12U);

    const Value* value = find_value(reading, "maximum_pressure", Place::cylinder(2));
    ASSERT_NE(value, nullptr);
    EXPECT_EQ(value->typed, "141,5");
    EXPECT_EQ(value->number, 141.5);
    EXPECT_DOUBLE_EQ(value->value_si.value_or(0.0), 141.5e5);
    EXPECT_EQ(value->kind, PressureKind::absolute);
    EXPECT_EQ(value->place_typed, "2") << "the engine calls it A2";

    value = find_value(reading, "exhaust_temperature", Place::cylinder(6));
    ASSERT_NE(value, nullptr);
    EXPECT_EQ(value->unit_typed, "degF");
    EXPECT_NEAR(value->value_si.value_or(0.0), (640.0 + 459.67) / 1.8,
                1e-9); // rounding of one multiplication
    EXPECT_EQ(find_value(reading, "exhaust_temperature", Place::cylinder(5))->missing,
              MissingReason::out_of_order);
    EXPECT_EQ(find_value(reading, "maximum_pressure", Place::cylinder(1))->kind, PressureKind::gauge)
        << "the quantity's own kind";
    EXPECT_NE(find_value(reading, "turbocharger_speed", Place::turbocharger(2)), nullptr);
    EXPECT_NE(find_value(reading, "cooler_pressure_drop"), nullptr) << "stands for all coolers";
    EXPECT_NE(find_value(reading, "barometric_pressure", {Place::Kind::ship, 0}), nullptr);
    EXPECT_EQ(find_value(reading, "power_source")->words, "torsion_meter");
    EXPECT_EQ(find_value(reading, "auxiliary_blower_running")->words, "no");
    EXPECT_EQ(find_value(reading, "auxiliary_blower_running")->typed, "0");
    EXPECT_EQ(find_value(reading, "reading_remark")->words, "calm, \"steady\"");
}

TEST_F(TakingIn, LendsTheNearestReadingOfTheShipWithinSixHours)
{
    write_ship();
    const auto history = memory();
    take_folder(*history, QStringLiteral("ship"));
    const auto main = value_of_result(ReadingStore(*history).load(engine_named(*history, "main engine")));
    const Value* const sea = find_value(main[0], "sea_water_temperature", {Place::Kind::ship, 0});
    ASSERT_NE(sea, nullptr) << "three and a half hours away";
    EXPECT_EQ(sea->typed, "18");
    EXPECT_EQ(find_value(main[0], "barometric_pressure", {Place::Kind::ship, 0})->typed, "1012")
        << "its own goes before the ship's";
    const auto auxiliary =
        value_of_result(ReadingStore(*history).load(engine_named(*history, "auxiliary engine")));
    EXPECT_EQ(find_value(auxiliary[0], "sea_water_temperature", {Place::Kind::ship, 0}), nullptr)
        << "seven and a half hours away";
}

TEST_F(TakingIn, SharesWhatConcernsTheShipWithAllHerEngines)
{
    write_ship();
    const auto history = memory();
    take_folder(*history, QStringLiteral("ship"));
    const auto events =
        value_of_result(EventStore(*history).load(engine_named(*history, "auxiliary engine")));
    ASSERT_EQ(events.size(), 1U);
    EXPECT_EQ(events.front().kind, "docking");
    const auto own = value_of_result(EventStore(*history).load_own(engine_named(*history, "main engine")));
    ASSERT_EQ(own.size(), 3U);
    EXPECT_EQ(own[0].place, Place::cylinder(2));
    EXPECT_EQ(own[0].running_hours, 12000.5);
    EXPECT_FALSE(own[1].date_only);
    EXPECT_EQ(own[1].place, Place::turbocharger(1));
}

TEST_F(TakingIn, OfTheSameAgainChangesNothing)
{
    write_ship();
    {
        const auto history = create();
        EXPECT_FALSE(take_folder(*history, QStringLiteral("ship")).anything_refused());
    }
    const QByteArray before = read(QStringLiteral("ship.evenstroke"));
    {
        const auto history = open();
        const TakeReport report = take_folder(*history, QStringLiteral("ship"));
        EXPECT_FALSE(report.anything_refused());
        for (const FolderReport& folder : report.folders)
            EXPECT_EQ(folder.values.fresh + folder.events.fresh + folder.cards.fresh, 0) << folder.folder;
        EXPECT_EQ(report.folders[1].values.same, 13);
    }
    EXPECT_EQ(read(QStringLiteral("ship.evenstroke")), before);
}

TEST_F(TakingIn, TakesSemicolonsDecimalCommasAndColumnsInAnyOrder)
{
    write_engine(QStringLiteral("engine"),
                 "\xEF\xBB\xBFunit;value;cylinder;quantity;taken_at;reading;weather\r\n"
                 "bar;140,5;1;maximum_pressure;2029-01-12T08:30Z;2029-01;fine\r\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    EXPECT_FALSE(report.anything_refused());
    EXPECT_EQ(report.folders.front().remarks,
              std::vector<std::string>{"readings.csv: the column \"weather\" was not read"});
    EXPECT_EQ(find_value(readings_of(*history).front(), "maximum_pressure", Place::cylinder(1))->number,
              140.5);
}

TEST_F(TakingIn, AddsWhatIsNewToAKnownReading)
{
    write_engine(
        QStringLiteral("engine"),
        header + "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n2029-01,2029-01-12T08:30Z,load_percent,,,%\n");
    const auto history = memory();
    take_folder(*history, QStringLiteral("engine"));
    write_engine(QStringLiteral("engine"), header + "2029-01,2029-01-12T08:30Z,speed,,95.40,rpm\n2029-01,"
                                                    "2029-01-12T10:30+02:00,load_percent,,75,%\n");
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    EXPECT_FALSE(report.anything_refused());
    EXPECT_EQ(report.folders.front().values.same, 1) << "the same number in another writing";
    EXPECT_EQ(report.folders.front().values.fresh, 1) << "an empty box is filled";
    EXPECT_EQ(find_value(readings_of(*history).front(), "load_percent")->typed, "75");
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

TEST_F(TakingIn, RefusesAnotherValueForAPlaceThatIsKnown)
{
    write_engine(QStringLiteral("engine"), header + "2029-01,2029-01-12T08:30Z,scavenge_pressure,,2.1,bar\n");
    const auto history = memory();
    take_folder(*history, QStringLiteral("engine"));
    for (const char* const other : {"2.2,bar", "2.1,bar abs", "2.1,kgf/cm2"}) {
        write_engine(QStringLiteral("engine"),
                     header + "2029-01,2029-01-12T08:30Z,scavenge_pressure,," + other + "\n");
        const TakeReport report = take_folder(*history, QStringLiteral("engine"));
        EXPECT_FALSE(report.folders.front().taken) << other;
        EXPECT_NE(report.folders.front().refused.front().reason.find("is 2.1 bar in the history and"),
                  std::string::npos);
    }
    write_engine(QStringLiteral("engine"), header + "2029-01,2029-01-12T09:30Z,scavenge_pressure,,2.1,bar\n");
    EXPECT_NE(take_folder(*history, QStringLiteral("engine"))
                  .folders.front()
                  .refused.front()
                  .reason.find("at 2029-01-12T08:30Z, not at"),
              std::string::npos);
}

TEST_F(TakingIn, KnowsTheValueThatStoodBeforeACorrection)
{
    write_engine(QStringLiteral("engine"), header + "2029-01,2029-01-12T08:30Z,speed,,59.4,r/min\n");
    const auto history = memory();
    take_folder(*history, QStringLiteral("engine"));
    const Reading reading = readings_of(*history).front();
    Value right = reading.values.front();
    right.typed = "95.4";
    right.value_si.reset();
    expect_done(ReadingStore(*history).correct(reading.id, right, chief_));
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    EXPECT_FALSE(report.anything_refused());
    EXPECT_EQ(report.folders.front().values.same, 1);
    EXPECT_EQ(readings_of(*history).front().values.front().typed, "95.4") << "the correction stands";
}

TEST_F(TakingIn, MergesFoldersOfOneEngineAndKeepsTheNewestParticulars)
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

TEST_F(TakingIn, RefusesAnotherImoNumberForTheSameName)
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

TEST_F(TakingIn, NamesTheFilesItDoesNotRead)
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

TEST_F(TakingIn, RefusesSharedReadingsOfTwoShips)
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

TEST_F(TakingIn, RefusesACylinderInTheShipsReadings)
{
    write_ship();
    write(QStringLiteral("ship/ship_readings.csv"),
          "reading,taken_at,quantity,value,unit\nnoon,2029-01-12T12:00Z,maximum_pressure,140,bar\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("ship"));
    EXPECT_NE(report.folders[2].refused.front().reason.find("not shared by the ship's engines"),
              std::string::npos);
}

TEST_F(TakingIn, RefusesACardOfAReadingThatIsNotThere)
{
    write_ship();
    write(QStringLiteral("ship/main/cards/2028-12/A1.csv"), "crank_angle_deg,pressure_bar\n0,100\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("ship"));
    EXPECT_FALSE(report.folders[1].taken);
    EXPECT_TRUE(report.folders[1].refused.front().file.ends_with("cards/2028-12/A1.csv"));
}

TEST_F(TakingIn, SaysWhichFoldersHoldNoEngine)
{
    QDir().mkpath(path(QStringLiteral("nothing/here")));
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("nothing"));
    ASSERT_EQ(report.folders.size(), 1U);
    EXPECT_FALSE(report.folders.front().taken);
}

TEST_F(TakingIn, RefusesAFolderThatIsNotThereAndTakesTheOthers)
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

TEST_F(TakingIn, TakesAFolderThatIsNamedTwiceOrTogetherWithTheOneAroundItOnce)
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

TEST_F(TakingIn, CountsTheGoodAndTheBadOfAllFiles)
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

TEST_F(TakingIn, DoesNotBlameTheCardsOfReadingsThatABadRowHeldBack)
{
    write_ship();
    write(QStringLiteral("ship/main/readings.csv"),
          header + "2029-01,2029-01-12T10:30Z,speed,,95.4,r/min\n2029-01,2029-01-12T10:30Z,moonlight,,1,%\n");
    const FolderReport report = take_folder(*memory(), QStringLiteral("ship")).folders[1];
    ASSERT_EQ(report.refused.size(), 1U);
    EXPECT_EQ(report.cards.fresh, 1);
    EXPECT_EQ(report.rows().refused, 1);
}

TEST_F(TakingIn, NamesTheFileOfABadCardOnceWithItsLine)
{
    write_ship();
    write(QStringLiteral("ship/main/cards/2029-01/A2.csv"), "crank_angle_deg,pressure_bar\n0,101\n1,x\n");
    const FolderReport report = take_folder(*memory(), QStringLiteral("ship")).folders[1];
    ASSERT_EQ(report.refused.size(), 1U);
    EXPECT_EQ(report.refused.front().line, 3);
    EXPECT_NE(report.refused.front().text().find("A2.csv, line 3: The pressure"), std::string::npos)
        << report.refused.front().text();
}

TEST_F(TakingIn, SaysThatTheDescriptionOfTheEngineChangedAndWhere)
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

TEST_F(TakingIn, RefusesToMakeAnotherEngineOfOneThatHasReadings)
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

TEST_F(TakingIn, TakesADescriptionOfAnotherCycleWhereNothingWasReadYet)
{
    write(QStringLiteral("engine/engine.json"), engine_json());
    const auto history = memory();
    take_folder(*history, QStringLiteral("engine"));
    write(QStringLiteral("engine/engine.json"), engine_json().replace("two-stroke", "four-stroke"));
    EXPECT_TRUE(take_folder(*history, QStringLiteral("engine")).folders.front().taken);
}

TEST_F(TakingIn, TakesUnitsThatMeasureTheSameInAnotherWay)
{
    write_engine(QStringLiteral("engine"),
                 header + "2029-01,2029-01-12T08:30Z,fuel_index,1,62,mm\n"
                          "2029-01,2029-01-12T08:30Z,fuel_index,,61.5,mm\n"
                          "2029-01,2029-01-12T08:30Z,wind_speed,,4,Beaufort\n"
                          "2029-01,2029-01-12T08:30Z,cylinder_oil_feed_rate,1,55,l/24 h\n"
                          "2029-01,2029-01-12T08:30Z,injection_timing_setting,1,-2,deg\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    EXPECT_FALSE(report.anything_refused());
    const Reading reading = readings_of(*history).front();
    const Value* const index = find_value(reading, "fuel_index", Place::cylinder(1));
    ASSERT_NE(index, nullptr);
    EXPECT_EQ(index->typed, "62");
    EXPECT_EQ(unit(index->unit).symbol, "mm");
    EXPECT_FALSE(own_value(*index, {}).has_value()) << "millimetres are no per cent";
    EXPECT_FALSE(number_in_own_unit(*index, {}).has_value());
    EXPECT_FALSE(
        own_value(*find_value(reading, "cylinder_oil_feed_rate", Place::cylinder(1)), {}).has_value());
    // WMO: force 4 is 5.5 to 7.9 m/s.
    const auto wind = own_value(*find_value(reading, "wind_speed", {Place::Kind::ship, 0}), {});
    ASSERT_TRUE(wind.has_value());
    EXPECT_NEAR(wind->value, 6.7, 0.05); // 0.836 * 8 = 6.688
}

TEST_F(TakingIn, RefusesRackMillimetresWhereTheBaselineIsInPerCent)
{
    write(
        QStringLiteral("engine/engine.json"),
        engine_json(
            "Quiet Barley", "main engine",
            R"(, "baseline": [{"load_percent": 50, "fuel_index": 55}, {"load_percent": 75, "fuel_index": 70}])"));
    write(QStringLiteral("engine/readings.csv"),
          header +
              "2029-01,2029-01-12T08:30Z,fuel_index,1,62,mm\n2029-01,2029-01-12T08:30Z,fuel_index,2,70,%\n");
    const FolderReport report = take_folder(*memory(), QStringLiteral("engine")).folders.front();
    ASSERT_EQ(report.refused.size(), 1U);
    EXPECT_EQ(report.refused.front().line, 2);
    EXPECT_NE(report.refused.front().reason.find("baseline has fuel_index in %"), std::string::npos);
}

TEST_F(TakingIn, StoppedHalfwayLeavesTheHistoryAsItWas)
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

TEST_F(TakingIn, TakesBackTheFolderInWhichSomethingGoesWrongMidway)
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

TEST_F(TakingIn, TakesTheExampleFleet)
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
