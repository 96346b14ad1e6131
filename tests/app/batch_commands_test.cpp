// SPDX-License-Identifier: GPL-3.0-or-later
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

#include <set>

using namespace evenstroke;
using test::Outcome;
using test::run;

namespace {

/// The sample vessel taken into a history, once for all tests of this file.
class SampleVesselEndToEnd : public testing::Test
{
protected:
    static void SetUpTestSuite()
    {
        folder_ = new QTemporaryDir;
        ASSERT_EQ(run({"sample", "--out", folder_->filePath("sample")}).code, 0);
        const Outcome taken = run({"take", folder_->filePath("sample"), "--history", history()});
        ASSERT_EQ(taken.code, 0) << taken.err.toStdString();
    }
    static void TearDownTestSuite() { delete folder_; }
    static QString history() { return folder_->filePath("sample.evenstroke"); }
    static QTemporaryDir* folder_;
};
QTemporaryDir* SampleVesselEndToEnd::folder_ = nullptr;

/// RFC 4180 cells of one row; the tests' rows hold no line feed.
QStringList cells(const QString& row)
{
    QStringList parts{QString()};
    bool quoted = false;
    for (const QChar c : row) {
        if (c == QLatin1Char('"'))
            quoted = !quoted;
        else if (c == QLatin1Char(',') && !quoted)
            parts << QString();
        else
            parts.last() += c;
    }
    return parts;
}

} // namespace

TEST_F(SampleVesselEndToEnd, FlagsFindExactlyTheTwoDevelopingFaults)
{
    const Outcome flags = run({"flags", "--history", history()});
    ASSERT_EQ(flags.code, 0) << flags.err.toStdString();
    EXPECT_TRUE(flags.out.startsWith("vessel,engine,flagged_at,subject,quantity,severity,sentence\n"));
    const auto faults = sample::sample_truth().faults;
    ASSERT_EQ(faults.size(), 2u);
    EXPECT_EQ(flags.rows().size(), 2) << flags.out.toStdString();
    for (const sample::SampleFault& fault : faults) {
        int found = 0;
        for (const QString& row : flags.rows()) {
            const QStringList c = cells(row);
            ASSERT_EQ(c.size(), 7) << row.toStdString();
            if (c[1].toStdString() != fault.engine || c[3] != QString("cylinder %1").arg(fault.cylinder))
                continue;
            ++found;
            EXPECT_GT(c[2].toStdString().substr(0, 10), fault.onset); // never before it began
            EXPECT_NE(c[5], "ask");
            EXPECT_TRUE(c[6].contains(QStringLiteral("by chance"))) << c[6].toStdString();
            EXPECT_TRUE(c[6].contains(QStringLiteral("engine-years"))) << c[6].toStdString();
        }
        EXPECT_EQ(found, 1) << fault.engine << " cylinder " << fault.cylinder;
    }
}

TEST_F(SampleVesselEndToEnd, DoubtsFindTheTypingErrorsAndLittleElse)
{
    const Outcome doubts = run({"doubts", "--history", history()});
    ASSERT_EQ(doubts.code, 0) << doubts.err.toStdString();
    std::set<QStringList> wanted;
    for (const sample::SampleTypingError& slip : sample::sample_truth().typing_errors)
        wanted.insert({QString::fromStdString(slip.vessel), QString::fromStdString(slip.engine),
                       QString::fromStdString(slip.reading), QString::fromStdString(slip.quantity),
                       QString::fromStdString(slip.cylinder), QString::fromStdString(slip.verdict)});
    int others = 0;
    for (const QString& row : doubts.rows()) {
        const QStringList c = cells(row);
        if (wanted.erase(c) == 0 && c.last() != "unsteady")
            ++others;
    }
    for (const QStringList& missing : wanted)
        ADD_FAILURE() << missing.join(',').toStdString() << " was not found";
    EXPECT_LE(others, 3) << doubts.out.toStdString(); // 2.5 in 100 readings over some 140 readings
}

TEST_F(SampleVesselEndToEnd, TakingTheSameAgainChangesNothing)
{
    const Outcome again = run({"take", folder_->filePath("sample"), "--history", history()});
    EXPECT_EQ(again.code, 0) << again.err.toStdString();
    EXPECT_TRUE(again.out.contains(" 0 values new")) << again.out.toStdString();
}

TEST_F(SampleVesselEndToEnd, EvaluateAgreesInBothFormats)
{
    const Outcome csv = run({"evaluate", "--history", history(), "--engine", "main engine"});
    const Outcome json = run({"evaluate", "--history", history(), "--engine", "main engine", "--format", "json"});
    ASSERT_EQ(csv.code, 0) << csv.err.toStdString();
    const QJsonArray objects = QJsonDocument::fromJson(json.out.toUtf8()).array();
    ASSERT_EQ(objects.size(), csv.rows().size());
    const QStringList header = cells(csv.out.section(QLatin1Char('\n'), 0, 0));
    EXPECT_EQ(header.join(','), "vessel,engine,reading,taken_at,quantity,cylinder,value,unit,corrected,expected,deviation,apart,"
                                "uncertainty");
    int with_deviation = 0;
    for (qsizetype i = 0; i < objects.size(); i += 37) {
        const QStringList c = cells(csv.rows().at(i));
        const QJsonObject object = objects.at(i).toObject();
        EXPECT_EQ(object["quantity"].toString(), c[4]);
        if (c[10].isEmpty()) {
            EXPECT_TRUE(object["deviation"].isNull());
            continue;
        }
        ++with_deviation;
        // Deviation is corrected minus expected, in the typed unit; the numbers are not rounded.
        EXPECT_NEAR(c[10].toDouble(), c[8].toDouble() - c[9].toDouble(), 1e-9 * (1.0 + std::abs(c[8].toDouble())));
    }
    EXPECT_GT(with_deviation, 10);
}

TEST_F(SampleVesselEndToEnd, VerifyBackupAndReport)
{
    EXPECT_EQ(run({"verify", "--history", history()}).code, 0);
    const QString copy = folder_->filePath("copy.evenstroke");
    EXPECT_EQ(run({"backup", "--history", history(), "--to", copy}).code, 0);
    EXPECT_EQ(run({"verify", "--history", copy}).code, 0);
    EXPECT_NE(run({"backup", "--history", history(), "--to", copy}).code, 0); // nothing is written over
    const QString pdf = folder_->filePath("report.pdf");
    const Outcome report = run({"report", "--history", history(), "--engine", "main engine", "--from", "2025-12-01", "--to",
                                "2026-11-30", "--out", pdf});
    EXPECT_EQ(report.code, 0) << report.err.toStdString();
    const Outcome usual = run({"report", "--history", history(), "--engine", "main engine", "--from", "2025-10-01", "--to",
                              "2026-11-30", "--depth", "usual", "--out", folder_->filePath("usual.pdf")});
    EXPECT_EQ(usual.code, 0) << usual.err.toStdString();
    const Outcome odd = run({"report", "--history", history(), "--engine", "main engine", "--from", "2025-12-01", "--to",
                             "2026-11-30", "--depth", "deep", "--out", folder_->filePath("odd.pdf")});
    EXPECT_EQ(odd.code, 2);
    EXPECT_TRUE(odd.err.contains("brief, usual or full")) << odd.err.toStdString();
    QFile file(pdf);
    ASSERT_TRUE(file.open(QIODevice::ReadOnly));
    EXPECT_EQ(file.read(5), "%PDF-");
    EXPECT_LT(file.size(), 1000000);
}

TEST(BatchUse, WrongUseIsExitTwoAndSaysHow)
{
    EXPECT_EQ(run({}).code, 2);
    EXPECT_EQ(run({"dance"}).code, 2);
    EXPECT_EQ(run({"flags"}).code, 2);
    EXPECT_TRUE(run({"flags"}).err.contains("--history is missing"));
    EXPECT_EQ(run({"flags", "--history", "x", "--colour"}).code, 2);
    EXPECT_EQ(run({"flags", "--history", "x", "--format", "xml"}).code, 2);
    EXPECT_EQ(run({"take", "--history", "x"}).code, 2);
    for (const char* later : {"parcel", "receive"}) {
        EXPECT_EQ(run({later}).code, 2) << later;
        EXPECT_TRUE(run({later}).err.contains("not in this version")) << later;
    }
    EXPECT_TRUE(run({"flags"}).out.isEmpty()); // results only on standard output
}

TEST(BatchUse, AHistoryThatIsNotThereOrNotOursIsLeftAlone)
{
    QTemporaryDir folder;
    const QString absent = folder.filePath("absent.evenstroke");
    EXPECT_EQ(run({"flags", "--history", absent}).code, 3);
    EXPECT_FALSE(QFile::exists(absent));
    const QString foreign = folder.filePath("notes.txt");
    QFile file(foreign);
    ASSERT_TRUE(file.open(QIODevice::WriteOnly));
    file.write("not a history at all");
    file.close();
    const Outcome refused = run({"flags", "--history", foreign});
    EXPECT_TRUE(refused.code == 3 || refused.code == 1);
    EXPECT_FALSE(refused.err.isEmpty());
    ASSERT_TRUE(file.open(QIODevice::ReadOnly));
    EXPECT_EQ(file.readAll(), "not a history at all");
}

TEST(BatchTake, ABadFolderIsRefusedWholeAndKeepGoodTakesTheRest)
{
    QTemporaryDir folder;
    ASSERT_EQ(run({"sample", "--out", folder.filePath("sample")}).code, 0);
    QFile readings(folder.filePath("sample/main_engine/readings.csv"));
    ASSERT_TRUE(readings.exists());
    ASSERT_TRUE(readings.open(QIODevice::Append));
    readings.write("2026-12,2026-12-01T06:30Z,colour_of_smoke,,3,bar,,,\n");
    readings.close();
    const QString history = folder.filePath("h.evenstroke");
    const Outcome refused = run({"take", folder.filePath("sample"), "--history", history});
    EXPECT_EQ(refused.code, 1);
    EXPECT_TRUE(refused.err.contains("readings.csv, line ")) << refused.err.toStdString();
    EXPECT_TRUE(refused.err.contains("colour_of_smoke"));
    EXPECT_FALSE(run({"flags", "--history", history, "--engine", "main engine"}).code == 0); // nothing of it is in
    EXPECT_EQ(run({"flags", "--history", history, "--engine", "auxiliary engine 1"}).code, 0);
    EXPECT_EQ(run({"take", folder.filePath("sample"), "--history", history, "--keep-good"}).code, 0);
    EXPECT_EQ(run({"flags", "--history", history, "--engine", "main engine"}).code, 0);
}

namespace {

QString engine_json(const QString& further = {})
{
    return QStringLiteral(R"({"vessel": "Quiet Barley", "engine": "main engine", "cycle": "two-stroke", "cylinders": 2,
        "bore_mm": 600, "stroke_mm": 2400, "rod_length_mm": 2460, "rated_power_kw": 9000, "rated_speed_rpm": 105%1})")
        .arg(further);
}

/// A folder with one small engine, and a history that is not there yet.
class TakeByCommand : public testing::Test
{
protected:
    void SetUp() override
    {
        write("engine/engine.json", engine_json());
        write("engine/readings.csv", "reading,taken_at,quantity,cylinder,value,unit\n"
                                     "2029-01,2029-01-12T08:30Z,speed,,95.4,r/min\n"
                                     "2029-01,2029-01-12T08:30Z,maximum_pressure,1,140.5,bar\n");
    }
    QString path(const char* name) const { return folder_.filePath(QString::fromUtf8(name)); }
    void write(const char* name, const QString& content) const
    {
        ASSERT_TRUE(QDir().mkpath(QFileInfo(path(name)).path()));
        QFile file(path(name));
        ASSERT_TRUE(file.open(QIODevice::WriteOnly));
        file.write(content.toUtf8());
    }
    Outcome take(const QStringList& folders) const
    {
        return run(QStringList{"take"} + folders + QStringList{"--history", path("h.evenstroke")});
    }

private:
    QTemporaryDir folder_;
};

} // namespace

TEST_F(TakeByCommand, AFolderThatIsNotThereDoesNotStopTheOthers)
{
    const Outcome taken = take({path("engine"), path("nowhere")});
    EXPECT_EQ(taken.code, 1);
    EXPECT_TRUE(taken.err.contains(path("nowhere") + ": There is no folder of this name.")) << taken.err.toStdString();
    EXPECT_TRUE(taken.out.contains("2 values new")) << taken.out.toStdString();
    EXPECT_TRUE(taken.err.contains("1 folder taken: " + path("engine"))) << taken.err.toStdString();
    EXPECT_TRUE(taken.err.contains("1 folder refused whole, nothing of it is in the history: " + path("nowhere"))) << taken.err.toStdString();
    EXPECT_FALSE(taken.err.contains("keep-good")) << "a folder that is not there has no good rows";
    EXPECT_EQ(run({"evaluate", "--history", path("h.evenstroke")}).rows().size(), 2);
}

TEST_F(TakeByCommand, LeavesNoEmptyHistoryBehind)
{
    EXPECT_EQ(take({path("nowhere")}).code, 1);
    EXPECT_FALSE(QFile::exists(path("h.evenstroke")));
    write("engine/readings.csv", "reading,taken_at,quantity,cylinder,value,unit\n2029-01,2029-01-12T08:30Z,moonlight,,1,%\n");
    const Outcome refused = take({path("engine")});
    EXPECT_EQ(refused.code, 1);
    EXPECT_TRUE(refused.err.contains("No history was made"));
    EXPECT_FALSE(QFile::exists(path("h.evenstroke")));
    write("engine/readings.csv", "reading,taken_at,quantity,cylinder,value,unit\n2029-01,2029-01-12T08:30Z,speed,,95,r/min\n");
    EXPECT_EQ(take({path("engine")}).code, 0);
    EXPECT_EQ(take({path("nowhere")}).code, 1);
    EXPECT_TRUE(QFile::exists(path("h.evenstroke"))) << "was there before";
}

TEST_F(TakeByCommand, OfOneFolderNamedTwiceIsTakenOnce)
{
    const Outcome taken = take({path("engine"), path("engine")});
    EXPECT_EQ(taken.code, 0) << taken.err.toStdString();
    EXPECT_EQ(taken.out.count("values new"), 1);
}

TEST_F(TakeByCommand, CountsValuesEventsAndCards)
{
    write("engine/events.csv", "date,cylinder,kind,note\n2029-01-20,1,overhaul,\n2029-01-21,,dance,\n");
    write("engine/cards/2029-01/1.csv", "crank_angle_deg,pressure_bar\n-1,100\n0,101\n");
    const Outcome refused = take({path("engine")});
    EXPECT_EQ(refused.code, 1);
    EXPECT_TRUE(refused.out.contains("4 rows were good, 1 not")) << refused.out.toStdString();
    EXPECT_TRUE(refused.err.contains("events.csv, line 3")) << refused.err.toStdString();
    EXPECT_TRUE(refused.err.contains("--keep-good")) << refused.err.toStdString();
    const Outcome kept = take({path("engine"), "--keep-good"});
    EXPECT_EQ(kept.code, 0);
    EXPECT_TRUE(kept.out.contains("2 values new, 0 known, 0 left out; 1 events new, 0 known, 1 left out; 1 cards new, 0 "
                                  "known, 0 left out"))
        << kept.out.toStdString();
    write("engine/engine.json", "{");
    EXPECT_FALSE(take({path("engine")}).out.contains("rows")) << "none was come to";
}

TEST_F(TakeByCommand, SaysWhatOfTheEnginesDescriptionChanged)
{
    ASSERT_EQ(take({path("engine")}).code, 0);
    write("engine/engine.json", engine_json(R"(, "baseline": [{"load_percent": 50, "exhaust_temp": 300}])"));
    const Outcome changed = take({path("engine")});
    EXPECT_EQ(changed.code, 0);
    EXPECT_TRUE(changed.err.contains("knew of the engine (baseline); it is kept as revision 2 of "))
        << changed.err.toStdString();
    EXPECT_TRUE(changed.err.contains("Write exhaust_temperature if that is meant")) << changed.err.toStdString();
}

TEST_F(TakeByCommand, TheChosenEngineIsMissedInWords)
{
    ASSERT_EQ(take({path("engine")}).code, 0);
    const QString history = path("h.evenstroke");
    EXPECT_TRUE(run({"flags", "--history", history, "--vessel", "nope"})
                    .err.startsWith("The history holds no engine of a vessel \"nope\". Choose one of: Quiet Barley, main "
                                    "engine."));
    EXPECT_TRUE(run({"flags", "--history", history, "--engine", "nope"})
                    .err.startsWith("The history holds no engine \"nope\". Choose one of"));
}

TEST_F(TakeByCommand, AReadingThatIsNotThereLeavesStandardOutputEmpty)
{
    ASSERT_EQ(take({path("engine")}).code, 0);
    for (const char* format : {"csv", "json"}) {
        const Outcome outcome =
            run({"evaluate", "--history", path("h.evenstroke"), "--reading", "nix", "--format", format});
        EXPECT_EQ(outcome.code, 1);
        EXPECT_TRUE(outcome.out.isEmpty()) << outcome.out.toStdString();
        EXPECT_TRUE(outcome.err.contains("\"nix\""));
    }
    EXPECT_EQ(run({"flags", "--history", path("h.evenstroke"), "--format", "json"}).out, "[]\n");
}

TEST_F(TakeByCommand, AWindForceIsShownAsTypedAndNotConvertedAlongAStraightLine)
{
    write("engine/readings.csv", "reading,taken_at,quantity,cylinder,value,unit\n2029-01,2029-01-12T08:30Z,wind_speed,,4,Beaufort\n"
                                 "2029-01,2029-01-12T08:30Z,fuel_index,1,62,mm\n");
    ASSERT_EQ(take({path("engine")}).code, 0);
    const Outcome shown = run({"evaluate", "--history", path("h.evenstroke")});
    EXPECT_TRUE(shown.out.contains(",wind_speed,,4,Beaufort,,,,,\n")) << shown.out.toStdString();
    EXPECT_TRUE(shown.out.contains(",fuel_index,1,62,mm,,,,,\n")) << shown.out.toStdString();
}

TEST(BatchUse, HelpOfACommandIsAResult)
{
    for (const char* command : {"take", "evaluate", "flags", "doubts", "explain", "report", "verify", "backup", "sample"}) {
        const Outcome help = run({command, "--help"});
        EXPECT_EQ(help.code, 0) << command;
        EXPECT_TRUE(help.out.contains(QString("evenstroke-batch %1").arg(command)));
        EXPECT_TRUE(help.err.isEmpty()) << help.err.toStdString();
    }
    EXPECT_TRUE(run({"take", "--help"}).out.contains("--keep-good"));
    const Outcome all = run({"--help"});
    EXPECT_EQ(all.code, 0);
    EXPECT_TRUE(all.out.contains("evaluate"));
}
