// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/reading/figure.h"

#include <QAbstractTableModel>

namespace evenstroke {

/// The numbers of a figure as a table, for readers of the screen and for whoever wants the digits.
class FigureTableModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    using QAbstractTableModel::QAbstractTableModel;
    void show_table(FigureTable table);
    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role = Qt::DisplayRole) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role = Qt::DisplayRole) const override;

private:
    FigureTable table_;
};

} // namespace evenstroke
