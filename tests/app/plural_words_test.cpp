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

// A page's letter opens the page wherever it is pressed: a button that promises it for something else lies.
TEST(Words, NoButtonPromisesALetterThatOpensAPage)
{
    const QString root = QStringLiteral(EVENSTROKE_SOURCE_DIR);
    QString letters;
    const QRegularExpression page(QStringLiteral("frame\\.add_page\\(.*u'([A-Z])'"));
    for (auto each = page.globalMatch(content_of(root + QStringLiteral("/app/desk/pages.cpp"))); each.hasNext();)
        letters += each.next().captured(1);
    ASSERT_GT(letters.size(), 10) << "the search itself";
    const QStringList open_pages{QStringLiteral("causes_button"), QStringLiteral("detection_button"), QStringLiteral("sisters_button"),
                                 QStringLiteral("bring_button"), QStringLiteral("empty_bring_button"), QStringLiteral("open_button")};
    const QRegularExpression promised(QString::fromLatin1(R"re(name="(\w+)"><property name="text"><string>[^<]*\(([A-Z])\)</string>)re"));
    QDirIterator forms(root + QStringLiteral("/ui_forms"), {QStringLiteral("*.ui")}, QDir::Files);
    int seen = 0;
    while (forms.hasNext()) {
        const QString path = forms.next();
        for (auto each = promised.globalMatch(content_of(path)); each.hasNext(); ++seen) {
            const auto button = each.next();
            EXPECT_TRUE(!letters.contains(button.captured(2)) || open_pages.contains(button.captured(1)))
                << qPrintable(path) << ": " << qPrintable(button.captured(1)) << " (" << qPrintable(button.captured(2)) << ")";
        }
    }
    EXPECT_GT(seen, 5) << "the search itself";
}

} // namespace
