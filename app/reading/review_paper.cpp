// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/review_paper.h"

#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/reading/review_model.h"
#include "app/reading/sheet_number.h"

#include <QCoreApplication>
#include <QTextDocument>

namespace evenstroke {

namespace {

constexpr int columns_on_paper = ReviewModel::column_count + 5; // five numbers stand in two cells each

QString tr_(const char* text) { return QCoreApplication::translate("evenstroke", text); }

QString level_words(Level level, const QString& verdict)
{
    return has_mark(level) ? QStringLiteral("<b>%1</b> %2").arg(level_text(level).toHtmlEscaped(), verdict.toHtmlEscaped())
                           : verdict.toHtmlEscaped();
}

QString line_row(const ReviewModel& model, int number)
{
    const ReviewRow& row = *model.row(number);
    QString html = QStringLiteral("<tr>");
    for (int column = 0; column < ReviewModel::column_count; ++column) {
        QString words = model.index(number, column).data().toString();
        if (ReviewModel::is_number(column)) {
            const auto [left, right] = at_decimal_sign(words);
            html += QStringLiteral("<td align=\"right\" style=\"padding-left: 12px;\">%1</td><td>%2</td>").arg(left, right);
            continue;
        }
        words = column == ReviewModel::words && row.repeats ? QString()
                : column == ReviewModel::verdict             ? level_words(row.line->level, words)
                                                             : words.toHtmlEscaped();
        html += QStringLiteral("<td style=\"padding-left: 6px;\">%1</td>").arg(words);
    }
    return html + QStringLiteral("</tr>");
}

QString section_row(const ReviewSection& section)
{
    QString words = QStringLiteral("<b>%1</b>").arg(to_qstring(section.title).toHtmlEscaped());
    if (has_mark(section.level))
        words += QStringLiteral(" · %1").arg(level_text(section.level).toHtmlEscaped());
    if (!section.sentence.empty())
        words += QStringLiteral("<br>%1").arg(to_qstring(section.sentence).toHtmlEscaped());
    return QStringLiteral("<tr><td colspan=\"%1\" style=\"padding-top: 8px;\">%2</td></tr>").arg(columns_on_paper).arg(words);
}

QString heading_row(const ReviewModel& model)
{
    QString html = QStringLiteral("<tr>");
    for (int column = 0; column < ReviewModel::column_count; ++column)
        html += QStringLiteral("<td%1 class=\"muted\" style=\"padding-left: 6px;\">%2</td>")
                    .arg(ReviewModel::is_number(column) ? QStringLiteral(" colspan=\"2\" align=\"right\"") : QString(),
                         model.headerData(column, Qt::Horizontal).toString().toHtmlEscaped());
    return html + QStringLiteral("</tr>");
}

} // namespace

void fill_review_paper(QTextDocument& document, const Judgement& judgement, const ReviewModel& model)
{
    const Theme& t = theme_of(ThemeKind::print);
    document.setDefaultFont(type(TypeSize::label));
    document.setDefaultStyleSheet(QStringLiteral("body { color: %1; } .muted { color: %2; } .title { font-size: 14pt; }")
                                      .arg(t.ink.name(), t.muted.name()));
    QString html = QStringLiteral("<body><p class=\"title\">%1</p><p class=\"muted\">%2</p><table cellspacing=\"0\" cellpadding=\"1\">")
                       .arg(tr_("One reading, judged from top to bottom").toHtmlEscaped(),
                            tr_("%1 of %2, reading of %3")
                                .arg(to_qstring(judgement.record->engine.name), to_qstring(judgement.record->vessel.name),
                                     reading_words(judgement, model.review()->reading))
                                .toHtmlEscaped());
    html += heading_row(model);
    for (int number = 0; number < model.rowCount(); ++number)
        html += model.row(number)->line ? line_row(model, number) : section_row(*model.row(number)->section);
    document.setHtml(html + QStringLiteral("</table></body>"));
}

void fill_words(QTextDocument& document, const QString& title, const QString& said, const QString& hint, const Theme& colours)
{
    document.clear();
    document.setDefaultFont(type(TypeSize::body));
    document.setDocumentMargin(0);
    document.setDefaultStyleSheet(QStringLiteral("body { color: %1; } .title { font-size: 14pt; } .muted { color: %2; font-size: 9pt; }")
                                      .arg(colours.ink.name(), colours.muted.name()));
    document.setHtml(QStringLiteral("<body><p class=\"title\">%1</p><p>%2</p><p class=\"muted\">%3</p></body>")
                         .arg(title.toHtmlEscaped(), said.toHtmlEscaped(), hint.toHtmlEscaped()));
}

} // namespace evenstroke
