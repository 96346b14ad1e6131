// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/desk/workplace.h"

#include <QAbstractTableModel>

#include <vector>

namespace evenstroke {

/// One line an engine, worst first; the quiet ones folded into one line until it is opened.
class FleetModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    /// Ship with engine, last reading, a strip a quantity group, the sentence.
    enum Column { ship = 0, last_reading = 1, first_strip = 2, sentence = first_strip + fleet_strip_count, column_count };

    using QAbstractTableModel::QAbstractTableModel;
    void show_fleet(std::vector<FleetRow> rows, TimePoint now);
    void unfold(bool unfolded);
    bool unfolded() const { return unfolded_; }

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role = Qt::DisplayRole) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role = Qt::DisplayRole) const override;

    /// The line "31 engines quiet"; engines that learn or have no data are counted apart.
    bool is_fold(int row) const { return row == troubled_ && quiet() > 0; }
    /// Null for the fold line.
    const FleetRow* row(int number) const;
    int row_of(const QString& engine_id) const; ///< -1: not shown
    int engines() const { return static_cast<int>(rows_.size()); }
    int quiet() const { return engines() - troubled_; }
    QString fold_text() const;
    QString last_reading_words(const FleetRow& row) const;
    bool is_late(const FleetRow& row) const;
    QString sentence_words(const FleetRow& row) const;

private:
    QString spoken(const FleetRow& row) const;
    std::vector<FleetRow> rows_; ///< troubled ones first
    int troubled_ = 0;
    bool unfolded_ = false;
    TimePoint now_{};
};

} // namespace evenstroke
