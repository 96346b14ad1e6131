// SPDX-License-Identifier: GPL-3.0-or-later
// The log sheet on the screen, without a history: model, keys, blocks.
#include "app/entry/block_text.h"
#include "app/entry/box_edit.h"
#include "app/entry/log_sheet_view.h"
#include "tests/core/reading_maker.h"

#include <QAbstractItemModelTester>
#include <QApplication>
#include <QClipboard>
#include <QSignalSpy>
#include <QTest>
#include <gtest/gtest.h>

using namespace evenstroke;
using evenstroke::test::invented_engine;
using evenstroke::test::ReadingMaker;

namespace {

class SheetOnScreen : public testing::Test
{
protected:
    SheetOnScreen()
        : model(sheet, undo), tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal)
    {
        begin({});
        view.set_sheet_model(&model);
        view.set_decimal_sign(u'.');
        view.resize(1000, 600);
        view.show();
        QApplication::setActiveWindow(&view);
        view.setFocus();
    }
    void begin(Reading reading, bool ship_open = true, std::vector<Value> ship = {})
    {
        SheetStart start;
        start.engine = invented_engine();
        start.reading = std::move(reading);
        start.ship = std::move(ship);
        start.ship_open = ship_open;
        sheet.start(std::move(start));
    }
    LogBox box(const char* name, Place place = Place::engine()) const
    {
        return {*find_quantity(name, place.kind), place, Phase::reading};
    }
    void stand_on(const char* name, Place place = Place::engine()) { view.go_to(box(name, place)); }
    QString at(const char* name, Place place = Place::engine()) const
    {
        return model.index_of(box(name, place)).data().toString();
    }
    std::string here() const
    {
        const auto current = view.current_box();
        return current ? quantity(current->quantity).name + " " + std::to_string(current->place.number)
                       : "nowhere";
    }
    /// Whoever has the keys: the editor while one is open.
    void type(const QString& text)
    {
        for (const QChar c : text) {
            QWidget* target = QApplication::focusWidget() && view.isAncestorOf(QApplication::focusWidget())
                                  ? QApplication::focusWidget()
                                  : &view;
            QTest::keyClick(target, c.toLatin1());
        }
    }
    void press(Qt::Key key, Qt::KeyboardModifiers modifiers = Qt::NoModifier)
    {
        QWidget* target = QApplication::focusWidget() && view.isAncestorOf(QApplication::focusWidget())
                              ? QApplication::focusWidget()
                              : &view;
        QTest::keyClick(target, key, modifiers);
    }

    EntrySheet sheet;
    QUndoStack undo;
    LogSheetModel model;
    QAbstractItemModelTester tester;
    LogSheetView view;
};

TEST_F(SheetOnScreen, EnterGoesThroughTheCylindersAndOnToTheNextQuantity)
{
    stand_on("maximum_pressure", Place::cylinder(1));
    for (const char* value : {"141", "142,5", "143.5", "144", "145", "146"}) {
        type(QString::fromLatin1(value));
        press(Qt::Key_Return);
    }
    EXPECT_EQ(here(), "compression_pressure 1");
    EXPECT_EQ(at("maximum_pressure", Place::cylinder(2)), QStringLiteral("142,5"));
    EXPECT_DOUBLE_EQ(*sheet.value(box("maximum_pressure", Place::cylinder(2)))->value_si, 142.5e5);
    EXPECT_DOUBLE_EQ(*sheet.value(box("maximum_pressure", Place::cylinder(3)))->value_si, 143.5e5);
    EXPECT_EQ(undo.count(), 6);
}

TEST_F(SheetOnScreen, TabGoesToTheNextQuantityOfTheSameCylinder)
{
    stand_on("maximum_pressure", Place::cylinder(3));
    type(QStringLiteral("143"));
    press(Qt::Key_Tab);
    EXPECT_EQ(here(), "compression_pressure 3");
    press(Qt::Key_Backtab, Qt::ShiftModifier);
    EXPECT_EQ(here(), "maximum_pressure 3");
}

TEST_F(SheetOnScreen, EnterMayGoQuantityByQuantityInstead)
{
    view.set_walk_order(WalkOrder::along_quantities);
    stand_on("maximum_pressure", Place::cylinder(3));
    press(Qt::Key_Return);
    EXPECT_EQ(here(), "compression_pressure 3");
    press(Qt::Key_Tab);
    EXPECT_EQ(here(), "compression_pressure 4");
}

TEST_F(SheetOnScreen, TheWalkComesToEveryBoxOnceAndEndsWithTheLineAfterIt)
{
    for (const WalkOrder order : {WalkOrder::along_cylinders, WalkOrder::along_quantities}) {
        std::set<QModelIndex> seen;
        QModelIndex index = next_section(model, {}, true), last;
        while (index.isValid()) {
            EXPECT_TRUE(seen.insert(index).second);
            last = index;
            index = next_box(model, index, order, false, true);
        }
        std::size_t boxes = 0;
        for (int row = 0; row < model.rowCount(); ++row)
            boxes += model.row(row) ? model.row(row)->boxes.size() : 0;
        EXPECT_EQ(seen.size(), boxes);
        EXPECT_EQ(model.box(last)->phase, Phase::after);
    }
}

TEST_F(SheetOnScreen, ArrowsLeaveABoxThatIsBeingTyped)
{
    stand_on("exhaust_temperature", Place::cylinder(2));
    type(QStringLiteral("352"));
    press(Qt::Key_Right);
    EXPECT_EQ(here(), "exhaust_temperature 3");
    EXPECT_EQ(at("exhaust_temperature", Place::cylinder(2)), QStringLiteral("352"));
    press(Qt::Key_Left);
    press(Qt::Key_F2);
    press(Qt::Key_Home);
    press(Qt::Key_Delete);
    press(Qt::Key_Return);
    EXPECT_EQ(at("exhaust_temperature", Place::cylinder(2)), QStringLiteral("52"));
}

TEST_F(SheetOnScreen, EscapeLeavesTheBoxAsItWas)
{
    stand_on("load_percent");
    type(QStringLiteral("75"));
    press(Qt::Key_Return);
    stand_on("load_percent");
    type(QStringLiteral("99"));
    press(Qt::Key_Escape);
    EXPECT_FALSE(view.is_editing());
    EXPECT_EQ(at("load_percent"), QStringLiteral("75"));
    EXPECT_EQ(undo.count(), 1);
}

TEST_F(SheetOnScreen, WhatCannotBeReadStaysInItsBoxWithTheReason)
{
    stand_on("load_percent");
    QSignalSpy refused(&model, &LogSheetModel::refused);
    type(QStringLiteral("7x5"));
    press(Qt::Key_Return);
    EXPECT_FALSE(view.is_editing());
    EXPECT_EQ(refused.count(), 1);
    ASSERT_TRUE(model.refusal(box("load_percent")).has_value());
    EXPECT_NE(model.refusal(box("load_percent"))->what_happened.find("x5"), std::string::npos);
    EXPECT_NE(here(), "load_percent 0") << "Enter goes on";
    EXPECT_EQ(at("load_percent"), QStringLiteral("7x5"));
    stand_on("load_percent");
    press(Qt::Key_F2);
    press(Qt::Key_Escape);
    EXPECT_EQ(at("load_percent"), QString());
    EXPECT_TRUE(model.unreadable().empty());
    EXPECT_EQ(undo.count(), 0);
}

TEST_F(SheetOnScreen, OneKeyGivesTheReasonForAnEmptyBox)
{
    stand_on("maximum_pressure", Place::cylinder(1));
    press(Qt::Key_F5);
    EXPECT_EQ(at("maximum_pressure", Place::cylinder(1)), QStringLiteral("not read"));
    EXPECT_EQ(here(), "maximum_pressure 2");
    press(Qt::Key_F7);
    press(Qt::Key_F9);
    EXPECT_EQ(sheet.value(box("maximum_pressure", Place::cylinder(2)))->missing, MissingReason::not_fitted);
    EXPECT_EQ(sheet.value(box("maximum_pressure", Place::cylinder(3)))->missing, MissingReason::out_of_order);
    stand_on("maximum_pressure", Place::cylinder(1));
    type(QStringLiteral("140"));
    press(Qt::Key_Return);
    EXPECT_EQ(at("maximum_pressure", Place::cylinder(1)), QStringLiteral("140"));
}

TEST_F(SheetOnScreen, DeleteEmptiesAndUndoBringsBack)
{
    stand_on("load_percent");
    type(QStringLiteral("75"));
    press(Qt::Key_Return);
    stand_on("load_percent");
    press(Qt::Key_Delete);
    EXPECT_EQ(sheet.value(box("load_percent")), nullptr);
    press(Qt::Key_Z, Qt::ControlModifier);
    EXPECT_EQ(at("load_percent"), QStringLiteral("75"));
    press(Qt::Key_Z, Qt::ControlModifier);
    EXPECT_EQ(at("load_percent"), QString());
    press(Qt::Key_Y, Qt::ControlModifier);
    EXPECT_EQ(at("load_percent"), QStringLiteral("75"));
}

TEST_F(SheetOnScreen, PastesABlockAsOneStep)
{
    QApplication::clipboard()->setText(QStringLiteral("141,5\t142\t143\n118\t\t119,5\n"));
    stand_on("maximum_pressure", Place::cylinder(2));
    press(Qt::Key_V, Qt::ControlModifier);
    EXPECT_EQ(at("maximum_pressure", Place::cylinder(2)), QStringLiteral("141,5"));
    EXPECT_EQ(at("compression_pressure", Place::cylinder(4)), QStringLiteral("119,5"));
    EXPECT_EQ(at("compression_pressure", Place::cylinder(3)), QString());
    EXPECT_EQ(undo.count(), 1);
    undo.undo();
    EXPECT_TRUE(sheet.reading().values.empty());
}

TEST_F(SheetOnScreen, RefusesABlockWithACellThatCannotBeReadAndChangesNothing)
{
    QApplication::clipboard()->setText(QStringLiteral("141\t142\n118\tn/a\n"));
    stand_on("maximum_pressure", Place::cylinder(2));
    QSignalSpy refused(&view, &LogSheetView::paste_refused);
    press(Qt::Key_V, Qt::ControlModifier);
    ASSERT_EQ(refused.count(), 1);
    EXPECT_TRUE(sheet.reading().values.empty());
    EXPECT_EQ(undo.count(), 0);
    const PastePlan plan = plan_paste(model, view.currentIndex(), QApplication::clipboard()->text());
    ASSERT_EQ(plan.refused.size(), 1u);
    const QString text = refusal_text(plan);
    for (const char* part :
         {"Row 2, column 2", "Compression pressure of cylinder 3", "n/a", "Nothing was pasted"})
        EXPECT_TRUE(text.contains(QString::fromLatin1(part))) << text.toStdString();
    apply_paste(model, plan);
    EXPECT_EQ(sheet.reading().values.size(), 3u);
    EXPECT_EQ(undo.count(), 1);
}

TEST_F(SheetOnScreen, RefusesABlockThatIsWiderThanTheSheet)
{
    QApplication::clipboard()->setText(QStringLiteral("1\t2\t3\n"));
    stand_on("maximum_pressure", Place::cylinder(5));
    QSignalSpy refused(&view, &LogSheetView::paste_refused);
    press(Qt::Key_V, Qt::ControlModifier);
    EXPECT_EQ(refused.count(), 1);
    EXPECT_TRUE(sheet.reading().values.empty());
}

TEST_F(SheetOnScreen, CopiesABlockThatCanBePastedAgain)
{
    ReadingMaker maker;
    maker.cylinders("maximum_pressure", {141.5, 142}).cylinders("compression_pressure", {118, 119});
    begin(maker.done());
    const QModelIndex first = model.index_of(box("maximum_pressure", Place::cylinder(1)));
    const QModelIndex last = model.index_of(box("compression_pressure", Place::cylinder(2)));
    view.setCurrentIndex(first);
    view.selectionModel()->select(QItemSelection(first, last), QItemSelectionModel::ClearAndSelect);
    press(Qt::Key_C, Qt::ControlModifier);
    EXPECT_EQ(QApplication::clipboard()->text(), QStringLiteral("141.5\t142\n118\t119\n"));
    press(Qt::Key_X, Qt::ControlModifier);
    EXPECT_TRUE(sheet.reading().values.empty());
    view.go_to(first);
    press(Qt::Key_V, Qt::ControlModifier);
    EXPECT_EQ(at("compression_pressure", Place::cylinder(2)), QStringLiteral("119"));
    view.set_decimal_sign(u',');
    view.selectionModel()->select(first, QItemSelectionModel::ClearAndSelect);
    press(Qt::Key_C, Qt::ControlModifier);
    EXPECT_EQ(QApplication::clipboard()->text(), QStringLiteral("141,5\n"));
}

TEST_F(SheetOnScreen, CopiesTheWholeReadingWithItsHeads)
{
    ReadingMaker maker;
    maker.number("load_percent", 75.2).cylinders("exhaust_temperature", {350, 351});
    begin(maker.done());
    const QString block = whole_block(sheet, u',');
    EXPECT_TRUE(block.contains(QStringLiteral("Load\t%\t75,2\n"))) << block.toStdString();
    EXPECT_TRUE(block.contains(QStringLiteral("Exhaust temperature\t°C\t350\t351"))) << block.toStdString();
    EXPECT_FALSE(block.contains(QStringLiteral("Maximum pressure"))) << "rows without a value stay out";
}

TEST_F(SheetOnScreen, TakesAUnitTypedBehindTheNumberAndShowsIt)
{
    stand_on("scavenge_pressure");
    type(QStringLiteral("2,9 kgf/cm2"));
    press(Qt::Key_Return);
    EXPECT_EQ(at("scavenge_pressure"), QStringLiteral("2,9 kgf/cm²"));
    sheet.set_row_unit(box("scavenge_pressure").quantity, find_unit("kgf/cm2").value());
    EXPECT_EQ(at("scavenge_pressure"), QStringLiteral("2,9"));
    const int row = model.index_of(box("scavenge_pressure")).row();
    EXPECT_EQ(model.headerData(row, Qt::Vertical, Qt::UserRole).toString(), QStringLiteral("kgf/cm²"));
}

TEST_F(SheetOnScreen, FoldsAwayRowsThatAreNeverFilledButNeverAValue)
{
    SheetStart start;
    start.engine = invented_engine();
    start.used = {box("exhaust_temperature", Place::cylinder(1)).quantity};
    start.reading = ReadingMaker().number("liner_temperature", 150, Place::cylinder(2)).done();
    sheet.start(start);
    EXPECT_TRUE(model.index_of(box("liner_temperature", Place::cylinder(2))).isValid());
    EXPECT_FALSE(model.index_of(box("oil_mist_level")).isValid());
    EXPECT_GT(model.folded_rows(), 0);
    model.show_all(true);
    EXPECT_TRUE(model.index_of(box("oil_mist_level")).isValid());
    EXPECT_EQ(model.folded_rows(), 0);
}

TEST_F(SheetOnScreen, ShowsWhatTheShipSharesAndKeepsWhatIsTypedOverItApart)
{
    const Place ship{Place::Kind::ship, 0};
    const Reading weather = ReadingMaker().number("wind_speed", 6, ship).done();
    begin({}, false, weather.values);
    EXPECT_EQ(at("wind_speed", ship), QStringLiteral("6"));
    EXPECT_TRUE(sheet.lent(box("wind_speed", ship)));
    EXPECT_TRUE(sheet.empty());
    stand_on("wind_speed", ship);
    type(QStringLiteral("8"));
    press(Qt::Key_Return);
    EXPECT_FALSE(sheet.lent(box("wind_speed", ship)));
    EXPECT_EQ(sheet.reading().values.size(), 1u);
    undo.undo();
    EXPECT_EQ(at("wind_speed", ship), QStringLiteral("6"));
    EXPECT_TRUE(sheet.reading().values.empty());
}

TEST_F(SheetOnScreen, TellsReadersOfTheScreenWhatABoxHolds)
{
    begin(ReadingMaker().number("exhaust_temperature", 412, Place::cylinder(4)).done());
    const QModelIndex index = model.index_of(box("exhaust_temperature", Place::cylinder(4)));
    EXPECT_EQ(index.data(Qt::AccessibleTextRole).toString(),
              QStringLiteral("Exhaust temperature of cylinder 4: 412\u00a0°C"));
    model.set_marks({{box("exhaust_temperature", Place::cylinder(4)), BoxMark::asked}});
    EXPECT_TRUE(index.data(Qt::AccessibleTextRole).toString().endsWith(QStringLiteral("please look again")));
    EXPECT_EQ(model.index_of(box("load_percent")).data(Qt::AccessibleTextRole).toString(),
              QStringLiteral("Load: empty"));
}

TEST(Block, SplitsQuotedCellsAndIgnoresTheLastLineEnd)
{
    EXPECT_EQ(split_block(QStringLiteral("a\tb\r\nc\n")),
              (std::vector<QStringList>{{QStringLiteral("a"), QStringLiteral("b")}, {QStringLiteral("c")}}));
    EXPECT_EQ(split_block(QStringLiteral("\"x\ty\"\"z\"\tq")),
              (std::vector<QStringList>{{QStringLiteral("x\ty\"z"), QStringLiteral("q")}}));
}

} // namespace
