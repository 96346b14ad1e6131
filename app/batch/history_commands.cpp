// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/history_commands.h"

#include "app/batch/engines.h"
#include "app/batch/long_work.h"
#include "sample_vessel/sample_vessel.h"
#include "storage/audit.h"
#include "storage/backup.h"
#include "storage/take_in.h"

#include <QDir>
#include <QFile>
#include <QSaveFile>

namespace evenstroke::batch {
namespace {

QString counts_text(const storage::TakeCounts& counts, const char* what)
{
    return QStringLiteral("%1 %2 new, %3 known, %4 left out")
        .arg(counts.fresh)
        .arg(QString::fromUtf8(what))
        .arg(counts.same)
        .arg(counts.refused);
}

void print_folder(const storage::FolderReport& folder, Streams& streams)
{
    const QString name = QString::fromStdString(folder.folder);
    const QString who = QString::fromStdString(
        folder.vessel_name + (folder.engine_name.empty() ? "" : ", " + folder.engine_name));
    streams.out << name << ": ";
    const storage::TakeCounts rows = folder.rows();
    if (folder.taken)
        streams.out << who << ": " << counts_text(folder.values, "values") << "; "
                    << counts_text(folder.events, "events") << "; " << counts_text(folder.cards, "cards");
    else if (rows.fresh + rows.same + rows.refused == 0) // no row was come to: engine.json, or no engine at all
        streams.out << "refused, nothing of it was taken";
    else
        streams.out << "refused, nothing of it was taken; " << rows.fresh + rows.same << " rows were good, "
                    << rows.refused << " not";
    streams.out << "\n";
    for (const storage::RefusedRow& row : folder.refused)
        streams.err << QString::fromStdString(row.text()) << "\n";
    for (const std::string& remark : folder.remarks)
        streams.err << name << ": " << QString::fromStdString(remark) << "\n";
}

/// "3 folders taken: a, b, c"; more than a screen holds are only counted, stdout has a line for each.
void print_names(const QStringList& names, const char* what, Streams& streams)
{
    constexpr int most_named = 20;
    if (names.isEmpty())
        return;
    streams.err << names.size() << (names.size() == 1 ? " folder " : " folders ") << what;
    if (names.size() <= most_named)
        streams.err << ": " << names.join(QStringLiteral(", "));
    streams.err << "\n";
}

/// What was taken, what was refused whole, and what can be done about it. @return the exit code
int print_refusals(const storage::TakeReport& report, bool keep_good, Streams& streams)
{
    QStringList taken, refused;
    bool good_rows_wait = false;
    for (const storage::FolderReport& folder : report.folders) {
        (folder.taken ? taken : refused).append(QString::fromStdString(folder.folder));
        good_rows_wait = good_rows_wait || (!folder.taken && folder.rows().fresh + folder.rows().same > 0);
    }
    print_names(taken, "taken", streams);
    print_names(refused, "refused whole, nothing of it is in the history", streams);
    if (keep_good && !taken.isEmpty())
        streams.err << "Rows that could not be understood were left out, as --keep-good says; they are named above.\n";
    if (!refused.isEmpty())
        streams.err << "The reasons are named above. Put them right and take the folder in again"
                    << (good_rows_wait && !keep_good ? ", or use --keep-good to take the good rows only.\n" : ".\n");
    return refused.isEmpty() ? done : data_refused;
}

/// Writes one file of the sample vessel; leaves an equal one as it is, refuses to write over another.
Result<bool> write_sample_file(const QDir& folder, const sample::SampleFile& file)
{
    const QString path = folder.filePath(QString::fromStdString(file.relative_path));
    const QByteArray content = QByteArray::fromStdString(file.content);
    QFile existing(path);
    if (existing.exists()) {
        if (existing.open(QIODevice::ReadOnly) && existing.readAll() == content)
            return false;
        return Problem{Problem::Kind::invalid_input, path.toStdString() + " is there already with other content.",
                       "Name an empty folder, or one that does not exist yet."};
    }
    QSaveFile out(path);
    if (!QDir().mkpath(QFileInfo(path).path()) || !out.open(QIODevice::WriteOnly) ||
        out.write(content) != content.size() || !out.commit())
        return Problem{Problem::Kind::storage, path.toStdString() + " could not be written: " +
                                                   out.errorString().toStdString() + ".",
                       "Check that the disk has room and the folder may be written to."};
    return true;
}

} // namespace

int run_take(const QCommandLineParser& parser, Streams& streams)
{
    const QStringList folders = parser.positionalArguments();
    if (folders.isEmpty()) {
        streams.err << "Name at least one folder to take in.\n";
        return wrong_use;
    }
    auto history = storage::History::open_or_create(parser.value(QStringLiteral("history")));
    if (!history.has_value())
        return refuse(streams, history.error());
    storage::TakeOptions options;
    options.keep_good = parser.isSet(QStringLiteral("keep-good"));
    options.progress = progress_line(streams, QStringLiteral("taking in"));
    const auto report = storage::take(*history.value(), folders, options);
    const bool in_vain = !report.has_value() || report.value().cancelled || !report.value().anything_taken();
    if (in_vain && history.value()->made_now()) {
        storage::History::remove_new(std::move(history.value()));
        streams.err << "No history was made, as nothing was taken in.\n";
    }
    if (!report.has_value())
        return refuse(streams, report.error());
    for (const storage::FolderReport& folder : report.value().folders)
        print_folder(folder, streams);
    for (const std::string& file : report.value().ignored)
        streams.err << QString::fromStdString(file) << ": not a file of this program, left alone\n";
    if (report.value().cancelled) {
        streams.err << "Stopped. Nothing was taken in.\n";
        return data_refused;
    }
    return report.value().anything_refused() ? print_refusals(report.value(), options.keep_good, streams) : done;
}

int run_verify(const QCommandLineParser& parser, Streams& streams)
{
    auto history = open_history(parser);
    if (!history.has_value())
        return refuse(streams, history.error());
    const auto findings = storage::verify(*history.value(), progress_line(streams, QStringLiteral("verifying")));
    if (!findings.has_value())
        return refuse(streams, findings.error());
    const storage::AuditFindings& found = findings.value();
    for (const std::string& sentence : found.sentences)
        streams.out << QString::fromStdString(sentence) << "\n";
    streams.out << (found.sound() ? "sound" : "altered") << ": " << found.entries << " audit entries, " << found.readings
                << " readings, " << found.values << " values; newest hash " << QString::fromStdString(found.last_hash)
                << "\n";
    return found.sound() ? done : data_refused;
}

int run_backup(const QCommandLineParser& parser, Streams& streams)
{
    auto history = open_history(parser);
    if (!history.has_value())
        return refuse(streams, history.error());
    const QString to = parser.value(QStringLiteral("to"));
    const auto copied = storage::back_up(*history.value(), to);
    if (!copied.has_value())
        return refuse(streams, copied.error());
    streams.out << "copied to " << to << "\n";
    return done;
}

int run_sample(const QCommandLineParser& parser, Streams& streams)
{
    const QDir folder(parser.value(QStringLiteral("out")));
    int written = 0, same = 0;
    for (const sample::SampleFile& file : sample::make_sample_vessel()) {
        const auto result = write_sample_file(folder, file);
        if (!result.has_value())
            return refuse(streams, result.error());
        ++(result.value() ? written : same);
    }
    streams.out << "The sample vessel is an invented scenario: no such ship, engine or voyage exists.\n"
                << folder.path() << ": " << written << " files written, " << same << " were there already\n";
    return done;
}

} // namespace evenstroke::batch
