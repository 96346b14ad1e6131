// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/unreadable_texts.h"

#include "app/desk/number_text.h"
#include "core/reading/quantity_catalogue.h"

#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>

namespace evenstroke {

std::string unreadable_choice(const std::string& reading_id)
{
    return "entry.unreadable." + reading_id;
}

QString write_unreadable(const std::map<LogBox, QString>& texts)
{
    QJsonArray boxes;
    for (const auto& [box, text] : texts)
        boxes.append(QJsonObject{{QStringLiteral("quantity"), to_qstring(quantity(box.quantity).name)},
                                 {QStringLiteral("kind"), static_cast<int>(box.place.kind)},
                                 {QStringLiteral("number"), box.place.number},
                                 {QStringLiteral("phase"), static_cast<int>(box.phase)},
                                 {QStringLiteral("text"), text}});
    return QString::fromUtf8(QJsonDocument(boxes).toJson(QJsonDocument::Compact));
}

std::map<LogBox, QString> read_unreadable(const QString& written)
{
    std::map<LogBox, QString> texts;
    for (const auto& entry : QJsonDocument::fromJson(written.toUtf8()).array()) {
        const QJsonObject box = entry.toObject();
        const Place place{static_cast<Place::Kind>(box[QStringLiteral("kind")].toInt()),
                          box[QStringLiteral("number")].toInt()};
        const auto id = find_quantity(to_std(box[QStringLiteral("quantity")].toString()), place.kind);
        if (id)
            texts[{*id, place, static_cast<Phase>(box[QStringLiteral("phase")].toInt())}] =
                box[QStringLiteral("text")].toString();
    }
    return texts;
}

} // namespace evenstroke
