// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/batch/command.h"

#include <QString>
#include <QStringList>
#include <QTextStream>

namespace evenstroke::test {

/// What a command of `evenstroke-batch` left behind.
struct Outcome
{
    int code = 0;
    QString out, err;
    /// The lines of a table below its header.
    QStringList rows() const { return out.split(QLatin1Char('\n'), Qt::SkipEmptyParts).mid(1); }
};

/// Runs a command line in this process, as it runs in a pipe.
inline Outcome run(const QStringList& arguments)
{
    Outcome outcome;
    QTextStream out(&outcome.out), err(&outcome.err);
    batch::Streams streams{out, err, false, false};
    outcome.code = batch::run_command_line(arguments, streams);
    out.flush();
    err.flush();
    return outcome;
}

} // namespace evenstroke::test
