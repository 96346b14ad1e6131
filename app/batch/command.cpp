// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/command.h"

#include <algorithm>

namespace evenstroke::batch {
namespace {

QString utf8(const char* text) { return QString::fromUtf8(text); }

/// Commands of the contract that this version does not have yet.
const QStringList later_commands = {QStringLiteral("parcel"), QStringLiteral("receive")};

QString usage_line(const Command& command)
{
    QString line = QStringLiteral("evenstroke-batch ") + utf8(command.name);
    if (command.rest)
        line += QStringLiteral(" ") + utf8(command.rest);
    for (const Option& option : command.options) {
        QString text = QStringLiteral("--") + utf8(option.name);
        if (option.value_name)
            text += QStringLiteral(" ") + utf8(option.value_name);
        line += option.needed ? QStringLiteral(" ") + text : QStringLiteral(" [") + text + QStringLiteral("]");
    }
    return line;
}

void list_commands(QTextStream& to, const QString& what)
{
    to << what << "\n";
    for (const Command& command : all_commands())
        to << "  " << usage_line(command) << "\n      " << command.summary << "\n";
    to.flush();
}

int explain_use(Streams& streams, const QString& what)
{
    list_commands(streams.err, what);
    return wrong_use;
}

/// @return the exit code: help that was asked for is a result
int explain_command(const Command& command, Streams& streams)
{
    streams.out << "evenstroke-batch " << command.name << ": " << command.summary << "\n  " << usage_line(command)
                << "\n";
    for (const Option& option : command.options) {
        QString left = QStringLiteral("--") + utf8(option.name);
        if (option.value_name)
            left += QStringLiteral(" ") + utf8(option.value_name);
        streams.out << "    " << left.leftJustified(24) << " " << utf8(option.help)
                    << (option.needed ? " (needed)" : "") << "\n";
    }
    streams.out << "Exit code: 0 done; 1 " << command.refused << "; 2 wrong use; 3 the file or disk failed.\n";
    streams.out.flush();
    return done;
}

int run_one(const Command& command, const QStringList& arguments, Streams& streams)
{
    if (arguments.contains(QStringLiteral("--help")) || arguments.contains(QStringLiteral("-h")))
        return explain_command(command, streams);
    QCommandLineParser parser;
    parser.setOptionsAfterPositionalArgumentsMode(QCommandLineParser::ParseAsOptions);
    for (const Option& option : command.options) {
        QCommandLineOption made(utf8(option.name), utf8(option.help));
        if (option.value_name)
            made.setValueName(utf8(option.value_name));
        parser.addOption(made);
    }
    if (!parser.parse(QStringList(utf8(command.name)) + arguments)) {
        streams.err << parser.errorText() << "\nUse: " << usage_line(command) << "\n";
        return wrong_use;
    }
    for (const Option& option : command.options)
        if (option.needed && !parser.isSet(utf8(option.name))) {
            streams.err << "--" << option.name << " is missing.\nUse: " << usage_line(command) << "\n";
            return wrong_use;
        }
    if (!command.rest && !parser.positionalArguments().isEmpty()) {
        streams.err << "\"" << parser.positionalArguments().first() << "\" is not understood.\nUse: "
                    << usage_line(command) << "\n";
        return wrong_use;
    }
    return command.run(parser, streams);
}

} // namespace

ExitCode exit_code(const Problem& problem)
{
    switch (problem.kind) {
    case Problem::Kind::invalid_input: return data_refused;
    case Problem::Kind::not_found: return data_refused;
    case Problem::Kind::damaged_file:
    case Problem::Kind::newer_file:
    case Problem::Kind::storage: break;
    }
    return file_trouble;
}

int refuse(Streams& streams, const Problem& problem)
{
    streams.err << QString::fromStdString(problem.text()) << "\n";
    return exit_code(problem);
}

int run_command_line(const QStringList& arguments, Streams& streams)
{
    if (arguments.isEmpty())
        return explain_use(streams, QStringLiteral("A command is missing. These are known:"));
    const QString& name = arguments.first();
    if (name == QStringLiteral("--version")) {
        streams.out << "evenstroke-batch " << utf8(EVENSTROKE_VERSION) << "\n";
        return done;
    }
    if (name == QStringLiteral("--help") || name == QStringLiteral("help")) {
        list_commands(streams.out,
                      QStringLiteral("Performance readings of ship's diesel engines, without a window."));
        return done;
    }
    const auto& commands = all_commands();
    const auto found = std::find_if(commands.begin(), commands.end(),
                                    [&](const Command& command) { return name == QLatin1String(command.name); });
    if (found != commands.end())
        return run_one(*found, arguments.mid(1), streams);
    if (later_commands.contains(name)) {
        streams.err << "\"" << name << "\" is not in this version yet. Use a later version for it.\n";
        return wrong_use;
    }
    return explain_use(streams, QStringLiteral("\"%1\" is no command. These are known:").arg(name));
}

} // namespace evenstroke::batch
