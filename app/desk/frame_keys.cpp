// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/foot_line.h"
#include "app/desk/frame.h"
#include "app/desk/number_text.h"
#include "app/desk/rail.h"
#include "app/desk/sentence_bar.h"
#include "app/desk/workplace.h"

#include <QAbstractButton>
#include <QApplication>
#include <QComboBox>
#include <QDateTime>
#include <QFileInfo>
#include <QKeyEvent>
#include <QPrintDialog>
#include <QPrinter>
#include <QShortcut>

#include <array>

namespace evenstroke {

namespace {

constexpr QChar workings_letter(u'W');

/// "history last written 09:41", or the day where it was not today.
QString saved_text(const Workplace& workplace)
{
    if (!workplace.is_open())
        return Frame::tr("no history open");
    if (workplace.read_only())
        return Frame::tr("history, for reading only");
    const QDateTime saved = QFileInfo(workplace.path()).lastModified();
    return saved.date() == QDate::currentDate()
               ? Frame::tr("history last written %1").arg(saved.time().toString(QStringLiteral("HH:mm")))
               : Frame::tr("history last written %1").arg(day_text(TimePoint(std::chrono::seconds(saved.toSecsSinceEpoch()))));
}

/// "reference 25 °C inlet air, 25 °C coolant, 1000 mbar"
QString reference_text(const Workplace& workplace)
{
    const auto judgement = workplace.judgement();
    if (!judgement || !judgement->record)
        return {};
    const ReferenceConditions& reference = judgement->record->engine.reference;
    return Frame::tr("reference %1 °C inlet air, %2 °C coolant, %3 mbar")
        .arg(number_text(in_celsius(reference.inlet_air), 0), number_text(in_celsius(reference.cooler_coolant), 0),
             number_text(1000.0 * in_bar(reference.barometer), 0));
}

} // namespace

void Frame::refresh_frame()
{
    for (const Entry& entry : entries_)
        if (entry.about.count_new)
            rail_->set_count(entry.about.name, workplace_.is_open() ? entry.about.count_new(workplace_) : 0);
    const QString activity = workplace_.activity();
    const QString draft = current_ ? current_->draft_text() : QString();
    foot_->set_state(!activity.isEmpty() ? activity : !draft.isEmpty() ? draft : saved_text(workplace_));
    foot_->set_stoppable(!activity.isEmpty());
    QStringList middle;
    for (const QString& text : {reference_text(workplace_), current_ ? current_->foot_text() : QString()})
        if (!text.isEmpty())
            middle.append(text);
    foot_->set_middle(middle.join(QStringLiteral(" · ")));
    foot_->set_theme_word(theme().kind == ThemeKind::night ? tr("night") : tr("day"));
    sentence_->show_sentence(current_ ? current_->sentence() : QString());
    const VesselChoice* vessel = workplace_.find_vessel(workplace_.selection().vessel);
    setWindowTitle(vessel ? tr("%1 – Evenstroke").arg(vessel->name) : QStringLiteral("Evenstroke"));
}

void Frame::add_keys()
{
    const auto key = [this](const QKeySequence& sequence, auto action) {
        connect(new QShortcut(sequence, this), &QShortcut::activated, this, action);
    };
    key(QKeySequence(Qt::ALT | Qt::Key_Left), [this] { workplace_.go_back(); });
    key(QKeySequence(Qt::ALT | Qt::Key_Right), [this] { workplace_.go_forward(); });
    key(QKeySequence(Qt::Key_F8),
        [this] { use_theme(theme().kind == ThemeKind::day ? ThemeKind::night : ThemeKind::day); });
    key(QKeySequence(Qt::Key_F6), [this] { walk_focus(); });
    key(QKeySequence::Print, [this] { print_page(); });
    qApp->installEventFilter(this);
}

namespace {

/// The first thing in a part of the window that can be seen and takes keys; null where there is none.
QWidget* first_reachable(QWidget* part)
{
    const auto reachable = [](const QWidget* widget) {
        return widget->isVisible() && widget->isEnabled() && (widget->focusPolicy() & Qt::TabFocus) == Qt::TabFocus;
    };
    for (QWidget* widget = part->nextInFocusChain(); widget && widget != part; widget = widget->nextInFocusChain())
        if (part->isAncestorOf(widget) && reachable(widget))
            return widget;
    return reachable(part) ? part : nullptr;
}

/// Return presses the button in hand, as Space does. Later, as what it does may take the button away.
bool press_button(QWidget* widget, const QKeyEvent& key)
{
    auto* button = qobject_cast<QAbstractButton*>(widget);
    const bool enter = key.key() == Qt::Key_Return || key.key() == Qt::Key_Enter;
    if (!button || !enter || (key.modifiers() & ~Qt::KeypadModifier) != Qt::NoModifier || !button->isEnabled())
        return false;
    if (!key.isAutoRepeat())
        QMetaObject::invokeMethod(button, "click", Qt::QueuedConnection);
    return true;
}

} // namespace

/// Letters change the page or open a chooser unless they are being typed somewhere.
bool Frame::eventFilter(QObject* watched, QEvent* event)
{
    if (event->type() != QEvent::KeyPress || !watched->isWidgetType() || !isActiveWindow()
        || QApplication::activePopupWidget() || QApplication::activeModalWidget())
        return QWidget::eventFilter(watched, event);
    auto* widget = static_cast<QWidget*>(watched);
    if (widget->window() != this)
        return QWidget::eventFilter(watched, event);
    const auto* key = static_cast<QKeyEvent*>(event);
    if (press_button(widget, *key))
        return true;
    const bool with_alt = key->modifiers() == Qt::AltModifier;
    if (key->matches(QKeySequence::Copy) && current_ && !widget->testAttribute(Qt::WA_InputMethodEnabled)) {
        current_->copy();
        return true;
    }
    if (!with_alt && (key->modifiers() & ~Qt::ShiftModifier) != Qt::NoModifier)
        return QWidget::eventFilter(watched, event);
    // A closed list takes the first letters of its entries.
    const bool typing = widget->testAttribute(Qt::WA_InputMethodEnabled) || qobject_cast<QComboBox*>(widget) || (current_ && current_->takes_letters());
    if (typing && !with_alt)
        return QWidget::eventFilter(watched, event);
    if (key->key() >= Qt::Key_A && key->key() <= Qt::Key_Z && take_letter(QChar(key->key())))
        return true;
    return QWidget::eventFilter(watched, event);
}

bool Frame::take_letter(QChar letter)
{
    if (letter == workings_letter && show_workings())
        return true;
    for (const Entry& entry : entries_)
        if (letter != workings_letter && entry.about.key == letter && (workplace_.is_open() || entry.about.without_history)) {
            workplace_.open_page(entry.about.name);
            return true;
        }
    return sentence_->open_by_letter(letter);
}

/// The sheet of workings of the number in hand, from whatever page shows one.
bool Frame::show_workings()
{
    const auto wanted = current_ ? current_->number_in_hand() : std::nullopt;
    if (!wanted || !find(QStringLiteral("workings")))
        return false;
    workplace_.open_page(QStringLiteral("workings"), *wanted);
    return true;
}

/// F6: page, sentence, rail, and round again.
void Frame::walk_focus()
{
    QWidget* focus = QApplication::focusWidget();
    std::array<QWidget*, 3> parts{sentence_, rail_, current_};
    if (focus && sentence_->isAncestorOf(focus))
        parts = {rail_, current_, sentence_};
    else if (focus && rail_->isAncestorOf(focus))
        parts = {current_, sentence_, rail_};
    for (QWidget* part : parts) {
        if (!part)
            continue;
        QWidget* first = part == current_ ? current_->first_focus() : nullptr;
        if (!first || first == part || !first->isVisible() || !first->isEnabled())
            first = first_reachable(part);
        if (first) {
            first->setFocus(Qt::TabFocusReason);
            return;
        }
    }
}

void Frame::print_page()
{
    if (!current_ || !current_->can_print())
        return;
    QPrinter printer(QPrinter::HighResolution);
    printer.setPageOrientation(QPageLayout::Landscape);
    QPrintDialog dialog(&printer, this);
    if (dialog.exec() == QDialog::Accepted)
        current_->print(printer);
}

} // namespace evenstroke
