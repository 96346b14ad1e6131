// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/quantity_delegate.h"

#include "app/desk/number_text.h"

#include <QCompleter>
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

} // namespace evenstroke
