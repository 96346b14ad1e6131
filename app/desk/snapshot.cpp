// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/snapshot.h"

#include "app/desk/frame.h"
#include "app/desk/page.h"
#include "app/desk/worker_run.h"
#include "app/desk/workplace.h"

#include <QApplication>
#include <QElapsedTimer>
#include <QPixmap>
#include <QTextStream>
#include <QThread>

#include <algorithm>

namespace evenstroke {

namespace {

/// Whether the page is still at work on what it is going to show.
bool at_work(const Frame& frame)
{
    const Page* page = frame.current_page();
    if (!page)
        return false;
    const auto runs = page->findChildren<WorkerRun*>();
    return std::any_of(runs.begin(), runs.end(), [](const WorkerRun* run) { return run->busy(); });
}

} // namespace

int take_snapshot(Frame& frame, Workplace& workplace, const QString& file)
{
    constexpr int fewest_rounds = 12; // on a busy machine one round may take as long as the quiet time
    int rounds = 0;
    constexpr int longest_milliseconds = 120'000;
    frame.show();
    QElapsedTimer all, quiet;
    all.start();
    quiet.start();
    while ((quiet.elapsed() < snapshot_quiet_milliseconds || rounds < fewest_rounds)
           && all.elapsed() < longest_milliseconds) {
        QApplication::processEvents(QEventLoop::AllEvents, 20);
        QThread::msleep(5);
        ++rounds;
        if (!workplace.activity().isEmpty() || at_work(frame)) {
            quiet.restart();
            rounds = 0;
        }
    }
    if (frame.grab().save(file))
        return 0;
    QTextStream(stderr) << QStringLiteral("The picture %1 could not be written. Choose a folder that allows writing.").arg(file)
                        << Qt::endl;
    return 3;
}

} // namespace evenstroke
