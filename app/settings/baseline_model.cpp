// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/settings/baseline_model.h"

#include "app/desk/number_text.h"
#include "app/settings/engine_fields.h"

#include <algorithm>
#include <set>

namespace evenstroke {
namespace {

QString title_of(const std::string& name)
{
    const auto id = find_quantity(name);
    if (!id)
        return to_qstring(name);
    const QString in = unit_text(*id);
    return in.isEmpty() ? quantity_title(*id) : EngineDraft::tr("%1, %2").arg(quantity_title(*id), in);
}

} // namespace

BaselineModel::BaselineModel(EngineDraft& draft, QObject* parent) : QAbstractTableModel(parent), draft_(draft)
{
    collect();
    connect(&draft_, &EngineDraft::changed, this, [this] {
        beginResetModel();
        collect();
        endResetModel();
    });
}

void BaselineModel::collect()
{
    std::set<std::string> names(added_.begin(), added_.end());
    for (const BaselinePoint& point : draft_.state().engine.baseline)
        for (const auto& [name, value] : point.values)
            names.insert(name);
    rows_ = {std::string()};
    for (const Quantity& of : all_quantities())
        if (names.erase(of.name) > 0)
            rows_.push_back(of.name);
    rows_.insert(rows_.end(), names.begin(), names.end()); // kept though not known here
}

const std::string& BaselineModel::quantity_of(int row) const
{
    static const std::string none;
    return row > 0 && row < static_cast<int>(rows_.size()) ? rows_[static_cast<std::size_t>(row)] : none;
}

int BaselineModel::row_of(const std::string& quantity) const
{
    const auto found = std::find(rows_.begin() + 1, rows_.end(), quantity);
    return found == rows_.end() ? -1 : static_cast<int>(found - rows_.begin());
}

void BaselineModel::add_quantity(const std::string& name)
{
    if (row_of(name) >= 0)
        return;
    beginResetModel();
    added_.push_back(name);
    collect();
    endResetModel();
}

void BaselineModel::remove_quantity(int row)
{
    const std::string name = quantity_of(row);
    if (name.empty())
        return;
    std::erase(added_, name);
    EngineDraft::State state = draft_.state();
    for (BaselinePoint& point : state.engine.baseline)
        point.values.erase(name);
    draft_.change(state, title_of(name));
}

std::optional<Problem> BaselineModel::add_load(const QString& text)
{
    const auto load = read_box(text);
    if (!load.has_value())
        return load.error();
    if (!load.value())
        return invalid_input("No load is typed.", "Type a load in per cent of rated power.");
    EngineDraft::State state = draft_.state();
    auto& points = state.engine.baseline;
    const auto after = std::find_if(points.begin(), points.end(), [&](const BaselinePoint& point) { return point.mode.empty() && point.load_percent >= *load.value(); });
    if (after != points.end() && after->load_percent == *load.value())
        return invalid_input("The baseline has a point at this load already.", "Change the values of its column.");
    points.insert(after, {*load.value(), "", {}});
    draft_.change(state, tr("load"));
    return std::nullopt;
}

void BaselineModel::remove_load(int column)
{
    EngineDraft::State state = draft_.state();
    if (column < 0 || column >= static_cast<int>(state.engine.baseline.size()))
        return;
    state.engine.baseline.erase(state.engine.baseline.begin() + column);
    draft_.change(state, tr("load"));
}

int BaselineModel::rowCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(rows_.size());
}

int BaselineModel::columnCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(draft_.state().engine.baseline.size());
}

QString BaselineModel::cell(int row, int column) const
{
    const BaselinePoint& point = draft_.state().engine.baseline[static_cast<std::size_t>(column)];
    if (row == 0)
        return plain_text(point.load_percent);
    const auto found = point.values.find(quantity_of(row));
    return found == point.values.end() ? QString() : plain_text(found->second);
}

QVariant BaselineModel::data(const QModelIndex& index, int role) const
{
    if (!checkIndex(index, CheckIndexOption::IndexIsValid))
        return {};
    switch (role) {
    case Qt::DisplayRole:
    case Qt::EditRole: return cell(index.row(), index.column());
    case Qt::TextAlignmentRole: return QVariant(Qt::AlignRight | Qt::AlignVCenter);
    case Qt::AccessibleTextRole:
        return tr("%1 at load %2: %3").arg(headerData(index.row(), Qt::Vertical, Qt::DisplayRole).toString(), cell(0, index.column()),
                                           cell(index.row(), index.column()).isEmpty() ? tr("empty") : cell(index.row(), index.column()));
    default: return {};
    }
}

QVariant BaselineModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation == Qt::Vertical) {
        if (role == Qt::DisplayRole)
            return section == 0 ? tr("Load, %") : title_of(quantity_of(section));
        return role == Qt::TextAlignmentRole ? QVariant(Qt::AlignLeft | Qt::AlignVCenter) : QVariant();
    }
    const auto& points = draft_.state().engine.baseline;
    if (section < 0 || section >= static_cast<int>(points.size()))
        return {};
    if (role == Qt::DisplayRole)
        return points[static_cast<std::size_t>(section)].mode.empty() ? tr("point %1").arg(section + 1) : to_qstring(points[static_cast<std::size_t>(section)].mode);
    return role == Qt::TextAlignmentRole ? QVariant(Qt::AlignRight | Qt::AlignVCenter) : QVariant();
}

Qt::ItemFlags BaselineModel::flags(const QModelIndex& index) const
{
    const Qt::ItemFlags usual = QAbstractTableModel::flags(index);
    return index.isValid() ? usual | Qt::ItemIsEditable : usual;
}

bool BaselineModel::setData(const QModelIndex& index, const QVariant& text, int role)
{
    if (role != Qt::EditRole || !checkIndex(index, CheckIndexOption::IndexIsValid))
        return false;
    if (text.toString().trimmed() == cell(index.row(), index.column()))
        return true;
    const auto number = read_box(text.toString());
    if (!number.has_value() || (index.row() == 0 && !number.value())) {
        emit refused(number.has_value() ? tr("A point needs its load. To take the point away, choose \u201cremove load\u201d.") : to_qstring(number.error().text()));
        return false;
    }
    EngineDraft::State state = draft_.state();
    BaselinePoint& point = state.engine.baseline[static_cast<std::size_t>(index.column())];
    const std::string name = quantity_of(index.row());
    if (index.row() == 0)
        point.load_percent = *number.value();
    else if (number.value())
        point.values[name] = *number.value();
    else
        point.values.erase(name);
    draft_.change(state, index.row() == 0 ? tr("load") : title_of(name));
    return true;
}

} // namespace evenstroke
