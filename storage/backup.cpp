// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/backup.h"

#include "storage/sql.h"

#include <QDir>
#include <QFile>
#include <QFileInfo>
#include <QRegularExpression>

namespace evenstroke::storage {
namespace {

const std::string not_copied = "the history was not copied";
constexpr qint64 seconds_a_day = 86400;

QString backup_folder(const QString& history_path)
{
    const QFileInfo info(history_path);
    return info.absoluteDir().filePath(info.completeBaseName() + QStringLiteral(" backups"));
}

QString backup_path(const QString& history_path, const std::string& when)
{
    const QFileInfo info(history_path);
    const QString name = QStringLiteral("%1 %2.%3")
                             .arg(info.completeBaseName(), to_qt(when),
                                  info.suffix().isEmpty() ? QStringLiteral("evenstroke") : info.suffix());
    return QDir(backup_folder(history_path)).filePath(name);
}

void forget_oldest(const QString& history_path, int kept)
{
    const QStringList copies = automatic_backups(history_path);
    for (qsizetype i = std::max(kept, 1); i < copies.size(); ++i)
        QFile::remove(copies[i]);
}

Result<QString> copy_into_folder(History& history, const std::string& when)
{
    const QString path = backup_path(history.path(), when);
    if (QFileInfo::exists(path))
        return path;
    if (!QDir().mkpath(backup_folder(history.path())))
        return Problem{Problem::Kind::storage,
                       "The folder for backups cannot be made, so " + not_copied + ".",
                       "Check the rights of the folder in which the history stands."};
    const Done copied = back_up(history, path);
    if (!copied)
        return copied.error();
    forget_oldest(history.path(), history.settings().backups_kept);
    return path;
}

} // namespace

Done back_up(History& history, const QString& to_path)
{
    if (QFileInfo::exists(to_path))
        return Problem{Problem::Kind::storage,
                       "\"" + from_qt(to_path) + "\" is there already, so " + not_copied + ".",
                       "Choose another name."};
    // Written under another name first: a copy that was cut short must not look like a whole one.
    const QString unfinished = to_path + QStringLiteral(".part");
    QFile::remove(unfinished);
    Query copy(history.database(), "VACUUM INTO ?", not_copied);
    const Done copied = copy.run(from_qt(unfinished));
    if (!copied) {
        QFile::remove(unfinished);
        return copied;
    }
    if (!QFile::rename(unfinished, to_path)) {
        QFile::remove(unfinished);
        return Problem{Problem::Kind::storage,
                       "\"" + from_qt(to_path) + "\" cannot be written, so " + not_copied + ".",
                       "Choose another place."};
    }
    return done();
}

Result<QString> back_up_daily(History& history)
{
    const qint64 today = seconds_of(history.now()) / seconds_a_day;
    if (history.backed_up_day_ == today || history.path() == QStringLiteral(":memory:"))
        return QString();
    history.backed_up_day_ = today; // also when it cannot be made: asking again at every change helps nobody
    if (QFileInfo::exists(backup_path(history.path(), date_text(history.now()))))
        return QString();
    return copy_into_folder(history, date_text(history.now()));
}

Result<QString> back_up_before_migration(History& history)
{
    const std::string when =
        date_text(history.now()) + " before format " + std::to_string(History::newest_version());
    return copy_into_folder(history, when);
}

QStringList automatic_backups(const QString& history_path)
{
    const QFileInfo info(history_path);
    const QDir folder(backup_folder(history_path));
    const QRegularExpression ours(QStringLiteral("^%1 \\d{4}-\\d{2}-\\d{2}( before format \\d+)?\\.[^.]+$")
                                      .arg(QRegularExpression::escape(info.completeBaseName())));
    QStringList copies;
    // Names carry the date, so the order of names is the order of time.
    for (const QString& name : folder.entryList(QDir::Files, QDir::Name | QDir::Reversed))
        if (ours.match(name).hasMatch())
            copies << folder.filePath(name);
    return copies;
}

} // namespace evenstroke::storage
