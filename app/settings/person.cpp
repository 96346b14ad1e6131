// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/person.h"

#include <QSettings>

namespace evenstroke {

QString person_name()
{
    return QSettings().value(QStringLiteral("person/name")).toString();
}

void set_person_name(const QString& name)
{
    QSettings().setValue(QStringLiteral("person/name"), name.trimmed());
}

storage::Signature signature(const QString& why)
{
    const QString name = person_name();
    return {name.isEmpty() ? std::string("not named") : name.toStdString(), why.trimmed().toStdString()};
}

} // namespace evenstroke
