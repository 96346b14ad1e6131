// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/engine_json.h"
#include "storage/engine_json_load.h"
#include "storage/json_reader.h"
#include "storage/sql.h"

#include <QJsonDocument>

#include <initializer_list>

namespace evenstroke::storage {
namespace {

void put(QJsonObject& object, const char* key, const std::optional<double>& number)
{
    if (number)
        object.insert(QLatin1String(key), rounded_number(*number));
}
void put(QJsonObject& object, const char* key, const std::string& text)
{
    if (!text.empty())
        object.insert(QLatin1String(key), to_qt(text));
}
std::optional<double> if_positive(double number)
{
    return number > 0.0 ? std::optional(number) : std::nullopt;
}

QJsonValue vessel_value(const Vessel& vessel)
{
    QJsonObject object;
    put(object, "imo", vessel.imo);
    put(object, "flag", vessel.flag);
    put(object, "class", vessel.class_society);
    put(object, "class_number", vessel.class_number);
    if (object.isEmpty())
        return to_qt(vessel.name);
    put(object, "name", vessel.name);
    return object;
}

QJsonObject reference_object(const ReferenceConditions& reference)
{
    QJsonObject object;
    put(object, "inlet_air_c", in_celsius(reference.inlet_air));
    put(object, "cooler_coolant_c", in_celsius(reference.cooler_coolant));
    put(object, "barometric_mbar", in_bar(reference.barometer) * 1000.0);
    if (reference.relative_humidity)
        put(object, "relative_humidity_percent", *reference.relative_humidity * 100.0);
    put(object, "source", reference.source);
    return object;
}

QJsonObject correction_object(const Engine& engine)
{
    QJsonObject object;
    for (const auto& [name, coefficients] : engine.correction) {
        QJsonObject one;
        put(one, "per_inlet_air", coefficients.per_inlet_air);
        put(one, "per_coolant", coefficients.per_coolant);
        put(one, "source", coefficients.source);
        object.insert(to_qt(name), one);
    }
    return object;
}

QJsonObject limits_object(const Engine& engine)
{
    QJsonObject object;
    for (const AbsoluteLimit& limit : engine.limits) {
        QJsonObject one;
        put(one, "low", limit.low);
        put(one, "high", limit.high);
        put(one, "source", limit.source);
        object.insert(to_qt(limit.quantity), one);
    }
    return object;
}

QJsonArray instruments_array(const Engine& engine)
{
    QJsonArray array;
    for (const Instrument& instrument : engine.instruments) {
        QJsonObject one;
        put(one, "quantity", instrument.quantity);
        put(one, "serial", instrument.serial);
        put(one, "calibrated", instrument.calibrated);
        put(one, "uncertainty", instrument.uncertainty);
        put(one, "source", instrument.source);
        array.append(one);
    }
    return array;
}

QJsonArray baseline_array(const Engine& engine)
{
    QJsonArray array;
    for (const BaselinePoint& point : engine.baseline) {
        QJsonObject one;
        put(one, "load_percent", point.load_percent);
        put(one, "mode", point.mode);
        for (const auto& [name, value] : point.values)
            one.insert(to_qt(name), rounded_number(value));
        array.append(one);
    }
    return array;
}

/// Every key that this program knows, as it stands in vessel and engine.
QJsonObject known_keys(const Vessel& vessel, const Engine& engine)
{
    QJsonObject object;
    object.insert(QStringLiteral("vessel"), vessel_value(vessel));
    put(object, "engine", engine.name);
    object.insert(QStringLiteral("cycle"),
                  engine.two_stroke() ? QStringLiteral("two-stroke") : QStringLiteral("four-stroke"));
    object.insert(QStringLiteral("cylinders"), engine.cylinders);
    QJsonArray names, order;
    for (const std::string& name : engine.cylinder_names)
        names.append(to_qt(name));
    for (const int cylinder : engine.firing_order)
        order.append(cylinder);
    if (!names.isEmpty())
        object.insert(QStringLiteral("cylinder_names"), names);
    if (!order.isEmpty())
        object.insert(QStringLiteral("firing_order"), order);
    put(object, "bore_mm", if_positive(engine.bore.value() * 1000.0));
    put(object, "stroke_mm", if_positive(engine.stroke.value() * 1000.0));
    put(object, "rod_length_mm", if_positive(engine.rod_length.value() * 1000.0));
    put(object, "rated_power_kw", if_positive(engine.rated_power.value() / 1000.0));
    put(object, "rated_speed_rpm", if_positive(engine.rated_speed.value() * 60.0));
    object.insert(QStringLiteral("maximum_pressure_controlled"), engine.maximum_pressure_controlled);
    object.insert(QStringLiteral("reference"), reference_object(engine.reference));
    object.insert(QStringLiteral("correction"), correction_object(engine));
    object.insert(QStringLiteral("limits"), limits_object(engine));
    object.insert(QStringLiteral("instruments"), instruments_array(engine));
    object.insert(QStringLiteral("baseline"), baseline_array(engine));
    put(object, "baseline_source", engine.baseline_source);
    put(object, "compression_ratio", engine.compression_ratio);
    put(object, "cylinder_closes_deg", engine.cylinder_closes_deg);
    put(object, "cylinder_opens_deg", engine.cylinder_opens_deg);
    put(object, "expansion_angle_deg", engine.expansion_angle_deg);
    put(object, "mechanical_efficiency", engine.mechanical_efficiency);
    if (engine.propeller_pitch)
        put(object, "propeller_pitch_m", engine.propeller_pitch->value());
    put_load_and_heat(object, engine);
    return object;
}

QJsonValue merged(const QJsonValue& former, const QJsonValue& before, const QJsonValue& now);

/// What is the same as before stays as it was typed; keys that nobody knows stay.
QJsonObject merged_objects(const QJsonObject& former, const QJsonObject& before, const QJsonObject& now)
{
    QJsonObject result = former;
    for (const QString& key : before.keys())
        if (!now.contains(key))
            result.remove(key);
    for (const QString& key : now.keys())
        if (before.value(key) != now.value(key))
            result.insert(key, merged(former.value(key), before.value(key), now.value(key)));
    return result;
}

QJsonValue merged(const QJsonValue& former, const QJsonValue& before, const QJsonValue& now)
{
    if (former.isObject() && now.isObject())
        return merged_objects(former.toObject(), before.toObject(), now.toObject());
    const QJsonArray kept = former.toArray(), then = before.toArray();
    QJsonArray array = now.toArray();
    if (!former.isArray() || !now.isArray() || kept.size() != array.size() || then.size() != array.size())
        return now;
    for (qsizetype i = 0; i < array.size(); ++i)
        array[i] = merged(kept[i], then[i], array[i]);
    return array;
}

} // namespace

std::string write_engine_document(const Vessel& vessel, const Engine& engine, const std::string& former)
{
    std::vector<DocumentProblem> problems;
    QJsonObject former_object, before;
    if (const auto document = read_engine_document(former, problems)) {
        former_object = QJsonDocument::fromJson(QByteArray::fromStdString(document->text)).object();
        before = known_keys(document->vessel, document->engine);
    }
    const QJsonObject now = merged_objects(former_object, before, known_keys(vessel, engine));
    return QJsonDocument(now).toJson(QJsonDocument::Indented).toStdString();
}

} // namespace evenstroke::storage
