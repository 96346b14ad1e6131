// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/fleet/fleet_view.h"
#include "core/trend/drift_catalogue.h"
#include "core/trend/fleet_strips.h"
#include "tests/app/invented_judgement.h"
#include "tests/app/pictures.h"

#include <gtest/gtest.h>

#include <QAbstractItemModelTester>
#include <QSignalSpy>
#include <QTest>

namespace evenstroke {
namespace {

const TimePoint now = TimePoint(std::chrono::sys_days{std::chrono::year{2031} / 4 / 1});

FleetRow row(const char* ship, bool drifting, int readings = 37)
{
    FleetRow made;
    made.vessel_id = made.vessel_name = QString::fromLatin1(ship);
    made.engine_id = made.vessel_id + QStringLiteral("-main");
    made.engine_name = QStringLiteral("Main engine");
    made.summary = summarise(*invented::judgement({6, readings, drifting, true}));
    return made;
}

TEST(FleetSummary, SurvivesBeingKept)
{
    const FleetSummary summary = summarise(*invented::judgement());
    const auto again = unpack(pack(summary));
    ASSERT_TRUE(again.has_value());
    EXPECT_EQ(again->level, summary.level);
    EXPECT_EQ(again->sentence, summary.sentence);
    EXPECT_EQ(again->last_reading, summary.last_reading);
    EXPECT_EQ(again->last_usable, summary.last_usable);
    EXPECT_EQ(again->worsening, summary.worsening);
    ASSERT_EQ(again->strips.size(), summary.strips.size());
    EXPECT_EQ(again->strips.front().values, summary.strips.front().values);
    EXPECT_EQ(again->strips.front().title, summary.strips.front().title);
}

TEST(FleetSummary, OfAnotherVersionOrTornIsNotRead)
{
    QByteArray bytes = pack(summarise(*invented::judgement()));
    EXPECT_FALSE(unpack(bytes.left(bytes.size() / 2)).has_value());
    bytes[1] = 77;
    EXPECT_FALSE(unpack(bytes).has_value());
    EXPECT_FALSE(unpack({}).has_value());
}

TEST(FleetSummary, HasAStripForEveryLineOfTheCatalogueAndEveryQuantityThatIsWatched)
{
    EXPECT_EQ(all_fleet_strips().size(), static_cast<std::size_t>(fleet_strip_count));
    for (const drift::CatalogueChannel& channel : drift::channel_catalogue())
        if (const auto id = find_quantity(channel.quantity)) {
            EXPECT_TRUE(find_fleet_strip(quantity(*id))) << channel.quantity;
        }
}

TEST(FleetSummary, TheStripOfAGroupIsTheOneThatStandsOut)
{
    const FleetSummary summary = summarise(*invented::judgement());
    const FleetStrip& pressures = summary.strips.at(find_fleet_strip(quantity(*find_quantity("compression_pressure"))).value());
    EXPECT_EQ(pressures.title, QStringLiteral("Compression pressure, cylinder 4"));
    EXPECT_EQ(pressures.level, Level::watch);
}

TEST(TroubleRank, FollowsTheOrderOfTrouble)
{
    FleetSummary summary;
    summary.last_reading = summary.last_usable = now - std::chrono::days(10);
    const auto rank = [&](Level level, bool worsening, bool limit, int days) {
        summary.level = level;
        summary.worsening = worsening;
        summary.limit_passed = limit;
        summary.last_usable = now - std::chrono::days(days);
        return trouble_rank(summary, now);
    };
    const std::vector<int> order{rank(Level::watch, false, true, 10), rank(Level::act, true, false, 10),
                                 rank(Level::act, false, false, 10),  rank(Level::watch, true, false, 10),
                                 rank(Level::quiet, false, false, 60), rank(Level::watch, false, false, 10),
                                 rank(Level::ask, false, false, 10),  rank(Level::note, false, false, 10),
                                 rank(Level::quiet, false, false, 10)};
    EXPECT_TRUE(std::is_sorted(order.begin(), order.end()));
    EXPECT_EQ(std::adjacent_find(order.begin(), order.end()), order.end());
}

TEST(TroubleRank, SilenceNeverLooksQuiet)
{
    FleetSummary summary;
    summary.level = Level::quiet;
    EXPECT_LT(trouble_rank(summary, now), 8) << "no usable reading at all";
    summary.last_usable = now - std::chrono::days(late_after_days);
    EXPECT_EQ(trouble_rank(summary, now), 8);
    summary.last_usable = now - std::chrono::days(late_after_days + 1);
    EXPECT_LT(trouble_rank(summary, now), 8);
}

TEST(Fleet, FoldsTheQuietOnesIntoOneLine)
{
    FleetModel model;
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    model.show_fleet({row("Quiet Barley", true), row("Long Furrow", false), row("High Meadow", false)}, now);
    EXPECT_EQ(model.rowCount(), 2);
    EXPECT_TRUE(model.is_fold(1));
    EXPECT_TRUE(model.fold_text().startsWith(QStringLiteral("2 ")));
    model.unfold(true);
    EXPECT_EQ(model.rowCount(), 4);
    EXPECT_EQ(model.row(2)->vessel_name, QStringLiteral("Long Furrow"));
    model.unfold(false);
    EXPECT_EQ(model.rowCount(), 2);
}

TEST(Fleet, EnginesThatLearnAreNotCountedAmongTheQuiet)
{
    FleetRow learning = row("Long Furrow", false), empty = row("High Meadow", false);
    learning.summary.level = Level::learning;
    empty.summary.level = Level::no_data;
    FleetModel model;
    model.show_fleet({row("Quiet Barley", false), learning, empty}, now);
    EXPECT_TRUE(model.fold_text().startsWith("1 engine")) << model.fold_text().toStdString();
    EXPECT_TRUE(model.fold_text().contains("1 learning")) << model.fold_text().toStdString();
    EXPECT_TRUE(model.fold_text().contains("1 without data")) << model.fold_text().toStdString();
    model.show_fleet({learning}, now);
    EXPECT_FALSE(model.fold_text().contains("quiet")) << model.fold_text().toStdString();
    EXPECT_TRUE(model.sentence_words(learning).startsWith("Learning")) << model.sentence_words(learning).toStdString();
}

TEST(Fleet, SaysInWordsHowOldALateReadingIs)
{
    FleetModel model;
    model.show_fleet({row("Long Furrow", false, 30)}, now); // the newest one is from August
    EXPECT_TRUE(model.last_reading_words(*model.row(0)).contains(QStringLiteral("month")));
    EXPECT_TRUE(model.sentence_words(*model.row(0)).startsWith(QStringLiteral("No usable reading since")));
}

TEST(Fleet, EnterOpensAnEngineOrTheFold)
{
    FleetView view;
    view.resize(1166, 600);
    view.show_fleet({row("Quiet Barley", true), row("Long Furrow", false), row("Still Water", false, 30)}, now);
    view.show();
    view.setFocus();
    keep_picture(view, QStringLiteral("fleet_view"));
    QSignalSpy asked(&view, &FleetView::asked_for);
    QTest::keyClick(&view, Qt::Key_Return);
    ASSERT_EQ(asked.count(), 1);
    EXPECT_EQ(asked.at(0).at(1).toString(), QStringLiteral("Quiet Barley-main"));
    QTest::keyClick(&view, Qt::Key_End);
    view.setCurrentIndex(view.fleet_model().index(view.fleet_model().rowCount() - 1, 0));
    QTest::keyClick(&view, Qt::Key_Return);
    EXPECT_TRUE(view.fleet_model().unfolded());
    keep_picture(view, QStringLiteral("fleet_view_unfolded"));
}

} // namespace
} // namespace evenstroke
