// SPDX-License-Identifier: GPL-3.0-or-later
// What `evaluate` prints of small hand-made engines (invented numbers).
#include "tests/app/command_run.h"

#include <gtest/gtest.h>

#include <QDir>
#include <QFile>
#include <QTemporaryDir>

using namespace evenstroke;

namespace {

constexpr char engine_json[] = R"({"vessel": "Low Meadow", "engine": "main engine", "cycle": "two-stroke",
 "cylinders": 4, "bore_mm": 500, "stroke_mm": 2000, "rod_length_mm": 2100, "rated_power_kw": 6000,
 "rated_speed_rpm": 120, "reference": {"inlet_air_c": 25, "cooler_coolant_c": 25, "barometric_mbar": 1000},
 "correction": {"compression_pressure": [0.0028, -0.0014]},
 "baseline": [{"load_percent": 50, "compression_pressure": 80, "exhaust_temperature": 300},
              {"load_percent": 75, "compression_pressure": 110, "exhaust_temperature": 320},
              {"load_percent": 100, "compression_pressure": 140, "exhaust_temperature": 360}]})";
constexpr char head[] = "reading,taken_at,quantity,cylinder,value,unit\n";
constexpr char conditions[] = "R,2029-01-12T08:30Z,load_percent,,75,%\n"
                              "R,2029-01-12T08:30Z,cooler_coolant_inlet_temperature,,25,degC\n"
                              "R,2029-01-12T08:30Z,barometric_pressure,,1000,mbar\n";
constexpr char air[] = "R,2029-01-12T08:30Z,inlet_air_temperature,,25,degC\n";

class Evaluate : public testing::Test
{
protected:
    QString out(const QString& command, const std::string& rows, const QStringList& more = {})
    {
        write(QStringLiteral("engine.json"), engine_json);
        write(QStringLiteral("readings.csv"), head + rows);
        const QString history = folder_.filePath(QStringLiteral("small.evenstroke"));
        QFile::remove(history);
        EXPECT_EQ(run({QStringLiteral("take"), folder_.filePath(QStringLiteral("e")), QStringLiteral("--history"), history}), 0);
        EXPECT_EQ(run(QStringList{command, QStringLiteral("--history"), history} + more), 0);
        return out_;
    }
    /// Cells of the row of a quantity and cylinder, from `value` on; empty when there is none.
    static QStringList row_of(const QString& table, const QString& quantity, const QString& cylinder)
    {
        for (const QString& line : table.split(u'\n'))
            if (const QStringList cells = line.split(u','); cells.size() == 13 && cells[4] == quantity && cells[5] == cylinder)
                return cells.mid(6);
        return {};
    }

private:
    int run(const QStringList& arguments)
    {
        const test::Outcome outcome = test::run(arguments);
        out_ = outcome.out;
        EXPECT_EQ(outcome.code, 0) << outcome.err.toStdString();
        return outcome.code;
    }
    void write(const QString& name, const std::string& content)
    {
        QDir().mkpath(folder_.filePath(QStringLiteral("e")));
        QFile file(folder_.filePath(QStringLiteral("e/") + name));
        ASSERT_TRUE(file.open(QIODevice::WriteOnly));
        file.write(QByteArray::fromStdString(content));
    }
    QTemporaryDir folder_;
    QString out_;
};

TEST_F(Evaluate, NamesTheUnitAsInTheFile)
{
    const QString table = out(QStringLiteral("evaluate"),
                              std::string(conditions) + air +
                                  "R,2029-01-12T08:30Z,compression_pressure,1,111,bar\n"
                                  "R,2029-01-12T08:30Z,compression_pressure,2,112,bar abs\n"
                                  "R,2029-01-12T08:30Z,compression_pressure,3,11.2,MPa abs\n"
                                  "R,2029-01-12T08:30Z,compression_pressure,4,11.1,MPa\n"
                                  "R,2029-01-12T08:30Z,sea_state,,3,\n");
    const QString c = QStringLiteral("compression_pressure");
    EXPECT_EQ(row_of(table, c, QStringLiteral("1")).mid(0, 2), QStringList({QStringLiteral("111"), QStringLiteral("bar")}));
    EXPECT_EQ(row_of(table, c, QStringLiteral("2")).mid(0, 2), QStringList({QStringLiteral("112"), QStringLiteral("bar abs")}));
    EXPECT_EQ(row_of(table, c, QStringLiteral("3")).mid(0, 2), QStringList({QStringLiteral("11.2"), QStringLiteral("MPa abs")}));
    EXPECT_EQ(row_of(table, QStringLiteral("sea_state"), {}).mid(0, 2), QStringList({QStringLiteral("3"), QString()}));
    // At reference conditions the corrected value is the typed one, and the expected one has the typed kind too:
    // 110 bar gauge are 111 bar absolute under 1000 mbar. Tolerance: rounding of a double.
    EXPECT_NEAR(row_of(table, c, QStringLiteral("2"))[2].toDouble(), 112.0, 1e-9);
    EXPECT_NEAR(row_of(table, c, QStringLiteral("2"))[3].toDouble(), 111.0, 1e-9);
    EXPECT_NEAR(row_of(table, c, QStringLiteral("3"))[3].toDouble(), 11.1, 1e-9);
    EXPECT_NEAR(row_of(table, c, QStringLiteral("4"))[4].toDouble(), 0.1, 1e-9);
}

TEST_F(Evaluate, ShowsANumberThatCannotBeBroughtToItsOwnUnit)
{
    const QString table = out(QStringLiteral("evaluate"),
                              std::string(conditions) + air + "R,2029-01-12T08:30Z,fuel_consumption,,100,l/h\n");
    EXPECT_EQ(row_of(table, QStringLiteral("fuel_consumption"), {}),
              QStringList({QStringLiteral("100"), QStringLiteral("l/h"), {}, {}, {}, {}, {}}));
}

TEST_F(Evaluate, LeavesOpenWhatAMissingConditionLeavesOpen)
{
    const QString table = out(QStringLiteral("evaluate"),
                              std::string(conditions) + "R,2029-01-12T08:30Z,compression_pressure,1,111,bar\n"
                                                        "R,2029-01-12T08:30Z,compression_pressure,2,112,bar\n");
    const QStringList row = row_of(table, QStringLiteral("compression_pressure"), QStringLiteral("1"));
    EXPECT_EQ(row[2], QString()) << "not corrected without the inlet air";
    EXPECT_EQ(row[3], QStringLiteral("110"));
    EXPECT_EQ(row[4], QString());
    EXPECT_EQ(row[5], QString()) << "and nothing lies apart in it";
}

TEST_F(Evaluate, KeepsTheExpectedValueWhateverWasTyped)
{
    const QString table = out(QStringLiteral("evaluate"),
                              std::string(conditions) + air + "R,2029-01-12T08:30Z,compression_pressure,1,1e17,bar\n");
    EXPECT_EQ(row_of(table, QStringLiteral("compression_pressure"), QStringLiteral("1"))[3], QStringLiteral("110"));
}

// Worked out by hand: 500 x 2000 mm is a swept volume of 0.392699082 m³; at 120 r/min, two-stroke, 1 bar of mean
// pressure is 78.5398163 kW. 16 bar: 1256.637061 kW; four cylinders of 16, 16, 17 and 15 bar: 5026.548246 kW; a
// shaft power of 4500 kW: 14.3239449 bar and 0.895246554. 800 kg/h over 4500 kW: 177.777778 g/kWh, with 41.0 MJ/kg
// instead of 42.7: 170.700 g/kWh. Tolerance: the digits given here.
TEST_F(Evaluate, AddsTheComputedQuantitiesWhenAsked)
{
    const std::string t = "R,2029-01-12T08:30Z,";
    const std::string rows = std::string(conditions) + air + t + "speed,,120,1/min\n" + t + "shaft_power,,4500,kW\n" + t +
                             "mean_indicated_pressure,1,16,bar\n" + t + "mean_indicated_pressure,2,1.6,MPa\n" + t +
                             "mean_indicated_pressure,3,17,bar\n" + t + "mean_indicated_pressure,4,15,bar\n" + t +
                             "fuel_consumption,,800,kg/h\n" + t + "fuel_lower_heating_value,,41.0,MJ/kg\n" + t +
                             "compression_pressure,1,110,bar\n" + t + "scavenge_pressure,,2.0,bar\n";
    const QString table = out(QStringLiteral("evaluate"), rows, {QStringLiteral("--derived")});
    const auto cells = [&](const char* name, const char* cylinder) {
        return row_of(table, QString::fromUtf8(name), QString::fromUtf8(cylinder));
    };
    ASSERT_EQ(cells("indicated_power", "2").size(), 7) << table.toStdString();
    EXPECT_NEAR(cells("indicated_power", "2")[0].toDouble(), 1256.637061, 1e-6);
    EXPECT_EQ(cells("indicated_power", "2")[1], QStringLiteral("kW"));
    EXPECT_NEAR(cells("indicated_power", "")[0].toDouble(), 5026.548246, 1e-6);
    EXPECT_NEAR(cells("mean_effective_pressure", "")[0].toDouble(), 14.3239449, 1e-7);
    EXPECT_NEAR(cells("mechanical_efficiency", "")[0].toDouble(), 0.895246554, 1e-9);
    EXPECT_NEAR(cells("specific_fuel_consumption", "")[0].toDouble(), 177.777778, 1e-6);
    EXPECT_NEAR(cells("specific_fuel_consumption", "")[2].toDouble(), 170.700, 1e-3);
    EXPECT_NEAR(cells("compression_pressure_ratio", "1")[0].toDouble(), 111.0 / 3.0, 1e-9);
    EXPECT_NEAR(cells("compressor_pressure_ratio", "")[0].toDouble(), 3.0, 1e-9);
    EXPECT_TRUE(cells("compressor_efficiency", "").isEmpty()) << "the air after the compressor was not read";
    EXPECT_TRUE(row_of(out(QStringLiteral("evaluate"), rows), QStringLiteral("mechanical_efficiency"), {}).isEmpty())
        << "and nothing is added unasked";
}

TEST_F(Evaluate, ARowInSeveralUnitsIsNoUnitSlip)
{
    const QString doubts = out(QStringLiteral("doubts"),
                               std::string(conditions) + air +
                                   "R,2029-01-12T08:30Z,exhaust_temperature,1,608,degF\n"
                                   "R,2029-01-12T08:30Z,exhaust_temperature,2,610,degF\n"
                                   "R,2029-01-12T08:30Z,exhaust_temperature,3,594,K\n"
                                   "R,2029-01-12T08:30Z,exhaust_temperature,4,321,degC\n");
    EXPECT_FALSE(doubts.contains(QStringLiteral("unit_slip"))) << doubts.toStdString();
}

} // namespace
