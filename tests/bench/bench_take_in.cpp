// SPDX-License-Identifier: GPL-3.0-or-later
// How fast a fleet's files are taken in, beside the sqlite3 shell importing the same files into one plain
// table, and how fast they are read again. Prints absolutes and ratios; judges nothing.
// Use: bench_take_in [FOLDER]
#include "storage/audit.h"
#include "storage/history.h"
#include "storage/reading_store.h"
#include "storage/take_in.h"
#include "storage/vessel_store.h"

#include <QCoreApplication>
#include <QDir>
#include <QDirIterator>
#include <QElapsedTimer>
#include <QFile>
#include <QProcess>
#include <QStandardPaths>
#include <QTemporaryDir>
#include <QTextStream>

#include <algorithm>
#include <cstdio>
#include <functional>

using namespace evenstroke;
using namespace evenstroke::storage;

namespace {

constexpr int runs = 3; // the best of them counts: the machine may be doing other things

double best_seconds(const std::function<void(int)>& work)
{
    double best = 1e9;
    for (int run = 0; run < runs; ++run) {
        QElapsedTimer timer;
        timer.start();
        work(run);
        best = std::min(best, static_cast<double>(timer.nsecsElapsed()) * 1e-9);
    }
    return best;
}

void write_text(const QString& path, const QString& text)
{
    QDir().mkpath(QFileInfo(path).path());
    QFile file(path);
    if (file.open(QIODevice::WriteOnly))
        file.write(text.toUtf8());
}

/// Invented numbers: 18 engines, 54 readings of 60 values each, about as many rows as a small fleet has.
void make_fleet(const QString& folder)
{
    for (int engine = 1; engine <= 18; ++engine) {
        const QString path = QStringLiteral("%1/engine-%2").arg(folder).arg(engine);
        write_text(
            path + QStringLiteral("/engine.json"),
            QStringLiteral(
                R"({"vessel": "Vessel %1", "engine": "main engine", "cycle": "two-stroke", "cylinders": 7, "bore_mm": 600,
                       "stroke_mm": 2400, "rod_length_mm": 2460, "rated_power_kw": 14000, "rated_speed_rpm": 105})")
                .arg(engine));
        QString rows = QStringLiteral("reading,taken_at,quantity,cylinder,value,unit\n");
        QTextStream out(&rows);
        for (int reading = 0; reading < 54; ++reading) {
            const QString head = QStringLiteral("%1-%2,%1-%2-12T08:30Z,")
                                     .arg(2020 + reading / 12)
                                     .arg(reading % 12 + 1, 2, 10, QLatin1Char('0'));
            for (int cylinder = 1; cylinder <= 7; ++cylinder) {
                const auto row = [&](const char* quantity, double value, const char* unit) {
                    out << head << quantity << ',' << cylinder << ',' << QString::number(value, 'f', 1) << ','
                        << unit << '\n';
                };
                row("maximum_pressure", 140 + cylinder + 0.1 * reading, "bar");
                row("compression_pressure", 115 + cylinder + 0.1 * reading, "bar");
                row("mean_indicated_pressure", 16 + 0.1 * cylinder, "bar");
                row("exhaust_temperature", 330 + cylinder + 0.3 * reading, "degC");
                row("fuel_index", 70 + 0.1 * cylinder, "%");
                row("jacket_outlet_temperature", 82 + 0.1 * cylinder, "degC");
                row("piston_coolant_outlet_temperature", 58 + 0.1 * cylinder, "degC");
            }
            for (const char* rest : {"load_percent,,75.5,%", "shaft_power,,10570,kW", "speed,,95.4,r/min",
                                     "scavenge_pressure,,2.11,bar", "scavenge_temperature,,38,degC",
                                     "inlet_air_temperature,,31,degC", "turbocharger_speed,,14210,r/min",
                                     "exhaust_before_turbine,,388,degC", "exhaust_after_turbine,,262,degC",
                                     "barometric_pressure,,1012,mbar", "fuel_consumption,,1815,kg/h"})
                out << head << rest << '\n';
        }
        out.flush();
        write_text(path + QStringLiteral("/readings.csv"), rows);
    }
}

QStringList reading_files(const QString& folder)
{
    QStringList files;
    QDirIterator found(folder, {QStringLiteral("readings.csv")}, QDir::Files, QDirIterator::Subdirectories);
    while (found.hasNext())
        files << found.next();
    files.sort();
    return files;
}

qint64 count_rows(const QStringList& files)
{
    qint64 rows = 0;
    for (const QString& path : files) {
        QFile file(path);
        if (file.open(QIODevice::ReadOnly))
            rows += file.readAll().count('\n') - 1;
    }
    return rows;
}

/// @param one_transaction  the shell's own way is one transaction a file
double shell_seconds(const QString& shell, const QString& folder, const QStringList& files,
                     bool one_transaction)
{
    return best_seconds([&](int run) {
        QString script = QStringLiteral("CREATE TABLE plain(reading TEXT, taken_at TEXT, quantity TEXT, "
                                        "cylinder TEXT, value TEXT, unit TEXT);\n.mode csv\n");
        script += one_transaction ? QStringLiteral("BEGIN;\n") : QString();
        for (const QString& file : files)
            script += QStringLiteral(".import --skip 1 \"%1\" plain\n").arg(file);
        script += one_transaction ? QStringLiteral("COMMIT;\n") : QString();
        QProcess process;
        process.start(shell, {QStringLiteral("%1/plain%2%3.db").arg(folder).arg(run).arg(one_transaction)});
        process.write(script.toUtf8());
        process.closeWriteChannel();
        process.waitForFinished(-1);
    });
}

std::unique_ptr<History> open_history(const QString& path)
{
    HistorySettings settings;
    settings.automatic_backups = false;
    auto history = History::open_or_create(path, settings);
    if (!history) {
        std::fprintf(stderr, "%s\n", history.error().text().c_str());
        std::exit(3);
    }
    return std::move(history.value());
}

void print(const char* what, double seconds, qint64 rows)
{
    std::printf("%-58s %8.3f s %12.0f rows/s\n", what, seconds, static_cast<double>(rows) / seconds);
}

void print_reading(const QString& path)
{
    qint64 values = 0;
    const double loading = best_seconds([&](int) {
        values = 0;
        const auto history = open_history(path);
        const VesselStore vessels(*history);
        const auto engines = vessels.engines();
        for (const EngineEntry& engine : engines.value()) {
            const auto readings = ReadingStore(*history).load(engine.id);
            for (const Reading& reading : readings.value())
                values += static_cast<qint64>(reading.values.size());
        }
    });
    print("all readings of all engines loaded", loading, values);
    const double checking = best_seconds([&](int) {
        const auto history = open_history(path);
        if (const auto findings = verify(*history); !findings || !findings.value().sound())
            std::printf("the check found something\n");
    });
    print("whole history verified", checking, values);
}

} // namespace

int main(int argc, char** argv)
{
    const QCoreApplication application(argc, argv);
    const QTemporaryDir work;
    const QString shared = qEnvironmentVariable("EVENSTROKE_CHECK_DATA",
                                                QStringLiteral(EVENSTROKE_SOURCE_DIR "/../shared/data")) +
                           QStringLiteral("/example_fleet");
    QString fleet = argc > 1 ? QString::fromLocal8Bit(argv[1]) : shared;
    if (!QFileInfo::exists(fleet)) {
        fleet = work.filePath(QStringLiteral("fleet"));
        make_fleet(fleet);
    }
    const QStringList files = reading_files(fleet);
    const qint64 rows = count_rows(files);
    std::printf("%lld rows in %lld files\n", static_cast<long long>(rows),
                static_cast<long long>(files.size()));

    const double taking = best_seconds([&](int run) {
        const auto history = open_history(work.filePath(QStringLiteral("taken%1.evenstroke").arg(run)));
        const auto report = take(*history, {fleet});
        if (!report || report.value().anything_refused())
            std::printf("something was refused\n");
    });
    print("taken in: checked, audited, indexed", taking, rows);
    const QString first = work.filePath(QStringLiteral("taken0.evenstroke"));
    const double again = best_seconds([&](int) { static_cast<void>(take(*open_history(first), {fleet})); });
    print("the same taken in again: nothing changes", again, rows);
    print_reading(first);
    std::printf("%-58s %8.1f bytes a row\n", "size of the history",
                static_cast<double>(QFileInfo(first).size()) / static_cast<double>(rows));

    const QString shell = QStandardPaths::findExecutable(QStringLiteral("sqlite3"));
    if (shell.isEmpty()) {
        std::printf("the sqlite3 shell is not here: no ratio\n");
        return 0;
    }
    for (const bool one : {false, true}) {
        const double plain = shell_seconds(shell, work.path(), files, one);
        print(one ? "sqlite3 shell, one plain table, one transaction"
                  : "sqlite3 shell, one plain table, a transaction a file",
              plain, rows);
        std::printf("%-58s %8.2f\n", "  ratio of the rates, ours over the shell's", plain / taking);
    }
    return 0;
}
