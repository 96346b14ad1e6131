// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/command.h"
#include "app/batch/long_work.h"

#include <QApplication>

#include <cstdio>
#include <unistd.h>

int main(int argc, char** argv)
{
    // The report is drawn, but never on a screen: no display is needed.
    qputenv("QT_QPA_PLATFORM", "offscreen");
    const QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("evenstroke"));
    QTextStream out(stdout), err(stderr);
    out.setEncoding(QStringConverter::Utf8);
    err.setEncoding(QStringConverter::Utf8);
    evenstroke::batch::Streams streams{out, err, isatty(STDOUT_FILENO) != 0, isatty(STDERR_FILENO) != 0};
    evenstroke::batch::listen_for_stop();
    const int code = evenstroke::batch::run_command_line(QApplication::arguments().mid(1), streams);
    out.flush();
    err.flush();
    return code;
}
