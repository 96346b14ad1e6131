// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/suggested_file.h"

#include <QDir>
#include <QRegularExpression>
#include <QStandardPaths>

namespace evenstroke {

QString suggested_file(const QStringList& words, const QString& ending)
{
    QString name = words.join(u'_').toLower();
    // What a file system may refuse, and spaces, which people dislike in names.
    name.replace(QRegularExpression(QStringLiteral(R"([\s]+)")), QStringLiteral("_"));
    name.replace(QRegularExpression(QStringLiteral(R"([/\\:*?"<>|]+)")), QStringLiteral("-"));
    return QDir(QStandardPaths::writableLocation(QStandardPaths::DocumentsLocation)).filePath(name + ending);
}

} // namespace evenstroke
