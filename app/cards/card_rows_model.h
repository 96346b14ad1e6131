// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/cards/card_words.h"

#include <QAbstractTableModel>

namespace evenstroke {

/// The results of a card beside those of the healthy one and what was read by hand.
class CardRowsModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    enum Column { title, now, healthy, difference, hand_read, column_count };
    using QAbstractTableModel::QAbstractTableModel;
    void show_rows(std::vector<CardRow> rows);
    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role = Qt::DisplayRole) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role = Qt::DisplayRole) const override;
    QString as_text() const; ///< tab-separated, with the heading

private:
    std::vector<CardRow> rows_;
};

} // namespace evenstroke
