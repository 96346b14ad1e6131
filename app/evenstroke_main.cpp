// SPDX-License-Identifier: GPL-3.0-or-later
// evenstroke [HISTORY] [--theme day|night] [--page NAME] [--snapshot FILE.png]
#include "app/desk/frame.h"
#include "app/desk/language.h"
#include "app/desk/pages.h"
#include "app/desk/snapshot.h"
#include "app/desk/version.h"
#include "app/desk/workplace.h"

#include <QApplication>
#include <QCommandLineParser>
#include <QLocale>
#include <QSettings>
#include <QTextStream>

#include <string_view>

namespace {

using namespace evenstroke;

struct Wishes
{
    QString history, theme, page, snapshot, size;
};

Wishes read_command_line(const QStringList& arguments)
{
    QCommandLineParser parser;
    parser.setApplicationDescription(QStringLiteral("Performance readings of ship's diesel engines."));
    parser.addHelpOption();
    parser.addVersionOption();
    parser.addPositionalArgument(QStringLiteral("history"), QStringLiteral("The history to open."),
                                 QStringLiteral("[HISTORY]"));
    const QCommandLineOption theme(QStringLiteral("theme"), QStringLiteral("day or night."), QStringLiteral("THEME"));
    const QCommandLineOption page(QStringLiteral("page"), QStringLiteral("The page to show, such as board or trend."),
                                  QStringLiteral("NAME"));
    const QCommandLineOption snapshot(QStringLiteral("snapshot"),
                                      QStringLiteral("Saves the page as a picture and ends."),
                                      QStringLiteral("FILE.png"));
    const QCommandLineOption size(QStringLiteral("size"), QStringLiteral("Size of the window, 1366x768."),
                                  QStringLiteral("WxH"));
    parser.addOptions({theme, page, snapshot, size});
    parser.process(arguments);
    Wishes wishes;
    wishes.history = parser.positionalArguments().value(0);
    wishes.theme = parser.value(theme);
    wishes.page = parser.value(page);
    wishes.snapshot = parser.value(snapshot);
    wishes.size = parser.value(size);
    return wishes;
}

int wrong_use(const QString& words)
{
    QTextStream(stderr) << words << Qt::endl;
    return 2;
}

/// Help and version need no screen.
void answer_without_screen(int argc, char** argv)
{
    for (int i = 1; i < argc; ++i)
        for (const char* const asked : {"--help", "-h", "--help-all", "--version", "-v"})
            if (std::string_view(argv[i]) == asked) {
                QCoreApplication application(argc, argv);
                QCoreApplication::setApplicationName(QStringLiteral("evenstroke"));
                QCoreApplication::setApplicationVersion(program_version());
                read_command_line(QCoreApplication::arguments()); // answers and ends the program
            }
}

} // namespace

int main(int argc, char** argv)
{
    answer_without_screen(argc, argv);
    QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("evenstroke"));
    QApplication::setOrganizationName(QStringLiteral("evenstroke"));
    QApplication::setApplicationVersion(program_version());
    use_language(QLocale());
    const Wishes wishes = read_command_line(QApplication::arguments());
    if (!wishes.theme.isEmpty() && wishes.theme != QLatin1String("day") && wishes.theme != QLatin1String("night"))
        return wrong_use(QStringLiteral("There is no theme %1. Use day or night.").arg(wishes.theme));

    Workplace workplace;
    Frame frame(workplace);
    add_all_pages(frame);
    if (!wishes.page.isEmpty() && !frame.page_names().contains(wishes.page))
        return wrong_use(QStringLiteral("There is no page %1. The pages are: %2.")
                             .arg(wishes.page, frame.page_names().join(QStringLiteral(", "))));
    frame.recall();
    if (!wishes.theme.isEmpty())
        set_theme(wishes.theme == QLatin1String("night") ? ThemeKind::night : ThemeKind::day);
    const QStringList sides = wishes.size.split(u'x');
    if (sides.size() == 2)
        frame.resize(sides[0].toInt(), sides[1].toInt());
    else if (!wishes.snapshot.isEmpty())
        frame.resize(1366, 768);

    const QString last = QSettings().value(QStringLiteral("history/last")).toString();
    const QString path = !wishes.history.isEmpty() || !wishes.snapshot.isEmpty() ? wishes.history : last;
    frame.begin(path, wishes.page);
    if (!wishes.snapshot.isEmpty())
        return take_snapshot(frame, workplace, wishes.snapshot);
    frame.show();
    return QApplication::exec();
}
