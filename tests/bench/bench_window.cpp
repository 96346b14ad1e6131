// SPDX-License-Identifier: GPL-3.0-or-later
// What the window costs: start to the first page, turning pages with 12 cylinders and 10 years, the fleet page
// from stored judgements, judging a fleet anew, a survey report. Aims: start 0.5 s; a page switch 50 ms for 95
// of 100; the fleet page of 500 vessels 0.5 s, judging all of them anew 30 s; the report 1 s and 1 MB. Prints
// absolutes and ratios; nothing fails on a figure.
//
// bench_window [vessels, default 50]
#include "app/desk/frame.h"
#include "app/desk/pages.h"
#include "app/desk/snapshot.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "app/survey/report_maker.h"
#include "app/survey/report_writer.h"
#include "storage/history.h"
#include "storage/take_in.h"
#include "tests/app/large_engine.h"

#include <QApplication>
#include <QDir>
#include <QElapsedTimer>
#include <QFile>
#include <QProcess>
#include <QSettings>
#include <QStandardPaths>
#include <QTemporaryDir>

#include <algorithm>
#include <cstdio>
#include <vector>

using namespace evenstroke;

namespace {

class Watch
{
public:
    Watch() { timer_.start(); }
    double ms() const { return static_cast<double>(timer_.nsecsElapsed()) / 1e6; }

private:
    QElapsedTimer timer_;
};

/// Lets the workers finish; false when they do not within ten minutes.
bool settle(Workplace& workplace)
{
    const Watch watch;
    while (!workplace.activity().isEmpty() || !workplace.judgement()) {
        QApplication::processEvents(QEventLoop::AllEvents, 20);
        if (watch.ms() > 600'000.0)
            return false;
    }
    return true;
}

bool copy_as(const QString& from, const QString& to, const QByteArray& vessel)
{
    QDir().mkpath(to);
    QFile particulars(from + QStringLiteral("/engine.json")), renamed(to + QStringLiteral("/engine.json"));
    if (!particulars.open(QIODevice::ReadOnly) || !renamed.open(QIODevice::WriteOnly))
        return false;
    renamed.write(particulars.readAll().replace("Long Furrow", vessel));
    for (const QString& name : {QStringLiteral("readings.csv"), QStringLiteral("events.csv")})
        QFile::copy(from + u'/' + name, to + u'/' + name);
    return true;
}

bool take_in(const QString& history_path, const QString& folder)
{
    auto history = storage::History::create(history_path);
    if (!history)
        return false;
    const auto taken = storage::take(*history.value(), {folder});
    return taken && !taken.value().anything_refused();
}

void print_start(const QString& history)
{
    const QString program = QCoreApplication::applicationDirPath() + QStringLiteral("/evenstroke");
    if (!QFile::exists(program))
        return;
    const auto best_of = [&](const QStringList& arguments) {
        double best = 1e300;
        for (int run = 0; run < 5; ++run) {
            const Watch watch;
            QProcess process;
            process.start(program, arguments);
            process.waitForFinished(60'000);
            best = std::min(best, watch.ms());
        }
        return best;
    };
    const double bare = best_of({QStringLiteral("--version")});
    const double start = best_of({history, QStringLiteral("--page"), QStringLiteral("fleet"), QStringLiteral("--snapshot"),
                                  history + QStringLiteral(".png")});
    const double waited = snapshot_quiet_milliseconds;
    std::printf("start to the first page, its picture saved, without the %.0f ms of waiting for it: %.0f ms, %.1f times of a "
                "start that only says its version (%.0f ms)\n",
                waited, start - waited, (start - waited) / bare, bare);
}

void print_pages(const QString& history)
{
    Workplace workplace;
    Frame frame(workplace);
    add_all_pages(frame);
    frame.resize(1366, 768);
    frame.begin(history, QStringLiteral("board"));
    frame.show();
    if (!settle(workplace))
        return;
    QStringList names = frame.page_names();
    names.removeAll(QStringLiteral("history"));
    std::vector<double> all, drawing;
    for (const QString& name : names) {
        std::vector<double> times;
        for (int round = 0; round < 22; ++round) {
            workplace.open_page(name == names.front() ? names.back() : names.front());
            QApplication::processEvents();
            Selection selection = workplace.selection();
            selection.place = Place::cylinder(round % 12 + 1);
            selection.quantity = find_quantity("compression_pressure");
            const Watch watch;
            workplace.open_page(name, selection);
            QApplication::processEvents();
            frame.grab(); // drawn as well
            if (round < 2)
                continue; // pages are made when first turned to
            times.push_back(watch.ms());
            const Watch again;
            frame.grab();
            drawing.push_back(again.ms());
        }
        all.insert(all.end(), times.begin(), times.end());
        std::sort(times.begin(), times.end());
        std::printf("  to %-8s median %5.1f ms, 95 of 100 within %5.1f ms\n", qPrintable(name), times[times.size() / 2],
                    times[times.size() * 95 / 100]);
    }
    std::sort(all.begin(), all.end());
    std::sort(drawing.begin(), drawing.end());
    std::printf("a page switch with 12 cylinders and 10 years: median %.1f ms, 95 of 100 within %.1f ms; drawing a page again "
                "takes %.2f of the median\n",
                all[all.size() / 2], all[all.size() * 95 / 100], drawing[drawing.size() / 2] / all[all.size() / 2]);
}

void print_fleet(const QString& history, int vessels)
{
    double judged = 0.0;
    {
        const Watch watch;
        Workplace workplace;
        if (workplace.open(history) || !settle(workplace))
            return;
        judged = watch.ms();
    }
    const Watch watch;
    Workplace workplace;
    Frame frame(workplace);
    add_all_pages(frame);
    frame.resize(1366, 768);
    frame.begin(history, QStringLiteral("fleet"));
    frame.show();
    QApplication::processEvents();
    frame.grab();
    const double shown = watch.ms();
    std::printf("%d vessels of 10 years: all judged in %.1f s; the fleet page from stored judgements in %.0f ms, %.4f of it\n",
                vessels, judged / 1e3, shown, shown / judged);
}

void print_report(const QString& history, const QString& pdf)
{
    Workplace workplace;
    if (workplace.open(history) || !settle(workplace))
        return;
    ReportWish wish;
    wish.history_path = history;
    wish.engine_id = workplace.selection().engine;
    const TimePoint last = workplace.judgement()->record->readings.back().taken_at.utc;
    wish.period.to = last;
    wish.period.from = last - std::chrono::days(1826);
    const Watch watch;
    ReportMaker maker;
    maker.make(wish);
    while (maker.busy())
        QApplication::processEvents(QEventLoop::AllEvents, 5);
    if (!maker.layout())
        return;
    const double laid_out = watch.ms();
    if (!write_survey_pdf(*maker.layout(), pdf))
        return;
    std::printf("survey report of 12 cylinders and 5 years: %.0f ms, %.2f of it for the contents; %lld bytes\n", watch.ms(),
                laid_out / watch.ms(), static_cast<long long>(QFileInfo(pdf).size()));
}

} // namespace

int main(int argc, char** argv)
{
    qputenv("QT_QPA_PLATFORM", "offscreen");
    const QTemporaryDir folder;
    qputenv("XDG_CONFIG_HOME", folder.path().toUtf8());
    QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("evenstroke-bench"));
    QApplication::setOrganizationName(QStringLiteral("evenstroke-bench"));
    set_theme(ThemeKind::day);
    const int vessels = argc > 1 ? std::max(1, std::atoi(argv[1])) : 50;
    const QString one = folder.filePath(QStringLiteral("one")), many = folder.filePath(QStringLiteral("many"));
    write_large_engine(one);
    for (int vessel = 1; vessel <= vessels; ++vessel)
        if (!copy_as(one, QStringLiteral("%1/%2").arg(many).arg(vessel), "Vessel " + QByteArray::number(vessel)))
            return 1;
    const QString history = folder.filePath(QStringLiteral("one.evenstroke")), fleet = folder.filePath(QStringLiteral("many.evenstroke"));
    if (!take_in(history, one) || !take_in(fleet, many))
        return 1;
    print_pages(history);
    print_start(history);
    print_report(history, folder.filePath(QStringLiteral("report.pdf")));
    print_fleet(fleet, vessels);
}
