// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/log_sheet_model.h"

#include "app/desk/number_text.h"
#include "app/entry/entry_commands.h"

#include <algorithm>

namespace evenstroke {

LogSheetModel::LogSheetModel(EntrySheet& sheet, QUndoStack& undo, QObject* parent)
    : QAbstractTableModel(parent), sheet_(sheet), undo_(undo)
{
    connect(&sheet_, &EntrySheet::restarted, this, &LogSheetModel::restart);
    connect(&sheet_, &EntrySheet::value_put, this, [this](const LogBox& put_box) { tell_box(put_box); });
    connect(&sheet_, &EntrySheet::unreadable_changed, this, &LogSheetModel::tell_box);
    connect(&sheet_, &EntrySheet::ship_changed, this, &LogSheetModel::rebuild);
    connect(&sheet_, &EntrySheet::row_unit_changed, this, [this] {
        if (!rows_.empty())
            emit dataChanged(index(0, 0), index(rowCount() - 1, columnCount() - 1));
        emit headerDataChanged(Qt::Vertical, 0, std::max(0, rowCount() - 1));
    });
    rebuild();
}

/// Another reading is on the sheet.
void LogSheetModel::restart()
{
    marks_.clear();
    previous_.clear();
    rebuild();
}

void LogSheetModel::unfold_filled()
{
    rebuild();
}

std::optional<Problem> LogSheetModel::refusal(const LogBox& where) const
{
    const auto waiting = unreadable().find(where);
    if (waiting == unreadable().end())
        return std::nullopt;
    const auto read = read_box(where, to_std(waiting->second), sheet_.row_unit(where.quantity));
    return read ? std::nullopt : std::optional<Problem>(read.error());
}

void LogSheetModel::rebuild()
{
    beginResetModel();
    rows_.clear();
    columns_ = 4; // room for words
    folded_ = 0;
    const auto& sections = sheet_.sections();
    for (std::size_t s = 0; s < sections.size(); ++s) {
        std::vector<Row> shown;
        for (std::size_t r = 0; r < sections[s].rows.size(); ++r) {
            if (unfolded(sections[s].rows[r]))
                shown.push_back({static_cast<int>(s), static_cast<int>(r)});
            else
                ++folded_;
        }
        if (shown.empty())
            continue;
        columns_ = std::max(columns_, static_cast<int>(sections[s].columns.size()));
        rows_.push_back({static_cast<int>(s), -1});
        rows_.insert(rows_.end(), shown.begin(), shown.end());
    }
    endResetModel();
    emit folding_changed();
}

bool LogSheetModel::unfolded(const LogRow& row) const
{
    const bool quick_line = row.boxes.front().phase != Phase::reading;
    if (all_rows_ || quick_line || row.need == Need::required || sheet_.used().count(row.quantity) > 0)
        return true;
    if (row.need == Need::recommended && sheet_.used().empty())
        return true; // a first reading: nobody knows yet what this engine has instruments for
    return std::any_of(row.boxes.begin(), row.boxes.end(), [this](const LogBox& b) {
        return sheet_.value(b) != nullptr || unreadable().count(b) > 0;
    });
}

std::vector<LogSection> LogSheetModel::shown_sections() const
{
    std::vector<LogSection> shown;
    for (int r = 0; r < rowCount(); ++r) {
        if (const LogRow* in_row = row(r)) {
            shown.back().rows.push_back(*in_row);
            continue;
        }
        LogSection section = sheet_.sections()[static_cast<std::size_t>(section_of(r))];
        section.rows.clear();
        shown.push_back(std::move(section));
    }
    return shown;
}

void LogSheetModel::show_all(bool all)
{
    if (all == all_rows_)
        return;
    all_rows_ = all;
    rebuild();
}

int LogSheetModel::rowCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : static_cast<int>(rows_.size());
}

int LogSheetModel::columnCount(const QModelIndex& parent) const
{
    return parent.isValid() ? 0 : columns_;
}

const LogRow* LogSheetModel::row(int row_number) const
{
    if (row_number < 0 || row_number >= rowCount())
        return nullptr;
    const Row& at = rows_[static_cast<std::size_t>(row_number)];
    if (at.row < 0)
        return nullptr;
    return &sheet_.sections()[static_cast<std::size_t>(at.section)].rows[static_cast<std::size_t>(at.row)];
}

QString LogSheetModel::heading(int row_number) const
{
    if (row_number < 0 || row_number >= rowCount() || row(row_number))
        return {};
    return to_qstring(sheet_.sections()[static_cast<std::size_t>(section_of(row_number))].title);
}

std::optional<LogBox> LogSheetModel::box(const QModelIndex& at) const
{
    const LogRow* in_row = at.isValid() && at.model() == this ? row(at.row()) : nullptr;
    if (!in_row || static_cast<std::size_t>(at.column()) >= in_row->boxes.size())
        return std::nullopt;
    return in_row->boxes[static_cast<std::size_t>(at.column())];
}

QModelIndex LogSheetModel::index_of(const LogBox& wanted) const
{
    for (int r = 0; r < rowCount(); ++r) {
        const LogRow* in_row = row(r);
        if (!in_row || in_row->quantity != wanted.quantity)
            continue;
        const auto found = std::find(in_row->boxes.begin(), in_row->boxes.end(), wanted);
        if (found != in_row->boxes.end())
            return index(r, static_cast<int>(found - in_row->boxes.begin()));
    }
    return {};
}

QString LogSheetModel::box_name(const LogBox& named) const
{
    const QString title = quantity_title(named.quantity);
    if (named.phase == Phase::before)
        return tr("%1, line before the walk").arg(title);
    if (named.phase == Phase::after)
        return tr("%1, line after the walk").arg(title);
    if (named.place.kind == Place::Kind::engine || named.place.kind == Place::Kind::ship)
        return title;
    return tr("%1 of %2").arg(title, place_title(sheet_.engine(), named.place, false));
}

QString LogSheetModel::shown_text(const LogBox& shown) const
{
    const auto waiting = unreadable().find(shown);
    if (waiting != unreadable().end())
        return waiting->second;
    const Value* value = sheet_.value(shown);
    return value ? to_qstring(box_text(*value, sheet_.row_unit(shown.quantity))) : QString();
}

BoxMark LogSheetModel::mark_of(const LogBox& marked, const Value* value) const
{
    if (unreadable().count(marked) > 0)
        return BoxMark::unreadable;
    if (value && value->confirmed)
        return BoxMark::confirmed;
    const auto found = marks_.find(marked);
    return found == marks_.end() ? BoxMark::none : found->second;
}

QString LogSheetModel::accessible_text(const LogBox& described, const QString& shown) const
{
    const Value* value = sheet_.value(described);
    QString text = tr("%1: %2").arg(box_name(described), shown.isEmpty() ? tr("empty") : shown);
    if (value && value->number)
        text = with_unit(text, to_qstring(row_unit_text(described.quantity, {value->unit, value->kind})));
    if (value && value->origin == Origin::card)
        text += tr(", from the card");
    switch (mark_of(described, value)) {
    case BoxMark::asked:
        return text + tr(", please look again");
    case BoxMark::impossible:
        return text + tr(", cannot be");
    case BoxMark::unreadable:
        return text + tr(", cannot be read");
    case BoxMark::confirmed:
        return text + tr(", read again");
    case BoxMark::none:
        break;
    }
    return sheet_.lent(described) ? text + tr(", entered for the ship") : text;
}

QVariant LogSheetModel::heading_data(const QModelIndex& at, int role) const
{
    const auto& columns = sheet_.sections()[static_cast<std::size_t>(section_of(at.row()))].columns;
    const auto column = static_cast<std::size_t>(at.column());
    switch (role) {
    case heading_role:
        return true;
    case Qt::DisplayRole:
        if (column == 1 && columns.size() == 1 && !previous_.empty())
            return tr("last time");
        return column < columns.size() ? to_qstring(columns[column]) : QString();
    case Qt::TextAlignmentRole:
        return QVariant(Qt::AlignRight | Qt::AlignVCenter);
    case Qt::AccessibleTextRole:
        return heading(at.row());
    default:
        return {};
    }
}

/// The place right of a lone box: last time's number, so that a slip is seen without looking aside.
QVariant LogSheetModel::beside_data(const QModelIndex& at, int role) const
{
    const LogRow* in_row = row(at.row());
    if (!in_row || in_row->boxes.size() != 1 || at.column() != 1 ||
        in_row->boxes.front().phase != Phase::reading)
        return {};
    const auto found = previous_.find(in_row->quantity);
    if (found == previous_.end())
        return {};
    switch (role) {
    case beside_role:
        return true;
    case Qt::DisplayRole:
        return found->second;
    case Qt::TextAlignmentRole:
        return QVariant(Qt::AlignRight | Qt::AlignVCenter);
    case Qt::AccessibleTextRole:
        return tr("%1, last time: %2").arg(quantity_title(in_row->quantity), found->second);
    default:
        return {};
    }
}

QVariant LogSheetModel::data(const QModelIndex& at, int role) const
{
    if (!checkIndex(at, CheckIndexOption::IndexIsValid))
        return {};
    if (!row(at.row()))
        return heading_data(at, role);
    const auto shown = box(at);
    if (!shown)
        return beside_data(at, role);
    const bool words = quantity(shown->quantity).type == ValueType::words;
    const Value* value = sheet_.value(*shown);
    switch (role) {
    case Qt::DisplayRole:
    case Qt::EditRole:
        return shown_text(*shown);
    case Qt::TextAlignmentRole:
        return QVariant((words ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    case Qt::AccessibleTextRole:
        return accessible_text(*shown, shown_text(*shown));
    case mark_role:
        return static_cast<int>(mark_of(*shown, value));
    case lent_role:
        return sheet_.lent(*shown);
    case missing_role:
        return value && value->missing != MissingReason::none;
    case words_role:
        return words;
    case heading_role:
        return false;
    default:
        return {};
    }
}

QVariant LogSheetModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation == Qt::Horizontal || section < 0 || section >= rowCount())
        return {};
    const LogRow* in_row = row(section);
    if (role == heading_role)
        return in_row == nullptr;
    if (role == Qt::DisplayRole)
        return in_row ? quantity_title(in_row->quantity) : heading(section);
    if (!in_row)
        return {};
    const QString unit = to_qstring(row_unit_text(in_row->quantity, sheet_.row_unit(in_row->quantity)));
    if (role == Qt::UserRole)
        return unit;
    if (role == Qt::AccessibleTextRole)
        return unit.isEmpty() ? quantity_title(in_row->quantity)
                              : tr("%1 in %2").arg(quantity_title(in_row->quantity), unit);
    return {};
}

Qt::ItemFlags LogSheetModel::flags(const QModelIndex& at) const
{
    if (!box(at))
        return Qt::NoItemFlags;
    return Qt::ItemIsEnabled | Qt::ItemIsSelectable | Qt::ItemIsEditable | Qt::ItemNeverHasChildren;
}

bool LogSheetModel::setData(const QModelIndex& at, const QVariant& text, int role)
{
    const auto typed = box(at);
    if (role != Qt::EditRole || !typed)
        return false;
    const QString wanted = text.toString().trimmed();
    if (wanted == shown_text(*typed) && unreadable().count(*typed) == 0)
        return true; // an untouched box keeps every digit, and what the ship lends stays lent
    const auto read = read_box(*typed, to_std(wanted), sheet_.row_unit(typed->quantity));
    if (!read) {
        sheet_.keep_unreadable(*typed, wanted);
        emit refused(at);
        return false;
    }
    put(read.value(),
        wanted.isEmpty() ? tr("empty %1").arg(box_name(*typed)) : tr("enter %1").arg(box_name(*typed)));
    return true;
}

void LogSheetModel::put(const Value& value, const QString& what)
{
    const LogBox where = box_of(value);
    const Value* old = sheet_.value(where);
    sheet_.forget_unreadable(where);
    if (old ? same_value(*old, value) : !says_something(value))
        return;
    undo_.push(new PutValue(sheet_, value, what));
}

void LogSheetModel::tell_box(const LogBox& changed)
{
    const QModelIndex at = index_of(changed);
    if (at.isValid())
        emit dataChanged(at, at);
}

void LogSheetModel::set_previous(std::map<QuantityId, QString> previous)
{
    if (previous == previous_)
        return;
    previous_ = std::move(previous);
    if (!rows_.empty())
        emit dataChanged(index(0, 1), index(rowCount() - 1, 1));
}

void LogSheetModel::set_marks(std::map<LogBox, BoxMark> marks)
{
    std::map<LogBox, BoxMark> old = std::move(marks_);
    marks_ = std::move(marks);
    for (const auto& [where, mark] : old)
        if (marks_.count(where) == 0)
            tell_box(where);
    for (const auto& [where, mark] : marks_) {
        const auto before = old.find(where);
        if (before == old.end() || before->second != mark)
            tell_box(where);
    }
}

} // namespace evenstroke
