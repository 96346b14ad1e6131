// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_rows_model.h"

#include "app/desk/theme.h"

namespace evenstroke {

void CardRowsModel::show_rows(std::vector<CardRow> rows)
{
    beginResetModel();
    rows_ = std::move(rows);
    endResetModel();
}

int CardRowsModel::rowCount(const QModelIndex& parent) const { return parent.isValid() ? 0 : static_cast<int>(rows_.size()); }
int CardRowsModel::columnCount(const QModelIndex& parent) const { return parent.isValid() ? 0 : column_count; }

QVariant CardRowsModel::data(const QModelIndex& index, int role) const
{
    if (!index.isValid() || index.row() >= rowCount())
        return {};
    const CardRow& row = rows_[static_cast<std::size_t>(index.row())];
    if (role == Qt::TextAlignmentRole)
        return QVariant((index.column() == title ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    if (role == Qt::FontRole)
        return type(TypeSize::label, row.clear && (index.column() == difference || index.column() == title));
    if (role == Qt::ToolTipRole && row.clear && index.column() == difference)
        return tr("differs by more than the uncertainty explains");
    if (role != Qt::DisplayRole)
        return {};
    switch (index.column()) {
    case title: return row.title;
    case now: return row.now;
    case healthy: return row.healthy;
    case difference: return row.difference;
    default: return row.hand_read;
    }
}

QVariant CardRowsModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation != Qt::Horizontal)
        return {};
    if (role == Qt::FontRole)
        return type(TypeSize::label);
    if (role == Qt::TextAlignmentRole)
        return QVariant((section == title ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    if (role != Qt::DisplayRole)
        return {};
    switch (section) {
    case title: return tr("Result");
    case now: return tr("card");
    case healthy: return tr("healthy");
    case difference: return tr("difference");
    default: return tr("by hand");
    }
}

QString CardRowsModel::as_text() const
{
    QStringList lines;
    const auto add = [&](const auto& cell) {
        QStringList cells;
        for (int column = 0; column < column_count; ++column)
            cells.append(cell(column).toString());
        lines.append(cells.join(u'\t'));
    };
    add([this](int column) { return headerData(column, Qt::Horizontal); });
    for (int row = 0; row < rowCount(); ++row)
        add([&](int column) { return data(index(row, column)); });
    return lines.join(u'\n') + u'\n';
}

} // namespace evenstroke
