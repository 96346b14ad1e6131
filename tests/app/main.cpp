// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/language.h"
#include "app/desk/theme.h"

#include <gtest/gtest.h>

#include <QApplication>
#include <QLocale>
#include <QSettings>
#include <QStandardPaths>
#include <QTemporaryDir>

/// Tests of the front end run without a screen and without the user's own settings.
int main(int argc, char** argv)
{
    qputenv("QT_QPA_PLATFORM", "offscreen");
    ::testing::InitGoogleTest(&argc, argv);
    QStandardPaths::setTestModeEnabled(true);
    const QTemporaryDir settings;
    QSettings::setDefaultFormat(QSettings::IniFormat);
    QSettings::setPath(QSettings::IniFormat, QSettings::UserScope, settings.path());
    QSettings::setPath(QSettings::NativeFormat, QSettings::UserScope, settings.path());
    QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("evenstroke-tests"));
    QApplication::setOrganizationName(QStringLiteral("evenstroke-tests"));
    evenstroke::use_language(QLocale(QLocale::English));
    evenstroke::set_theme(evenstroke::ThemeKind::day);
    return RUN_ALL_TESTS();
}
