// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/language.h"

#include <QCoreApplication>
#include <QLocale>
#include <QTranslator>

namespace evenstroke {

void use_language(const QLocale& locale)
{
    const QString folder = QStringLiteral(":/translations");
    for (const QLocale& each : {QLocale(QLocale::English), locale}) { // the later one is asked first
        auto* words = new QTranslator(qApp);
        if (words->load(each, QStringLiteral("evenstroke"), QStringLiteral("_"), folder))
            QCoreApplication::installTranslator(words);
        else
            delete words;
    }
}

} // namespace evenstroke
