// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/figure_table_model.h"

namespace evenstroke {

void FigureTableModel::show_table(FigureTable table)
{
    beginResetModel();
    table_ = std::move(table);
    endResetModel();
}

int FigureTableModel::rowCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(table_.rows.size());
}

int FigureTableModel::columnCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(table_.heading.size());
}

QVariant FigureTableModel::data(const QModelIndex& index, int role) const
{
    if (!checkIndex(index, CheckIndexOption::IndexIsValid))
        return {};
    if (role == Qt::DisplayRole)
        return table_.rows[static_cast<std::size_t>(index.row())].value(index.column());
    if (role == Qt::TextAlignmentRole)
        return static_cast<int>((index.column() == 0 ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    return {};
}

QVariant FigureTableModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    return orientation == Qt::Horizontal && role == Qt::DisplayRole ? QVariant(table_.heading.value(section)) : QVariant();
}

} // namespace evenstroke
