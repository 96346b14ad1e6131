// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/quantity_delegate.h"

#include "app/desk/number_text.h"

#include <QClipboard>
#include <QCompleter>
#include <QGuiApplication>
#include <QKeyEvent>
#include <QLineEdit>

namespace evenstroke {

QWidget* QuantityDelegate::createEditor(QWidget* parent, const QStyleOptionViewItem&, const QModelIndex&) const
{
    QStringList titles;
    for (const Quantity& of : all_quantities())
        if (of.type == ValueType::number && !titles.contains(to_qstring(of.title)))
            titles.append(to_qstring(of.title));
    auto* line = new QLineEdit(parent);
    line->setFrame(false);
    auto* completer = new QCompleter(titles, line);
    completer->setCaseSensitivity(Qt::CaseInsensitive);
    completer->setFilterMode(Qt::MatchContains);
    line->setCompleter(completer);
    return line;
}

bool BaselineDelegate::eventFilter(QObject* editor, QEvent* event)
{
    if (event->type() == QEvent::KeyPress && static_cast<QKeyEvent*>(event)->matches(QKeySequence::Paste)) {
        const QString text = QGuiApplication::clipboard()->text().trimmed();
        if (text.contains(QLatin1Char('\t')) || text.contains(QLatin1Char('\n'))) {
            emit closeEditor(static_cast<QWidget*>(editor), QAbstractItemDelegate::RevertModelCache);
            emit table_pasted();
            return true;
        }
    }
    return QStyledItemDelegate::eventFilter(editor, event);
}

} // namespace evenstroke
