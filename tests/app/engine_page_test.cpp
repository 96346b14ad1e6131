// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/app/engine_desk.h"

#include <QAbstractItemModelTester>
#include <QClipboard>
#include <QGuiApplication>
#include <QPushButton>
#include <QTableView>

namespace evenstroke {
namespace {

using EngineDesk = test::EngineOnDesk;

TEST_F(EngineDesk, ShowsWhatTheHistoryHolds)
{
    EXPECT_EQ(box("Bore").text(), "600");
    EXPECT_EQ(box("Rated power").text(), "12000");
    EXPECT_EQ(box("Name of the ship").text(), "Quiet Barley");
    EXPECT_FALSE(page_->draft().dirty());
}

TEST_F(EngineDesk, SavesANewRevisionWithItsReason)
{
    type_into(box("Bore"), "610,5");
    EXPECT_TRUE(page_->draft().dirty());
    EXPECT_FALSE(page_->save()) << "no reason is given yet";
    EXPECT_TRUE(problem().contains("reason"));
    child<QLineEdit>("why_field").setText("measured at the overhaul");
    ASSERT_TRUE(page_->save()) << problem().toStdString();
    EXPECT_NEAR(stored().engine.bore.value(), 0.6105, 1e-12);
    EXPECT_EQ(stored().revision, 2);
    EXPECT_EQ(storage::VesselStore(*workplace_->history()).revisions(engine().toStdString()).value().back().by.why, "measured at the overhaul");
}

TEST_F(EngineDesk, RefusesWhatCannotBe)
{
    type_into(box("Length of connecting rod"), "500");
    child<QLineEdit>("why_field").setText("try");
    EXPECT_FALSE(page_->save());
    EXPECT_TRUE(problem().contains("rod")) << problem().toStdString();
    EXPECT_EQ(stored().revision, 1);
}

TEST_F(EngineDesk, TextThatIsNoNumberLeavesTheBoxAsItWas)
{
    type_into(box("Stroke"), "two metres");
    EXPECT_EQ(box("Stroke").text(), "2400");
    EXPECT_FALSE(problem().isEmpty());
    type_into(box("Inlet air"), "");
    EXPECT_EQ(box("Inlet air").text(), "25") << "nothing typed is not zero degrees";
}

TEST_F(EngineDesk, UndoTakesOneStepBack)
{
    type_into(box("Bore"), "610");
    type_into(box("Stroke"), "2410");
    page_->draft().undo().undo();
    EXPECT_EQ(box("Stroke").text(), "2400");
    EXPECT_EQ(box("Bore").text(), "610");
    page_->draft().undo().undo();
    EXPECT_FALSE(page_->draft().dirty());
}

TEST_F(EngineDesk, PastedShopTrialIsShownBeforeItIsTaken)
{
    // Invented figures, as a spreadsheet puts them on the clipboard in a country with decimal commas.
    QGuiApplication::clipboard()->setText("Load\t%\t50\t85\nMax. pressure\tbar\t121,5\t150,2\nSmoke\t-\t0\t1\nT/C speed\trpm\t9200\t12800\n");
    page_->findChild<QPushButton*>("baseline_button")->click();
    child<QPushButton>("paste_button").click();
    EXPECT_TRUE(child<QWidget>("trial").isVisible());
    EXPECT_EQ(page_->draft().state().engine.baseline.size(), 3u) << "nothing is changed yet";
    page_->take_trial();
    const auto& points = page_->draft().state().engine.baseline;
    ASSERT_EQ(points.size(), 4u);
    EXPECT_EQ(points[2].load_percent, 85.0);
    EXPECT_NEAR(points[0].values.at("maximum_pressure"), 121.5, 1e-9);
    EXPECT_NEAR(points[0].values.at("compression_pressure"), 90.0, 1e-9) << "what was not in the sheet stays";
    page_->draft().undo().undo();
    EXPECT_EQ(page_->draft().state().engine.baseline.size(), 3u) << "one undo takes the whole paste back";
}

TEST_F(EngineDesk, APastedTableReplacesTheCurveAndAsksForItsSource)
{
    page_->findChild<QPushButton*>("baseline_button")->click();
    ASSERT_TRUE(page_->show_trial("Load\t%\t55\t85\nMax. pressure\tbar\t121,5\t150,2\n"));
    page_->take_trial();
    const Engine& engine = page_->draft().state().engine;
    for (const BaselinePoint& point : engine.baseline)
        EXPECT_EQ(point.values.count("maximum_pressure"), point.load_percent == 55.0 || point.load_percent == 85.0 ? 1u : 0u) << point.load_percent;
    EXPECT_TRUE(QString::fromStdString(engine.baseline_source).startsWith("pasted on")) << engine.baseline_source;
    EXPECT_TRUE(child<QLabel>("baseline_question").isVisible());
    EXPECT_TRUE(child<QPushButton>("save_button").isEnabled()) << "the first change can be saved at once";
    EXPECT_TRUE(child<QPushButton>("undo_button").isEnabled());
    EXPECT_EQ(page_->draft_text(), "engine: changes not saved");
    type_into(child<QLineEdit>("baseline_source_field"), "shop test 4711, invented");
    EXPECT_FALSE(child<QLabel>("baseline_question").isVisible());
}

TEST_F(EngineDesk, ATablePastedIntoAnOpenCellIsTakenAsATable)
{
    page_->findChild<QPushButton*>("baseline_button")->click();
    auto& table = child<QTableView>("baseline_table");
    table.setFocus();
    table.setCurrentIndex(page_->baseline().index(1, 0)); // which opens it
    QCoreApplication::sendPostedEvents(nullptr, QEvent::DeferredDelete); // the cell before it is closed for good
    QLineEdit* cell = table.viewport()->findChild<QLineEdit*>();
    ASSERT_TRUE(cell);
    QGuiApplication::clipboard()->setText("Load\t%\t50\t85\nMax. pressure\tbar\t121,5\t150,2\n");
    const auto before = page_->draft().state().engine.baseline.size();
    QTest::keyClick(cell, Qt::Key_V, Qt::ControlModifier);
    QApplication::processEvents();
    EXPECT_TRUE(child<QWidget>("trial").isVisible());
    EXPECT_EQ(page_->draft().state().engine.baseline.size(), before) << "nothing is changed yet";
    QGuiApplication::clipboard()->setText("99.5");
    QCoreApplication::sendPostedEvents(nullptr, QEvent::DeferredDelete);
    table.edit(page_->baseline().index(1, 0));
    cell = table.viewport()->findChild<QLineEdit*>();
    ASSERT_TRUE(cell);
    cell->selectAll();
    QTest::keyClick(cell, Qt::Key_V, Qt::ControlModifier);
    EXPECT_EQ(cell->text(), "99.5") << "one number is the cell's text";
}

TEST_F(EngineDesk, ANewEngineAsksForAllThatIsMissingInOneSentence)
{
    page_->begin_new(false);
    EXPECT_FALSE(page_->save());
    EXPECT_TRUE(problem().contains("Still needed: name of the engine, number of cylinders, bore, stroke, length of connecting rod, rated power, rated speed."))
        << problem().toStdString();
    type_into(box("Bore"), "");
    EXPECT_TRUE(problem().contains("Still needed")) << "walking through an empty box is no mistake";
}

TEST_F(EngineDesk, PasteWithoutATableSaysSo)
{
    EXPECT_FALSE(page_->show_trial("good morning"));
    EXPECT_TRUE(problem().contains("no table")) << problem().toStdString();
}

TEST_F(EngineDesk, LimitIsAddedByNamingItsQuantity)
{
    QAbstractItemModel& model = *child<QTableView>("limits_table").model();
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    ASSERT_EQ(model.rowCount(), 1) << "only the empty row";
    EXPECT_FALSE(model.setData(model.index(0, 0), "Maximum presure"));
    EXPECT_TRUE(problem().contains("Maximum pressure")) << "the nearest name is offered: " << problem().toStdString();
    ASSERT_TRUE(model.setData(model.index(0, 0), "maximum pressure"));
    ASSERT_EQ(model.rowCount(), 2);
    ASSERT_TRUE(model.setData(model.index(0, 3), "165,5"));
    ASSERT_TRUE(model.setData(model.index(0, 4), "nameplate"));
    const AbsoluteLimit& limit = page_->draft().state().engine.limits.front();
    EXPECT_EQ(limit.quantity, "maximum_pressure");
    EXPECT_EQ(limit.high, 165.5);
    EXPECT_FALSE(limit.low.has_value());
    EXPECT_EQ(limit.source, "nameplate");
}

TEST_F(EngineDesk, CoefficientsAndInstrumentsAreTables)
{
    for (const char* name : {"coefficients_table", "instruments_table"}) {
        QAbstractItemModel& model = *child<QTableView>(name).model();
        const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
        ASSERT_TRUE(model.setData(model.index(0, 0), "Exhaust temperature")) << name;
        ASSERT_TRUE(model.setData(model.index(0, 1), "0.0012")) << name;
    }
    EXPECT_EQ(page_->draft().state().engine.correction.at("exhaust_temperature").per_inlet_air, 0.0012);
    EXPECT_EQ(page_->draft().state().engine.instruments.front().serial, "0.0012");
    QAbstractItemModel& model = *child<QTableView>("coefficients_table").model();
    EXPECT_FALSE(model.setData(model.index(1, 0), "Exhaust temperature")) << "one row a quantity";
}

TEST_F(EngineDesk, BaselineCellsAreTypedAndEmptied)
{
    QAbstractItemModel& model = *child<QTableView>("baseline_table").model();
    const QAbstractItemModelTester tester(&model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    const int row = page_->baseline().row_of("maximum_pressure");
    ASSERT_GT(row, 0);
    ASSERT_TRUE(model.setData(model.index(row, 1), "143.5"));
    EXPECT_EQ(page_->draft().state().engine.baseline[1].values.at("maximum_pressure"), 143.5);
    ASSERT_TRUE(model.setData(model.index(row, 1), ""));
    EXPECT_EQ(page_->draft().state().engine.baseline[1].values.count("maximum_pressure"), 0u);
    EXPECT_FALSE(model.setData(model.index(0, 1), ""));
}

TEST_F(EngineDesk, ANewEngineOfTheShipIsMade)
{
    page_->begin_new(false);
    EXPECT_EQ(page_->draft().state().vessel.name, "Quiet Barley");
    EXPECT_FALSE(page_->save());
    const std::pair<const char*, const char*> typed[] = {{"Name of the engine", "Auxiliary engine 2"}, {"Cylinders", "5"}, {"Bore", "210"},
                                                         {"Stroke", "320"}, {"Length of connecting rod", "620"}, {"Rated power", "900"}, {"Rated speed", "900"}};
    for (const auto& [title, text] : typed)
        type_into(box(QString::fromUtf8(title)), QString::fromUtf8(text));
    ASSERT_TRUE(page_->save()) << problem().toStdString();
    EXPECT_EQ(storage::VesselStore(*workplace_->history()).engines().value().size(), 3u);
    EXPECT_EQ(workplace_->selection().engine.toStdString(), page_->draft().state().engine.id) << "the new engine is looked at";
}

TEST_F(EngineDesk, LeavingWithUnsavedChangesIsAskedOnce)
{
    EXPECT_TRUE(page_->may_leave());
    type_into(box("Bore"), "610");
    EXPECT_FALSE(page_->may_leave());
    EXPECT_TRUE(page_->may_leave());
    page_->refresh();
    EXPECT_EQ(box("Bore").text(), "610") << "the changes wait";
}

TEST_F(EngineDesk, PicturesAreKept)
{
    const QString folder = qEnvironmentVariable("EVENSTROKE_PICTURES");
    if (folder.isEmpty())
        GTEST_SKIP() << "EVENSTROKE_PICTURES names no folder";
    page_->show_trial("Load\t%\t50\t85\nMax. pressure\tbar\t121,5\t150,2\nSmoke\t-\t0\t1\nT/C speed\trpm\t9200\t12800\n");
    int number = 0;
    for (const char* section : {"particulars_button", "baseline_button", "coefficients_button", "limits_button", "instruments_button"}) {
        child<QPushButton>(section).click();
        QApplication::processEvents();
        page_->grab().save(folder + QStringLiteral("/engine_page_%1.png").arg(++number));
    }
}

} // namespace
} // namespace evenstroke
