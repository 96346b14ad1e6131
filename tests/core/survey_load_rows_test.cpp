// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/core/survey_fixture.h"

#include <gtest/gtest.h>

#include <functional>

namespace evenstroke {
namespace {

using namespace survey_fixture;

std::string report_of(const std::function<void(Engine&)>& describe)
{
    Judgement judgement = make_judgement();
    EngineRecord record = *judgement.record;
    describe(record.engine);
    judgement.record = std::make_shared<const EngineRecord>(std::move(record));
    return report_as_text(make_survey_report(judgement, year_to_march(), make_details()));
}

bool contains(const std::string& text, std::string_view part) { return text.find(part) != std::string::npos; }

TEST(SurveyLoadRows, LimitsAndWallsStandWithTheirSourceARowEach)
{
    const std::string text = report_of([](Engine& engine) {
        LoadLimits limits;
        limits.mean_effective_pressure = 1.0;
        limits.torque_exponent = 2.2;
        limits.torque_below_speed = 0.96;
        limits.highest_speed = 1.045;
        limits.overload = 1.1;
        limits.light_running_margin = 0.05;
        limits.source = "maker's diagram, sheet 9";
        engine.load_limits = limits;
        WallDescription wall;
        wall.part = "liner";
        wall.load_percent = 85.0;
        wall.gas = celsius(890.0);
        wall.gas_film = film_coefficient(400.0);
        wall.thickness = millimetres(35.0);
        wall.conductivity = conductivity(45.0);
        wall.coolant_film = film_coefficient(8000.0);
        wall.coolant = celsius(80.0);
        wall.highest = celsius(300.0);
        wall.source = "calculation 3";
        engine.walls = {wall};
        engine.moving_mass = 5200.0 * si::kilograms;
        engine.generator_efficiency = 0.96;
    });
    for (const char* part :
         {"Limit of mean effective pressure\t100.0 % of the rating's\tmaker's diagram, sheet 9",
          "Limit of torque and speed\tpower at most speed to the power 2.20, below 96.0 % of rated speed\tmaker's diagram, sheet 9",
          "Highest speed\t104.5 % of rated speed", "Overload for a time\t110.0 % of rated power", "Light running margin\t5.0 %",
          "Wall: liner\tat 85 % load: gas 890 °C, gas film 400 W/(m² K), 35.0 mm of 45.0 W/(m K), coolant film 8000 W/(m² K), "
          "coolant 80 °C, at most 300 °C\tcalculation 3",
          "Moving mass of one cylinder:\t5200 kg", "Generator efficiency:\t0.960"})
        EXPECT_TRUE(contains(text, part)) << part;
}

TEST(SurveyLoadRows, AnEngineWithoutThemPrintsNoneOfThem)
{
    const std::string text = report_of([](Engine&) {});
    for (const char* part : {"Load diagram and walls", "Moving mass", "Generator efficiency", "ISO 3046-1, "})
        EXPECT_FALSE(contains(text, part)) << part;
}

TEST(SurveyLoadRows, HumidityIsSaidToCountOnlyWhereItDoes)
{
    EXPECT_TRUE(contains(report_of([](Engine& engine) { engine.reference.relative_humidity = 0.3; }),
                         "Relative humidity:\t30 %, not used"));
    const std::string text = report_of([](Engine& engine) {
        engine.reference.relative_humidity = 0.3;
        engine.consumption_correction = ConsumptionCorrection::iso_3046;
        engine.aspiration = AspirationClass::naturally_aspirated;
    });
    EXPECT_TRUE(contains(text, "Relative humidity:\t30 %\n")) << "it counts";
    EXPECT_TRUE(contains(text, "brought to reference ambient by ISO 3046-1, naturally aspirated"));
}

} // namespace
} // namespace evenstroke
