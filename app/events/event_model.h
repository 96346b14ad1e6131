// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <QAbstractTableModel>

#include <vector>

namespace evenstroke {

/// The diary as a table, newest first. Holds and shows; changes go through EventDiary.
class EventModel : public QAbstractTableModel
{
    Q_OBJECT

public:
    enum Column { date, hours, part, what, comparison, note, columns };

    explicit EventModel(QObject* parent = nullptr);
    /// @param readings for the hour counter at events that were entered without it
    void show(const Engine& engine, std::vector<Event> events, const std::vector<Reading>& readings);
    const Event* event(int row) const;
    int row_of(const QString& id) const; ///< -1: not there
    QString text_of(const Event& event, int column) const;

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role) const override;

private:
    Engine engine_;
    std::vector<Event> events_;
    std::vector<QString> hours_;
};

} // namespace evenstroke
