// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/workings_page.h"

#include "app/board/board_page.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/sentence_choices.h"
#include "app/desk/workplace.h"
#include "app/reading/workings_sheet.h"
#include "core/workings/find_workings.h"
#include "ui_workings_page.h"

#include <QClipboard>
#include <QGuiApplication>
#include <QKeyEvent>
#include <QPrinter>
#include <QScrollBar>
#include <QTextDocument>

#include <algorithm>

namespace evenstroke {

WorkingsPage::WorkingsPage(Workplace& place, QWidget* parent)
    : Page(place, parent), ui_(std::make_unique<Ui::WorkingsPage>())
{
    ui_->setupUi(this);
    ui_->sheet->installEventFilter(this);
    ui_->sheet->setAccessibleName(tr("Sheet of workings"));
    connect(ui_->back_button, &QPushButton::clicked, this, &WorkingsPage::go_back);
    connect(ui_->copy_button, &QPushButton::clicked, this, &WorkingsPage::copy);
    connect(ui_->earlier_button, &QPushButton::clicked, this, [this] { walk_readings(-1); });
    connect(ui_->later_button, &QPushButton::clicked, this, [this] { walk_readings(1); });
}

WorkingsPage::~WorkingsPage() = default;

QString WorkingsPage::sentence() const
{
    const Selection& selection = workplace().selection();
    if (!selection.estimate.isEmpty())
        return tr("Power of {engine} of {vessel}, reading of {reading}, and how it was worked out.");
    if (selection.place.kind == Place::Kind::engine)
        return tr("{quantity} of {engine} of {vessel}, reading of {reading}, and how it was worked out.");
    return tr("{quantity} of {place}, {engine} of {vessel}, reading of {reading}, and how it was worked out.");
}

std::optional<Workings> WorkingsPage::wanted(std::size_t reading) const
{
    const Selection& selection = workplace().selection();
    if (!selection.estimate.isEmpty()) {
        const PowerAgreement power = review_reading(*judgement_, reading).power;
        const auto found = std::find_if(power.estimates.begin(), power.estimates.end(), [&](const PowerEstimate& estimate) {
            return to_qstring(estimate.name) == selection.estimate;
        });
        return found == power.estimates.end() ? std::nullopt : std::optional(found->workings);
    }
    return selection.quantity ? find_workings(*judgement_, reading, *selection.quantity, selection.place) : std::nullopt;
}

void WorkingsPage::refresh()
{
    judgement_ = workplace().judgement();
    workings_.reset();
    reading_ = judgement_ ? reading_in_hand(*judgement_, workplace().selection()) : std::nullopt;
    if (!reading_) {
        show_nothing(empty_words(workplace()));
        return;
    }
    if (!workplace().selection().quantity && workplace().selection().estimate.isEmpty())
        workplace().step_to(settled(workplace().selection(), *judgement_));
    workings_ = wanted(*reading_);
    if (!workings_) {
        show_nothing(tr("This value was not read on that day and is not worked out. Choose another reading (key M) or "
                        "quantity (key Q), or go back (Esc)."));
        return;
    }
    const int scrolled = ui_->sheet->verticalScrollBar()->value();
    fill_sheet(*ui_->sheet->document(), *workings_, heading(), theme());
    ui_->sheet->setAccessibleDescription(text());
    ui_->sheet->show();
    ui_->empty->hide();
    ui_->sheet->verticalScrollBar()->setValue(scrolled);
    ui_->earlier_button->setEnabled(*reading_ > 0);
    ui_->later_button->setEnabled(*reading_ + 1 < judgement_->readings.size());
}

void WorkingsPage::show_nothing(const QString& words)
{
    ui_->sheet->hide();
    ui_->empty->setText(words);
    ui_->empty->show();
}

SheetHeading WorkingsPage::heading() const
{
    const Engine& engine = judgement_->record->engine;
    QString title = to_qstring(workings_->title);
    if (workings_->place.kind != Place::Kind::engine)
        title = tr("%1, %2").arg(title, place_title(engine, workings_->place, false));
    QString name = to_qstring(engine.name);
    if (!name.isEmpty())
        name[0] = name[0].toUpper();
    return {title, tr("%1 of %2, reading of %3")
                       .arg(name, to_qstring(judgement_->record->vessel.name),
                            reading_words(*judgement_, *reading_))};
}

QString WorkingsPage::text() const
{
    if (!workings_)
        return ui_->empty->text();
    const SheetHeading words = heading();
    return to_qstring(workings_text(*workings_, to_std(words.title + QStringLiteral(", ") + words.where)));
}

QWidget* WorkingsPage::first_focus() { return ui_->sheet->isHidden() ? static_cast<QWidget*>(this) : ui_->sheet; }

void WorkingsPage::go_back()
{
    if (workplace().can_go_back())
        workplace().go_back();
    else
        workplace().open_page(QStringLiteral("reading"));
}

void WorkingsPage::walk_readings(int step)
{
    if (judgement_)
        workplace().step_to(with_reading_step(workplace().selection(), *judgement_, step));
}

bool WorkingsPage::take_key(const QKeyEvent& event)
{
    if (event.modifiers() & ~Qt::KeypadModifier)
        return false;
    switch (event.key()) {
    case Qt::Key_Escape:
    case Qt::Key_W: go_back(); return true;
    case Qt::Key_PageUp:
    case Qt::Key_Left: walk_readings(-1); return true;
    case Qt::Key_PageDown:
    case Qt::Key_Right: walk_readings(1); return true;
    default: return false;
    }
}

void WorkingsPage::keyPressEvent(QKeyEvent* event)
{
    if (!take_key(*event))
        Page::keyPressEvent(event);
}

bool WorkingsPage::eventFilter(QObject* watched, QEvent* event)
{
    if (watched == ui_->sheet && event->type() == QEvent::KeyPress && take_key(*static_cast<QKeyEvent*>(event)))
        return true;
    return Page::eventFilter(watched, event);
}

void WorkingsPage::copy()
{
    const QString marked = ui_->sheet->textCursor().selectedText();
    QGuiApplication::clipboard()->setText(marked.isEmpty() ? text() : QString(marked).replace(QChar::ParagraphSeparator, u'\n'));
}

void WorkingsPage::print(QPrinter& printer)
{
    if (!workings_)
        return;
    QTextDocument paper;
    fill_sheet(paper, *workings_, heading(), theme_of(ThemeKind::print));
    paper.print(&printer);
}

} // namespace evenstroke
