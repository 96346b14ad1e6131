// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/trail.h"

#include "app/desk/number_text.h"

#include <QCryptographicHash>
#include <QSettings>

namespace evenstroke {

namespace {

constexpr std::size_t places_kept = 100;

/// A path is no good as a key: the settings take its slashes for groups.
QString group_of(const QString& history_path)
{
    const QByteArray hash = QCryptographicHash::hash(history_path.toUtf8(), QCryptographicHash::Sha1);
    return QStringLiteral("whereabouts/%1").arg(QString::fromLatin1(hash.toHex().left(16)));
}

} // namespace

void Trail::go(const Whereabouts& where)
{
    if (where == here())
        return;
    if (here().page.isEmpty()) {
        places_[index_] = where; // the very first place has nothing before it
        return;
    }
    places_.resize(index_ + 1);
    places_.push_back(where);
    if (places_.size() > places_kept)
        places_.erase(places_.begin());
    index_ = places_.size() - 1;
}

void Trail::step(const Whereabouts& where) { places_[index_] = where; }

void Trail::remember(const QString& history_path) const
{
    if (history_path.isEmpty() || here().selection.engine.isEmpty())
        return;
    const Selection& selection = here().selection;
    QSettings settings;
    settings.beginGroup(group_of(history_path));
    settings.setValue(QStringLiteral("page"), here().page);
    settings.setValue(QStringLiteral("vessel"), selection.vessel);
    settings.setValue(QStringLiteral("engine"), selection.engine);
    settings.setValue(QStringLiteral("quantity"),
                      selection.quantity ? to_qstring(quantity(*selection.quantity).name) : QString());
    settings.setValue(QStringLiteral("place_kind"), static_cast<int>(selection.place.kind));
    settings.setValue(QStringLiteral("place_number"), selection.place.number);
    settings.setValue(QStringLiteral("range"), static_cast<int>(selection.range));
    settings.setValue(QStringLiteral("view"), static_cast<int>(selection.view));
}

void Trail::recall(const QString& history_path)
{
    QSettings settings;
    settings.beginGroup(group_of(history_path));
    Whereabouts where;
    const auto number = [&settings](const char* key, int highest) {
        return std::clamp(settings.value(QLatin1String(key), 0).toInt(), 0, highest);
    };
    where.page = settings.value(QStringLiteral("page")).toString();
    where.selection.vessel = settings.value(QStringLiteral("vessel")).toString();
    where.selection.engine = settings.value(QStringLiteral("engine")).toString();
    where.selection.place.kind = static_cast<Place::Kind>(number("place_kind", 4));
    where.selection.place.number = number("place_number", 100);
    if (const std::string name = settings.value(QStringLiteral("quantity")).toString().toStdString(); !name.empty()) {
        where.selection.quantity = find_quantity(name, where.selection.place.kind);
        if (!where.selection.quantity)
            where.selection.quantity = find_quantity(name);
    }
    where.selection.range = static_cast<TimeRange>(number("range", 2));
    where.selection.view = settings.contains(QStringLiteral("view")) ? static_cast<ValueView>(number("view", 3))
                                                                     : ValueView::apart;
    places_.assign(1, where);
    index_ = 0;
}

} // namespace evenstroke
