// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QStyledItemDelegate>

namespace evenstroke {

/// A line with the titles of all quantities to choose from as one types.
class QuantityDelegate : public QStyledItemDelegate
{
    Q_OBJECT

public:
    using QStyledItemDelegate::QStyledItemDelegate;
    QWidget* createEditor(QWidget* parent, const QStyleOptionViewItem& option, const QModelIndex& index) const override;
};

/// Cells of the baseline: a table on the clipboard that is pasted while a cell is open is a table, not the cell's text.
class BaselineDelegate : public QStyledItemDelegate
{
    Q_OBJECT

public:
    using QStyledItemDelegate::QStyledItemDelegate;

signals:
    void table_pasted();

protected:
    bool eventFilter(QObject* editor, QEvent* event) override;
};

} // namespace evenstroke
