// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/causes/causes_page.h"

#include "app/board/board_page.h"
#include "app/causes/causes_text.h"
#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"

#include <QTextDocument>

namespace evenstroke {
namespace {

using Kind = CausesLine::Kind;

QString html_of(const CausesLine& line, const Theme& t)
{
    const QString words = line.words.toHtmlEscaped();
    switch (line.kind) {
    case Kind::subject: return QStringLiteral("<p class=\"strong\" style=\"margin-top: 14px;\">%1</p>").arg(words);
    case Kind::caution:
        return QStringLiteral("<p><b style=\"color: %1;\">%2</b> %3</p>")
            .arg(t.act.name(), CausesPage::tr("Caution:").toHtmlEscaped(), words);
    case Kind::cause: return QStringLiteral("<p style=\"margin-top: 8px; margin-bottom: 2px;\"><b>%1</b></p>").arg(words);
    case Kind::label:
        return QStringLiteral("<p style=\"margin: 0px 0px 2px 18px;\"><span class=\"muted\">%1:</span> %2</p>")
            .arg(line.lead.toHtmlEscaped(), words);
    case Kind::last: return QStringLiteral("<p class=\"small\" style=\"margin-top: 14px;\">%1</p>").arg(words);
    case Kind::plain: break;
    }
    return sheet_paragraph(line.words);
}

} // namespace

CausesPage::CausesPage(Workplace& place, QWidget* parent) : SheetPage(place, parent) {}

void CausesPage::refresh()
{
    const auto judgement = workplace().judgement();
    if (!judgement || judgement->readings.empty()) {
        judgement_.reset();
        explanation_.reset();
        show_instead(empty_words(workplace()));
        return;
    }
    if (judgement != judgement_) {
        judgement_ = judgement;
        explanation_ = explain(*judgement_);
        auto cards = workplace().history() ? find_cards(*workplace().history(), *judgement_) : Result<CardsStored>(CardsStored{});
        cards_ = cards ? std::move(cards.value()) : CardsStored{}; // what cannot be read is said on the page Cards
    }
    show_sheet();
}

void CausesPage::fill(QTextDocument& document, const Theme& colours) const
{
    QString html = QStringLiteral("<body>") + sheet_paragraph(title(), "title");
    for (const CausesLine& line : causes_lines(*explanation_, cards_))
        html += html_of(line, colours);
    document.setDefaultStyleSheet(sheet_style(colours));
    document.setHtml(html + QStringLiteral("</body>"));
}

QString CausesPage::plain_text() const
{
    if (!explanation_)
        return {};
    QString plain = title() + u'\n';
    for (const CausesLine& line : causes_lines(*explanation_, cards_))
        plain += (line.kind == Kind::caution ? tr("Caution: ") : line.lead.isEmpty() ? QString() : line.lead + QStringLiteral(": ")) +
                 line.words + u'\n';
    return plain;
}

} // namespace evenstroke
