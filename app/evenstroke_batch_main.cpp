// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/command.h"
#include "app/batch/long_work.h"

#include <QApplication>
#include <QTemporaryDir>

#include <cstdio>
#include <cstring>
#include <memory>
#include <optional>
#include <unistd.h>

int main(int argc, char** argv)
{
    // Only the report is drawn, and never on a screen: no display is needed.
    const bool draws = argc > 1 && std::strcmp(argv[1], "report") == 0;
    qputenv("QT_QPA_PLATFORM", "offscreen");
    // Qt warns on stderr where the system gave no folder for a program's passing files (cron, containers).
    std::optional<QTemporaryDir> passing; // mode 0700, removed at the end
    if (draws && qEnvironmentVariableIsEmpty("XDG_RUNTIME_DIR")) {
        passing.emplace();
        if (passing->isValid())
            qputenv("XDG_RUNTIME_DIR", passing->path().toLocal8Bit());
    }
    const std::unique_ptr<QCoreApplication> application(draws ? new QApplication(argc, argv)
                                                              : new QCoreApplication(argc, argv));
    QCoreApplication::setApplicationName(QStringLiteral("evenstroke"));
    QTextStream out(stdout), err(stderr);
    out.setEncoding(QStringConverter::Utf8);
    err.setEncoding(QStringConverter::Utf8);
    evenstroke::batch::Streams streams{out, err, isatty(STDOUT_FILENO) != 0, isatty(STDERR_FILENO) != 0};
    evenstroke::batch::listen_for_stop();
    const int code = evenstroke::batch::run_command_line(QCoreApplication::arguments().mid(1), streams);
    out.flush();
    err.flush();
    return code;
}
