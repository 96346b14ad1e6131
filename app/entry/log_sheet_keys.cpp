// SPDX-License-Identifier: GPL-3.0-or-later
// What the keys do on the log sheet while no box, or one, is being typed in.
#include "app/entry/log_sheet_view.h"

#include "app/entry/box_edit.h"

#include <QCoreApplication>
#include <QInputMethodEvent>
#include <QKeyEvent>

namespace evenstroke {

bool LogSheetView::event(QEvent* event)
{
    if (event->type() == QEvent::KeyPress) {
        auto* key = static_cast<QKeyEvent*>(event);
        if ((key->key() == Qt::Key_Tab || key->key() == Qt::Key_Backtab) &&
            !(key->modifiers() & Qt::ControlModifier)) {
            keyPressEvent(key);
            return true;
        }
    }
    return QTableView::event(event);
}

bool LogSheetView::walk_key(int key, Qt::KeyboardModifiers modifiers)
{
    const bool enter = key == Qt::Key_Return || key == Qt::Key_Enter;
    const bool tab = key == Qt::Key_Tab || key == Qt::Key_Backtab;
    if (!enter && !tab)
        return false;
    const bool back = key == Qt::Key_Backtab || (modifiers & Qt::ShiftModifier);
    const QModelIndex next = next_box(*model_, currentIndex(), order_, tab, !back);
    if (next.isValid())
        go_to(next);
    else if (tab)
        emit left_sheet(!back);
    return true;
}

/// Undoes or redoes a step and shows the first box that it changed.
void LogSheetView::take_back(bool again)
{
    std::optional<LogBox> changed;
    const auto watching = connect(&model_->sheet(), &EntrySheet::value_put, this, [&changed](const LogBox& box) {
        if (!changed)
            changed = box;
    });
    if (again)
        model_->undo_stack().redo();
    else
        model_->undo_stack().undo();
    disconnect(watching);
    if (changed)
        go_to(*changed);
}

/// The group's heading comes to the top, so that the whole group is seen.
void LogSheetView::go_to_section(bool forward)
{
    const QModelIndex first = next_section(*model_, currentIndex(), forward);
    if (!first.isValid())
        return;
    setCurrentIndex(first);
    const int heading = first.row() > 0 ? first.row() - 1 : first.row();
    scrollTo(model_->index(heading, first.column()), PositionAtTop);
}

void LogSheetView::go_to_end(bool first)
{
    QModelIndex box = model_->index(first ? 0 : model_->rowCount() - 1, 0);
    if (!model_->box(box))
        box = neighbour(*model_, box, first ? 1 : -1, 0);
    go_to(box);
    if (first)
        scrollToTop();
}

/// A composed letter (dead key, input method) opens the box like a plain one.
void LogSheetView::inputMethodEvent(QInputMethodEvent* event)
{
    const bool says_something = !event->commitString().isEmpty() || !event->preeditString().isEmpty();
    if (is_editing() || !says_something || !current_box()) {
        QTableView::inputMethodEvent(event);
        return;
    }
    edit(currentIndex());
    if (!editor_)
        return;
    editor_->begin_typing({});
    QCoreApplication::sendEvent(editor_, event);
}

bool LogSheetView::sheet_key(QKeyEvent* event)
{
    if (event->matches(QKeySequence::Copy))
        copy();
    else if (event->matches(QKeySequence::Cut))
        cut();
    else if (event->matches(QKeySequence::Paste))
        paste();
    else if (event->matches(QKeySequence::Undo))
        take_back(false);
    else if (event->matches(QKeySequence::Redo) ||
             (event->key() == Qt::Key_Y && event->modifiers() == Qt::ControlModifier))
        take_back(true);
    else if (event->key() == Qt::Key_PageDown && event->modifiers() == Qt::ControlModifier)
        go_to_section(true);
    else if (event->key() == Qt::Key_PageUp && event->modifiers() == Qt::ControlModifier)
        go_to_section(false);
    else if (event->key() == Qt::Key_Home && event->modifiers() == Qt::ControlModifier)
        go_to_end(true);
    else if (event->key() == Qt::Key_End && event->modifiers() == Qt::ControlModifier)
        go_to_end(false);
    else if (event->key() == Qt::Key_U && event->modifiers() == Qt::ControlModifier) {
        finish_editing();
        emit unit_wanted(currentIndex().row());
    } else
        return false;
    return true;
}

/// A key for the whole box came up from the editor: a reason replaces what is being typed, F3 and F4 take it
/// first. Any other key leaves the box as it is being typed.
bool LogSheetView::leave_for_key(int key)
{
    if (key == Qt::Key_F5 || key == Qt::Key_F7 || key == Qt::Key_F9) {
        if (const auto box = model_->box(editor_->index))
            model_->forget_unreadable(*box);
        close_editor();
        return true;
    }
    return (key == Qt::Key_F3 || key == Qt::Key_F4) && finish_editing();
}

void LogSheetView::keyPressEvent(QKeyEvent* event)
{
    if (!model_ || BoxEdit::only_modifies(event->key())) {
        event->ignore();
        return;
    }
    if (sheet_key(event) || walk_key(event->key(), event->modifiers()))
        return;
    if (is_editing() && !leave_for_key(event->key())) {
        event->ignore();
        return;
    }
    switch (event->key()) {
    case Qt::Key_F2:
        begin_edit({});
        return;
    case Qt::Key_F3:
        if (event->modifiers() & Qt::ShiftModifier)
            emit second_wanted();
        else
            emit suggestion_wanted();
        return;
    case Qt::Key_F4:
        emit confirm_wanted();
        return;
    case Qt::Key_F5:
        set_reason(MissingReason::not_read);
        return;
    case Qt::Key_F7:
        set_reason(MissingReason::not_fitted);
        return;
    case Qt::Key_F9:
        set_reason(MissingReason::out_of_order);
        return;
    case Qt::Key_Delete:
    case Qt::Key_Backspace:
        clear_boxes();
        return;
    default:
        break;
    }
    const bool plain = !(event->modifiers() & (Qt::ControlModifier | Qt::AltModifier | Qt::MetaModifier));
    if (plain && !event->text().isEmpty() && event->text().at(0).isPrint()) {
        begin_edit(event->text());
        return;
    }
    QTableView::keyPressEvent(event);
}

} // namespace evenstroke
