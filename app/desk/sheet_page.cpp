// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/sheet_page.h"

#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "ui_sheet_page.h"

#include <QClipboard>
#include <QGuiApplication>
#include <QKeyEvent>
#include <QPrinter>
#include <QScrollBar>
#include <QTextDocument>

#include <algorithm>

namespace evenstroke {

SheetPage::SheetPage(Workplace& place, QWidget* parent) : Page(place, parent), ui_(std::make_unique<Ui::SheetPage>())
{
    ui_->setupUi(this);
    ui_->sheet->installEventFilter(this);
    connect(ui_->back_button, &QPushButton::clicked, this, &SheetPage::go_back);
    connect(ui_->copy_button, &QPushButton::clicked, this, &SheetPage::copy);
    hide_progress();
}

SheetPage::~SheetPage() = default;

QPushButton* SheetPage::add_action(const QString& words)
{
    auto* button = new QPushButton(words, this);
    button->setProperty("worded", true);
    ui_->actions->insertWidget(actions_++, button);
    return button;
}

void SheetPage::show_sheet()
{
    shown_ = true;
    const QString words = plain_text();
    const int scrolled = keeps_place() || words == words_ ? ui_->sheet->verticalScrollBar()->value() : 0;
    words_ = words;
    fill(*ui_->sheet->document(), theme());
    ui_->sheet->moveCursor(QTextCursor::Start); // setting a document leaves it at its end
    ui_->sheet->verticalScrollBar()->setValue(scrolled);
    ui_->sheet->setAccessibleName(title());
    ui_->sheet->setAccessibleDescription(words);
    ui_->sheet->show();
    ui_->empty->hide();
}

void SheetPage::show_instead(const QString& words)
{
    shown_ = false;
    ui_->sheet->hide();
    ui_->empty->setText(words);
    ui_->empty->show();
}

void SheetPage::show_progress(int done, int total, const QString& words)
{
    ui_->progress->setMaximum(std::max(1, total));
    ui_->progress->setValue(done);
    ui_->progress->show();
    ui_->progress_words->setText(words);
    ui_->progress_words->show();
}

void SheetPage::hide_progress()
{
    ui_->progress->hide();
    ui_->progress_words->hide();
}

QWidget* SheetPage::first_focus() { return shown_ ? static_cast<QWidget*>(ui_->sheet) : this; }
bool SheetPage::can_print() const { return shown_; }

void SheetPage::go_back()
{
    if (workplace().can_go_back())
        workplace().go_back();
    else
        workplace().open_page(page_before());
}

bool SheetPage::key_taken(const QKeyEvent& event)
{
    if (event.modifiers() & ~Qt::KeypadModifier)
        return false;
    if (take_key(event.key()))
        return true;
    if (event.key() != Qt::Key_Escape)
        return false;
    go_back();
    return true;
}

void SheetPage::keyPressEvent(QKeyEvent* event)
{
    if (!key_taken(*event))
        Page::keyPressEvent(event);
}

bool SheetPage::eventFilter(QObject* watched, QEvent* event)
{
    if (watched == ui_->sheet && event->type() == QEvent::KeyPress && key_taken(*static_cast<QKeyEvent*>(event)))
        return true;
    return Page::eventFilter(watched, event);
}

void SheetPage::changeEvent(QEvent* event)
{
    if (event->type() == QEvent::StyleChange && shown_ && isVisible())
        show_sheet();
    Page::changeEvent(event);
}

void SheetPage::copy()
{
    const QString marked = ui_->sheet->textCursor().selectedText();
    QGuiApplication::clipboard()->setText(marked.isEmpty() ? plain_text()
                                                           : QString(marked).replace(QChar::ParagraphSeparator, u'\n'));
}

void SheetPage::print(QPrinter& printer)
{
    if (!shown_)
        return;
    QTextDocument paper;
    fill(paper, theme_of(ThemeKind::print));
    paper.print(&printer);
}

// ------------------------------------------------------------------------------------- parts of sheets

QString sheet_style(const Theme& t)
{
    return QStringLiteral("body { color: %1; font-size: 10.5pt; } p { margin: 0px 0px 8px 0px; } .muted { color: %2; } "
                          ".small { font-size: 9pt; color: %2; } .title { font-size: 14pt; } .strong { font-weight: bold; }")
        .arg(t.ink.name(), t.muted.name());
}

QString sheet_paragraph(const QString& words, const char* kind)
{
    return words.isEmpty() ? QString()
                           : QStringLiteral("<p class=\"%1\">%2</p>").arg(QLatin1String(kind), words.toHtmlEscaped());
}

QString sheet_table(const QStringList& heads, const std::vector<QStringList>& rows, bool small_last)
{
    if (rows.empty())
        return {};
    const auto cell = [](const QString& words, bool small) {
        return QStringLiteral("<td class=\"%1\" style=\"padding-right: 24px;\">%2</td>")
            .arg(small ? QStringLiteral("small") : QString(), words.toHtmlEscaped());
    };
    QString html = QStringLiteral("<table cellspacing=\"0\" cellpadding=\"3\"><tr>");
    for (const QString& head : heads)
        html += cell(head, true);
    html += QStringLiteral("</tr>");
    for (const QStringList& row : rows) {
        html += QStringLiteral("<tr>");
        for (qsizetype i = 0; i < row.size(); ++i)
            html += cell(row[i], small_last && i + 1 == row.size());
        html += QStringLiteral("</tr>");
    }
    return html + QStringLiteral("</table><p></p>");
}

} // namespace evenstroke
