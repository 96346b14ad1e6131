// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/log_sheet_view.h"

#include "app/entry/box_edit.h"
#include "app/entry/row_header.h"

#include <QClipboard>
#include <QGuiApplication>
#include <QHeaderView>
#include <QLocale>

#include <algorithm>

namespace evenstroke {
namespace {

constexpr int narrowest_column = 56, widest_column = 92;

/// The heading above a section's first row comes into sight with it.
void show_with_heading(LogSheetView& view, const LogSheetModel& model, const QModelIndex& index)
{
    if (index.row() > 0 && !model.row(index.row() - 1))
        view.scrollTo(model.index(index.row() - 1, index.column()));
    view.scrollTo(index);
}

} // namespace

LogSheetView::LogSheetView(QWidget* parent)
    : QTableView(parent), delegate_(new BoxDelegate(this)), labels_(new RowHeader(this)),
      decimal_sign_(QLocale::system().decimalPoint().at(0))
{
    setItemDelegate(delegate_);
    setVerticalHeader(labels_);
    horizontalHeader()->hide();
    setShowGrid(false);
    setCornerButtonEnabled(false);
    setTabKeyNavigation(false);
    setEditTriggers(QAbstractItemView::DoubleClicked);
    setSelectionMode(QAbstractItemView::ContiguousSelection);
    setHorizontalScrollMode(QAbstractItemView::ScrollPerPixel);
    setVerticalScrollMode(QAbstractItemView::ScrollPerPixel);
    connect(delegate_, &BoxDelegate::editor_made, this, &LogSheetView::editor_made);
    connect(labels_, &RowHeader::unit_wanted, this, &LogSheetView::unit_wanted);
    setAccessibleName(tr("Log sheet"));
}

void LogSheetView::set_sheet_model(LogSheetModel* model)
{
    model_ = model;
    setModel(model);
    connect(model, &QAbstractItemModel::modelReset, this, &LogSheetView::lay_out);
    connect(model, &LogSheetModel::refused, this, &LogSheetView::unreadable);
    lay_out();
}

void LogSheetView::lay_out()
{
    clearSpans();
    for (int row = 0; row < model_->rowCount(); ++row) {
        const LogRow* in_row = model_->row(row);
        setRowHeight(row, in_row ? 24 : row == 0 ? 26 : 36);
        if (!in_row || in_row->boxes.size() != 1 || model_->columnCount() < 2)
            continue;
        const ValueType kind = quantity(in_row->quantity).type;
        const int wide = kind == ValueType::words ? 6 : kind == ValueType::choice ? 2 : 1;
        if (wide > 1)
            setSpan(row, 0, 1, std::min(wide, model_->columnCount()));
    }
    lay_out_columns();
    if (!currentIndex().isValid())
        go_to(next_section(*model_, {}, true));
}

void LogSheetView::lay_out_columns()
{
    if (!model_ || model_->columnCount() == 0)
        return;
    const int width =
        std::clamp(viewport()->width() / model_->columnCount(), narrowest_column, widest_column);
    for (int column = 0; column < model_->columnCount(); ++column)
        setColumnWidth(column, width);
}

void LogSheetView::resizeEvent(QResizeEvent* event)
{
    QTableView::resizeEvent(event);
    lay_out_columns();
    // Sentences that appear below take room; the box in hand stays in sight.
    if (currentIndex().isValid())
        show_with_heading(*this, *model_, currentIndex());
}


std::optional<LogBox> LogSheetView::current_box() const
{
    return model_ ? model_->box(currentIndex()) : std::nullopt;
}

void LogSheetView::go_to(const QModelIndex& index)
{
    if (!index.isValid())
        return;
    setCurrentIndex(index);
    show_with_heading(*this, *model_, index);
}

void LogSheetView::go_to(const LogBox& box)
{
    go_to(model_->index_of(box));
}

void LogSheetView::currentChanged(const QModelIndex& current, const QModelIndex& previous)
{
    QTableView::currentChanged(current, previous);
    labels_->set_current(current.row());
    emit current_box_changed();
}

QModelIndex LogSheetView::moveCursor(CursorAction action, Qt::KeyboardModifiers modifiers)
{
    if (!model_ || !currentIndex().isValid())
        return QTableView::moveCursor(action, modifiers);
    switch (action) {
    case MoveUp:
        return neighbour(*model_, currentIndex(), -1, 0);
    case MoveDown:
        return neighbour(*model_, currentIndex(), 1, 0);
    case MoveLeft:
        return neighbour(*model_, currentIndex(), 0, -1);
    case MoveRight:
        return neighbour(*model_, currentIndex(), 0, 1);
    default:
        break;
    }
    const QModelIndex target = QTableView::moveCursor(action, modifiers);
    return model_->box(target)
               ? target
               : neighbour(*model_, target, action == MovePageUp || action == MoveHome ? 1 : -1, 0);
}

// ------------------------------------------------------------------------------------------- editing

void LogSheetView::editor_made(BoxEdit* editor)
{
    editor_ = editor;
    connect(editor, &BoxEdit::leave, this, &LogSheetView::leave_editor);
    connect(editor, &BoxEdit::textEdited, this, &LogSheetView::typing);
    connect(editor, &BoxEdit::give_up, this, [this] {
        if (const auto box = model_->box(editor_->index))
            model_->forget_unreadable(*box);
        close_editor();
        emit current_box_changed();
    });
}

bool LogSheetView::is_editing() const
{
    return !editor_.isNull();
}

void LogSheetView::close_editor()
{
    if (!editor_)
        return;
    BoxEdit* editor = editor_;
    editor_.clear();
    closeEditor(editor, QAbstractItemDelegate::NoHint);
    setFocus();
}

bool LogSheetView::finish_editing()
{
    if (!editor_)
        return true;
    const bool reason_kept =
        editor_->text().isEmpty() && editor_->index.data(LogSheetModel::missing_role).toBool();
    const bool read = reason_kept || model_->setData(editor_->index, editor_->text());
    close_editor();
    return read;
}

void LogSheetView::leave_editor(int key, Qt::KeyboardModifiers modifiers)
{
    finish_editing();
    if ((modifiers & Qt::ControlModifier) && (key == Qt::Key_PageUp || key == Qt::Key_PageDown)) {
        go_to_section(key == Qt::Key_PageDown);
        return;
    }
    if (walk_key(key, modifiers))
        return;
    const CursorAction action = key == Qt::Key_Up       ? MoveUp
                                : key == Qt::Key_Down   ? MoveDown
                                : key == Qt::Key_Left   ? MoveLeft
                                : key == Qt::Key_Right  ? MoveRight
                                : key == Qt::Key_PageUp ? MovePageUp
                                                        : MovePageDown;
    go_to(moveCursor(action, modifiers));
}

void LogSheetView::begin_edit(const QString& first)
{
    if (!current_box())
        return;
    edit(currentIndex());
    if (editor_ && !first.isEmpty())
        editor_->begin_typing(first);
}

// ------------------------------------------------------------------------------------ blocks of boxes

QModelIndexList LogSheetView::selected_boxes() const
{
    QModelIndexList boxes;
    for (const QModelIndex& index : selectionModel()->selectedIndexes())
        if (model_->box(index))
            boxes << index;
    if (boxes.isEmpty() && current_box())
        boxes << currentIndex();
    std::sort(boxes.begin(), boxes.end());
    return boxes;
}

void LogSheetView::copy()
{
    QItemSelection selection = selectionModel()->selection();
    if (selection.isEmpty())
        selection.select(currentIndex(), currentIndex());
    QGuiApplication::clipboard()->setText(block_of(*model_, selection, decimal_sign_));
}

void LogSheetView::cut()
{
    copy();
    clear_boxes();
}

void LogSheetView::paste()
{
    const QString text = QGuiApplication::clipboard()->text();
    if (text.isEmpty() || !currentIndex().isValid())
        return;
    QModelIndex from = currentIndex();
    for (const QModelIndex& index : selected_boxes())
        from = model_->index(std::min(from.row(), index.row()), std::min(from.column(), index.column()));
    const PastePlan plan = plan_paste(*model_, from, text);
    if (!plan.refused.empty()) {
        emit paste_refused(plan);
        return;
    }
    apply_paste(*model_, plan);
    emit pasted(static_cast<int>(plan.values.size()));
}

void LogSheetView::clear_boxes()
{
    const QModelIndexList boxes = selected_boxes();
    QUndoStack& undo = model_->undo_stack();
    if (boxes.size() > 1)
        undo.beginMacro(tr("empty %1 boxes").arg(boxes.size()));
    for (const QModelIndex& index : boxes)
        model_->put(without_value(*model_->box(index), MissingReason::none),
                    tr("empty %1").arg(model_->box_name(*model_->box(index))));
    if (boxes.size() > 1)
        undo.endMacro();
}

void LogSheetView::set_reason(MissingReason reason)
{
    const QModelIndexList boxes = selected_boxes();
    QUndoStack& undo = model_->undo_stack();
    const QString words = QString::fromStdString(missing_text(reason));
    if (boxes.size() > 1)
        undo.beginMacro(tr("mark %1 boxes %2").arg(boxes.size()).arg(words));
    for (const QModelIndex& index : boxes)
        model_->put(without_value(*model_->box(index), reason),
                    tr("mark %1 %2").arg(model_->box_name(*model_->box(index)), words));
    if (boxes.size() > 1)
        undo.endMacro();
    else
        walk_key(Qt::Key_Return, Qt::NoModifier);
}

} // namespace evenstroke
