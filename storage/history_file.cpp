// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/history_file.h"

#include "storage/schema.h"
#include "storage/sql.h"

#include <QDateTime>
#include <QFile>
#include <QFileInfo>
#include <QtEndian>

namespace evenstroke::storage {
namespace {

constexpr qint64 header_size = 100;

quint32 number_at(const QByteArray& header, int offset)
{
    return qFromBigEndian<quint32>(header.constData() + offset);
}

std::string named(const QString& path)
{
    return "\"" + from_qt(QFileInfo(path).fileName()) + "\"";
}

Problem not_ours(const QString& path, const std::string& what)
{
    return {Problem::Kind::damaged_file, named(path) + " " + what + ".",
            "Choose a history that ends in .evenstroke; this file was left as it is."};
}

/// Whether the pages that the header counts are all there. A journal beside the file may still change that.
bool is_cut_short(const QByteArray& header, qint64 size, const QString& path)
{
    const quint32 written = qFromBigEndian<quint16>(header.constData() + 16);
    const qint64 page_size = written == 1 ? 65536 : static_cast<qint64>(written);
    const bool count_is_valid = number_at(header, 24) == number_at(header, 92);
    return count_is_valid && size < page_size * number_at(header, 28) &&
           !QFile::exists(path + QStringLiteral("-journal"));
}

} // namespace

Result<HistoryFileHeader> inspect_history_file(const QString& path, int newest_version)
{
    const QFileInfo info(path);
    if (!info.exists())
        return Problem{Problem::Kind::not_found, "There is no history at \"" + from_qt(path) + "\".",
                       "Check the name, or make a new history."};
    QFile file(path);
    if (info.isDir() || !file.open(QIODevice::ReadOnly))
        return Problem{Problem::Kind::storage, named(path) + " cannot be read.",
                       "Choose a file that you have the right to read."};
    const QByteArray header = file.read(header_size);
    if (header.size() < header_size || !header.startsWith(QByteArray("SQLite format 3\0", 16)))
        return not_ours(path, file.size() == 0 ? "is empty" : "is not a history");
    if (number_at(header, 68) != history_application_id)
        return not_ours(path, "is a database of another program");
    HistoryFileHeader found;
    found.schema_version = static_cast<int>(number_at(header, 60));
    found.change_counter = number_at(header, 24);
    found.size = file.size();
    found.written_at = info.lastModified().toMSecsSinceEpoch();
    if (found.schema_version > newest_version)
        return Problem{Problem::Kind::newer_file,
                       named(path) + " was written by a later version of this program (format " +
                           std::to_string(found.schema_version) + "; this program knows up to " +
                           std::to_string(newest_version) + ").",
                       "Open it with the later program; it was left as it is."};
    if (found.schema_version < 1 || is_cut_short(header, found.size, path))
        return Problem{Problem::Kind::damaged_file, named(path) + " is damaged: a part of it is missing.",
                       "Open the newest backup beside it, and keep the damaged file."};
    return found;
}

} // namespace evenstroke::storage
