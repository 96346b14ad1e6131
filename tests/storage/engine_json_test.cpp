// SPDX-License-Identifier: GPL-3.0-or-later
#include "fixture.h"

#include "storage/engine_json.h"

namespace evenstroke::storage {
namespace {

struct BadDocument
{
    const char* name;
    QByteArray replaced, by; ///< in a sound document
    const char* key;         ///< of the problem
    const char* says;        ///< part of its sentence
};

class EngineDocumentTest : public StorageTest
{
};
class BadEngineDocument : public StorageTest, public testing::WithParamInterface<BadDocument>
{
};

TEST_F(EngineDocumentTest, IsReadWithAllItsParts)
{
    const QByteArray text =
        R"({"vessel": {"name": "Quiet Barley", "imo": 9000001, "flag": "none", "class": "none", "class_number": "7"},
        "engine": "main engine", "cycle": "four-stroke", "cylinders": 4, "cylinder_names": ["A1", "A2", "B1", "B2"],
        "firing_order": ["A1", 3, "A2", "B2"], "bore_mm": 320, "stroke_mm": 400, "rod_length_mm": 760, "rated_power_kw": 2000,
        "rated_speed_rpm": 720, "maximum_pressure_controlled": true,
        "reference": {"inlet_air_c": 45, "cooler_coolant_c": 32, "barometric_mbar": 1000, "source": "class"},
        "correction": {"exhaust_temperature": [-0.002, -0.0005], "maximum_pressure": {"per_inlet_air": 0.002, "per_coolant": 0.001, "source": "shop test"}},
        "limits": {"exhaust_temperature": 520, "lube_oil_inlet_pressure": {"low": 3.5, "source": "manual"}},
        "instruments": [{"quantity": "maximum_pressure", "serial": 12, "calibrated": "2029-01", "uncertainty": 1.5}],
        "baseline": [{"load_percent": 50, "exhaust_temperature": 350}, {"load_percent": 50, "mode": "gas", "exhaust_temperature": 340},
                     {"load_percent": 75, "exhaust_temperature": 365, "source": "shop test 12"}],
        "compression_ratio": 14.5, "propeller_pitch_m": 3.1})";
    const EngineDocument document = value_of_result(read_engine_document(text.toStdString(), "engine.json"));
    const Engine& engine = document.engine;
    EXPECT_EQ(document.vessel.imo, "9000001");
    EXPECT_FALSE(engine.two_stroke());
    EXPECT_EQ(engine.firing_order, (std::vector<int>{1, 3, 2, 4}));
    EXPECT_DOUBLE_EQ(engine.bore.value(), 0.32);
    EXPECT_DOUBLE_EQ(engine.rated_speed.value(), 12.0);
    EXPECT_DOUBLE_EQ(in_celsius(engine.reference.inlet_air), 45.0);
    EXPECT_EQ(engine.correction.at("maximum_pressure").source, "shop test");
    EXPECT_DOUBLE_EQ(engine.correction.at("exhaust_temperature").per_inlet_air, -0.002);
    ASSERT_EQ(engine.limits.size(), 2U);
    EXPECT_EQ(engine.limits[0].high, 520.0);
    EXPECT_EQ(engine.limits[1].low, 3.5);
    EXPECT_EQ(engine.instruments.front().serial, "12");
    EXPECT_EQ(engine.baseline[1].mode, "gas");
    EXPECT_EQ(engine.baseline_source, "shop test 12");
    EXPECT_TRUE(document.unknown_keys.empty());
    EXPECT_TRUE(find_document_problems(document).empty());
}

TEST_F(EngineDocumentTest, NamesKeysThatItDoesNotKnow)
{
    const QByteArray text =
        engine_json("V", "E", R"(, "colour": "grey", "reference": {"inlet_air_c": 25, "humidity": 30})");
    const EngineDocument document = value_of_result(read_engine_document(text.toStdString(), "engine.json"));
    EXPECT_EQ(document.unknown_keys, (std::vector<std::string>{"reference.humidity", "colour"}));
}

TEST_F(EngineDocumentTest, KeepsNamesThatNoQuantityHasAndSaysWhatMayBeMeant)
{
    const QByteArray text = engine_json("V", "E", R"(, "correction": {"pmax": [0.002, 0.001]},
        "limits": {"jacket_outlet_temprature": 95}, "instruments": [{"quantity": "moonlight"}],
        "baseline": [{"load_percent": 50, "exhaust_temp": 300, "speed": 83}, {"load_percent": 75, "exhaust_temp": 330}])");
    const EngineDocument document = value_of_result(read_engine_document(text.toStdString(), "engine.json"));
    ASSERT_EQ(document.remarks.size(), 4U) << "each name once, however many points have it";
    EXPECT_EQ(document.remarks[0],
              "correction: no quantity is called \"pmax\"; it was kept and not used. Write "
              "maximum_pressure if that is meant");
    EXPECT_NE(document.remarks[1].find("Write jacket_outlet_temperature if"), std::string::npos);
    EXPECT_TRUE(document.remarks[2].ends_with("it was kept and not used")) << "nothing is near to moonlight";
    EXPECT_NE(document.remarks[3].find("Write exhaust_temperature if"), std::string::npos);
    EXPECT_EQ(document.engine.baseline[0].values.at("exhaust_temp"), 300.0);
}

TEST_F(EngineDocumentTest, MayHaveOneKeyInSeveralObjectsAndInTexts)
{
    const QByteArray text =
        engine_json("V", "E", R"(, "note": "a \", \"engine\": {", "limits": {"speed": {"high": 110},
        "exhaust_temperature": {"high": 430}}, "baseline": [{"load_percent": 50}, {"load_percent": 75}])");
    const EngineDocument document = value_of_result(read_engine_document(text.toStdString(), "engine.json"));
    EXPECT_TRUE(find_document_problems(document).empty());
}

TEST_F(EngineDocumentTest, IsReadForACardWithoutVesselAndRating)
{
    const auto document = read_engine_document(
        R"({"cycle": "four-stroke", "cylinders": 1, "bore_mm": 104, "stroke_mm": 85, "rod_length_mm": 136.5})",
        "engine.json");
    EXPECT_TRUE(document.has_value());
}

TEST_F(EngineDocumentTest, TakesAByteOrderMark)
{
    EXPECT_TRUE(
        read_engine_document("\xEF\xBB\xBF" + engine_json().toStdString(), "engine.json").has_value());
}

TEST_F(EngineDocumentTest, RefusesEndlessNesting)
{
    const auto document = read_engine_document(R"({"limits": )" + std::string(100000, '['), "engine.json");
    ASSERT_FALSE(document.has_value());
    EXPECT_NE(document.error().what_happened.find("nested too deeply"), std::string::npos);
}

TEST_F(EngineDocumentTest, NamesTheLineWhereTheTextBreaks)
{
    const auto document = read_engine_document("{\n\"vessel\": \"V\",\n\"engine\" \"E\"}", "engine.json");
    ASSERT_FALSE(document.has_value());
    EXPECT_EQ(document.error().what_happened,
              "engine.json, line 3: The document cannot be read as JSON: a colon is missing after a key.");
}

TEST_P(BadEngineDocument, IsRefusedInWords)
{
    QByteArray text = engine_json(
        "V", "E",
        R"(, "compression_ratio": 12, "baseline": [{"load_percent": 50, "speed": 83}, {"load_percent": 75, "speed": 95}])");
    ASSERT_TRUE(text.contains(GetParam().replaced));
    text.replace(GetParam().replaced, GetParam().by);
    std::vector<DocumentProblem> problems;
    const auto document = read_engine_document(text.toStdString(), problems);
    if (document)
        problems = find_document_problems(*document);
    ASSERT_FALSE(problems.empty());
    EXPECT_EQ(problems.front().key, GetParam().key);
    EXPECT_NE(problems.front().reason.find(GetParam().says), std::string::npos) << problems.front().reason;
    EXPECT_FALSE(problems.front().expected.empty());
}

INSTANTIATE_TEST_SUITE_P(
    Documents, BadEngineDocument,
    testing::Values(
        BadDocument{"NoCylinders", "\"cylinders\": 6", "\"cylinders\": 0", "cylinders", "is 0"},
        BadDocument{"HalfACylinder", "\"cylinders\": 6", "\"cylinders\": 5.5", "cylinders", "5.5"},
        BadDocument{"NegativeBore", "\"bore_mm\": 600", "\"bore_mm\": -600", "bore_mm", "-600"},
        BadDocument{"ZeroStroke", "\"stroke_mm\": 2400", "\"stroke_mm\": 0", "stroke_mm", "0"},
        BadDocument{"RodShorterThanCrank", "\"rod_length_mm\": 2460", "\"rod_length_mm\": 1100", "",
                    "shorter than the crank"},
        BadDocument{"NoCompression", "\"compression_ratio\": 12", "\"compression_ratio\": 1",
                    "compression_ratio", "above 1"},
        BadDocument{"FallingLoads", "\"load_percent\": 75", "\"load_percent\": 40", "", "do not increase"},
        BadDocument{"SameLoadTwice", "\"load_percent\": 75", "\"load_percent\": 50", "", "do not increase"},
        BadDocument{"NoLoad", "\"load_percent\": 75, ", "", "baseline[1].load_percent", "no load"},
        BadDocument{"TextForNumber", "\"bore_mm\": 600", "\"bore_mm\": \"600\"", "bore_mm", "no number"},
        BadDocument{"UnknownCycle", "two-stroke", "six-stroke", "cycle", "six-stroke"},
        BadDocument{"NoVessel", "\"vessel\": \"V\", ", "", "vessel", "names no vessel"},
        BadDocument{"NoBore", "\"bore_mm\": 600, ", "", "bore_mm", "bore_mm is not given"},
        BadDocument{"NoRating", "\"rated_power_kw\"", "\"rated_power\"", "rated_power_kw",
                    "rated_power_kw is not given"},
        BadDocument{"KeyTwice", "\"bore_mm\": 600", "\"bore_mm\": 600, \"bore_mm\": 610", "bore_mm",
                    "stands twice"},
        BadDocument{
            "CorrectionInAnotherForm", "\"baseline\": [",
            R"("correction": {"compression_pressure": {"value": [0.002, 0.001], "source": "x"}}, "baseline": [)",
            "correction.compression_pressure", "per_inlet_air and per_coolant cannot be found"},
        BadDocument{
            "HalfACorrection", "\"baseline\": [",
            R"("correction": {"exhaust_temperature": {"per_air": -0.002, "per_coolant": 0}}, "baseline": [)",
            "correction.exhaust_temperature", "per_inlet_air cannot be found"},
        BadDocument{
            "CorrectionInWords", "\"baseline\": [",
            R"("correction": {"exhaust_temperature": {"per_inlet_air": "x", "per_coolant": 0}}, "baseline": [)",
            "correction.exhaust_temperature.per_inlet_air", "no number"},
        BadDocument{"OneCoefficient", "\"baseline\": [",
                    R"("correction": {"exhaust_temperature": [-0.002]}, "baseline": [)",
                    "correction.exhaust_temperature", "no pair of coefficients"},
        BadDocument{"ListForObject", "\"baseline\": [", "\"limits\": [], \"baseline\": [", "limits",
                    "no keys"}),
    [](const auto& one) { return std::string(one.param.name); });

TEST_F(EngineDocumentTest, IsWrittenBackWithWhatNobodyKnows)
{
    const std::string former =
        engine_json(
            "V", "E",
            R"(, "colour": "grey", "limits": {"exhaust_temperature": 430, "speed": {"high": 108, "painted": true}})")
            .toStdString();
    EngineDocument document = value_of_result(read_engine_document(former, "engine.json"));
    EXPECT_TRUE(same_document(write_engine_document(document.vessel, document.engine, former), former))
        << "nothing changed, nothing is rewritten";
    document.engine.limits[1].high = 110.0;
    document.engine.bore = millimetres(620.0);
    const std::string changed = write_engine_document(document.vessel, document.engine, former);
    const EngineDocument again = value_of_result(read_engine_document(changed, "engine.json"));
    EXPECT_EQ(again.unknown_keys, (std::vector<std::string>{"limits.speed.painted", "colour"}));
    EXPECT_EQ(again.engine.limits[1].high, 110.0);
    EXPECT_NE(changed.find("\"bore_mm\": 620"), std::string::npos)
        << "no digits of converting to SI and back";
    EXPECT_NE(changed.find("\"exhaust_temperature\": 430"), std::string::npos)
        << "what did not change stays as typed";
}

} // namespace
} // namespace evenstroke::storage
