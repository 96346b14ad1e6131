// SPDX-License-Identifier: GPL-3.0-or-later
// `evenstroke-batch explain`: rows, text, refusals (invented numbers).
#include "sample_vessel/sample_vessel.h"
#include "tests/app/command_run.h"

#include <gtest/gtest.h>

#include <QDir>
#include <QFile>
#include <QFileInfo>
#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>
#include <QTemporaryDir>

#include <cmath>

using namespace evenstroke;
using test::Outcome;
using test::run;

namespace {

constexpr char header_line[] =
    "vessel,engine,reading,subject,rank,cause,explained,urgency,limit_quantity,months_5,months_50,months_95\n";

QByteArray engine_json(const char* vessel)
{
    return QByteArray(R"({"vessel": ")") + vessel + R"(", "engine": "main engine", "cycle": "two-stroke", "cylinders": 6,
 "bore_mm": 600, "stroke_mm": 2400, "rod_length_mm": 2500, "rated_power_kw": 12000, "rated_speed_rpm": 105,
 "baseline": [{"load_percent": 70, "maximum_pressure": 150, "compression_pressure": 120, "exhaust_temperature": 320,
               "mean_indicated_pressure": 18, "fuel_index": 66, "scavenge_pressure": 2.4},
              {"load_percent": 80, "maximum_pressure": 150, "compression_pressure": 120, "exhaust_temperature": 320,
               "mean_indicated_pressure": 18, "fuel_index": 66, "scavenge_pressure": 2.4}]})";
}

/// A fixed scatter of about one between readings, cylinders and quantities.
double scatter(int reading, int cylinder, int quantity)
{
    const double x = std::sin(12.9898 * reading + 78.233 * cylinder + 37.719 * quantity) * 43758.5453;
    return 3.4 * (x - std::floor(x) - 0.5);
}

/// Twenty monthly readings; from the fourteenth on the exhaust valve of cylinder 4 leaks.
QByteArray readings_csv()
{
    struct
    {
        const char* name;
        double usual, noise, leak;
        const char* unit;
    } const quantities[] = {{"maximum_pressure", 150, 1.2, -5, "bar"},
                            {"compression_pressure", 120, 1.0, -4, "bar"},
                            {"mean_indicated_pressure", 18, 0.2, -0.5, "bar"},
                            {"exhaust_temperature", 320, 5, 32, "degC"},
                            {"fuel_index", 66, 0.6, 0, "%"},
                            {"jacket_outlet_temperature", 82, 0.8, 0, "degC"}};
    QByteArray text = "reading,taken_at,quantity,cylinder,value,unit\n";
    for (int i = 0; i < 20; ++i) {
        const QByteArray start = QStringLiteral("r%1,%2-%3-10T08:30Z,").arg(i + 1, 2, 10, QLatin1Char('0')).arg(2027 + i / 12)
                                     .arg(i % 12 + 1, 2, 10, QLatin1Char('0')).toUtf8();
        text += start + "load_percent,,75,%\n" + start + "shaft_power,,9000,kW\n";
        text += start + "scavenge_pressure,," + QByteArray::number(2.4 + 0.03 * scatter(i, 0, 9), 'f', 2) + ",bar\n";
        int k = 0;
        for (const auto& q : quantities) {
            ++k;
            for (int cylinder = 1; cylinder <= 6; ++cylinder) {
                const double value = q.usual + q.noise * scatter(i, cylinder, k) + (cylinder == 4 && i >= 13 ? q.leak : 0.0);
                text += start + q.name + ',' + QByteArray::number(cylinder) + ',' + QByteArray::number(value, 'f', 2) + ',' + q.unit + '\n';
            }
        }
    }
    return text;
}

class Explain : public testing::Test
{
protected:
    void take(const char* vessel)
    {
        const QString folder = QStringLiteral("folder of ") + QString::fromUtf8(vessel);
        write(folder + QStringLiteral("/engine.json"), engine_json(vessel));
        write(folder + QStringLiteral("/readings.csv"), readings_csv());
        const Outcome taken = run({"take", folder_.filePath(folder), "--history", history()});
        ASSERT_EQ(taken.code, 0) << taken.err.toStdString();
    }
    QString history() const { return folder_.filePath(QStringLiteral("h.evenstroke")); }
    Outcome explain(const QStringList& more = {}) const
    {
        return run(QStringList{"explain", "--history", history(), "--engine", "main engine"} + more);
    }

private:
    void write(const QString& name, const QByteArray& content) const
    {
        const QString path = folder_.filePath(name);
        ASSERT_TRUE(QDir().mkpath(QFileInfo(path).path()));
        QFile file(path);
        ASSERT_TRUE(file.open(QIODevice::WriteOnly));
        file.write(content);
    }
    QTemporaryDir folder_;
};

TEST_F(Explain, GivesARowForEachCauseOfTheCylinderThatIsOutOfTheUsual)
{
    take("Low Meadow");
    const Outcome csv = explain({"--format", "csv"});
    ASSERT_EQ(csv.code, 0) << csv.err.toStdString();
    EXPECT_TRUE(csv.out.startsWith(QLatin1String(header_line))) << csv.out.toStdString();
    ASSERT_FALSE(csv.rows().isEmpty());
    const QStringList first = csv.rows().first().split(u',');
    ASSERT_EQ(first.size(), 12);
    EXPECT_EQ(first.mid(0, 6), QStringList({"Low Meadow", "main engine", "r20", "cylinder 4", "1", "exhaust_valve_leak"}));
    EXPECT_GT(first[6].toDouble(), 0.7);
    EXPECT_LE(first[6].toDouble(), 1.0);
    EXPECT_EQ(first[7], "soon");
    int rank = 0;
    for (const QString& row : csv.rows())
        EXPECT_EQ(row.split(u',')[4].toInt(), ++rank) << row.toStdString();
    const Outcome json = explain({"--format", "json"});
    const QJsonArray objects = QJsonDocument::fromJson(json.out.toUtf8()).array();
    ASSERT_EQ(objects.size(), csv.rows().size());
    EXPECT_EQ(objects.first().toObject()["cause"].toString(), "exhaust_valve_leak");
    EXPECT_EQ(objects.first().toObject()["rank"].toDouble(), 1.0);
}

TEST_F(Explain, TellsPeopleWhatFitsAndWhatToCheckAndPronouncesNoVerdict)
{
    take("Low Meadow");
    const Outcome text = explain();
    EXPECT_EQ(text.code, 0);
    EXPECT_EQ(text.out, explain({"--format", "text"}).out);
    for (const char* said : {"Cylinder 4 is out of the usual at reading r20 (", "fits: exhaust temperature", "check next: ", "urgency: soon",
                             "not read: ", "Caution: ", "possible causes"})
        EXPECT_TRUE(text.out.contains(said)) << said << "\n" << text.out.toStdString();
    for (const char* never : {"diagnos", "certain", "nan", "speaks against: exhaust temperature"})
        EXPECT_FALSE(text.out.contains(never)) << never;
}

TEST_F(Explain, AnEarlierReadingIsExplainedAsIfNothingHadComeAfterIt)
{
    take("Low Meadow");
    const Outcome before = explain({"--reading", "r12", "--format", "csv"});
    EXPECT_EQ(before.code, 0);
    EXPECT_EQ(before.out, header_line) << "nothing out of the usual: the header alone";
    EXPECT_TRUE(explain({"--reading", "r12"}).out.contains("Nothing is out of the usual at reading r12 ("));
    EXPECT_TRUE(explain({"--reading", "r02"}).out.contains("too few readings"));
    EXPECT_EQ(explain({"--reading", "r20", "--format", "csv"}).out, explain({"--format", "csv"}).out);
}

TEST_F(Explain, RefusesInWordsWhatItCannotFind)
{
    take("Low Meadow");
    for (const char* format : {"text", "csv", "json"}) {
        const Outcome reading = explain({"--reading", "nix", "--format", format});
        EXPECT_EQ(reading.code, 1);
        EXPECT_TRUE(reading.out.isEmpty());
        EXPECT_TRUE(reading.err.contains("\"nix\""));
    }
    const Outcome engine = run({"explain", "--history", history(), "--engine", "steam engine"});
    EXPECT_EQ(engine.code, 1);
    EXPECT_TRUE(engine.err.contains("Choose one of: Low Meadow, main engine")) << engine.err.toStdString();
    EXPECT_EQ(explain({"--format", "xml"}).code, 2);
    EXPECT_EQ(run({"explain", "--history", history()}).code, 2);
    EXPECT_EQ(run({"explain", "--history", history() + "x", "--engine", "main engine"}).code, 3);
}

TEST_F(Explain, AnEngineOfSeveralVesselsIsRefusedWithTheirNames)
{
    take("Low Meadow");
    take("Grey Heron");
    const Outcome refused = explain();
    EXPECT_EQ(refused.code, 1);
    EXPECT_TRUE(refused.out.isEmpty());
    EXPECT_TRUE(refused.err.contains("Grey Heron") && refused.err.contains("Low Meadow")) << refused.err.toStdString();
    EXPECT_TRUE(refused.err.contains("--vessel"));
    const Outcome chosen = explain({"--vessel", "Grey Heron", "--format", "csv"});
    EXPECT_EQ(chosen.code, 0) << chosen.err.toStdString();
    EXPECT_TRUE(chosen.rows().first().startsWith("Grey Heron,"));
}

TEST(ExplainSample, EveryEngineOfTheSampleVesselHasAnAnswer)
{
    const QTemporaryDir folder;
    const QString history = folder.filePath(QStringLiteral("sample.evenstroke"));
    ASSERT_EQ(run({"sample", "--out", folder.filePath(QStringLiteral("sample"))}).code, 0);
    ASSERT_EQ(run({"take", folder.filePath(QStringLiteral("sample")), "--history", history}).code, 0);
    for (const char* engine : {"main engine", "auxiliary engine 1"}) {
        const Outcome text = run({"explain", "--history", history, "--engine", engine});
        EXPECT_EQ(text.code, 0) << text.err.toStdString();
        EXPECT_TRUE(text.out.contains("out of the usual")) << text.out.toStdString();
        EXPECT_TRUE(run({"explain", "--history", history, "--engine", engine, "--format", "csv"}).out.startsWith(QLatin1String(header_line)));
    }
}

} // namespace
