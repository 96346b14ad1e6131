// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/board/board.h"

#include <QAbstractTableModel>

namespace evenstroke {

/// The board as a table: one column a cylinder, one row a quantity, then rows that hold the engine's own values
/// side by side, each over `engine_span` columns. Holds and names; computes nothing.
class BoardModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    using QAbstractTableModel::QAbstractTableModel;
    void set_board(Board board, int engine_span);
    const Board& board() const { return board_; }

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role = Qt::DisplayRole) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role = Qt::DisplayRole) const override;
    Qt::ItemFlags flags(const QModelIndex& index) const override;

    int cylinder_rows() const { return static_cast<int>(board_.rows.size()); }
    int engine_span() const { return engine_span_; }
    int engine_cells_in_row() const;
    bool is_engine_row(int row) const { return row >= cylinder_rows(); }
    /// Null where the table has no cell: right of the last of the engine's values.
    const BoardCell* cell(const QModelIndex& index) const;
    QModelIndex find(QuantityId quantity, const Place& place) const;

private:
    Board board_;
    int engine_span_ = 1;
};

} // namespace evenstroke
