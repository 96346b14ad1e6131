// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/box_edit.h"

#include "app/desk/theme.h"
#include "app/entry/log_sheet_model.h"

#include <QKeyEvent>
#include <QPainter>

namespace evenstroke {
namespace {

constexpr int mark_width = 14, side_room = 5;

void paint_heading(QPainter& painter, const QRect& area, const QModelIndex& index)
{
    painter.setFont(type(TypeSize::label));
    painter.setPen(theme().muted);
    const QRect room = area.adjusted(0, 0, -side_room, -4);
    QString words = index.data().toString();
    if (painter.fontMetrics().horizontalAdvance(words) > room.width())
        words = words.section(u' ', 0, 0); // narrow columns of many cylinders: "last" for "last time"
    painter.drawText(room, Qt::AlignRight | Qt::AlignBottom, words);
    painter.setPen(QPen(theme().muted, 1));
    painter.drawLine(area.bottomLeft(), area.bottomRight());
}

void paint_beside(QPainter& painter, const QRect& area, const QModelIndex& index)
{
    painter.setFont(type(TypeSize::label));
    painter.setPen(theme().muted);
    painter.drawText(area.adjusted(0, 0, -side_room, 0), Qt::AlignRight | Qt::AlignVCenter,
                     index.data().toString());
}

/// For the narrow columns of engines with many cylinders.
QString short_reason(const QString& reason)
{
    if (reason == QString::fromStdString(missing_text(MissingReason::out_of_order)))
        return BoxDelegate::tr("defect");
    return reason == QString::fromStdString(missing_text(MissingReason::not_fitted))
               ? BoxDelegate::tr("none")
               : BoxDelegate::tr("unread");
}

void paint_mark(QPainter& painter, const QRectF& place, BoxMark mark)
{
    if (mark == BoxMark::asked)
        draw_mark(painter, place, Level::ask);
    else if (mark == BoxMark::impossible || mark == BoxMark::unreadable)
        draw_mark(painter, place, Level::act);
    else if (mark == BoxMark::confirmed) {
        painter.setFont(type(TypeSize::label));
        painter.setPen(theme().muted);
        painter.drawText(place, Qt::AlignCenter, QStringLiteral("✓"));
    }
}

/// The row and the column a user of keys may be typing in must be seen without hunting for the frame.
QColor background_of(const QStyleOptionViewItem& option, bool lent)
{
    if (option.state & QStyle::State_Selected)
        return theme().band;
    return lent ? theme().page : theme().sheet;
}

} // namespace

BoxEdit::BoxEdit(QWidget* parent) : QLineEdit(parent)
{
    setFrame(false);
    setAttribute(Qt::WA_InputMethodEnabled, true);
}

void BoxEdit::begin_typing(const QString& first)
{
    typing_ = true;
    setText(first);
    setCursorPosition(static_cast<int>(first.size()));
    emit textEdited(first);
}

bool BoxEdit::only_modifies(int key)
{
    switch (key) {
    case Qt::Key_Shift:
    case Qt::Key_Control:
    case Qt::Key_Meta:
    case Qt::Key_Alt:
    case Qt::Key_AltGr:
    case Qt::Key_CapsLock:
    case Qt::Key_NumLock:
    case Qt::Key_ScrollLock:
    case Qt::Key_Super_L:
    case Qt::Key_Super_R:
    case Qt::Key_Hyper_L:
    case Qt::Key_Hyper_R:
    case Qt::Key_Mode_switch:
    case Qt::Key_Multi_key:
        return true;
    default:
        return key == Qt::Key_unknown || (key >= Qt::Key_Dead_Grave && key <= Qt::Key_Dead_Longsolidusoverlay);
    }
}

bool BoxEdit::event(QEvent* event)
{
    // The page's own keys are not the line's: Ctrl+D would delete here, Ctrl+U empty the box.
    if (event->type() == QEvent::ShortcutOverride) {
        const auto* key = static_cast<QKeyEvent*>(event);
        if (key->modifiers() == Qt::ControlModifier &&
            (key->key() == Qt::Key_D || key->key() == Qt::Key_N || key->key() == Qt::Key_Return ||
             key->key() == Qt::Key_Enter)) {
            event->ignore();
            return true;
        }
    }
    // Tab would move the focus before keyPressEvent sees it.
    if (event->type() == QEvent::KeyPress) {
        auto* key = static_cast<QKeyEvent*>(event);
        if (key->key() == Qt::Key_Tab || key->key() == Qt::Key_Backtab) {
            keyPressEvent(key);
            return true;
        }
    }
    return QLineEdit::event(event);
}

void BoxEdit::keyPressEvent(QKeyEvent* event)
{
    if (only_modifies(event->key())) {
        event->accept(); // the table behind must not take it for a key of its own
        return;
    }
    if (event->key() == Qt::Key_U && event->modifiers() == Qt::ControlModifier) {
        event->ignore(); // the unit of the row
        return;
    }
    switch (event->key()) {
    case Qt::Key_Escape:
        emit give_up();
        return;
    case Qt::Key_Return:
    case Qt::Key_Enter:
    case Qt::Key_Tab:
    case Qt::Key_Backtab:
    case Qt::Key_Up:
    case Qt::Key_Down:
    case Qt::Key_PageUp:
    case Qt::Key_PageDown:
        emit leave(event->key(), event->modifiers());
        return;
    case Qt::Key_Left:
    case Qt::Key_Right:
        if (typing_ && event->modifiers() == Qt::NoModifier) {
            emit leave(event->key(), event->modifiers());
            return;
        }
        break;
    case Qt::Key_F2:
        typing_ = false;
        return;
    default:
        break;
    }
    QLineEdit::keyPressEvent(event);
}

void BoxDelegate::paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const
{
    painter->save();
    if (index.data(LogSheetModel::heading_role).toBool())
        paint_heading(*painter, option.rect, index);
    else if (index.flags() & Qt::ItemIsEditable)
        paint_box(*painter, option, index);
    else if (index.data(LogSheetModel::beside_role).toBool())
        paint_beside(*painter, option.rect, index);
    painter->restore();
}

void BoxDelegate::paint_box(QPainter& painter, const QStyleOptionViewItem& option,
                            const QModelIndex& index) const
{
    const bool lent = index.data(LogSheetModel::lent_role).toBool();
    const bool missing = index.data(LogSheetModel::missing_role).toBool();
    const auto mark = static_cast<BoxMark>(index.data(LogSheetModel::mark_role).toInt());
    const QRect box = option.rect.adjusted(1, 1, -1, -1);
    painter.fillRect(box, background_of(option, lent));
    painter.setPen(QPen(theme().rule, 1));
    painter.drawRect(box.adjusted(0, 0, -1, -1));
    if (option.state & QStyle::State_HasFocus) {
        painter.setPen(QPen(theme().line, 2));
        painter.drawRect(box.adjusted(1, 1, -1, -1));
    }
    painter.setFont(type(missing ? TypeSize::label : TypeSize::body));
    const bool words = index.data(LogSheetModel::words_role).toBool();
    QString text = index.data().toString();
    int room = box.width() - 2 * side_room;
    if (missing && painter.fontMetrics().horizontalAdvance(text) > room)
        text = short_reason(text);
    // In a narrow column the number needs the whole width: the mark then shrinks into the corner.
    const bool beside = painter.fontMetrics().horizontalAdvance(text) + mark_width <= room;
    if (painter.fontMetrics().horizontalAdvance(text) > room) {
        painter.setFont(type(TypeSize::label));
        room = box.width() - 4;
    }
    text = painter.fontMetrics().elidedText(text, Qt::ElideRight, room);
    const QRect area =
        QRect(0, 0, room, box.height()).translated(box.left() + (box.width() - room) / 2, box.top());
    painter.setPen(mark == BoxMark::unreadable ? theme().act : missing || lent ? theme().muted : theme().ink);
    painter.drawText(area.adjusted(words && mark != BoxMark::none ? mark_width : 0, 0, 0, 0),
                     static_cast<int>((words ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter), text);
    paint_mark(painter,
               beside || words ? QRectF(box.left() + 2, box.center().y() - 5, 11, 11)
                               : QRectF(box.left() + 1, box.top() + 1, 7, 7),
               mark);
}

QSize BoxDelegate::sizeHint(const QStyleOptionViewItem&, const QModelIndex&) const
{
    return {56, 24};
}

QWidget* BoxDelegate::createEditor(QWidget* parent, const QStyleOptionViewItem&,
                                   const QModelIndex& index) const
{
    auto* editor = new BoxEdit(parent);
    editor->index = index;
    editor->setFont(type(TypeSize::body));
    const bool words = index.data(LogSheetModel::words_role).toBool();
    editor->setAlignment((words ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    editor->setAccessibleName(index.data(Qt::AccessibleTextRole).toString());
    emit editor_made(editor);
    return editor;
}

void BoxDelegate::setEditorData(QWidget* editor, const QModelIndex& index) const
{
    auto* edit = qobject_cast<BoxEdit*>(editor);
    // Also called whenever the model changes: what is being typed must not be written over.
    if (!edit || edit->isModified() || !edit->text().isEmpty())
        return;
    const bool reason = index.data(LogSheetModel::missing_role).toBool();
    edit->setText(reason ? QString() : index.data(Qt::EditRole).toString());
    edit->selectAll();
}

void BoxDelegate::setModelData(QWidget* editor, QAbstractItemModel* model, const QModelIndex& index) const
{
    // A reason is shown as words but edited as an empty box: leaving it untouched keeps it.
    const auto* edit = qobject_cast<BoxEdit*>(editor);
    if (!edit || (edit->text().isEmpty() && index.data(LogSheetModel::missing_role).toBool()))
        return;
    model->setData(index, edit->text());
}

void BoxDelegate::updateEditorGeometry(QWidget* editor, const QStyleOptionViewItem& option,
                                       const QModelIndex&) const
{
    editor->setGeometry(option.rect.adjusted(0, 0, 0, 0));
}

bool BoxDelegate::eventFilter(QObject* object, QEvent* event)
{
    if (event->type() == QEvent::KeyPress || event->type() == QEvent::ShortcutOverride)
        return false; // BoxEdit knows its keys; Enter and Tab go where the walk goes
    return QStyledItemDelegate::eventFilter(object, event);
}

} // namespace evenstroke
