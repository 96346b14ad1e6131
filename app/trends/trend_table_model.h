// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"

#include <QAbstractTableModel>

#include <memory>
#include <vector>

namespace evenstroke {

/// The trend as a table, newest reading first: for readers of the screen, for copying and for files.
class TrendTableModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    enum Column { date, load, read, corrected, expected, deviation, apart, uncertainty, remark, column_count };

    using QAbstractTableModel::QAbstractTableModel;
    void show_trend(std::shared_ptr<const Judgement> judgement, const Trend* trend);
    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role = Qt::DisplayRole) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role = Qt::DisplayRole) const override;

    std::size_t reading_of(int row) const;
    int row_of(std::size_t reading) const; ///< -1 where it is not in the table: Qt's way of saying no row
    /// Tab-separated for the clipboard, or comma-separated with a heading for files (RFC 4180), where numbers keep
    /// a plain minus sign and the date is ISO 8601.
    QString as_text() const;
    QByteArray as_csv() const;

private:
    const TrendPoint& point(int row) const;
    std::optional<double> number(const TrendPoint& point, int column) const;
    QString remark_text(const TrendPoint& point) const;
    std::shared_ptr<const Judgement> judgement_;
    const Trend* trend_ = nullptr;
};

} // namespace evenstroke
