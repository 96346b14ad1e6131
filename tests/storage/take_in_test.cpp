// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "core/reading/typed_number.h"
#include "core/trend/conditions.h"
#include "storage/audit.h"
#include "storage/event_store.h"

namespace evenstroke::storage {
namespace {

/// What rows of readings become in the history.
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

} // namespace
} // namespace evenstroke::storage
