// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/events/key_box.h"

#include "app/desk/theme.h"

#include <QKeyEvent>
#include <QPainter>

namespace evenstroke {

KeyBox::KeyBox(QWidget* parent) : QWidget(parent)
{
    setFocusPolicy(Qt::StrongFocus);
    setAccessibleName(tr("New event"));
    setAccessibleDescription(tr("A letter for what was done, a digit for the cylinder, Enter for today"));
}

void KeyBox::show_line(const QString& line, const QString& placeholder)
{
    line_ = line;
    placeholder_ = placeholder;
    setAccessibleDescription(line.isEmpty() ? placeholder : line);
    update();
}

void KeyBox::paintEvent(QPaintEvent*)
{
    QPainter painter(this);
    const QRect inside = rect().adjusted(0, 0, -1, -1);
    painter.fillRect(rect(), theme().sheet);
    painter.setPen(QPen(hasFocus() ? theme().line : theme().rule, 1.0));
    painter.drawRect(inside);
    const bool empty = line_.isEmpty();
    painter.setFont(type(TypeSize::body, !empty));
    painter.setPen(empty ? theme().muted : theme().ink);
    painter.drawText(inside.adjusted(12, 0, -12, 0), Qt::AlignLeft | Qt::AlignVCenter,
                     painter.fontMetrics().elidedText(empty ? placeholder_ : line_, Qt::ElideRight, inside.width() - 24));
}

void KeyBox::keyPressEvent(QKeyEvent* event)
{
    if ((event->modifiers() & ~(Qt::ShiftModifier | Qt::KeypadModifier)) != Qt::NoModifier)
        return QWidget::keyPressEvent(event);
    switch (event->key()) {
    case Qt::Key_Return:
    case Qt::Key_Enter: emit accepted(); return;
    case Qt::Key_Escape: emit cancelled(); return;
    case Qt::Key_Backspace: emit key_typed(QLatin1Char('\b')); return;
    case Qt::Key_Left: emit day_moved(-1); return;
    case Qt::Key_Right: emit day_moved(1); return;
    case Qt::Key_PageUp: emit day_moved(-30); return;
    case Qt::Key_PageDown: emit day_moved(30); return;
    case Qt::Key_Down: emit left_downwards(); return;
    default: break;
    }
    const QString text = event->text();
    if (text.size() == 1 && (text.front().isLetter() || text.front().isDigit()))
        emit key_typed(text.front());
    else
        QWidget::keyPressEvent(event);
}

void KeyBox::focusInEvent(QFocusEvent* event)
{
    update();
    QWidget::focusInEvent(event);
}

void KeyBox::focusOutEvent(QFocusEvent* event)
{
    update();
    QWidget::focusOutEvent(event);
}

} // namespace evenstroke
