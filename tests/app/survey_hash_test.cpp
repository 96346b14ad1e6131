// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/command.h"
#include "app/survey/report_sources.h"
#include "storage/vessel_store.h"

#include <gtest/gtest.h>

#include <QCryptographicHash>
#include <QDir>
#include <QFile>
#include <QTemporaryDir>

/// The hash that a survey report prints can be made anew from the files by what the report says, without this
/// program. The recipe is followed here with nothing but splitting and sorting of text.
namespace evenstroke {
namespace {

const QByteArray header = "reading,taken_at,quantity,cylinder,value,unit,phase,text,missing_reason\n";

void write(const QString& path, const QByteArray& content)
{
    QFile file(path);
    ASSERT_TRUE(file.open(QIODevice::WriteOnly)) << path.toStdString();
    file.write(content);
}

/// Lines after the header, sorted by their bytes, hashed with their line feeds.
std::string by_the_recipe(const QByteArray& file)
{
    QList<QByteArray> lines = file.mid(file.indexOf('\n') + 1).split('\n');
    lines.removeAll(QByteArray());
    std::sort(lines.begin(), lines.end());
    return QCryptographicHash::hash(lines.join('\n') + '\n', QCryptographicHash::Sha256).toHex().toStdString();
}

class DataSetHash : public testing::Test
{
protected:
    void take(const QByteArray& readings, const QByteArray& shared = {})
    {
        ASSERT_TRUE(QDir(folder_.path()).mkpath("ship/engine"));
        write(path("ship/engine/engine.json"),
              R"({"vessel": "Quiet Barley", "engine": "main", "cycle": "two-stroke", "cylinders": 3, "cylinder_names": ["A1", "A2", "A3"],
                  "bore_mm": 600, "stroke_mm": 2400, "rod_length_mm": 2500, "rated_power_kw": 6000, "rated_speed_rpm": 105})");
        write(path("ship/engine/readings.csv"), readings);
        if (!shared.isEmpty())
            write(path("ship/ship_readings.csv"), shared);
        QString text;
        QTextStream out(&text), err(&text);
        batch::Streams streams{out, err, false, false};
        const int code = batch::run_command_line({"take", path("ship"), "--history", path("h.evenstroke")}, streams);
        ASSERT_EQ(code, 0) << text.toStdString();
    }
    std::string printed()
    {
        auto history = storage::History::open(path("h.evenstroke"), storage::OpenMode::read_only);
        const auto vessels = storage::VesselStore(*history.value()).engines();
        const auto sources = load_report_sources(*history.value(), vessels.value().front().id);
        EXPECT_TRUE(sources.has_value());
        return sources.value().details.data_hash;
    }
    QString path(const char* name) const { return folder_.filePath(QString::fromLatin1(name)); }
    QTemporaryDir folder_;
};

TEST_F(DataSetHash, IsMadeAnewFromReadingsCsvByThePrintedRecipe)
{
    // Units in several writings and kinds, a quick line, words, an empty box; in no order at all.
    const QByteArray readings = header + "2031-02,2031-02-14T06:30Z,exhaust_temperature,A1,352,degC,,,\n"
                                         "2031-01,2031-01-14T06:30Z,exhaust_temperature,A2,350.50,\xc2\xb0" "C,,,\n"
                                         "2031-01,2031-01-14T06:30Z,exhaust_temperature,A1,625,degF,,,\n"
                                         "2031-01,2031-01-14T06:30Z,exhaust_temperature,A3,,,,,out_of_order\n"
                                         "2031-01,2031-01-14T06:30Z,load_percent,,75,%,,,\n"
                                         "2031-01,2031-01-14T06:30Z,speed,,92,rpm,before,,\n"
                                         "2031-01,2031-01-14T06:30Z,scavenge_pressure,,3.11,bar abs,,,\n"
                                         "2031-01,2031-01-14T06:30Z,maximum_pressure,A1,14.2,MPa gauge,,,\n"
                                         "2031-01,2031-01-14T06:30Z,reading_remark,,,,,\"calm, following sea\",\n";
    take(readings);
    EXPECT_EQ(printed(), by_the_recipe(readings));
}

TEST_F(DataSetHash, CountsTimesInUtcAndLeavesOutWhatTheShipLends)
{
    take(header + "2031-01,2031-01-14T08:30+02:00,load_percent,,75,%,,,\n",
         "reading,taken_at,quantity,value,unit\n2031-01,2031-01-14T07:00Z,wind_speed,7,m/s\n");
    EXPECT_EQ(printed(), by_the_recipe(header + "2031-01,2031-01-14T06:30Z,load_percent,,75,%,,,\n"));
}

TEST_F(DataSetHash, ChangesWithTheUnitAndItsKind)
{
    const QByteArray line = "2031-01,2031-01-14T06:30Z,scavenge_pressure,,2.1,";
    take(header + line + "bar gauge,,,\n");
    EXPECT_EQ(printed(), by_the_recipe(header + line + "bar gauge,,,\n"));
    EXPECT_NE(printed(), by_the_recipe(header + line + "bar abs,,,\n"));
    EXPECT_NE(printed(), by_the_recipe(header + line + "bar,,,\n"));
}

} // namespace
} // namespace evenstroke
