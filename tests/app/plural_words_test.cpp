// SPDX-License-Identifier: GPL-3.0-or-later
#include <gtest/gtest.h>

#include <QDirIterator>
#include <QFile>
#include <QRegularExpression>

namespace {

QString content_of(const QString& path)
{
    QFile file(path);
    EXPECT_TRUE(file.open(QIODevice::ReadOnly)) << qPrintable(path);
    return QString::fromUtf8(file.readAll());
}

// "%n event(s)" must never reach the screen: every text that counts has its two English forms.
TEST(Words, EveryTextThatCountsHasOneAndMany)
{
    const QString root = QStringLiteral(EVENSTROKE_SOURCE_DIR);
    const QString forms = content_of(root + QStringLiteral("/resources/translations/evenstroke_en.ts"));
    const QRegularExpression counted(QString::fromLatin1(R"re("((?:[^"\\\n]|\\.)*%n(?:[^"\\\n]|\\.)*)")re"));
    int seen = 0;
    QDirIterator files(root + QStringLiteral("/app"), {QStringLiteral("*.cpp")}, QDir::Files,
                       QDirIterator::Subdirectories);
    while (files.hasNext()) {
        const QString path = files.next();
        for (auto each = counted.globalMatch(content_of(path)); each.hasNext(); ++seen) {
            const QString text = each.next().captured(1).toHtmlEscaped();
            EXPECT_TRUE(forms.contains(QStringLiteral("<source>") + text + QStringLiteral("</source>")))
                << qPrintable(path) << ": " << qPrintable(text);
        }
    }
    EXPECT_GT(seen, 10) << "the search itself";
}

} // namespace
