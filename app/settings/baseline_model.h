// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/settings/engine_draft.h"

#include <QAbstractTableModel>

namespace evenstroke {

/// The baseline as a table: a row a quantity, a column a load; the first row holds the loads themselves.
class BaselineModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    explicit BaselineModel(EngineDraft& draft, QObject* parent = nullptr);

    /// Name of the quantity of a row; empty for the row of loads.
    const std::string& quantity_of(int row) const;
    int row_of(const std::string& quantity) const; ///< -1: not there

    void add_quantity(const std::string& name);
    void remove_quantity(int row);
    /// @return what is the matter with the load, if anything
    std::optional<Problem> add_load(const QString& text);
    void remove_load(int column);

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role) const override;
    Qt::ItemFlags flags(const QModelIndex& index) const override;
    bool setData(const QModelIndex& index, const QVariant& text, int role) override;

signals:
    void refused(const QString& words);

private:
    void collect();
    QString cell(int row, int column) const;

    EngineDraft& draft_;
    std::vector<std::string> rows_; ///< names; the first is empty: the loads
    std::vector<std::string> added_; ///< named here and without a value yet
};

} // namespace evenstroke
