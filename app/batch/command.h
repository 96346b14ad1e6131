// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"

#include <QCommandLineParser>
#include <QString>
#include <QStringList>
#include <QTextStream>

#include <functional>
#include <vector>

/// `evenstroke-batch`: the program without a window. Results go to `out`, everything else to `err`.
namespace evenstroke::batch {

enum ExitCode { done = 0, data_refused = 1, wrong_use = 2, file_trouble = 3 };

/// What went wrong, as an exit code: the data were refused, or file and disk did not serve.
ExitCode exit_code(const Problem& problem);

struct Streams
{
    QTextStream& out;
    QTextStream& err;
    bool out_is_terminal = false, err_is_terminal = false;
};

/// Says the problem on `err` and gives its exit code.
int refuse(Streams& streams, const Problem& problem);

struct Option
{
    const char* name;
    const char* value_name; ///< null: a switch
    const char* help;
    bool needed = false;
};

/// One command: its options, what follows them, and what it does.
struct Command
{
    const char* name;
    const char* summary;
    const char* rest; ///< name of the words after the options; null: none are taken
    std::vector<Option> options;
    std::function<int(const QCommandLineParser&, Streams&)> run;
    const char* refused = "the data were refused, nothing changed"; ///< what exit code 1 means
};

const std::vector<Command>& all_commands();

/// Runs the command line without the program's name. @return the exit code
int run_command_line(const QStringList& arguments, Streams& streams);

} // namespace evenstroke::batch
