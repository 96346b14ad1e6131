// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/engine/shop_trial.h"

#include "core/engine/table_text.h"
#include "tests/core/survey_fixture.h"

#include <gtest/gtest.h>

namespace evenstroke {
namespace {

bool contains(const std::string& text, std::string_view part) { return text.find(part) != std::string::npos; }

Engine engine()
{
    return survey_fixture::make_engine(6); // rated 9000 kW, reference barometer 1 bar
}

// All figures below are invented.
TEST(ShopTrial, ReadsLoadsAsRowsWithUnitsInTheHeadings)
{
    const auto trial = read_shop_trial("Load [%]\tMaximum pressure (bar)\tExhaust temperature, °C\n50\t110\t300\n75\t130\t320\n100\t150\t350\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    ASSERT_EQ(trial.value().points.size(), 3u);
    EXPECT_EQ(trial.value().points[1].load_percent, 75.0);
    EXPECT_EQ(trial.value().points[1].values.at("maximum_pressure"), 130.0);
    EXPECT_EQ(trial.value().points[2].values.at("exhaust_temperature"), 350.0);
    EXPECT_TRUE(trial.value().left_out.empty());
}

TEST(ShopTrial, ReadsLoadsAsColumnsWithAColumnOfUnitsAndDecimalCommas)
{
    const auto trial = read_shop_trial("Item\tUnit\t50 %\t75 %\nEngine load\t%\t50,0\t75,0\nPscav\tbar\t1,10\t1,95\nT/C speed\trpm\t9500\t12100\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    ASSERT_EQ(trial.value().points.size(), 2u);
    EXPECT_DOUBLE_EQ(trial.value().points[1].values.at("scavenge_pressure"), 1.95);
    EXPECT_DOUBLE_EQ(trial.value().points[0].values.at("turbocharger_speed"), 9500.0);
}

TEST(ShopTrial, TakesPowerWhereThereIsNoLoad)
{
    const auto trial = read_shop_trial("Output kW;4500;6750;9000\nSFOC g/kWh;172,5;169,8;171,4\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    ASSERT_EQ(trial.value().points.size(), 3u);
    EXPECT_DOUBLE_EQ(trial.value().points[1].load_percent, 75.0);
    EXPECT_NEAR(trial.value().points[1].values.at("specific_fuel_consumption"), 169.8, 1e-9); // unit conversion and back
}

TEST(ShopTrial, SortsLoadsThatComeInAnyOrder)
{
    const auto trial = read_shop_trial("load\t100\t50\t75\np_max\t150\t110\t130\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    EXPECT_EQ(trial.value().points.front().load_percent, 50.0);
    EXPECT_EQ(trial.value().points.front().values.at("maximum_pressure"), 110.0);
}

TEST(ShopTrial, ConvertsUnitsAndMakesAbsolutePressuresGauge)
{
    const auto trial = read_shop_trial("load\t75\nScavenge pressure (bar abs)\t2.95\nMaximum pressure (MPa)\t13\nExhaust temperature (°F)\t608\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    const auto& values = trial.value().points.front().values;
    EXPECT_NEAR(values.at("scavenge_pressure"), 1.95, 1e-9); // 1e-9: rounding of the conversion to pascal and back
    EXPECT_NEAR(values.at("maximum_pressure"), 130.0, 1e-9);
    EXPECT_NEAR(values.at("exhaust_temperature"), 320.0, 1e-9);
    EXPECT_TRUE(contains(trial.value().understood.front().words, "made gauge"));
}

TEST(ShopTrial, TakesTheMeanOfTheCylinders)
{
    const auto trial = read_shop_trial("load\t75\nMax pressure cyl. 1\t128\nMax pressure cyl. 2\t130\nMax pressure cyl. 3\t132\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    EXPECT_NEAR(trial.value().points.front().values.at("maximum_pressure"), 130.0, 1e-9);
}

TEST(ShopTrial, SaysWhatItDoesNotKnow)
{
    const auto trial = read_shop_trial("load\t75\t100\np_max\t130\t150\nColour of the smoke\tgrey\tgrey\n", engine());
    ASSERT_TRUE(trial.has_value());
    ASSERT_EQ(trial.value().left_out.size(), 1u);
    EXPECT_EQ(trial.value().left_out.front().header, "Colour of the smoke");
}

TEST(ShopTrial, RefusesImpossibleAndUnreadableCellsInWords)
{
    const auto trial = read_shop_trial("load\t50\t75\t100\np_max\t1300\t1.234,5\t150\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    ASSERT_EQ(trial.value().refused.size(), 2u);
    EXPECT_TRUE(contains(trial.value().refused[0], "1300 bar cannot be"));
    EXPECT_EQ(trial.value().points.size(), 1u) << "points without a value are no points";
}

TEST(ShopTrial, RefusesATableWithoutLoadOrWithTheSameLoadTwice)
{
    EXPECT_TRUE(contains(read_shop_trial("p_max\t130\t150\nSFOC\t170\t171\n", engine()).error().text(), "no load"));
    EXPECT_TRUE(contains(read_shop_trial("load\t75\t75\np_max\t130\t150\n", engine()).error().text(), "Two points"));
    EXPECT_FALSE(read_shop_trial("hello", engine()).has_value());
    EXPECT_FALSE(read_shop_trial("", engine()).has_value());
}

TEST(ShopTrial, WrongDimensionIsLeftOutWithTheReason)
{
    const auto trial = read_shop_trial("load\t75\np_max (bar)\t130\nExhaust temperature (bar)\t3\n", engine());
    ASSERT_TRUE(trial.has_value());
    ASSERT_EQ(trial.value().left_out.size(), 1u);
    EXPECT_TRUE(contains(trial.value().left_out.front().words, "does not measure"));
}

TEST(ShopTrial, KnowsShortHeadingsWithTheirUnits)
{
    const std::pair<const char*, const char*> headings[] = {
        {"Scav. air press. kg/cm2", "scavenge_pressure"},   {"Scav. press. [kg/cm2]", "scavenge_pressure"},
        {"p_scav bar", "scavenge_pressure"},                {"Max. comb. press. kg/cm2 abs", "maximum_pressure"},
        {"Comp. press. (bar)", "compression_pressure"},     {"Exh. gas temp. aft. cyl. deg C", "exhaust_temperature"},
        {"Exh. temp. bef. turb. °C", "exhaust_before_turbine"}, {"T/C speed r/min", "turbocharger_speed"},
        {"t_scav °C", "scavenge_temperature"},              {"Spec. fuel cons. g/kWh", "specific_fuel_consumption"},
    };
    for (const auto& [heading, quantity] : headings) {
        const table_text::Heading read = table_text::read_heading(heading);
        EXPECT_EQ(table_text::quantity_of(read), quantity) << heading << " was read as " << read.words;
        EXPECT_TRUE(read.unit) << heading;
    }
}

TEST(ShopTrial, ReadsAShortHeadingInItsOwnUnit)
{
    const auto trial = read_shop_trial("load %\t75\nScav. air press. kg/cm2\t2.0\n", engine());
    ASSERT_TRUE(trial.has_value()) << trial.error().text();
    EXPECT_NEAR(trial.value().points.front().values.at("scavenge_pressure"), 1.96133, 1e-9); // 2 kgf/cm2, ISO 80000-4
}

TEST(MergedBaseline, ReplacesTheWholeCurveOfAPastedQuantityAndNothingElse)
{
    std::vector<BaselinePoint> baseline{{50.0, "", {{"speed", 95.0}, {"maximum_pressure", 110.0}}},
                                        {75.0, "", {{"maximum_pressure", 130.0}}},
                                        {100.0, "", {{"speed", 120.0}, {"maximum_pressure", 150.0}}},
                                        {75.0, "eco", {{"maximum_pressure", 125.0}}}};
    const auto merged = merged_baseline(baseline, {{60.0, "", {{"maximum_pressure", 118.0}}}, {100.0, "", {{"maximum_pressure", 152.0}}}});
    ASSERT_EQ(merged.size(), 4u) << "the point at 75 % had nothing else and goes";
    EXPECT_EQ(merged[0].values.count("maximum_pressure"), 0u) << "no point of the old test stays on the curve";
    EXPECT_EQ(merged[0].values.at("speed"), 95.0);
    EXPECT_EQ(merged[1].load_percent, 60.0);
    EXPECT_EQ(merged[2].values.at("maximum_pressure"), 152.0);
    EXPECT_EQ(merged[2].values.at("speed"), 120.0);
    EXPECT_EQ(merged[3].values.at("maximum_pressure"), 125.0) << "another mode is another curve";
}

TEST(MergedBaseline, JoinsSameLoadsAndAddsNewOnes)
{
    std::vector<BaselinePoint> baseline{{50.0, "", {{"speed", 95.0}}}, {100.0, "", {{"speed", 120.0}}}};
    const auto merged = merged_baseline(baseline, {{75.0, "", {{"maximum_pressure", 130.0}}}, {100.0, "", {{"maximum_pressure", 150.0}}}});
    ASSERT_EQ(merged.size(), 3u);
    EXPECT_EQ(merged[1].load_percent, 75.0);
    EXPECT_EQ(merged[2].values.size(), 2u);
}

} // namespace
} // namespace evenstroke
