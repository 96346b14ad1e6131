// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/board/board_model.h"

#include <algorithm>

namespace evenstroke {

void BoardModel::set_board(Board board, int engine_span)
{
    beginResetModel();
    board_ = std::move(board);
    engine_span_ = std::max(1, engine_span);
    endResetModel();
}

int BoardModel::engine_cells_in_row() const { return std::max(1, columnCount() / engine_span_); }

int BoardModel::rowCount(const QModelIndex& parent) const
{
    if (parent.isValid() || board_.cylinders.empty())
        return 0;
    const int in_row = engine_cells_in_row(), cells = static_cast<int>(board_.engine.size());
    return cylinder_rows() + (cells + in_row - 1) / in_row;
}

int BoardModel::columnCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(board_.cylinders.size());
}

const BoardCell* BoardModel::cell(const QModelIndex& index) const
{
    if (!index.isValid())
        return nullptr;
    if (!is_engine_row(index.row()))
        return &board_.rows[static_cast<std::size_t>(index.row())].cells[static_cast<std::size_t>(index.column())];
    if (index.column() % engine_span_ != 0 || index.column() / engine_span_ >= engine_cells_in_row())
        return nullptr;
    const int number =
        (index.row() - cylinder_rows()) * engine_cells_in_row() + index.column() / engine_span_;
    return number < static_cast<int>(board_.engine.size()) ? &board_.engine[static_cast<std::size_t>(number)] : nullptr;
}

QModelIndex BoardModel::find(QuantityId quantity, const Place& place) const
{
    for (int row = 0; row < rowCount(); ++row)
        for (int column = 0; column < columnCount(); ++column) {
            const BoardCell* found = cell(index(row, column));
            if (found && found->quantity == quantity && found->place == place)
                return index(row, column);
        }
    return {};
}

QVariant BoardModel::data(const QModelIndex& index, int role) const
{
    if (!checkIndex(index, CheckIndexOption::IndexIsValid))
        return {};
    const BoardCell* found = cell(index);
    if (!found)
        return {};
    switch (role) {
    case Qt::DisplayRole: return found->number;
    case Qt::AccessibleTextRole:
    case Qt::ToolTipRole: return found->spoken;
    case Qt::TextAlignmentRole: return static_cast<int>(Qt::AlignRight | Qt::AlignVCenter);
    default: return {};
    }
}

QVariant BoardModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (role != Qt::DisplayRole || section < 0)
        return {};
    const auto number = static_cast<std::size_t>(section);
    if (orientation == Qt::Horizontal)
        return number < board_.cylinders.size() ? board_.cylinders[number].title : QVariant();
    if (number < board_.rows.size())
        return board_.rows[number].title;
    return section == cylinder_rows() && section < rowCount() ? tr("The engine") : QString();
}

Qt::ItemFlags BoardModel::flags(const QModelIndex& index) const
{
    if (!index.isValid())
        return Qt::NoItemFlags;
    return cell(index) ? Qt::ItemIsEnabled | Qt::ItemIsSelectable | Qt::ItemNeverHasChildren
                       : Qt::ItemFlags(Qt::ItemNeverHasChildren);
}

} // namespace evenstroke
