// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/sample_files.h"

#if __has_include("sample_vessel/sample_vessel.h")
#include "sample_vessel/sample_vessel.h"
#define EVENSTROKE_HAS_SAMPLE
#endif

#include <QDir>
#include <QFile>
#include <QFileInfo>

namespace evenstroke {

#ifndef EVENSTROKE_HAS_SAMPLE
std::optional<Problem> write_sample_files(const QString&)
{
    return Problem{Problem::Kind::not_found, "The sample vessel is not part of this build.",
                   "Open a history or take in a folder instead."};
}
#else
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
#endif

} // namespace evenstroke
