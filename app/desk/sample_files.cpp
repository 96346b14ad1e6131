// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/sample_files.h"

#include "sample_vessel/sample_vessel.h"

#include <QDir>
#include <QFile>
#include <QFileInfo>

namespace evenstroke {

std::optional<Problem> write_sample_files(const QString& folder)
{
    for (const sample::SampleFile& file : sample::make_sample_vessel()) {
        const QString path = QDir(folder).filePath(QString::fromStdString(file.relative_path));
        QDir().mkpath(QFileInfo(path).path());
        QFile out(path);
        const QByteArray content = QByteArray::fromStdString(file.content);
        if (!out.open(QIODevice::WriteOnly) || out.write(content) != content.size())
            return Problem{
                Problem::Kind::storage,
                QStringLiteral("The file %1 could not be written: %2.").arg(path, out.errorString()).toStdString(),
                "Make room on the disk, or allow writing there, and try again."};
    }
    return std::nullopt;
}

} // namespace evenstroke
