// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/log_sheet.h"

#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

#include <algorithm>

using namespace evenstroke;
using namespace evenstroke::test;

namespace {

const LogSection* find_section(const std::vector<LogSection>& sheet, std::string_view name)
{
    const auto found =
        std::find_if(sheet.begin(), sheet.end(), [&](const LogSection& s) { return s.name == name; });
    return found == sheet.end() ? nullptr : &*found;
}

const LogRow* find_row(const LogSection& section, std::string_view name)
{
    const auto found = std::find_if(section.rows.begin(), section.rows.end(),
                                    [&](const LogRow& row) { return quantity(row.quantity).name == name; });
    return found == section.rows.end() ? nullptr : &*found;
}

TEST(LogSheet, FollowsTheWalk)
{
    std::vector<std::string> names;
    for (const LogSection& section : make_log_sheet(invented_engine(), {}))
        names.push_back(section.name);
    EXPECT_EQ(names, (std::vector<std::string>{"quick_lines", "control", "ship_weather", "engine_stand",
                                               "turbochargers", "coolers", "cooling_lube", "fuel"}));
}

TEST(LogSheet, HoldsEveryQuantityOfATwoStrokeEngineOnce)
{
    std::vector<QuantityId> seen;
    for (const LogSection& section : make_log_sheet(invented_engine(), {}))
        for (const LogRow& row : section.rows)
            if (section.name != "quick_lines")
                seen.push_back(row.quantity);
    std::sort(seen.begin(), seen.end());
    std::vector<QuantityId> expected;
    for (const Quantity& quantity : all_quantities())
        if (quantity.only_for != "four-stroke" && quantity.group != "quick_line" && !quantity.derived())
            expected.push_back(quantity.id);
    EXPECT_EQ(seen, expected);
}

TEST(LogSheet, LeavesOutWhatTheKindOfEngineHasNot)
{
    Engine engine = invented_engine();
    const auto two = make_log_sheet(engine, {});
    EXPECT_NE(find_row(*find_section(two, "engine_stand"), "piston_coolant_outlet_temperature"), nullptr);
    EXPECT_EQ(find_row(*find_section(two, "cooling_lube"), "crankcase_pressure"), nullptr);
    engine.kind = EngineKind::four_stroke;
    const auto four = make_log_sheet(engine, {});
    EXPECT_EQ(find_row(*find_section(four, "engine_stand"), "piston_coolant_outlet_temperature"), nullptr);
    EXPECT_NE(find_row(*find_section(four, "cooling_lube"), "crankcase_pressure"), nullptr);
}

TEST(LogSheet, HasAColumnACylinderUnderItsOwnName)
{
    Engine engine = invented_engine();
    engine.cylinders = 4;
    engine.cylinder_names = {"A1", "A2", "B1", "B2"};
    const auto sheet = make_log_sheet(engine, {});
    const LogSection& stand = *find_section(sheet, "engine_stand");
    EXPECT_EQ(stand.columns, engine.cylinder_names);
    const LogRow* peaks = find_row(stand, "maximum_pressure");
    ASSERT_NE(peaks, nullptr);
    ASSERT_EQ(peaks->boxes.size(), 4u);
    EXPECT_EQ(peaks->boxes[3].place, Place::cylinder(4));
}

TEST(LogSheet, HasBoxesForEachTurbochargerAndCoolerOrOneForAll)
{
    const auto single = make_log_sheet(invented_engine(), {});
    EXPECT_EQ(find_row(*find_section(single, "turbochargers"), "turbocharger_speed")->boxes,
              (std::vector<LogBox>{{*find_quantity("turbocharger_speed"), Place::engine(), Phase::reading}}));
    const auto two = make_log_sheet(invented_engine(), {2, 3});
    EXPECT_EQ(find_row(*find_section(two, "turbochargers"), "turbocharger_speed")->boxes.size(), 2u);
    EXPECT_EQ(find_row(*find_section(two, "turbochargers"), "exhaust_receiver_pressure")->boxes.size(), 1u);
    EXPECT_EQ(find_row(*find_section(two, "coolers"), "cooler_pressure_drop")->boxes[2].place, at_cooler(3));
    EXPECT_EQ(find_row(*find_section(two, "coolers"), "scavenge_pressure")->boxes.size(), 1u);
}

TEST(LogSheet, LearnsTheLayoutFromEarlierReadings)
{
    const std::vector<Reading> readings{
        ReadingMaker().number("turbocharger_speed", 9000, at_turbocharger(2)).done(),
        ReadingMaker().number("cooler_pressure_drop", 12, at_cooler(1)).done()};
    EXPECT_EQ(find_layout(readings), (EngineLayout{2, 1}));
    EXPECT_EQ(find_layout({}), (EngineLayout{0, 0}));
}

TEST(LogSheet, MarksWhatTheWholeShipShares)
{
    const auto sheet = make_log_sheet(invented_engine(), {});
    EXPECT_TRUE(find_row(*find_section(sheet, "ship_weather"), "wind_speed")->shared);
    EXPECT_EQ(find_row(*find_section(sheet, "ship_weather"), "wind_speed")->boxes.front().place, at_ship());
    EXPECT_FALSE(find_row(*find_section(sheet, "ship_weather"), "inlet_air_temperature")->shared);
}

TEST(LogSheet, HasTheEightQuickLineRowsBeforeAndAfter)
{
    const auto sheet = make_log_sheet(invented_engine(), {2, 2});
    const LogSection& lines = *find_section(sheet, "quick_lines");
    EXPECT_EQ(lines.rows.size(), 8u);
    EXPECT_EQ(lines.columns, (std::vector<std::string>{"before", "after"}));
    for (const LogRow& row : lines.rows) {
        ASSERT_EQ(row.boxes.size(), 2u);
        EXPECT_EQ(row.boxes[0].phase, Phase::before);
        EXPECT_EQ(row.boxes[1].phase, Phase::after);
    }
}

TEST(LogSheet, RemembersWhatWasEverRead)
{
    const std::vector<Reading> readings{
        ReadingMaker()
            .number("liner_temperature", 150, Place::cylinder(1))
            .missing("oil_mist_level", MissingReason::not_fitted)
            .missing("thrust_bearing_temperature", MissingReason::out_of_order)
            .done()};
    EXPECT_EQ(quantities_used(readings),
              (std::set<QuantityId>{*find_quantity("liner_temperature"),
                                    *find_quantity("thrust_bearing_temperature")}));
}

TEST(Completeness, CountsRequiredBoxesAndTakesAReasonForAnAnswer)
{
    const auto sheet = make_log_sheet(invented_engine(), {});
    const Completeness empty = find_completeness(sheet, Reading{});
    EXPECT_EQ(empty.answered, 0);
    EXPECT_EQ(empty.missing.size(), static_cast<std::size_t>(empty.required));
    const Completeness some = find_completeness(
        sheet, ReadingMaker()
                   .cylinders("exhaust_temperature", {350, 351})
                   .missing("exhaust_temperature", MissingReason::out_of_order, Place::cylinder(3))
                   .done());
    EXPECT_EQ(some.required, empty.required);
    EXPECT_EQ(some.answered, 3);
}

TEST(Completeness, ListsWhatIsMissingARowALine)
{
    Engine engine = invented_engine();
    const QuantityId exhaust = *find_quantity("exhaust_temperature"), speed = *find_quantity("speed");
    std::vector<LogBox> missing{{speed, Place::engine(), Phase::reading},
                                {exhaust, Place::cylinder(3), Phase::reading},
                                {exhaust, Place::cylinder(4), Phase::reading}};
    EXPECT_EQ(missing_words(engine, missing),
              (std::vector<std::string>{"Speed", "Exhaust temperature of cylinders 3 and 4"}));
    missing.clear();
    for (int cylinder = 1; cylinder <= engine.cylinders; ++cylinder)
        missing.push_back({exhaust, Place::cylinder(cylinder), Phase::reading});
    EXPECT_EQ(missing_words(engine, missing).front(), "Exhaust temperature of all cylinders");
}

TEST(Closing, NeedsOneFigureOfLoadAndNothingElse)
{
    EXPECT_TRUE(find_problem_with_closing(ReadingMaker().number("speed", 98).done()).has_value());
    for (const char* figure : {"load_percent", "shaft_power", "generator_power", "fuel_index"})
        EXPECT_FALSE(find_problem_with_closing(ReadingMaker().number(figure, 60).done()).has_value())
            << figure;
    EXPECT_TRUE(
        find_problem_with_closing(ReadingMaker().missing("load_percent", MissingReason::not_read).done())
            .has_value());
}

} // namespace
