// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/engine_json.h"

namespace evenstroke::storage {
namespace {

const char* const all_keys = R"(,
 "load_limits": {"mean_effective_pressure_percent": 102, "torque_exponent": 2.2, "torque_below_speed_percent": 96,
   "torque_factor": 1.05, "highest_speed_percent": 104.5, "overload_percent": 110, "light_running_margin_percent": 5,
   "source": "maker's diagram"},
 "walls": [{"part": "liner", "load_percent": 85, "gas_c": 890, "gas_film_w_m2k": 400, "thickness_mm": 35,
   "conductivity_w_mk": 45, "coolant_film_w_m2k": 8000, "coolant_c": 80, "highest_c": 300, "lowest_c": 120,
   "source": "maker's calculation"}],
 "moving_mass_kg": 5200, "generator_efficiency": 0.96, "consumption_correction": "iso-3046", "aspiration": "turbocharged",
 "reference": {"inlet_air_c": 25, "relative_humidity_percent": 30, "source": "shop test"})";

class EngineLoadKeys : public StorageTest
{
};

TEST_F(EngineLoadKeys, AreReadIntoPartsOfTheRating)
{
    const std::string text = engine_json("V", "E", all_keys).toStdString();
    const EngineDocument document = value_of_result(read_engine_document(text, "engine.json"));
    const Engine& engine = document.engine;
    EXPECT_TRUE(document.unknown_keys.empty());
    EXPECT_TRUE(find_document_problems(document).empty());
    ASSERT_TRUE(engine.load_limits);
    EXPECT_DOUBLE_EQ(*engine.load_limits->mean_effective_pressure, 1.02);
    EXPECT_DOUBLE_EQ(*engine.load_limits->torque_exponent, 2.2);
    EXPECT_DOUBLE_EQ(*engine.load_limits->torque_below_speed, 0.96);
    EXPECT_DOUBLE_EQ(engine.load_limits->torque_factor, 1.05);
    EXPECT_DOUBLE_EQ(*engine.load_limits->highest_speed, 1.045);
    EXPECT_DOUBLE_EQ(*engine.load_limits->overload, 1.1);
    EXPECT_DOUBLE_EQ(*engine.load_limits->light_running_margin, 0.05);
    EXPECT_FALSE(engine.load_limits->constant_speed);
    EXPECT_EQ(engine.load_limits->source, "maker's diagram");
    ASSERT_EQ(engine.walls.size(), 1U);
    EXPECT_EQ(engine.walls[0].part, "liner");
    EXPECT_NEAR(in_celsius(engine.walls[0].gas), 890.0, 1e-9); // over kelvin and back
    EXPECT_DOUBLE_EQ(engine.walls[0].thickness.value(), 0.035);
    EXPECT_NEAR(in_celsius(*engine.walls[0].highest), 300.0, 1e-9);
    EXPECT_DOUBLE_EQ(engine.moving_mass->value(), 5200.0);
    EXPECT_EQ(engine.generator_efficiency, 0.96);
    EXPECT_EQ(engine.consumption_correction, ConsumptionCorrection::iso_3046);
    EXPECT_EQ(engine.aspiration, AspirationClass::turbocharged);
    EXPECT_DOUBLE_EQ(*engine.reference.relative_humidity, 0.3);
}

TEST_F(EngineLoadKeys, MayAllBeLeftOut)
{
    const Engine engine = value_of_result(read_engine_document(engine_json().toStdString(), "engine.json")).engine;
    EXPECT_FALSE(engine.load_limits);
    EXPECT_TRUE(engine.walls.empty());
    EXPECT_FALSE(engine.moving_mass || engine.generator_efficiency || engine.reference.relative_humidity);
    EXPECT_EQ(engine.consumption_correction, ConsumptionCorrection::linear);
    EXPECT_EQ(engine.aspiration, AspirationClass::charge_air_cooled);
    const std::string written = write_engine_document({}, engine, "");
    for (const char* key : {"load_limits", "walls", "moving_mass_kg", "generator_efficiency", "consumption_correction",
                            "aspiration", "relative_humidity_percent"})
        EXPECT_EQ(written.find(key), std::string::npos) << key << " says only what is so anyhow";
}

TEST_F(EngineLoadKeys, AreWrittenAsTheyWereTyped)
{
    const std::string former = engine_json("V", "E", all_keys).toStdString();
    EngineDocument document = value_of_result(read_engine_document(former, "engine.json"));
    EXPECT_TRUE(same_document(write_engine_document(document.vessel, document.engine, former), former));
    document.engine.id.clear();
    const std::string anew = write_engine_document(document.vessel, document.engine, "");
    const Engine again = value_of_result(read_engine_document(anew, "engine.json")).engine;
    EXPECT_NE(anew.find("\"highest_speed_percent\": 104.5"), std::string::npos) << "no digits of converting: " << anew;
    EXPECT_NE(anew.find("\"gas_c\": 890"), std::string::npos);
    EXPECT_DOUBLE_EQ(*again.load_limits->overload, 1.1);
    EXPECT_EQ(again.walls[0].source, "maker's calculation");
    EXPECT_EQ(again.consumption_correction, ConsumptionCorrection::iso_3046);
    document.engine.load_limits.reset();
    document.engine.walls.clear();
    const std::string without = write_engine_document(document.vessel, document.engine, former);
    EXPECT_EQ(without.find("load_limits"), std::string::npos) << "what was taken away is not kept as unknown";
    EXPECT_EQ(without.find("walls"), std::string::npos);
}

TEST_F(EngineLoadKeys, UnknownOnesInsideAreKeptAndNamed)
{
    const std::string former =
        engine_json("V", "E", R"(, "load_limits": {"overload_percent": 110, "painted": true},
        "walls": [{"part": "cover", "load_percent": 85, "gas_c": 900, "gas_film_w_m2k": 400, "thickness_mm": 40,
        "conductivity_w_mk": 40, "coolant_film_w_m2k": 8000, "coolant_c": 80, "colour": "grey"}])").toStdString();
    EngineDocument document = value_of_result(read_engine_document(former, "engine.json"));
    EXPECT_EQ(document.unknown_keys, (std::vector<std::string>{"load_limits.painted", "walls[0].colour"}));
    document.engine.load_limits->overload = 1.05;
    document.engine.walls[0].coolant = celsius(85.0);
    const std::string changed = write_engine_document(document.vessel, document.engine, former);
    EXPECT_NE(changed.find("\"painted\": true"), std::string::npos);
    EXPECT_NE(changed.find("\"colour\": \"grey\""), std::string::npos);
    EXPECT_NE(changed.find("\"overload_percent\": 105"), std::string::npos);
}

struct BadLoadKey
{
    const char* name;
    QByteArray replaced, by;
    const char *key, *says;
};
class BadLoadKeys : public StorageTest, public testing::WithParamInterface<BadLoadKey>
{
};

TEST_P(BadLoadKeys, AreRefusedWithKeyLineValueAndRemedy)
{
    QByteArray text = engine_json("V", "E", all_keys);
    ASSERT_TRUE(text.contains(GetParam().replaced));
    text.replace(GetParam().replaced, GetParam().by);
    std::vector<DocumentProblem> problems;
    EXPECT_FALSE(read_engine_document(text.toStdString(), problems).has_value());
    ASSERT_FALSE(problems.empty());
    EXPECT_EQ(problems.front().key, GetParam().key);
    EXPECT_GT(problems.front().line, 0) << "somebody has to find it";
    EXPECT_FALSE(problems.front().value.empty());
    EXPECT_NE(problems.front().reason.find(GetParam().says), std::string::npos) << problems.front().reason;
    EXPECT_FALSE(problems.front().expected.empty());
}

INSTANTIATE_TEST_SUITE_P(
    Documents, BadLoadKeys,
    testing::Values(
        BadLoadKey{"LimitAsAPart", "\"overload_percent\": 110", "\"overload_percent\": 1.1", "load_limits.overload_percent",
                   "not from 1 to 1.3"},
        BadLoadKey{"LimitInWords", "\"overload_percent\": 110", "\"overload_percent\": \"110\"",
                   "load_limits.overload_percent", "no number"},
        BadLoadKey{"SteepTorqueLimit", "\"torque_exponent\": 2.2", "\"torque_exponent\": 22", "load_limits.torque_exponent",
                   "22"},
        BadLoadKey{"ExponentWithoutItsSpeed", "\"torque_below_speed_percent\": 96,", "", "load_limits.torque_exponent",
                   "no torque_below_speed_percent"},
        BadLoadKey{"FactorOutside", "\"torque_factor\": 1.05", "\"torque_factor\": 105", "load_limits.torque_factor", "105"},
        BadLoadKey{"MarginOutside", "\"light_running_margin_percent\": 5", "\"light_running_margin_percent\": 50",
                   "load_limits.light_running_margin_percent", "50"},
        BadLoadKey{"WallWithoutGas", "\"gas_c\": 890,", "", "walls[0].gas_c", "is not given"},
        BadLoadKey{"WallColderThanItsCoolant", "\"gas_c\": 890", "\"gas_c\": 60", "walls[0]", "not hotter"},
        BadLoadKey{"WallInMetres", "\"thickness_mm\": 35", "\"thickness_mm\": 35000", "walls[0]", "35000 mm"},
        BadLoadKey{"ColderThanNothing", "\"coolant_c\": 80", "\"coolant_c\": -300", "walls[0].coolant_c", "absolute zero"},
        BadLoadKey{"MarksExchanged", "\"lowest_c\": 120", "\"lowest_c\": 320", "walls[0]", "exchanged"},
        BadLoadKey{"NoMass", "\"moving_mass_kg\": 5200", "\"moving_mass_kg\": 0", "moving_mass_kg", "cannot be"},
        BadLoadKey{"MoreOutThanIn", "\"generator_efficiency\": 0.96", "\"generator_efficiency\": 96", "generator_efficiency",
                   "more than 1"},
        BadLoadKey{"AnotherCorrection", "iso-3046", "iso-15550", "consumption_correction", "iso-15550"},
        BadLoadKey{"AnotherAspiration", "\"turbocharged\"", "\"steam\"", "aspiration", "steam"},
        BadLoadKey{"DampAir", "\"relative_humidity_percent\": 30", "\"relative_humidity_percent\": 130",
                   "reference.relative_humidity_percent", "130"}),
    [](const auto& one) { return std::string(one.param.name); });

} // namespace
} // namespace evenstroke::storage
