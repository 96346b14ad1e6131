// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_view.h"
#include "app/desk/theme.h"
#include "tests/app/invented_judgement.h"

#include <gtest/gtest.h>

#include <QAbstractItemModelTester>
#include <QSignalSpy>
#include <QTest>

namespace evenstroke {
namespace {

QString picture_folder() { return qEnvironmentVariable("EVENSTROKE_PICTURES"); }

void keep_picture(QWidget& widget, const QString& name)
{
    if (!picture_folder().isEmpty())
        widget.grab().save(picture_folder() + u'/' + name + QStringLiteral(".png"));
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

TEST(StripBoard, Pictures)
{
    for (const int cylinders : {4, 6, 9, 12, 16}) {
        BoardView view;
        view.resize(1150, 620);
        view.show_board(make_board(*invented::judgement({cylinders, 37, true, true}), TimeRange::since_overhaul));
        view.show();
        view.setFocus();
        keep_picture(view, QStringLiteral("board_view_%1").arg(cylinders));
    }
}

} // namespace
} // namespace evenstroke
