// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/hand_out.h"

#include <QDir>
#include <QDirIterator>

namespace evenstroke::storage {
namespace {

class HandingOut : public StorageTest
{
};

TEST_F(HandingOut, IsTakenInAgainWithoutAnyChange)
{
    write_ship();
    {
        const auto history = create();
        take_folder(*history, QStringLiteral("ship"));
        const auto vessel = value_of_result(VesselStore(*history).find_vessel("Quiet Barley"));
        const QStringList files = value_of_result(hand_out(*history, vessel.id, path(QStringLiteral("out"))));
        EXPECT_EQ(files.size(), 7);
    }
    const QByteArray before = read(QStringLiteral("ship.evenstroke"));
    {
        const auto history = open();
        const TakeReport report = take_folder(*history, QStringLiteral("out"));
        for (const FolderReport& folder : report.folders) {
            EXPECT_TRUE(folder.taken) << folder.folder;
            for (const RefusedRow& row : folder.refused)
                ADD_FAILURE() << row.text();
        }
    }
    EXPECT_EQ(read(QStringLiteral("ship.evenstroke")), before);
}

TEST_F(HandingOut, MakesTheSameHistoryElsewhere)
{
    write_ship();
    const auto first = memory(), second = memory();
    take_folder(*first, QStringLiteral("ship"));
    const auto vessel = value_of_result(VesselStore(*first).find_vessel("Quiet Barley"));
    value_of_result(hand_out(*first, vessel.id, path(QStringLiteral("out"))));
    EXPECT_FALSE(take_folder(*second, QStringLiteral("out")).anything_refused());
    const auto again = value_of_result(VesselStore(*second).find_vessel("Quiet Barley"));
    value_of_result(hand_out(*second, again.id, path(QStringLiteral("out again"))));
    QDirIterator files(path(QStringLiteral("out")), QDir::Files, QDirIterator::Subdirectories);
    int compared = 0;
    for (; files.hasNext(); ++compared) {
        const QString name = QDir(path(QStringLiteral("."))).relativeFilePath(files.next());
        EXPECT_EQ(read(name),
                  read(QString(name).replace(QStringLiteral("out/"), QStringLiteral("out again/"))))
            << name.toStdString();
    }
    EXPECT_EQ(compared, 7);
}

TEST_F(HandingOut, WritesFilesAsTheyWereRead)
{
    write_ship();
    const auto history = memory();
    take_folder(*history, QStringLiteral("ship"));
    value_of_result(hand_out(*history, value_of_result(VesselStore(*history).find_vessel("Quiet Barley")).id,
                             path(QStringLiteral("out"))));
    const QByteArray readings = read(QStringLiteral("out/main-engine/readings.csv"));
    EXPECT_TRUE(readings.contains("2029-01,2029-01-12T10:30+02:00,maximum_pressure,2,\"141,5\",bar abs,,,\n"))
        << readings.toStdString();
    EXPECT_TRUE(
        readings.contains("2029-01,2029-01-12T10:30+02:00,reading_remark,,,,,\"calm, \"\"steady\"\"\",\n"))
        << readings.toStdString();
    EXPECT_TRUE(readings.contains("2029-02,2029-02-12T08:30:15Z,fuel_consumption,,1900,l/h,,,\n"))
        << readings.toStdString();
    EXPECT_EQ(read(QStringLiteral("out/main-engine/engine.json")),
              read(QStringLiteral("ship/main/engine.json")));
    EXPECT_TRUE(read(QStringLiteral("out/main-engine/events.csv"))
                    .contains("2029-01-20,A2,overhaul,\"rings, liner\",12000.5,yard,\n"));
}

TEST_F(HandingOut, WritesOverNoFile)
{
    write_ship();
    const auto history = memory();
    take_folder(*history, QStringLiteral("ship"));
    const auto vessel = value_of_result(VesselStore(*history).find_vessel("Quiet Barley"));
    write(QStringLiteral("out/main-engine/readings.csv"), "mine");
    EXPECT_FALSE(hand_out(*history, vessel.id, path(QStringLiteral("out"))).has_value());
    EXPECT_EQ(read(QStringLiteral("out/main-engine/readings.csv")), "mine");
}

} // namespace
} // namespace evenstroke::storage
