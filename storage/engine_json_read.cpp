// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/plain_text.h"
#include "storage/engine_json_checks.h"
#include "storage/engine_json_load.h"
#include "storage/sql.h"

#include <QJsonDocument>

#include <algorithm>

namespace evenstroke::storage {
namespace {

constexpr int most_cylinders = 80; // as core's find_problem

/// Reads one document; each part of it has its function.
class DocumentReader
{
public:
    DocumentReader(const QJsonObject& object, std::vector<DocumentProblem>& problems)
        : top_(object, "", problems), problems_(problems)
    {
    }
    EngineDocument read();

private:
    void read_vessel();
    void read_particulars();
    void read_cylinder_names();
    void read_firing_order();
    void read_reference();
    void read_correction();
    void read_limits();
    void read_instruments();
    void read_baseline();
    void read_card_angles();
    void keep_unknown(const JsonReader& reader);
    std::optional<QJsonObject> object_of(JsonReader& reader, const char* key);
    QJsonArray array_of(const char* key);

    JsonReader top_;
    std::vector<DocumentProblem>& problems_;
    EngineDocument document_;
};

EngineDocument DocumentReader::read()
{
    top_.take("source");
    read_vessel();
    read_particulars();
    read_cylinder_names();
    read_firing_order();
    read_reference();
    read_correction();
    read_limits();
    read_instruments();
    read_baseline();
    read_card_angles();
    read_load_and_heat(top_, document_.engine);
    keep_unknown(top_);
    document_.remarks = unknown_quantity_remarks(document_.engine);
    return std::move(document_);
}

void DocumentReader::keep_unknown(const JsonReader& reader)
{
    const std::vector<std::string> left = reader.left_keys();
    document_.unknown_keys.insert(document_.unknown_keys.end(), left.begin(), left.end());
}

std::optional<QJsonObject> DocumentReader::object_of(JsonReader& reader, const char* key)
{
    const QJsonValue value = reader.take(key);
    if (value.isUndefined())
        return std::nullopt;
    if (value.isObject())
        return value.toObject();
    reader.refuse(key, value,
                  reader.path(key) + " is " + json_text(value) + ", which has no keys of its own.",
                  "Write it in braces: {…}.");
    return std::nullopt;
}

QJsonArray DocumentReader::array_of(const char* key)
{
    const QJsonValue value = top_.take(key);
    if (value.isUndefined() || value.isArray())
        return value.toArray();
    top_.refuse(key, value, std::string(key) + " is " + json_text(value) + ", which is no list.",
                "Write it in brackets: […].");
    return {};
}

void DocumentReader::read_vessel()
{
    Vessel& vessel = document_.vessel;
    if (top_.object().value(QLatin1String("vessel")).isString()) {
        vessel.name = top_.text("vessel");
        return;
    }
    const auto object = object_of(top_, "vessel");
    if (!object)
        return;
    JsonReader reader(*object, "vessel.", problems_);
    vessel.name = reader.text("name");
    // An IMO number is often written without quotation marks.
    vessel.imo = reader.object().value(QLatin1String("imo")).isDouble() ? number_text(*reader.number("imo"))
                                                                        : reader.text("imo");
    vessel.flag = reader.text("flag");
    vessel.class_society = reader.text("class");
    vessel.class_number = reader.text("class_number");
    keep_unknown(reader);
}

void DocumentReader::read_particulars()
{
    Engine& engine = document_.engine;
    engine.name = top_.text("engine");
    const std::string cycle = top_.text("cycle");
    if (cycle == "four-stroke" || cycle == "two-stroke")
        engine.kind = cycle == "four-stroke" ? EngineKind::four_stroke : EngineKind::two_stroke;
    else
        top_.refuse("cycle", top_.take("cycle"),
                    cycle.empty() ? "The engine's cycle is not given."
                                  : "The cycle " + evenstroke::quoted(cycle) + " is not known.",
                    "Write \"cycle\": \"two-stroke\" or \"four-stroke\".");
    if (const auto cylinders = top_.whole("cylinders", 1, most_cylinders))
        engine.cylinders = *cylinders;
    else if (!top_.has("cylinders"))
        top_.refuse("cylinders", {}, "The number of cylinders is not given.",
                    "Write \"cylinders\" with a whole number.");
    engine.bore = top_.positive("bore_mm").value_or(0.0) / 1000.0 * si::metres;
    engine.stroke = top_.positive("stroke_mm").value_or(0.0) / 1000.0 * si::metres;
    engine.rod_length = top_.positive("rod_length_mm").value_or(0.0) / 1000.0 * si::metres;
    engine.rated_power = top_.positive("rated_power_kw").value_or(0.0) * 1000.0 * si::watts;
    engine.rated_speed = top_.positive("rated_speed_rpm").value_or(0.0) / 60.0 * si::hertz;
    engine.maximum_pressure_controlled = top_.truth("maximum_pressure_controlled").value_or(false);
    if (const auto pitch = top_.number("propeller_pitch_m"))
        engine.propeller_pitch = *pitch * si::metres;
    engine.mechanical_efficiency = top_.positive("mechanical_efficiency");
    if (engine.mechanical_efficiency && *engine.mechanical_efficiency > 1.0)
        top_.refuse("mechanical_efficiency", *engine.mechanical_efficiency,
                    "The mechanical efficiency is " + number_text(*engine.mechanical_efficiency) +
                        "; more than 1 cannot be.",
                    "Write a share of 1, such as 0.92.");
}

void DocumentReader::read_cylinder_names()
{
    for (const QJsonValue& name : array_of("cylinder_names")) {
        if (!name.isString() || name.toString().trimmed().isEmpty()) {
            top_.refuse("cylinder_names", name, "The cylinder name " + json_text(name) + " is no text.",
                        "Write names in quotation marks, one a cylinder.");
            return;
        }
        document_.engine.cylinder_names.push_back(from_qt(name.toString().trimmed()));
    }
    std::vector<std::string> sorted = document_.engine.cylinder_names;
    std::sort(sorted.begin(), sorted.end());
    if (const auto twice = std::adjacent_find(sorted.begin(), sorted.end()); twice != sorted.end())
        top_.refuse("cylinder_names", to_qt(*twice),
                    "Two cylinders are called " + evenstroke::quoted(*twice) + ".",
                    "Give every cylinder a name of its own.");
}

void DocumentReader::read_firing_order()
{
    Engine& engine = document_.engine;
    if (top_.object().value(QLatin1String("firing_order")).toString() == QLatin1String("unknown")) {
        top_.take("firing_order");
        return;
    }
    const QJsonArray order = array_of("firing_order");
    for (const QJsonValue& entry : order) {
        const std::string name = entry.isDouble() ? number_text(entry.toDouble()) : from_qt(entry.toString());
        const auto cylinder = engine.find_cylinder(name);
        if (!cylinder || std::count(engine.firing_order.begin(), engine.firing_order.end(), *cylinder) > 0) {
            top_.refuse("firing_order", entry,
                        "The firing order names " + json_text(entry) +
                            (cylinder ? " twice." : ", which the engine lacks."),
                        "Name every cylinder once.");
            return;
        }
        engine.firing_order.push_back(*cylinder);
    }
    if (!order.isEmpty() && order.size() != engine.cylinders)
        top_.refuse("firing_order", order,
                    "The firing order names " + std::to_string(order.size()) + " of " +
                        std::to_string(engine.cylinders) + " cylinders.",
                    "Name every cylinder once.");
}

void DocumentReader::read_reference()
{
    const auto object = object_of(top_, "reference");
    if (!object)
        return;
    JsonReader reader(*object, "reference.", problems_);
    ReferenceConditions& reference = document_.engine.reference;
    const auto temperature = [&](const char* key, Temperature& to) {
        const auto degrees = reader.number(key);
        if (degrees && *degrees <= -273.15)
            reader.refuse(key, *degrees,
                          reader.path(key) + " is " + number_text(*degrees) + " °C, below absolute zero.",
                          "Write the temperature in °C.");
        else if (degrees)
            to = celsius(*degrees);
    };
    temperature("inlet_air_c", reference.inlet_air);
    temperature("cooler_coolant_c", reference.cooler_coolant);
    if (const auto barometer = reader.positive("barometric_mbar"))
        reference.barometer = bar_absolute(*barometer / 1000.0);
    if (const auto percent = reader.number("relative_humidity_percent")) {
        if (*percent < 0.0 || *percent > 100.0)
            reader.refuse("relative_humidity_percent", *percent,
                          reader.path("relative_humidity_percent") + " is " + number_text(*percent) +
                              " %, which cannot be.",
                          "Write the relative humidity from 0 to 100 %.");
        else
            reference.relative_humidity = *percent / 100.0;
    }
    reference.source = reader.text("source");
    keep_unknown(reader);
}

void DocumentReader::read_correction()
{
    const auto object = object_of(top_, "correction");
    if (!object)
        return;
    JsonReader reader(*object, "correction.", problems_);
    const std::string common_source = reader.text("source");
    for (const QString& name : object->keys()) {
        const QByteArray key = name.toUtf8();
        if (key == "source")
            continue;
        if (const auto both = read_coefficients(reader, key.constData(), common_source))
            document_.engine.correction[key.toStdString()] = *both;
    }
    keep_unknown(reader);
}

void DocumentReader::read_limits()
{
    const auto object = object_of(top_, "limits");
    if (!object)
        return;
    JsonReader reader(*object, "limits.", problems_);
    const std::string common_source = reader.text("source");
    for (const QString& name : object->keys()) {
        const QByteArray key = name.toUtf8();
        if (key == "source")
            continue;
        AbsoluteLimit limit{key.toStdString(), {}, {}, common_source};
        if (const QJsonValue value = reader.take(key.constData()); value.isObject()) {
            JsonReader one(value.toObject(), "limits." + limit.quantity + ".", problems_);
            limit.low = one.number("low");
            limit.high = one.number("high");
            if (one.has("source"))
                limit.source = one.text("source");
            one.take("source");
            keep_unknown(one);
            if (limit.low && limit.high && *limit.low > *limit.high)
                reader.refuse(key.constData(), value,
                              "The limits of " + limit.quantity + " are exchanged: low is above high.",
                              "Write the smaller number at low.");
        } else if (!value.isUndefined()) {
            limit.high = reader.number(key.constData()); // a bare number is not to be passed
        }
        if (limit.low || limit.high)
            document_.engine.limits.push_back(std::move(limit));
    }
}

void DocumentReader::read_instruments()
{
    int index = 0;
    for (const QJsonValue& value : array_of("instruments")) {
        const std::string where = "instruments[" + std::to_string(index++) + "].";
        if (!value.isObject()) {
            top_.refuse("instruments", value,
                        where + " is " + json_text(value) + ", which describes no instrument.",
                        "Write {\"quantity\": …, \"serial\": …}.");
            continue;
        }
        JsonReader reader(value.toObject(), where, problems_);
        Instrument instrument;
        instrument.quantity = reader.text("quantity");
        instrument.serial = reader.object().value(QLatin1String("serial")).isDouble()
                                ? number_text(*reader.number("serial"))
                                : reader.text("serial");
        instrument.calibrated = reader.text("calibrated");
        instrument.uncertainty = reader.positive("uncertainty");
        instrument.source = reader.text("source");
        keep_unknown(reader);
        document_.engine.instruments.push_back(std::move(instrument));
    }
}

void DocumentReader::read_baseline()
{
    document_.engine.baseline_source = top_.text("baseline_source");
    int index = 0;
    for (const QJsonValue& value : array_of("baseline")) {
        const std::string where = "baseline[" + std::to_string(index++) + "].";
        JsonReader reader(value.toObject(), where, problems_);
        const auto load = reader.number("load_percent");
        if (!load && !reader.has("load_percent")) {
            reader.refuse("load_percent", value,
                          "Point " + std::to_string(index) + " of the baseline has no load.",
                          "Write \"load_percent\" with a number.");
            continue;
        }
        BaselinePoint point{load.value_or(0.0), reader.text("mode"), {}};
        if (const std::string source = reader.text("source"); document_.engine.baseline_source.empty())
            document_.engine.baseline_source = source;
        for (const QString& name : reader.object().keys()) {
            const QByteArray key = name.toUtf8();
            if (key == "load_percent" || key == "mode" || key == "source")
                continue;
            if (const auto number = reader.number(key.constData()))
                point.values[key.toStdString()] = *number;
        }
        document_.engine.baseline.push_back(std::move(point));
    }
}

void DocumentReader::read_card_angles()
{
    Engine& engine = document_.engine;
    engine.compression_ratio = top_.number("compression_ratio");
    if (engine.compression_ratio && *engine.compression_ratio <= 1.0)
        top_.refuse("compression_ratio", *engine.compression_ratio,
                    "The compression ratio is " + number_text(*engine.compression_ratio) +
                        "; it must be above 1.",
                    "Write the maker's compression ratio, usually 10 to 25.");
    const auto angle = [&](const char* key) {
        const auto degrees = top_.number(key);
        if (degrees && (*degrees < -360.0 || *degrees > 360.0))
            top_.refuse(key, *degrees,
                        std::string(key) + " is " + number_text(*degrees) + "°, beyond one working cycle.",
                        "Write degrees from firing dead centre, negative before it.");
        return degrees;
    };
    engine.cylinder_closes_deg = angle("cylinder_closes_deg");
    engine.cylinder_opens_deg = angle("cylinder_opens_deg");
    engine.expansion_angle_deg = angle("expansion_angle_deg").value_or(40.0);
}

} // namespace

EngineDocument read_document_object(const QJsonObject& object, std::vector<DocumentProblem>& problems)
{
    return DocumentReader(object, problems).read();
}

} // namespace evenstroke::storage
