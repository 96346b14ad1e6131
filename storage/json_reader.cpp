// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/json_reader.h"

#include "core/plain_text.h"
#include "storage/sql.h"

#include <QJsonDocument>

#include <cmath>

namespace evenstroke::storage {

std::string json_text(const QJsonValue& value)
{
    constexpr qsizetype longest = 40;
    QString text;
    switch (value.type()) {
    case QJsonValue::String:
        text = QLatin1Char('"') + value.toString() + QLatin1Char('"');
        break;
    case QJsonValue::Bool:
        text = value.toBool() ? QStringLiteral("true") : QStringLiteral("false");
        break;
    case QJsonValue::Double:
        text = QString::number(value.toDouble(), 'g', 12);
        break;
    case QJsonValue::Array:
        text = QString::fromUtf8(QJsonDocument(value.toArray()).toJson(QJsonDocument::Compact));
        break;
    case QJsonValue::Object:
        text = QString::fromUtf8(QJsonDocument(value.toObject()).toJson(QJsonDocument::Compact));
        break;
    default:
        text = QStringLiteral("null");
        break;
    }
    return from_qt(text.size() > longest ? text.left(longest) + QStringLiteral("…") : text);
}

bool JsonReader::has(const char* key) const
{
    const QJsonValue value = object_.value(QLatin1String(key));
    return !value.isUndefined() && !value.isNull();
}

QJsonValue JsonReader::take(const char* key)
{
    taken_.insert(key);
    return has(key) ? object_.value(QLatin1String(key)) : QJsonValue(QJsonValue::Undefined);
}

void JsonReader::refuse(const char* key, const QJsonValue& value, const std::string& reason,
                        const std::string& expected)
{
    problems_.push_back({path(key), 0, json_text(value), reason, expected});
}

std::string JsonReader::text(const char* key)
{
    const QJsonValue value = take(key);
    if (value.isUndefined())
        return {};
    if (!value.isString()) {
        refuse(key, value, path(key) + " is " + json_text(value) + ", which is no text.",
               "Write it in quotation marks.");
        return {};
    }
    return from_qt(value.toString().trimmed());
}

std::optional<double> JsonReader::number(const char* key)
{
    const QJsonValue value = take(key);
    if (value.isUndefined())
        return std::nullopt;
    if (!value.isDouble() || !std::isfinite(value.toDouble())) {
        refuse(key, value, path(key) + " is " + json_text(value) + ", which is no number.",
               "Write a number with a decimal point and without quotation marks.");
        return std::nullopt;
    }
    return value.toDouble();
}

std::optional<double> JsonReader::positive(const char* key)
{
    const auto value = number(key);
    if (value && *value <= 0.0) {
        refuse(key, *value, path(key) + " is " + number_text(*value) + ", which cannot be.",
               "Write a number above zero.");
        return std::nullopt;
    }
    return value;
}

std::optional<int> JsonReader::whole(const char* key, int low, int high)
{
    const auto value = number(key);
    if (value && (*value != std::floor(*value) || *value < low || *value > high)) {
        refuse(key, *value, path(key) + " is " + number_text(*value) + ", which cannot be.",
               "Write a whole number from " + std::to_string(low) + " to " + std::to_string(high) + ".");
        return std::nullopt;
    }
    return value ? std::optional(static_cast<int>(*value)) : std::nullopt;
}

std::optional<bool> JsonReader::truth(const char* key)
{
    const QJsonValue value = take(key);
    if (value.isUndefined())
        return std::nullopt;
    if (!value.isBool()) {
        refuse(key, value, path(key) + " is " + json_text(value) + ", which is neither true nor false.",
               "Write true or false.");
        return std::nullopt;
    }
    return value.toBool();
}

std::vector<std::string> JsonReader::left_keys() const
{
    std::vector<std::string> left = aside_;
    for (const QString& key : object_.keys())
        if (taken_.count(from_qt(key)) == 0)
            left.push_back(where_ + from_qt(key));
    return left;
}

} // namespace evenstroke::storage
