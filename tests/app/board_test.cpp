// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_painting.h"
#include "app/board/board_view.h"
#include "app/desk/number_text.h"
#include "tests/app/invented_judgement.h"
#include "tests/app/pictures.h"
#include "tests/core/example_engine.h"

#include <gtest/gtest.h>

#include <QAbstractItemModelTester>
#include <QHeaderView>
#include <QPainter>
#include <QPdfWriter>
#include <QScrollBar>
#include <QSignalSpy>
#include <QTemporaryDir>
#include <QTest>

#include <cmath>
#include <memory>

namespace evenstroke {
namespace {

const BoardCell& cell_of(const Board& board, const char* quantity_name, int cylinder)
{
    for (const BoardRow& row : board.rows)
        if (row.cells.front().quantity == *find_quantity(quantity_name, Place::Kind::cylinder))
            return row.cells[static_cast<std::size_t>(cylinder - 1)];
    throw std::runtime_error("no such row");
}

TEST(StripBoard, ModelKeepsTheRulesOfItemModels)
{
    BoardModel model;
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    model.set_board(make_board(*invented::judgement(), TimeRange::since_overhaul), 1);
    EXPECT_EQ(model.columnCount(), 6);
    EXPECT_EQ(model.cylinder_rows(), 7);
    model.set_board(make_board(*invented::judgement({12, 37, true, true}), TimeRange::all), 2);
    EXPECT_EQ(model.columnCount(), 12);
    model.set_board({}, 1);
    EXPECT_EQ(model.rowCount(), 0);
}

TEST(StripBoard, SaysTheWorstFlagFirstAndWhatToCheck)
{
    const Board board = make_board(*invented::judgement(), TimeRange::since_overhaul);
    EXPECT_TRUE(board.headline.contains(QStringLiteral("Cylinder 4")));
    EXPECT_TRUE(board.level_words.startsWith(QStringLiteral("watch since")));
    EXPECT_TRUE(board.second_line.contains(QStringLiteral("engine-years")));
    EXPECT_TRUE(board.second_line.contains(QStringLiteral("Next:")));
    EXPECT_EQ(board.worst_place, Place::cylinder(4));
}

TEST(StripBoard, AFlagThatRoseIsNotDatedBackToItsBeginning)
{
    Judgement judgement = *invented::judgement();
    Flag& flag = judgement.flags.front();
    ASSERT_EQ(judgement.standing_flags().size(), 1u);
    const auto day_of = [&](std::size_t i) { return day_text(judgement.record->readings[i].taken_at.utc); };
    flag.severity = Level::watch;
    flag.level_now = Level::act;
    EXPECT_EQ(make_board(judgement, TimeRange::all).level_words, QStringLiteral("act now (began %1 as watch)").arg(day_of(flag.reading)));
    flag.raised_at = flag.reading + 1;
    EXPECT_EQ(make_board(judgement, TimeRange::all).level_words,
              QStringLiteral("act since %1 (began %2 as watch)").arg(day_of(flag.reading + 1), day_of(flag.reading)));
}

Judgement judged_with_work(std::size_t readings_since)
{
    return judge(std::make_shared<const EngineRecord>(overhauled_record(readings_since, 8.0)));
}

TEST(StripBoard, SaysWhatRecordedWorkHasToDoWithWhatIsShown)
{
    const Board before = make_board(judged_with_work(0), TimeRange::all);
    EXPECT_TRUE(before.headline.contains(QStringLiteral("Cylinder 3"))) << before.headline.toStdString();
    EXPECT_TRUE(before.second_line.startsWith(QStringLiteral("Entered since the newest reading: overhaul of cylinder 3")))
        << before.second_line.toStdString();
    const Board after = make_board(judged_with_work(2), TimeRange::all);
    EXPECT_TRUE(after.headline.contains(QStringLiteral("reads as before (overhaul on "))) << after.headline.toStdString();
    EXPECT_EQ(after.level, Level::note);
    EXPECT_EQ(after.level_words, level_text(Level::note));
    EXPECT_FALSE(after.second_line.contains(QStringLiteral("Entered since"))) << after.second_line.toStdString();
}

TEST(StripBoard, AReadingThatCannotBeComparedLeavesNoPointAmongTheDifferences)
{
    Judgement judgement = *invented::judgement();
    std::size_t before = 0;
    for (Trend& trend : judgement.trends)
        if (quantity(trend.quantity).name == "compression_pressure" && trend.place == Place::cylinder(3)) {
            trend.points.resize(trend.points.size() - 1);
            before = trend.points.size();
            TrendPoint uncorrected; // the coolant temperature was not read
            uncorrected.reading = judgement.readings.size() - 1;
            uncorrected.raw = 149.4;
            trend.points.push_back(uncorrected);
        }
    const Board board = make_board(judgement, TimeRange::all);
    const BoardCell& cell = cell_of(board, "compression_pressure", 3);
    EXPECT_EQ(cell.points.size(), before);
    for (const QPointF& point : cell.points)
        EXPECT_LT(std::abs(point.y()), 30.0);
    EXPECT_TRUE(cell.old_value);
    EXPECT_NE(cell.number, QStringLiteral("149.4"));
    EXPECT_TRUE(cell.spoken.contains(QStringLiteral("could not be corrected"))) << cell.spoken.toStdString();
}

TEST(StripBoard, AQuietEngineHasNoMarkAndNoLevelWord)
{
    const Board board = make_board(*invented::judgement({5, 37, false, true}), TimeRange::all);
    EXPECT_FALSE(has_mark(cell_of(board, "maximum_pressure", 4).level));
    EXPECT_TRUE(board.level_words.isEmpty());
}

TEST(StripBoard, AFreshCylinderIsSaidToBeLearning)
{
    const Board board = make_board(*invented::judgement(), TimeRange::since_overhaul);
    const BoardCell& cell = cell_of(board, "exhaust_temperature", 6);
    EXPECT_EQ(cell.word, QStringLiteral("learning, 4 of 8"));
    EXPECT_FALSE(cell.usual_low.has_value()) << "no usual range may be drawn before it is known";
    EXPECT_LT(cell.points.size(), 5U) << "the strip starts at the last overhaul";
}

TEST(StripBoard, EveryCellCanBeSpoken)
{
    BoardModel model;
    model.set_board(make_board(*invented::judgement(), TimeRange::all), 1);
    const QModelIndex index = model.find(*find_quantity("compression_pressure"), Place::cylinder(4));
    const QString spoken = index.data(Qt::AccessibleTextRole).toString();
    EXPECT_TRUE(spoken.contains(QStringLiteral("Cylinder 4"))) << spoken.toStdString();
    EXPECT_TRUE(spoken.contains(QStringLiteral("bar"))) << spoken.toStdString();
    EXPECT_TRUE(spoken.endsWith(QStringLiteral("watch"))) << spoken.toStdString();
}

TEST(StripBoard, ArrowKeysMoveTheCellInHandAndEnterAsksForItsTrend)
{
    BoardView view;
    view.resize(1150, 620);
    view.show_board(make_board(*invented::judgement(), TimeRange::since_overhaul));
    view.show();
    QSignalSpy moved(&view, &BoardView::moved_to), asked(&view, &BoardView::asked_for);
    view.setCurrentIndex(view.board_model().index(0, 0));
    QTest::keyClick(&view, Qt::Key_Down);
    QTest::keyClick(&view, Qt::Key_Right);
    EXPECT_EQ(view.currentIndex(), view.board_model().index(1, 1));
    QTest::keyClick(&view, Qt::Key_Return);
    ASSERT_EQ(asked.count(), 1);
    EXPECT_EQ(asked.at(0).at(0).toInt(), *find_quantity("compression_pressure"));
    EXPECT_GE(moved.count(), 2);
}

TEST(StripBoard, NarrowsTheColumnsToTwelveCylindersAndScrollsSidewaysFromThirteen)
{
    for (const int cylinders : {4, 6, 9, 12, 16}) {
        BoardView view;
        view.resize(1142, 620); // the page at 1366 x 768
        view.show_board(make_board(*invented::judgement({cylinders, 37, true, true}), TimeRange::since_overhaul));
        view.show();
        QTest::qWait(1);
        EXPECT_EQ(view.horizontalScrollBar()->maximum() > 0, cylinders > 12) << cylinders;
        keep_picture(view, QStringLiteral("board_view_%1").arg(cylinders));
    }
}

TEST(StripBoard, GoesOnPaperInBlackAndGrey)
{
    const QTemporaryDir folder;
    const QString path = folder.filePath(QStringLiteral("board.pdf"));
    QPdfWriter writer(path);
    writer.setPageSize(QPageSize(QPageSize::A4));
    writer.setPageOrientation(QPageLayout::Landscape);
    writer.setResolution(96);
    QPainter painter(&writer);
    paint_board_page(painter, QRectF(0, 0, writer.width(), writer.height()),
                     make_board(*invented::judgement({12, 37, true, true}), TimeRange::all), QStringLiteral("Main engine"));
    painter.end();
    EXPECT_GT(QFileInfo(path).size(), 5000);
    QImage paper(1100, 760, QImage::Format_RGB32);
    paper.fill(Qt::white);
    QPainter on_image(&paper);
    paint_board_page(on_image, QRectF(20, 20, 1060, 720), make_board(*invented::judgement(), TimeRange::all),
                     QStringLiteral("Main engine of Quiet Barley"));
    on_image.end();
    for (int y = 0; y < paper.height(); ++y)
        for (int x = 0; x < paper.width(); ++x) {
            const QRgb pixel = paper.pixel(x, y);
            // Smoothed text may differ by a step or two between the channels.
            ASSERT_NEAR(qRed(pixel), qBlue(pixel), 3) << x << ' ' << y;
        }
    if (const QString keep = qEnvironmentVariable("EVENSTROKE_PICTURES"); !keep.isEmpty())
        paper.save(keep + QStringLiteral("/board_paper.png"));
}

} // namespace
} // namespace evenstroke
