// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/app/engine_desk.h"

#include <QAbstractItemModelTester>
#include <QComboBox>
#include <QPushButton>
#include <QTableView>

namespace evenstroke {
namespace {

class EngineLoadPage : public test::EngineOnDesk
{
protected:
    void type_into(const QString& title, const QString& text) { EngineOnDesk::type_into(box(title), text); }
    bool put(const char* table, int row, int column, const QString& text)
    {
        QAbstractItemModel* model = child<QTableView>(table).model();
        return model->setData(model->index(row, column), text, Qt::EditRole);
    }
    const Engine& engine_now() { return page_->draft().state().engine; }
    Engine stored() { return EngineOnDesk::stored().engine; }
};

TEST_F(EngineLoadPage, LimitsOfTheLoadDiagramAreTypedInPerCentAndSaved)
{
    QAbstractItemModel* model = child<QTableView>("load_limits_table").model();
    const QAbstractItemModelTester tester(model, QAbstractItemModelTester::FailureReportingMode::Fatal);
    EXPECT_EQ(model->rowCount(), 8) << "always the same rows, none to add";
    ASSERT_TRUE(put("load_limits_table", 0, 1, "102")) << problem().toStdString();
    ASSERT_TRUE(put("load_limits_table", 6, 1, "5"));
    ASSERT_TRUE(put("load_limits_table", 0, 3, "maker's diagram"));
    ASSERT_TRUE(engine_now().load_limits);
    EXPECT_DOUBLE_EQ(*engine_now().load_limits->mean_effective_pressure, 1.02);
    EXPECT_DOUBLE_EQ(*engine_now().load_limits->light_running_margin, 0.05);
    EXPECT_EQ(model->index(6, 1).data().toString(), "5");
    child<QLineEdit>("why_field").setText("load diagram entered");
    ASSERT_TRUE(page_->save()) << problem().toStdString();
    EXPECT_DOUBLE_EQ(*stored().load_limits->mean_effective_pressure, 1.02);
    EXPECT_EQ(stored().load_limits->source, "maker's diagram");
}

TEST_F(EngineLoadPage, LimitThatCannotBeIsRefusedAndUndoTakesOneStepBack)
{
    EXPECT_FALSE(put("load_limits_table", 5, 1, "1.1")) << "a part, not per cent";
    EXPECT_TRUE(problem().contains("overload")) << problem().toStdString();
    EXPECT_FALSE(engine_now().load_limits);
    ASSERT_TRUE(put("load_limits_table", 5, 1, "110"));
    EXPECT_TRUE(engine_now().load_limits);
    page_->draft().undo().undo();
    EXPECT_FALSE(engine_now().load_limits);
    ASSERT_TRUE(put("load_limits_table", 5, 1, "110"));
    ASSERT_TRUE(put("load_limits_table", 5, 1, ""));
    EXPECT_FALSE(engine_now().load_limits) << "the key goes with the last of its numbers";
    EXPECT_FALSE(put("load_limits_table", 7, 1, "perhaps"));
    EXPECT_TRUE(put("load_limits_table", 7, 1, "yes"));
    EXPECT_TRUE(engine_now().load_limits->constant_speed);
}

TEST_F(EngineLoadPage, ExponentWithoutItsSpeedIsSaidWhenTheEngineIsSaved)
{
    ASSERT_TRUE(put("load_limits_table", 1, 1, "2.2"));
    child<QLineEdit>("why_field").setText("try");
    EXPECT_FALSE(page_->save());
    EXPECT_TRUE(problem().contains("speed below which")) << problem().toStdString();
}

TEST_F(EngineLoadPage, WallIsAddedByNamingItsPart)
{
    QAbstractItemModel* model = child<QTableView>("walls_table").model();
    ASSERT_EQ(model->rowCount(), 1) << "the row that adds one";
    ASSERT_TRUE(put("walls_table", 0, 0, "liner"));
    EXPECT_EQ(model->index(0, 2).data().toString(), "") << "nothing typed is not absolute zero";
    child<QLineEdit>("why_field").setText("wall entered");
    EXPECT_FALSE(page_->save()) << "a wall without numbers cannot be worked out";
    const char* const numbers[] = {"85", "890", "400", "35", "45", "8000", "80", "300", "120"};
    for (int column = 1; column <= 9; ++column)
        ASSERT_TRUE(put("walls_table", 0, column, numbers[column - 1])) << column;
    ASSERT_TRUE(put("walls_table", 0, 10, "calculation 3"));
    ASSERT_TRUE(page_->save()) << problem().toStdString();
    ASSERT_EQ(stored().walls.size(), 1u);
    EXPECT_NEAR(in_celsius(stored().walls[0].gas), 890.0, 1e-9); // over kelvin and back
    EXPECT_DOUBLE_EQ(stored().walls[0].thickness.value(), 0.035);
    EXPECT_EQ(stored().walls[0].source, "calculation 3");
    child<QTableView>("walls_table").setCurrentIndex(model->index(0, 0));
    child<QPushButton>("wall_remove_button").click();
    EXPECT_TRUE(engine_now().walls.empty());
}

TEST_F(EngineLoadPage, ParticularsHoldMassEfficiencyAspirationAndTheWayOfTheConsumption)
{
    type_into("Moving mass of one cylinder", "5200");
    type_into("Generator efficiency", "0,96");
    type_into("Relative humidity", "30");
    EXPECT_DOUBLE_EQ(engine_now().moving_mass->value(), 5200.0);
    EXPECT_EQ(engine_now().generator_efficiency, 0.96);
    EXPECT_DOUBLE_EQ(*engine_now().reference.relative_humidity, 0.3);
    box<QComboBox>("Consumption").setCurrentIndex(1);
    emit box<QComboBox>("Consumption").activated(1);
    EXPECT_EQ(engine_now().consumption_correction, ConsumptionCorrection::iso_3046);
    box<QComboBox>("Aspiration").setCurrentIndex(2);
    emit box<QComboBox>("Aspiration").activated(2);
    EXPECT_EQ(engine_now().aspiration, AspirationClass::naturally_aspirated);
    type_into("Generator efficiency", "96");
    child<QLineEdit>("why_field").setText("try");
    EXPECT_FALSE(page_->save()) << "96 is no share";
    EXPECT_TRUE(problem().contains("96")) << problem().toStdString();
}

TEST_F(EngineLoadPage, ReferenceConditionsCanBeChosenFromTheKnownSets)
{
    auto& set = box<QComboBox>("Conditions");
    EXPECT_EQ(set.currentIndex(), 0) << "25, 25, 1000 is the standard set";
    set.setCurrentIndex(1);
    emit set.activated(1);
    EXPECT_NEAR(in_celsius(engine_now().reference.inlet_air), 45.0, 1e-9);
    EXPECT_EQ(box<QLineEdit>("Inlet air").text(), "45") << "the boxes below follow";
    EXPECT_NE(engine_now().reference.source.find("M28"), std::string::npos);
    type_into("Inlet air", "30");
    EXPECT_EQ(set.currentText(), "the engine's own, as of its shop trial");
    page_->draft().undo().undo();
    page_->draft().undo().undo();
    EXPECT_FALSE(page_->draft().dirty());
}

} // namespace
} // namespace evenstroke
