// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/preference_store.h"
#include "storage/sql.h"
#include "storage/trace_layout.h"

#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>

// How the layout of an engine's files is kept in its history.
namespace evenstroke::storage {
namespace {

const char* const choice_name = "trace_layout";
const char* const separators[] = {"automatic", "comma", "semicolon", "tab", "space"};
const char* const angles[] = {"column", "sample number", "time"};

template <std::size_t count> int index_of(const char* const (&words)[count], const QString& word)
{
    for (std::size_t i = 0; i < count; ++i)
        if (word == QLatin1String(words[i]))
            return static_cast<int>(i);
    return 0;
}

QJsonObject object_of(const TraceLayout& layout)
{
    QJsonArray pressures, words;
    for (const PressureColumn& pressure : layout.pressures) {
        QJsonObject column{{QStringLiteral("column"), pressure.column}};
        if (pressure.cylinder)
            column.insert(QStringLiteral("cylinder"), *pressure.cylinder);
        pressures.append(column);
    }
    for (const std::string& word : layout.missing_words)
        words.append(to_qt(word));
    QJsonObject object{
        {QStringLiteral("separator"), QLatin1String(separators[static_cast<int>(layout.separator)])},
        {QStringLiteral("decimal_sign"), QString(QLatin1Char(layout.decimal_sign))},
        {QStringLiteral("header_lines"), layout.header_lines},
        {QStringLiteral("angle_from"), QLatin1String(angles[static_cast<int>(layout.angle_from)])},
        {QStringLiteral("angle_column"), layout.angle_column},
        {QStringLiteral("counts_per_revolution"), layout.counts_per_revolution},
        {QStringLiteral("seconds_per_count"), layout.seconds_per_count},
        {QStringLiteral("speed_rpm"), layout.speed},
        {QStringLiteral("first_angle_deg"), layout.first_angle},
        {QStringLiteral("dead_centre_at_deg"), layout.dead_centre_at},
        {QStringLiteral("backwards"), layout.backwards},
        {QStringLiteral("pressures"), pressures},
        {QStringLiteral("gauge"), layout.gauge},
        {QStringLiteral("missing_words"), words}};
    if (layout.cycle_column)
        object.insert(QStringLiteral("cycle_column"), *layout.cycle_column);
    if (layout.unit)
        object.insert(QStringLiteral("unit"), to_qt(unit(*layout.unit).symbol));
    if (const auto& two = layout.calibration)
        object.insert(QStringLiteral("calibration"),
                      QJsonArray{two->signal_1, two->pressure_1, two->signal_2, two->pressure_2});
    return object;
}

/// A file may hold anything, so what does not fit keeps the usual value.
TraceLayout layout_of(const QJsonObject& object)
{
    TraceLayout layout;
    const auto whole = [&](const char* key, int usual) {
        return object.value(QLatin1String(key)).toInt(usual);
    };
    const auto number = [&](const char* key, double usual) {
        return object.value(QLatin1String(key)).toDouble(usual);
    };
    layout.separator = static_cast<ColumnSeparator>(
        index_of(separators, object.value(QLatin1String("separator")).toString()));
    layout.decimal_sign =
        object.value(QLatin1String("decimal_sign")).toString() == QLatin1String(",") ? ',' : '.';
    layout.header_lines = whole("header_lines", layout.header_lines);
    layout.angle_from =
        static_cast<AngleFrom>(index_of(angles, object.value(QLatin1String("angle_from")).toString()));
    layout.angle_column = whole("angle_column", layout.angle_column);
    layout.counts_per_revolution = number("counts_per_revolution", layout.counts_per_revolution);
    layout.seconds_per_count = number("seconds_per_count", layout.seconds_per_count);
    layout.speed = number("speed_rpm", layout.speed);
    layout.first_angle = number("first_angle_deg", layout.first_angle);
    layout.dead_centre_at = number("dead_centre_at_deg", layout.dead_centre_at);
    layout.backwards = object.value(QLatin1String("backwards")).toBool();
    layout.gauge = object.value(QLatin1String("gauge")).toBool();
    if (object.contains(QLatin1String("cycle_column")))
        layout.cycle_column = whole("cycle_column", 1);
    if (const auto written = find_unit(from_qt(object.value(QLatin1String("unit")).toString()));
        written && unit(written.value().id).dimension == Dimension::pressure)
        layout.unit = written.value().id;
    const QJsonArray two = object.value(QLatin1String("calibration")).toArray();
    if (two.size() == 4)
        layout.calibration = {two[0].toDouble(), two[1].toDouble(), two[2].toDouble(), two[3].toDouble()};
    layout.pressures.clear();
    for (const QJsonValue& entry : object.value(QLatin1String("pressures")).toArray()) {
        const QJsonObject column = entry.toObject();
        PressureColumn pressure{column.value(QLatin1String("column")).toInt(2), std::nullopt};
        if (column.contains(QLatin1String("cylinder")))
            pressure.cylinder = column.value(QLatin1String("cylinder")).toInt();
        layout.pressures.push_back(pressure);
    }
    layout.missing_words.clear();
    for (const QJsonValue& word : object.value(QLatin1String("missing_words")).toArray())
        layout.missing_words.push_back(from_qt(word.toString()));
    return layout;
}

} // namespace

Result<std::optional<TraceLayout>> load_trace_layout(History& history, const std::string& engine_id)
{
    const auto kept = PreferenceStore(history).choice(engine_id, choice_name);
    if (!kept)
        return kept.error();
    if (!kept.value())
        return std::optional<TraceLayout>();
    const QJsonDocument document = QJsonDocument::fromJson(QByteArray::fromStdString(*kept.value()));
    if (!document.isObject())
        return std::optional<TraceLayout>();
    return std::optional(layout_of(document.object()));
}

Done save_trace_layout(History& history, const std::string& engine_id, const TraceLayout& layout)
{
    return PreferenceStore(history).set_choice(
        engine_id, choice_name,
        QJsonDocument(object_of(layout)).toJson(QJsonDocument::Compact).toStdString());
}

} // namespace evenstroke::storage
