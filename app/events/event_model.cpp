// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/events/event_model.h"

#include "app/desk/number_text.h"
#include "core/explanation/event_effect.h"
#include "core/reading/running_hours.h"

namespace evenstroke {

EventModel::EventModel(QObject* parent) : QAbstractTableModel(parent) {}

void EventModel::show(const Engine& engine, std::vector<Event> events, const std::vector<Reading>& readings)
{
    beginResetModel();
    engine_ = engine;
    events_ = std::move(events);
    hours_.clear();
    for (const Event& event : events_) {
        const auto counter = event.running_hours ? event.running_hours : running_hours_at(readings, event.date.utc);
        const QString number = counter ? whole_text(*counter) : QString();
        hours_.push_back(event.running_hours || number.isEmpty() ? number : tr("about %1").arg(number));
    }
    endResetModel();
}

const Event* EventModel::event(int row) const
{
    return row >= 0 && row < static_cast<int>(events_.size()) ? &events_[static_cast<std::size_t>(row)] : nullptr;
}

int EventModel::row_of(const QString& id) const
{
    for (std::size_t row = 0; row < events_.size(); ++row)
        if (to_qstring(events_[row].id) == id)
            return static_cast<int>(row);
    return -1;
}

int EventModel::rowCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(events_.size());
}

int EventModel::columnCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : columns;
}

QString EventModel::text_of(const Event& event, int column) const
{
    switch (column) {
    case date: return day_text(event.date.utc);
    case part: return place_title(engine_, event.place);
    case what: {
        const EventKind* kind = find_event_kind(event.kind);
        return kind ? to_qstring(kind->title) : to_qstring(event.kind);
    }
    case comparison: return to_qstring(event_effect_word(event));
    case note: {
        QStringList words;
        for (const std::string& one : {event.note, event.part, event.done_by})
            if (!one.empty())
                words.append(to_qstring(one));
        return words.join(QStringLiteral(" · "));
    }
    default: return {};
    }
}

QVariant EventModel::data(const QModelIndex& index, int role) const
{
    const Event* one = event(index.row());
    if (!one || !checkIndex(index, CheckIndexOption::IndexIsValid))
        return {};
    const QString shown = index.column() == hours ? hours_[static_cast<std::size_t>(index.row())] : text_of(*one, index.column());
    switch (role) {
    case Qt::DisplayRole: return shown;
    case Qt::TextAlignmentRole:
        return index.column() == hours ? QVariant(Qt::AlignRight | Qt::AlignVCenter) : QVariant(Qt::AlignLeft | Qt::AlignVCenter);
    case Qt::ToolTipRole: return to_qstring(event_effect_sentence(*one, engine_));
    case Qt::AccessibleTextRole:
        return tr("%1: %2").arg(headerData(index.column(), Qt::Horizontal, Qt::DisplayRole).toString(), shown.isEmpty() ? tr("empty") : shown);
    default: return {};
    }
}

QVariant EventModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation != Qt::Horizontal)
        return {};
    if (role == Qt::TextAlignmentRole)
        return section == hours ? QVariant(Qt::AlignRight | Qt::AlignVCenter) : QVariant(Qt::AlignLeft | Qt::AlignVCenter);
    if (role != Qt::DisplayRole)
        return {};
    switch (section) {
    case date: return tr("Date");
    case hours: return tr("Running hours");
    case part: return tr("Where");
    case what: return tr("What was done");
    case comparison: return tr("Comparison");
    case note: return tr("Note");
    default: return {};
    }
}

} // namespace evenstroke
