// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/engine_table.h"

#include "app/desk/number_text.h"
#include "app/settings/engine_fields.h"

namespace evenstroke {

EngineTable::EngineTable(EngineDraft& draft, Kind kind, QObject* parent)
    : QAbstractTableModel(parent), draft_(draft), kind_(std::move(kind)), shown_rows_(rows())
{
    connect(&draft_, &EngineDraft::changed, this, [this] {
        if (rows() == shown_rows_) {
            if (shown_rows_ > 0)
                emit dataChanged(index(0, 0), index(shown_rows_ - 1, columnCount() - 1));
            return;
        }
        beginResetModel();
        shown_rows_ = rows();
        endResetModel();
    });
}

int EngineTable::rowCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : shown_rows_ + (kind_.fixed ? 0 : 1);
}

int EngineTable::columnCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(kind_.columns.size());
}

QVariant EngineTable::data(const QModelIndex& index, int role) const
{
    if (!checkIndex(index, CheckIndexOption::IndexIsValid))
        return {};
    const EngineColumn& column = kind_.columns[static_cast<std::size_t>(index.column())];
    const bool there = index.row() < shown_rows_ && index.row() < rows();
    switch (role) {
    case Qt::DisplayRole:
        return there ? column.show(draft_.state().engine, index.row()) : index.column() == 0 ? tr("add …") : QString();
    case Qt::EditRole: return there ? column.show(draft_.state().engine, index.row()) : QString();
    case Qt::TextAlignmentRole: return QVariant((column.number ? Qt::AlignRight : Qt::AlignLeft) | Qt::AlignVCenter);
    case Qt::AccessibleTextRole:
        return tr("%1: %2").arg(column.title, there ? column.show(draft_.state().engine, index.row()) : tr("empty"));
    default: return {};
    }
}

QVariant EngineTable::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation != Qt::Horizontal || section < 0 || section >= columnCount())
        return {};
    const EngineColumn& column = kind_.columns[static_cast<std::size_t>(section)];
    if (role == Qt::TextAlignmentRole)
        return QVariant((column.number ? Qt::AlignRight : Qt::AlignLeft) | Qt::AlignVCenter);
    return role == Qt::DisplayRole ? QVariant(column.title) : QVariant();
}

Qt::ItemFlags EngineTable::flags(const QModelIndex& index) const
{
    const Qt::ItemFlags usual = QAbstractTableModel::flags(index);
    if (!index.isValid())
        return usual;
    const bool first = index.column() == 0;
    const bool editable = kind_.columns[static_cast<std::size_t>(index.column())].editable && (index.row() < shown_rows_ || first);
    return editable ? usual | Qt::ItemIsEditable : usual;
}

bool EngineTable::setData(const QModelIndex& index, const QVariant& text, int role)
{
    if (role != Qt::EditRole || !checkIndex(index, CheckIndexOption::IndexIsValid) || !(flags(index) & Qt::ItemIsEditable))
        return false;
    const QString typed = text.toString().trimmed();
    if (typed == data(index, Qt::EditRole).toString())
        return true;
    EngineDraft::State state = draft_.state();
    if (const auto problem = kind_.columns[static_cast<std::size_t>(index.column())].set(state.engine, index.row(), typed)) {
        emit refused(to_qstring(problem->text()));
        return false;
    }
    draft_.change(state, kind_.name);
    return true;
}

void EngineTable::remove_row(int row)
{
    if (row < 0 || row >= rows())
        return;
    EngineDraft::State state = draft_.state();
    kind_.remove(state.engine, row);
    draft_.change(state, kind_.name);
}

} // namespace evenstroke
