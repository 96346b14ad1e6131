// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/audit.h"
#include "storage/event_store.h"
#include "storage/sql.h"

#include <QFile>

#include <fstream>
#include <random>

namespace evenstroke::storage {
namespace {

const QByteArray good_row = "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n";

struct BadRow
{
    const char* name;
    QByteArray row;       ///< line 3 of readings.csv; line 2 is good
    const char* value;    ///< as the refusal shows it
    const char* reason;   ///< part of the sentence
    const char* expected; ///< part of what would be right
};

class BadReadingsRow : public StorageTest, public testing::WithParamInterface<BadRow>
{
};

TEST_P(BadReadingsRow, IsNamedWithFileLineValueReasonAndWhatIsExpected)
{
    write_engine(QStringLiteral("engine"), header + good_row + GetParam().row);
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    ASSERT_EQ(report.folders.size(), 1U);
    const FolderReport& folder = report.folders.front();
    EXPECT_TRUE(report.anything_refused());
    EXPECT_FALSE(folder.taken);
    ASSERT_EQ(folder.refused.size(), 1U);
    const RefusedRow& refused = folder.refused.front();
    EXPECT_TRUE(refused.file.ends_with("engine/readings.csv")) << refused.file;
    EXPECT_EQ(refused.line, 3);
    EXPECT_EQ(refused.value, GetParam().value);
    EXPECT_NE(refused.reason.find(GetParam().reason), std::string::npos) << refused.reason;
    EXPECT_NE(refused.expected.find(GetParam().expected), std::string::npos) << refused.expected;
    EXPECT_EQ(folder.values.refused, 1);
    EXPECT_EQ(folder.values.fresh, 1) << "says how many rows were good";
    EXPECT_TRUE(value_of_result(VesselStore(*history).engines()).empty()) << "refused whole";
}

TEST_P(BadReadingsRow, IsLeftOutWhenTheGoodRowsAreWanted)
{
    write_engine(QStringLiteral("engine"),
                 header + good_row + GetParam().row + "2029-01,2029-01-12T08:30Z,load_percent,,75.5,%\n");
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("engine"), true);
    EXPECT_TRUE(report.folders.front().taken);
    EXPECT_EQ(report.folders.front().values.refused, 1);
    const auto readings = readings_of(*history);
    ASSERT_EQ(readings.size(), 1U);
    EXPECT_EQ(readings.front().values.size(), 2U);
}

QByteArray january(const char* rest)
{
    return QByteArray("2029-01,2029-01-12T08:30Z,") + rest + "\n";
}

INSTANTIATE_TEST_SUITE_P(
    Rows, BadReadingsRow,
    testing::Values(
        BadRow{"UnknownQuantity", january("maximum_presure,1,140,bar"), "maximum_presure",
               "\"maximum_presure\" is not known", "maximum_pressure"},
        BadRow{"NoQuantity", january(",1,140,bar"), "", "quantity is missing", "catalogue"},
        BadRow{"UnknownUnit", january("maximum_pressure,1,140,bat"), "bat", "\"bat\" is not known", "bar"},
        BadRow{"UnitOfAnotherKind", january("maximum_pressure,1,140,degC"), "degC",
               "no unit of maximum_pressure", "unit of pressure"},
        BadRow{"NoUnit", january("maximum_pressure,1,140,"), "140", "has no unit", "bar"},
        BadRow{"AbsoluteDifference", january("cooler_pressure_drop,,12,mbar abs"), "mbar abs",
               "cannot be absolute", "mbar"},
        BadRow{"CylinderTheEngineLacks", january("maximum_pressure,7,140,bar"), "7", "no cylinder \"7\"",
               "1 to 6"},
        BadRow{"CylinderInWords", january("maximum_pressure,A1,140,bar"), "A1", "no cylinder \"A1\"",
               "1 to 6"},
        BadRow{"NoCylinder", january("maximum_pressure,,140,bar"), "maximum_pressure", "no cylinder is given",
               "1 to 6"},
        BadRow{"CylinderOfTheWholeEngine", january("shaft_power,2,9000,kW"), "2", "engine as a whole",
               "empty"},
        BadRow{"CylinderForATurbocharger", january("turbocharger_speed,2,14000,r/min"), "2",
               "each turbocharger", "tc1"},
        BadRow{"TurbochargerForACylinder", january("exhaust_temperature,tc1,340,degC"), "tc1",
               "at each cylinder", "1 to 6"},
        BadRow{"GroupedNumber", january("shaft_power,,1.234.567,kW"), "1.234.567", "\"1.234.567\"",
               "without thousands"},
        BadRow{"NotANumber", january("shaft_power,,NaN,kW"), "NaN", "not a number", "digits"},
        BadRow{"Dash", january("shaft_power,,-,kW"), "-", "not a number", "digits"},
        BadRow{"BeyondReach", january("shaft_power,,1e999,kW"), "1e999", "too large", "exponent"},
        BadRow{"Words", january("shaft_power,,about 9000,kW"), "about 9000", "not a number", "digits"},
        BadRow{"BelowAbsoluteZero", january("exhaust_temperature,1,-300,degC"), "-300", "below absolute zero",
               "sign"},
        BadRow{"BelowVacuum", january("barometric_pressure,,-3,mbar"), "-3", "vacuum", "sign"},
        BadRow{"GaugeBelowVacuum", january("scavenge_pressure,,-5,bar gauge"), "-5",
               "-5 bar gauge is below a perfect vacuum (about -1 bar gauge)", "sign"},
        BadRow{"OwnKindBelowVacuum", january("scavenge_pressure,,-1.2,bar"), "-1.2", "vacuum", "sign"},
        BadRow{"GaugeBarometer", january("barometric_pressure,,1.0,bar g"), "bar g", "absolute by nature",
               "Write bar alone"},
        BadRow{"WindForceBeyondTheScale", january("wind_speed,,14,Beaufort"), "14", "Beaufort scale",
               "0 to 12"},
        BadRow{"WindForceOfTheShip", january("speed_through_water,,4,Beaufort"), "Beaufort",
               "no unit of speed_through_water", "kn"},
        BadRow{"FuelIndexInMetres", january("fuel_index,1,0.06,m"), "m", "no unit of fuel_index", "%"},
        BadRow{"DateWithoutZone", "2029-02,2029-02-12T08:30,speed,,95.4,r/min\n", "2029-02-12T08:30",
               "which clock", "Z"},
        BadRow{"ImpossibleDate", "2029-02,2029-02-30T08:30Z,speed,,95.4,r/min\n", "2029-02-30T08:30Z",
               "calendar", "year, month, day"},
        BadRow{"OtherDate", "2029-02,12.02.2029 08:30,speed,,95.4,r/min\n", "12.02.2029 08:30", "12.02.2029",
               ""},
        BadRow{"NoName", ",2029-02-12T08:30Z,speed,,95.4,r/min\n", "", "no name", "2026-03"},
        BadRow{"TwoTimesForOneReading", "2029-01,2029-01-12T09:30Z,load_percent,,75,%\n", "2029-01-12T09:30Z",
               "2029-01-12T08:30Z", "one time"},
        BadRow{"TwoValuesForOnePlace", january("speed,,96.4,r/min"), "96.4",
               "95.4 r/min on line 2 and 96.4 r/min here", "right one"},
        BadRow{"UnknownChoice", january("power_source,,guess,"), "guess", "no choice", "torsion_meter"},
        BadRow{"NeitherYesNorNo", january("auxiliary_blower_running,,perhaps,"), "perhaps", "does not answer",
               "yes or no"},
        BadRow{"RowTooShort", "2029-01,2029-01-12T08:30Z,speed\n", "2029-01",
               "3 fields, the first line has 6", "as many"},
        BadRow{"RowTooLong", january("load_percent,,75,%,extra"), "2029-01", "7 fields, the first line has 6",
               "as many"},
        BadRow{"OpenQuote", "\"2029-01,2029-01-12T08:30Z,load_percent,,75,%\n",
               "\"2029-01,2029-01-12T08:30Z,load_percent,…", "not closed", "Close it"},
        BadRow{"ZeroByte", QByteArray("2029-01,2029-01-12T08:30Z,load_percent,,7") + '\0' + "5,%\n",
               "2029-01,2029-01-12T08:30Z,load_percent,,…", "zero bytes", "UTF-8"},
        BadRow{"NotUtf8", january("load_percent,,75,\xff"), "2029-01,2029-01-12T08:30Z,load_percent,,…",
               "not UTF-8", "UTF-8"}),
    [](const auto& one) { return std::string(one.param.name); });

struct BadEvent
{
    const char* name;
    QByteArray row;
    const char* value;
    const char* reason;
    const char* expected;
};
class BadEventsRow : public StorageTest, public testing::WithParamInterface<BadEvent>
{
};

TEST_P(BadEventsRow, IsNamedWithFileLineValueReasonAndWhatIsExpected)
{
    write_engine(QStringLiteral("engine"), header + good_row,
                 "date,cylinder,kind,note,running_hours\n2029-01-02,1,overhaul,,\n" + GetParam().row);
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    const FolderReport& folder = report.folders.front();
    EXPECT_FALSE(folder.taken);
    ASSERT_EQ(folder.refused.size(), 1U);
    EXPECT_TRUE(folder.refused.front().file.ends_with("engine/events.csv"));
    EXPECT_EQ(folder.refused.front().line, 3);
    EXPECT_EQ(folder.refused.front().value, GetParam().value);
    EXPECT_NE(folder.refused.front().reason.find(GetParam().reason), std::string::npos)
        << folder.refused.front().reason;
    EXPECT_NE(folder.refused.front().expected.find(GetParam().expected), std::string::npos)
        << folder.refused.front().expected;

    const TakeReport kept = take_folder(*history, QStringLiteral("engine"), true);
    EXPECT_TRUE(kept.folders.front().taken);
    EXPECT_EQ(value_of_result(EventStore(*history).load(only_engine(*history))).size(), 1U);
}

INSTANTIATE_TEST_SUITE_P(
    Rows, BadEventsRow,
    testing::Values(
        BadEvent{"UnknownKind", "2029-02-01,1,repainted,,\n", "repainted", "\"repainted\" is not known",
                 "overhaul"},
        BadEvent{"CylinderTheEngineLacks", "2029-02-01,9,overhaul,,\n", "9", "no cylinder \"9\"", "1 to 6"},
        BadEvent{"ImpossibleDate", "2029-13-01,1,overhaul,,\n", "2029-13-01", "2029-13-01", ""},
        BadEvent{"NoDate", ",1,overhaul,,\n", "", "", ""},
        BadEvent{"HoursInWords", "2029-02-01,1,overhaul,,many\n", "many", "not a number", "digits"},
        BadEvent{"NegativeHours", "2029-02-01,1,overhaul,,-5\n", "-5", "cannot be", "zero or more"}),
    [](const auto& one) { return std::string(one.param.name); });

struct BadFile
{
    const char* name;
    QByteArray content;
    qint64 line;
    const char* reason;
    const char* expected;
};
class BadReadingsFile : public StorageTest, public testing::WithParamInterface<BadFile>
{
};

TEST_P(BadReadingsFile, IsRefusedAsAWhole)
{
    write_engine(QStringLiteral("engine"), GetParam().content);
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    const FolderReport& folder = report.folders.front();
    EXPECT_FALSE(folder.taken);
    ASSERT_FALSE(folder.refused.empty());
    EXPECT_EQ(folder.refused.front().line, GetParam().line);
    EXPECT_NE(folder.refused.front().reason.find(GetParam().reason), std::string::npos)
        << folder.refused.front().reason;
    EXPECT_NE(folder.refused.front().expected.find(GetParam().expected), std::string::npos)
        << folder.refused.front().expected;
}

INSTANTIATE_TEST_SUITE_P(
    Files, BadReadingsFile,
    testing::Values(
        BadFile{"Empty", "", 0, "file is empty", "reading,taken_at,quantity,cylinder,value,unit"},
        BadFile{"NoHeader", good_row, 1, "no header line", "reading,taken_at,quantity,cylinder,value,unit"},
        BadFile{"ColumnMissing",
                "reading,taken_at,quantity,cylinder,value\n2029-01,2029-01-12T08:30Z,speed,,95\n", 1,
                "\"unit\" is missing", "reading,taken_at"},
        BadFile{"ColumnTwice", "reading,taken_at,quantity,cylinder,value,unit,value\n", 1, "stands twice",
                "once"},
        BadFile{"Utf16", QByteArray("\xff\xfer\0e\0a\0d\0i\0n\0g\0\n\0", 18), 1, "zero bytes", "UTF-8"}),
    [](const auto& one) { return std::string(one.param.name); });

class BadInput : public StorageTest
{
};

TEST_F(BadInput, AFileOfOnlyAHeaderHoldsNoReadings)
{
    write_engine(QStringLiteral("engine"), header, "date,cylinder,kind,note\n");
    const auto history = memory();
    EXPECT_FALSE(take_folder(*history, QStringLiteral("engine")).anything_refused());
    EXPECT_TRUE(readings_of(*history).empty());
}

/// Peak of the resident memory of this process [kB], as Linux counts it; -1 elsewhere.
long peak_memory_kb()
{
    std::ifstream status("/proc/self/status");
    for (std::string word; status >> word;)
        if (word == "VmHWM:") {
            long kilobytes = 0;
            status >> kilobytes;
            return kilobytes;
        }
    return -1;
}

TEST_F(BadInput, AHundredMegabytesInOneLineAreRefusedWithoutBeingKept)
{
    write_engine(QStringLiteral("engine"), header);
    for (const char* const begin : {"2029-01", "\"2029-01"}) {
        {
            QFile file(path(QStringLiteral("engine/readings.csv")));
            ASSERT_TRUE(file.open(QIODevice::WriteOnly));
            file.write(header + begin);
            const QByteArray megabyte(1 << 20, '7');
            for (int i = 0; i < 100; ++i)
                ASSERT_EQ(file.write(megabyte), megabyte.size());
        }
        const auto history = memory();
        const long before = peak_memory_kb();
        const TakeReport report = take_folder(*history, QStringLiteral("engine"));
        EXPECT_LT(peak_memory_kb() - before, 20 * 1024) << "kB more than before";
        ASSERT_EQ(report.folders.front().refused.size(), 1U);
        EXPECT_EQ(report.folders.front().refused.front().line, 2);
        EXPECT_NE(report.folders.front().refused.front().reason.find("longer than 64 kB"), std::string::npos);
    }
}

TEST_F(BadInput, ManyBadRowsAreAllCountedAndTheFirstThousandNamed)
{
    QByteArray readings = header;
    for (int i = 0; i < 5000; ++i)
        readings += "2029-01,2029-01-12T08:30Z,nonsense" + QByteArray::number(i) + ",,1,kW\n";
    write_engine(QStringLiteral("engine"), readings);
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("engine"));
    EXPECT_EQ(report.folders.front().values.refused, 5000);
    EXPECT_EQ(report.folders.front().refused.size(), 1000U);
}

TEST_F(BadInput, AValueOutsideTheHardRangeIsStoredAsTyped)
{
    write_engine(QStringLiteral("engine"),
                 header + january("maximum_pressure,1,1405,bar") + january("exhaust_temperature,1,-40,degC"));
    const auto history = memory();
    EXPECT_FALSE(take_folder(*history, QStringLiteral("engine")).anything_refused());
    const std::vector<Reading> readings = readings_of(*history);
    ASSERT_FALSE(readings.empty());
    const Value* const value = find_value(readings.front(), "maximum_pressure", Place::cylinder(1));
    ASSERT_NE(value, nullptr);
    EXPECT_EQ(value->typed, "1405");
    EXPECT_DOUBLE_EQ(value->value_si.value_or(0.0), 1405e5);
}

TEST_F(BadInput, RandomDamageLeadsToRefusalsAndNothingElse)
{
    write_ship();
    const QStringList files = {
        QStringLiteral("ship/main/readings.csv"), QStringLiteral("ship/main/events.csv"),
        QStringLiteral("ship/main/engine.json"), QStringLiteral("ship/ship_readings.csv"),
        QStringLiteral("ship/main/cards/2029-01/A1.csv")};
    const QByteArray pieces[] = {
        "\"", ",", "\n", QByteArray(1, '\0'), "\xff", ";", "-", "9999999999", "\r", "{", "]",
        "é",  "e", "NaN"};
    std::mt19937 chance(20300317);
    const auto pick = [&](qsizetype below) {
        return static_cast<qsizetype>(chance() % static_cast<unsigned>(below));
    };
    const auto history = memory();
    for (int round = 0; round < 300; ++round) {
        const QString& file = files[pick(files.size())];
        const QByteArray sound = read(file);
        QByteArray damaged = sound;
        for (qsizetype hits = 1 + pick(4); hits > 0; --hits) {
            const qsizetype at = pick(damaged.size());
            const qsizetype length = pick(3) == 0 ? pick(40) : pick(3);
            damaged.replace(at, std::min(length, damaged.size() - at),
                            pieces[pick(static_cast<qsizetype>(std::size(pieces)))]);
        }
        write(file, damaged);
        const TakeReport report = take_folder(*history, QStringLiteral("ship"), round % 2 == 0);
        for (const FolderReport& folder : report.folders)
            EXPECT_EQ(folder.anything_refused(), !folder.refused.empty())
                << "nothing is refused without a word";
        write(file, sound);
    }
    EXPECT_TRUE(value_of_result(verify(*history)).sound());
}

TEST_F(BadInput, ABadFolderDoesNotStopTheOthers)
{
    write(QStringLiteral("fleet/a/engine.json"), engine_json("Quiet Barley", "main engine"));
    write(QStringLiteral("fleet/a/readings.csv"), header + good_row + january("nonsense,,1,kW"));
    write(QStringLiteral("fleet/b/engine.json"), engine_json("Quiet Barley", "auxiliary engine"));
    write(QStringLiteral("fleet/b/readings.csv"), header + good_row);
    write(QStringLiteral("fleet/c/engine.json"), "{\"vessel\": ");
    write(QStringLiteral("fleet/d/readings.csv"), header + good_row);
    const auto history = memory();
    const TakeReport report = take_folder(*history, QStringLiteral("fleet"));
    ASSERT_EQ(report.folders.size(), 4U);
    EXPECT_FALSE(report.folders[0].taken);
    EXPECT_TRUE(report.folders[1].taken);
    EXPECT_FALSE(report.folders[2].taken);
    EXPECT_EQ(report.folders[2].refused.front().reason,
              "The document cannot be read as JSON: a closing brace is missing.");
    EXPECT_FALSE(report.folders[3].taken);
    EXPECT_EQ(report.folders[3].refused.front().reason, "There is no engine.json beside readings.csv.");
    EXPECT_EQ(value_of_result(VesselStore(*history).engines()).size(), 1U);
}

TEST_F(BadInput, AHistoryThatCannotBeWrittenStaysAsItWas)
{
    create();
    write_engine(QStringLiteral("engine"), header + good_row);
    const QByteArray before = read(QStringLiteral("ship.evenstroke"));
    const auto history = open(QStringLiteral("ship.evenstroke"), OpenMode::read_only);
    const auto report = take(*history, {path(QStringLiteral("engine"))});
    ASSERT_FALSE(report.has_value());
    EXPECT_EQ(report.error().kind, Problem::Kind::storage);
    EXPECT_EQ(read(QStringLiteral("ship.evenstroke")), before);
}

TEST_F(BadInput, AFullDiskLeavesTheHistoryAsItWas)
{
    QByteArray readings = header;
    for (int i = 0; i < 20000; ++i)
        readings += QStringLiteral("r%1,2029-01-12T08:30Z,speed,,95.%1,r/min\n").arg(i).toUtf8();
    write_engine(QStringLiteral("engine"), readings);
    const auto history = create();
    const QByteArray before = read(QStringLiteral("ship.evenstroke"));
    // SQLite answers as on a full disk when a file may not grow beyond so many pages.
    ASSERT_TRUE(QSqlQuery(history->database())
                    .exec(QStringLiteral("PRAGMA max_page_count = %1").arg(before.size() / 4096 + 20)));
    const auto report = take(*history, {path(QStringLiteral("engine"))});
    ASSERT_FALSE(report.has_value());
    EXPECT_EQ(report.error().kind, Problem::Kind::storage);
    EXPECT_NE(report.error().what_happened.find("disk is full"), std::string::npos);
    EXPECT_TRUE(value_of_result(VesselStore(*history).engines()).empty());
    EXPECT_EQ(read(QStringLiteral("ship.evenstroke")), before);
}

} // namespace
} // namespace evenstroke::storage
