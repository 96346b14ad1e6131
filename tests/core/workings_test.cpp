// SPDX-License-Identifier: GPL-3.0-or-later
// The sheet of workings: by the functions that made the number, so that it can be followed with a pocket calculator.
#include "core/derived/derived.h"
#include "core/workings/find_workings.h"
#include "tests/core/example_engine.h"
#include "tests/core/reading_maker.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <numeric>
#include <sstream>

using namespace evenstroke;
using namespace evenstroke::test;

namespace {

Judgement judged(Engine engine, Reading reading)
{
    EngineRecord record;
    record.engine = std::move(engine);
    record.readings = {std::move(reading)};
    return judge(std::make_shared<const EngineRecord>(std::move(record)));
}

Workings sheet_of(const Judgement& judgement, std::string_view name, Place place = Place::engine())
{
    const auto typed = find_quantity(name, place.kind);
    const auto sheet = find_workings(judgement, 0, typed ? *typed : *find_quantity(name), place);
    EXPECT_TRUE(sheet) << name;
    return sheet.value_or(Workings{});
}

const WorkingInput* input_of(const Workings& sheet, std::string_view symbol)
{
    const auto found = std::find_if(sheet.inputs.begin(), sheet.inputs.end(), [&](const auto& in) { return in.symbol == symbol; });
    return found == sheet.inputs.end() ? nullptr : &*found;
}

bool says(const std::vector<std::string>& remarks, std::string_view words)
{
    return std::any_of(remarks.begin(), remarks.end(), [&](const auto& each) { return each.find(words) != std::string::npos; });
}

double share_of_all(const Workings& sheet)
{
    return std::accumulate(sheet.inputs.begin(), sheet.inputs.end(), 0.0,
                           [](double sum, const WorkingInput& in) { return sum + in.share.value_or(0.0); });
}

ReadingMaker air_side()
{
    ReadingMaker reading;
    reading.number("load_percent", 75.0).number("speed", 95.4).number("shaft_power", 9000.0);
    reading.number("inlet_air_temperature", 30.0).number("barometric_pressure", 1013.0, at_ship());
    reading.typed("scavenge_pressure", "2,51 bar").number("cooler_coolant_inlet_temperature", 32.0, at_cooler(1));
    reading.number("compressor_outlet_temperature", 180.0, at_turbocharger(1));
    reading.number("compressor_outlet_temperature", 182.0, at_turbocharger(2));
    return reading;
}

} // namespace

TEST(Workings, OfADerivedNumberAreTheRowOfDeriveToTheLastBit)
{
    const Engine engine = example_engine();
    const Reading reading = air_side().number("fuel_consumption", 1600.0).number("fuel_lower_heating_value", 42.3)
                                .cylinders("compression_pressure", {120.0, 121.0, 119.0, 120.5, 120.2, 119.7})
                                .cylinders("mean_indicated_pressure", {16.0, 16.2, 15.9, 16.1, 16.3, 15.8}).done();
    const Judgement judgement = judged(engine, reading);
    const auto rows = derive(engine, Baseline(engine), reading);
    EXPECT_GT(rows.size(), 15U);
    for (const DerivedValue& row : rows) {
        const auto sheet = find_workings(judgement, 0, row.id, row.place);
        ASSERT_TRUE(sheet) << row.quantity;
        EXPECT_EQ(sheet->value, row.value) << row.quantity;
        EXPECT_EQ(sheet->corrected, row.corrected) << row.quantity;
        EXPECT_EQ(sheet->expected, row.expected) << row.quantity;
        EXPECT_EQ(sheet->half_width, row.uncertainty) << row.quantity;
        EXPECT_TRUE(sheet->missing.empty()) << sheet->missing;
        EXPECT_FALSE(sheet->inputs.empty()) << row.quantity;
        if (sheet->half_width) {
            EXPECT_NEAR(share_of_all(*sheet), 1.0, 1e-9) << row.quantity;
        }
    }
}

TEST(Workings, SayWhereEveryInputComesFrom)
{
    const Judgement judgement = judged(example_engine(), air_side().done());
    const Workings sheet = sheet_of(judgement, "compressor_efficiency");
    ASSERT_TRUE(sheet.value);
    EXPECT_EQ(sheet.title, "Compressor efficiency");
    EXPECT_NE(sheet.formula.find("Π^0.286"), std::string::npos);
    ASSERT_TRUE(input_of(sheet, "p_scav"));
    EXPECT_EQ(input_of(sheet, "p_scav")->origin, "typed 2,51 bar gauge");
    EXPECT_EQ(input_of(sheet, "p_scav")->unit, "bar gauge");
    EXPECT_EQ(input_of(sheet, "p_b")->value, 1.013);
    EXPECT_TRUE(says(sheet.remarks, "No air filter drop was read"));
    const auto ratio = std::find_if(sheet.steps.begin(), sheet.steps.end(), [](const WorkingStep& step) {
        return step.words == "Compressor pressure ratio, turbocharger 2";
    });
    ASSERT_NE(ratio, sheet.steps.end());
    EXPECT_NEAR(ratio->value, (2.51 + 1.013) / 1.013, 1e-12);
    const Workings over = sheet_of(judgement, "cooler_effectiveness");
    EXPECT_EQ(over.missing, "Effectiveness of the air cooler is not known, because scavenge temperature was not read. "
                            "Read scavenge temperature.");
}

TEST(Workings, AMeanOfSeveralIsSaidToBeOne)
{
    ReadingMaker reading = air_side();
    reading.number("scavenge_temperature", 44.0).number("cooler_coolant_inlet_temperature", 33.0, at_cooler(2));
    const Workings sheet = sheet_of(judged(example_engine(), reading.done()), "cooler_temperature_difference");
    EXPECT_NEAR(sheet.value.value(), 44.0 - 32.5, 1e-12);
    EXPECT_EQ(input_of(sheet, "t_ci")->origin, "mean of 2 coolers");
    EXPECT_NEAR(input_of(sheet, "t_ci")->moved, -1.0, 1e-9);
    EXPECT_NEAR(input_of(sheet, "t_ci")->share.value(), 0.5, 1e-9);
}

TEST(Workings, WithoutABarometerTheyTakeOneBarAndSaySo)
{
    ReadingMaker reading;
    reading.number("scavenge_pressure", 2.2);
    const Workings sheet = sheet_of(judged(example_engine(), reading.done()), "compressor_pressure_ratio");
    EXPECT_NEAR(sheet.value.value(), 3.2, 1e-12);
    EXPECT_FALSE(sheet.half_width);
    EXPECT_EQ(input_of(sheet, "p_b")->origin, "no barometer was read: 1 bar taken");
    EXPECT_TRUE(says(sheet.remarks, "1 bar was taken"));
}

TEST(Workings, OutsideTheValidityTheReasonOfTheFormulaIsCarriedThrough)
{
    ReadingMaker reading = air_side();
    reading.number("compressor_outlet_temperature", 20.0, at_turbocharger(3));
    const Workings sheet = sheet_of(judged(example_engine(), reading.done()), "compressor_efficiency", at_turbocharger(3));
    EXPECT_FALSE(sheet.value);
    EXPECT_NE(sheet.missing.find("which is not above the 30"), std::string::npos) << sheet.missing;
    const Workings blown = sheet_of(judged(example_engine(), air_side().words("auxiliary_blower_running", "yes").done()),
                                    "compressor_efficiency");
    EXPECT_NE(blown.missing.find("auxiliary blower"), std::string::npos) << blown.missing;
}

TEST(Workings, OfATypedValueFollowTheWholeChain)
{
    ReadingMaker made;
    made.number("load_percent", 80.0).number("inlet_air_temperature", 40.0).number("barometric_pressure", 1000.0, at_ship());
    made.number("cooler_coolant_inlet_temperature", 30.0, at_cooler(1));
    made.cylinders("compression_pressure", {130.0, 128.0, 129.0, 128.5, 129.5, 128.2});
    const Judgement judgement = judged(example_engine(), made.done());
    const Workings sheet = sheet_of(judgement, "compression_pressure", Place::cylinder(1));
    EXPECT_EQ(sheet.value, 130.0);
    // Methods of the trade, separate calculation: 130 bar at 40/30 °C with 2.8e-3 and -1.4e-3 gives 134.585 bar.
    EXPECT_NEAR(sheet.corrected.value(), 134.585, 1e-5);
    EXPECT_EQ(sheet.formula.find("p_corr = (p + p_b)(1 + a ΔT + b ΔTc) − p_b"), 0U);
    EXPECT_NEAR(sheet.deviation.value(), *sheet.corrected - *sheet.expected, 1e-12);
    EXPECT_TRUE(says(sheet.remarks, "Between the baseline's points at 75 % (120) and 100 % (144)")) << sheet.remarks.size();
    EXPECT_NE(sheet.source.find("coefficients: invented"), std::string::npos);
    EXPECT_NEAR(share_of_all(sheet), 1.0, 1e-9);
    const auto& judged_value = *std::find_if(judgement.readings[0].values.begin(), judgement.readings[0].values.end(), [](const JudgedValue& v) {
        return v.place == Place::cylinder(1);
    });
    EXPECT_EQ(sheet.deviation_half_width, judged_value.uncertainty);
    EXPECT_LT(*sheet.half_width, *sheet.deviation_half_width) << "the gauge's own, without load and ambient";
    EXPECT_EQ(sheet.apart, judged_value.apart);
    const auto median = std::find_if(sheet.steps.begin(), sheet.steps.end(), [](const WorkingStep& step) {
        return step.words == "Median of the other cylinders' deviations";
    });
    ASSERT_NE(median, sheet.steps.end());
    EXPECT_NEAR(*sheet.deviation - median->value, *sheet.apart, 1e-12);
}

TEST(Workings, SayWhyNothingWasCorrectedOrExpected)
{
    ReadingMaker made;
    made.number("load_percent", 75.0).number("exhaust_temperature", 330.0, Place::cylinder(2));
    made.number("jacket_outlet_temperature", 82.0, Place::cylinder(2));
    const Judgement judgement = judged(example_engine(), made.done());
    const Workings exhaust = sheet_of(judgement, "exhaust_temperature", Place::cylinder(2));
    EXPECT_FALSE(exhaust.corrected);
    EXPECT_TRUE(says(exhaust.remarks, "Not corrected, because no inlet air temperature was read."));
    const Workings jacket = sheet_of(judgement, "jacket_outlet_temperature", Place::cylinder(2));
    EXPECT_TRUE(says(jacket.remarks, "baseline does not speak of it"));
    const Workings missing = sheet_of(judgement, "maximum_pressure", Place::cylinder(2));
    EXPECT_EQ(missing.missing, "Maximum pressure of cylinder 2 is not known, because it was not read. "
                               "Read maximum pressure of cylinder 2.");
}

TEST(Workings, AreNothingForWordsAndForPlacesThatAQuantityDoesNotHave)
{
    const Judgement judgement = judged(example_engine(), air_side().done());
    EXPECT_FALSE(find_workings(judgement, 0, *find_quantity("mode"), Place::engine()));
    EXPECT_FALSE(find_workings(judgement, 0, *find_quantity("maximum_pressure"), Place::engine()));
    EXPECT_FALSE(find_workings(judgement, 0, *find_quantity("maximum_pressure"), Place::cylinder(7)));
    EXPECT_FALSE(find_workings(judgement, 0, *find_quantity("compressor_efficiency"), Place::cylinder(1)));
    EXPECT_FALSE(find_workings(judgement, 5, *find_quantity("speed"), Place::engine()));
}

TEST(Workings, AsTextKeepToAHundredCharactersALine)
{
    const Judgement judgement = judged(example_engine(), air_side().done());
    const std::string text = workings_text(sheet_of(judgement, "compressor_efficiency"), "Reading of 2026-03-14");
    EXPECT_EQ(text.find("Reading of 2026-03-14\nCompressor efficiency: 0."), 0U) << text;
    std::istringstream lines(text);
    for (std::string line; std::getline(lines, line);) {
        const auto characters = std::count_if(line.begin(), line.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; });
        EXPECT_LE(characters, 100) << line;
    }
    EXPECT_NE(text.find("Source: "), std::string::npos);
}
