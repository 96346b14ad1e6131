// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/frame.h"
#include "app/desk/pages.h"
#include "app/desk/snapshot.h"
#include "app/desk/theme.h"
#include "app/desk/version.h"
#include "app/desk/workplace.h"

#include <QApplication>
#include <QCommandLineParser>

using namespace evenstroke;

int main(int argc, char** argv)
{
    QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("evenstroke"));
    QApplication::setOrganizationName(QStringLiteral("evenstroke"));
    QApplication::setApplicationVersion(program_version());

    QCommandLineParser parser;
    parser.setApplicationDescription(QStringLiteral("Performance readings of ship's diesel engines"));
    parser.addHelpOption();
    parser.addVersionOption();
    parser.addPositionalArgument(QStringLiteral("HISTORY"), QStringLiteral("the history to open"));
    const QCommandLineOption theme_option(QStringLiteral("theme"), QStringLiteral("day or night"), QStringLiteral("theme"));
    const QCommandLineOption page(QStringLiteral("page"), QStringLiteral("page to show first"), QStringLiteral("name"));
    const QCommandLineOption snapshot(QStringLiteral("snapshot"), QStringLiteral("save the page as a picture and end"),
                                      QStringLiteral("file"));
    parser.addOptions({theme_option, page, snapshot});
    parser.process(application);

    set_theme(ThemeKind::day);
    Workplace workplace;
    Frame frame(workplace);
    add_all_pages(frame);
    const bool picture = parser.isSet(snapshot);
    if (picture)
        frame.resize(1366, 768);
    else
        frame.recall();
    if (parser.isSet(theme_option))
        frame.use_theme(parser.value(theme_option) == QStringLiteral("night") ? ThemeKind::night : ThemeKind::day);
    frame.show();
    const QString history = parser.positionalArguments().value(0);
    frame.begin(history, parser.value(page));
    if (picture)
        return take_snapshot(frame, workplace, parser.value(snapshot));
    const int code = QApplication::exec();
    frame.remember();
    return code;
}
