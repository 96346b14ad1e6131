// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/settings/engine_draft.h"

#include <QAbstractTableModel>

#include <functional>
#include <vector>

namespace evenstroke {

/// What one column of an engine's table shows and what typing into it means.
struct EngineColumn
{
    QString title;
    bool number = false, editable = true, names_quantity = false;
    std::function<QString(const Engine&, int row)> show;
    std::function<std::optional<Problem>(Engine&, int row, const QString& text)> set = {};
};

/// Limits, instruments or coefficients of an engine draft, one row each, and an empty row at the end for the
/// next one. Knows nothing of what the columns mean.
class EngineTable : public QAbstractTableModel
{
    Q_OBJECT

public:
    struct Kind
    {
        QString name; ///< for the undo list: "limit"
        std::vector<EngineColumn> columns;
        std::function<int(const Engine&)> rows;
        std::function<void(Engine&, int row)> remove;
        bool fixed = false; ///< always the same rows: none is added
    };

    EngineTable(EngineDraft& draft, Kind kind, QObject* parent = nullptr);
    void remove_row(int row);
    const std::vector<EngineColumn>& columns() const { return kind_.columns; }

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role) const override;
    Qt::ItemFlags flags(const QModelIndex& index) const override;
    bool setData(const QModelIndex& index, const QVariant& text, int role) override;

signals:
    void refused(const QString& words);

private:
    int rows() const { return kind_.rows(draft_.state().engine); }
    EngineDraft& draft_;
    Kind kind_;
    int shown_rows_ = 0;
};

EngineTable::Kind limits_table();
EngineTable::Kind instruments_table();
EngineTable::Kind coefficients_table();
EngineTable::Kind load_limits_table();
EngineTable::Kind walls_table();

/// The quantity that somebody names by its title or identifier. @par Problems invalid_input with the nearest names
Result<std::string> read_quantity_name(const QString& text);

} // namespace evenstroke
