// SPDX-License-Identifier: GPL-3.0-or-later

#include "tests/app/command_run.h"

#include <gtest/gtest.h>

#include <QDir>
#include <QFile>
#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>
#include <QTemporaryDir>

#include <cmath>

using namespace evenstroke;
using test::Outcome;
using test::run;

namespace {

QJsonArray cards(const Outcome& outcome) { return QJsonDocument::fromJson(outcome.out.toUtf8()).array(); }

const char* const result_names[] = {
    "mean_indicated_pressure_bar", "maximum_pressure_bar_abs", "maximum_pressure_angle_deg", "compression_pressure_bar_abs",
    "expansion_pressure_bar_abs", "start_of_combustion_deg", "maximum_pressure_rise_bar_per_deg", "ca10_deg", "ca50_deg",
    "ca90_deg", "tdc_offset_deg", "zero_offset_bar", "trapped_mass_kg", "temperature_tdc_k", "maximum_temperature_k"};

/// The invented vessel's cards: indicator 0.3° late and 0.15 bar high.
class CardCommand : public testing::Test
{
protected:
    void SetUp() override
    {
        const QDir engine(QStringLiteral(EVENSTROKE_SOURCE_DIR "/sample_vessel/files/main_engine"));
        engine_ = engine.filePath("engine.json");
        cards_ = engine.filePath("cards/2026-10");
    }
    Outcome card(const QStringList& traces) const
    {
        return run(QStringList{"card", "--engine", engine_, "--speed-rpm", "96.9", "--scavenge-pressure-bar-abs", "3.165",
                               "--charge-temperature-k", "343"} + traces);
    }
    QString write(const char* name, const QByteArray& content) const
    {
        QFile file(folder_.filePath(name));
        EXPECT_TRUE(file.open(QIODevice::WriteOnly));
        file.write(content);
        return file.fileName();
    }
    void refused(const char* name, const QByteArray& content, const char* part) const
    {
        const Outcome outcome = card({write(name, content)});
        EXPECT_EQ(outcome.code, 1) << name;
        EXPECT_TRUE(outcome.out.isEmpty()) << name;
        EXPECT_TRUE(outcome.err.contains(part)) << outcome.err.toStdString();
        EXPECT_TRUE(outcome.err.contains(name)) << outcome.err.toStdString();
    }
    QTemporaryDir folder_;
    QString engine_, cards_;
};

} // namespace

TEST_F(CardCommand, GivesOneObjectACardWithEveryResultAndItsUncertainty)
{
    const Outcome outcome = card({cards_ + "/1.csv", cards_ + "/5.csv"});
    ASSERT_EQ(outcome.code, 0) << outcome.err.toStdString();
    ASSERT_EQ(cards(outcome).size(), 2);
    const QJsonObject first = cards(outcome).at(0).toObject();
    EXPECT_TRUE(first["file"].toString().endsWith("1.csv"));
    EXPECT_EQ(first["cycles"].toInt(), 1);
    for (const char* name : result_names) {
        EXPECT_TRUE(first[name].isDouble()) << name;
        EXPECT_GT(first["uncertainty"].toObject()[name].toDouble(), 0.0) << name;
    }
    EXPECT_TRUE(first["remarks"].isArray());
    // The form of this reading says 17.18 bar, 149.4 and 111.0 bar gauge; the indicator's own scatter is 1 bar.
    EXPECT_NEAR(first["mean_indicated_pressure_bar"].toDouble(), 17.18, 0.3);
    EXPECT_NEAR(first["maximum_pressure_bar_abs"].toDouble(), 150.4, 1.0);
    EXPECT_NEAR(first["compression_pressure_bar_abs"].toDouble(), 112.0, 1.0);
    EXPECT_NEAR(first["tdc_offset_deg"].toDouble(), 0.3, 0.1);
}

TEST_F(CardCommand, TakesAFolderInTheOrderOfItsNames)
{
    const Outcome outcome = card({cards_});
    ASSERT_EQ(cards(outcome).size(), 6);
    EXPECT_TRUE(cards(outcome).at(5).toObject()["file"].toString().endsWith("6.csv"));
}

TEST_F(CardCommand, WithoutConditionsGivesWhatIsKnownAndNullForTheRest)
{
    const Outcome outcome = run({"card", "--engine", engine_, cards_ + "/1.csv"});
    ASSERT_EQ(outcome.code, 0) << outcome.err.toStdString();
    const QJsonObject card = cards(outcome).at(0).toObject();
    EXPECT_TRUE(card["trapped_mass_kg"].isNull());
    EXPECT_TRUE(card["maximum_temperature_k"].isNull());
    EXPECT_TRUE(card["mean_indicated_pressure_bar"].isDouble());
    QStringList codes;
    for (const QJsonValue& remark : card["remarks"].toArray())
        codes << remark.toObject()["code"].toString();
    EXPECT_TRUE(codes.contains("zero_not_referenced"));
    EXPECT_TRUE(codes.contains("charge_temperature_not_known"));
}

TEST_F(CardCommand, MissingSamplesAreBridged)
{
    QFile file(cards_ + "/1.csv");
    ASSERT_TRUE(file.open(QIODevice::ReadOnly));
    QList<QByteArray> lines = file.readAll().split('\n');
    for (const int line : {50, 200, 300, 301, 500})
        lines[line] = lines[line].left(lines[line].indexOf(',') + 1) + (line == 200 ? "nan" : "");
    const Outcome gaps = card({write("gaps.csv", lines.join('\n'))}), whole = card({cards_ + "/1.csv"});
    ASSERT_EQ(gaps.code, 0) << gaps.err.toStdString();
    EXPECT_NEAR(cards(gaps).at(0).toObject()["mean_indicated_pressure_bar"].toDouble(),
                cards(whole).at(0).toObject()["mean_indicated_pressure_bar"].toDouble(), 0.03);
}

TEST_F(CardCommand, BadFilesAreRefusedInWords)
{
    refused("empty.csv", "", "line 1");
    refused("text.csv", "Dear engineer,\nplease find enclosed\n", "line 1");
    refused("column.csv", "crank_angle_deg\n-180\n-179\n", "line 1");
    refused("short.csv", "crank_angle_deg,pressure_bar\n0,1\n1,2\n", "2 samples");
    refused("letters.csv", "crank_angle_deg,pressure_bar\n-180,3.1\n-179,three\n", "line 3");
    QByteArray zero = "crank_angle_deg,pressure_bar\n", twice = zero, falling = zero, late = zero;
    for (int i = -180; i < 180; ++i) {
        const QByteArray angle = QByteArray::number(i), back = QByteArray::number(-i);
        zero += angle + ",0\n";
        twice += angle + ",3.1\n" + angle + ",3.2\n";
        falling += back + "," + QByteArray::number(3.0 + 0.001 * i) + "\n";
        if (i >= -20)
            late += angle + "," + QByteArray::number(100 - i) + "\n";
    }
    refused("zero.csv", zero, "All pressures");
    refused("twice.csv", twice, "same crank angle");
    refused("falling.csv", falling, "steps back");
    refused("late.csv", late, "");
    QFile file(cards_ + "/1.csv");
    ASSERT_TRUE(file.open(QIODevice::ReadOnly));
    QByteArray tenth = "crank_angle_deg,pressure_bar\n", tenfold = tenth;
    for (const QByteArray& line : file.readAll().split('\n').mid(1)) {
        const QList<QByteArray> cells = line.split(',');
        if (cells.size() != 2)
            continue;
        tenth += cells[0] + "," + QByteArray::number(cells[1].toDouble() * 0.1) + "\n";
        tenfold += cells[0] + "," + QByteArray::number(cells[1].toDouble() * 10.0) + "\n";
    }
    refused("tenth.csv", tenth, "unit");
    refused("tenfold.csv", tenfold, "unit");
}

TEST_F(CardCommand, AGoodCardIsPrintedBesideABadOne)
{
    const Outcome outcome = card({write("bad.csv", "nothing\n"), cards_ + "/1.csv"});
    EXPECT_EQ(outcome.code, 1);
    EXPECT_EQ(cards(outcome).size(), 1);
    EXPECT_TRUE(outcome.err.contains("bad.csv"));
}

TEST_F(CardCommand, WrongUseIsExplained)
{
    EXPECT_EQ(run({"card"}).code, 2);
    EXPECT_EQ(run({"card", "--engine", engine_}).code, 2);
    const Outcome words = run({"card", "--engine", engine_, "--speed-rpm", "fast", cards_});
    EXPECT_EQ(words.code, 2);
    EXPECT_TRUE(words.err.contains("--speed-rpm"));
    EXPECT_EQ(run({"card", "--engine", engine_, "--scavenge-pressure-bar-abs", "3165", cards_}).code, 2);
    EXPECT_NE(run({"card", "--engine", folder_.filePath("none.json"), cards_}).code, 0);
}
