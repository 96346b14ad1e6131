// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/fleet/fleet_model.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"
#include "core/trend/fleet_strips.h"

#include <QCoreApplication>

#include <algorithm>

namespace evenstroke {

namespace {

bool is_quiet(const FleetRow& row, TimePoint now)
{
    return trouble_rank(row.summary, now) >= 8 && !(row.out_of_date && row.summary.readings == 0);
}

} // namespace

void FleetModel::show_fleet(std::vector<FleetRow> rows, TimePoint now)
{
    beginResetModel();
    rows_ = std::move(rows);
    now_ = now;
    std::stable_partition(rows_.begin(), rows_.end(), [now](const FleetRow& row) { return !is_quiet(row, now); });
    troubled_ = static_cast<int>(
        std::count_if(rows_.begin(), rows_.end(), [now](const FleetRow& row) { return !is_quiet(row, now); }));
    endResetModel();
}

void FleetModel::unfold(bool unfolded)
{
    if (unfolded == unfolded_)
        return;
    const int first = troubled_ + 1, last = troubled_ + quiet();
    if (quiet() == 0) {
        unfolded_ = unfolded;
    } else if (unfolded) {
        beginInsertRows({}, first, last);
        unfolded_ = true;
        endInsertRows();
    } else {
        beginRemoveRows({}, first, last);
        unfolded_ = false;
        endRemoveRows();
    }
    if (quiet() > 0)
        emit dataChanged(index(troubled_, 0), index(troubled_, column_count - 1));
}

int FleetModel::rowCount(const QModelIndex& parent) const
{
    if (parent.isValid())
        return 0;
    return troubled_ + (quiet() > 0 ? 1 : 0) + (unfolded_ ? quiet() : 0);
}

int FleetModel::columnCount(const QModelIndex& parent) const { return parent.isValid() ? 0 : column_count; }

const FleetRow* FleetModel::row(int number) const
{
    if (number < 0 || number >= rowCount() || is_fold(number))
        return nullptr;
    return &rows_[static_cast<std::size_t>(number < troubled_ ? number : number - 1)];
}

int FleetModel::row_of(const QString& engine_id) const
{
    for (int number = 0; number < rowCount(); ++number)
        if (const FleetRow* each = row(number); each && each->engine_id == engine_id)
            return number;
    return -1;
}

QString FleetModel::fold_text() const
{
    const auto count = [this](auto wanted) {
        return static_cast<int>(std::count_if(rows_.begin() + troubled_, rows_.end(), [&](const FleetRow& row) { return wanted(row.summary.level); }));
    };
    const int none = count([](Level level) { return level == Level::no_data; });
    const int learning = count([](Level level) { return level == Level::learning; });
    const int still = quiet() - none - learning;
    QStringList words;
    if (still > 0)
        words.append(tr("%n engine(s) quiet", nullptr, still));
    if (learning > 0)
        words.append(still > 0 ? tr("%1 learning").arg(learning) : tr("%n engine(s) learning", nullptr, learning));
    if (none > 0)
        words.append(words.isEmpty() ? tr("%n engine(s) without data yet", nullptr, none) : tr("%1 without data yet").arg(none));
    return words.join(QStringLiteral(" · "));
}

bool FleetModel::is_late(const FleetRow& row) const { return days_late(row.summary, now_).has_value(); }

QString FleetModel::last_reading_words(const FleetRow& row) const
{
    if (!row.summary.last_reading)
        return row.out_of_date ? QString() : tr("no reading yet");
    if (!row.summary.last_usable)
        return tr("none usable");
    const auto late = days_late(row.summary, now_);
    return late ? age_text(*row.summary.last_usable, now_) : day_text(*row.summary.last_usable);
}

QString FleetModel::sentence_words(const FleetRow& row) const
{
    if (row.out_of_date && row.summary.readings == 0)
        return tr("being judged");
    if (!row.summary.last_reading)
        return tr("Nothing to judge yet.");
    QString words = row.summary.sentence;
    if (words.isEmpty() && is_late(row))
        words = tr("No usable reading since %1.").arg(day_text(*row.summary.last_usable));
    if (words.isEmpty() && row.summary.level == Level::learning)
        words = tr("Learning: too few usable readings to compare with yet.");
    if (words.isEmpty() && row.summary.level == Level::no_data)
        words = tr("No data yet to compare.");
    if (row.summary.places_concerned > 1)
        words += tr(" %n place(s) concerned.", nullptr, row.summary.places_concerned);
    return words;
}

QString FleetModel::spoken(const FleetRow& row) const
{
    QStringList words{tr("%1, %2").arg(row.vessel_name, row.engine_name), level_text(row.summary.level),
                      tr("last reading %1").arg(last_reading_words(row)), sentence_words(row)};
    words.removeAll(QString());
    return words.join(QStringLiteral(", "));
}

QVariant FleetModel::data(const QModelIndex& index, int role) const
{
    if (!checkIndex(index, CheckIndexOption::IndexIsValid))
        return {};
    const FleetRow* each = row(index.row());
    if (!each)
        return role == Qt::DisplayRole && index.column() == ship ? QVariant(fold_text()) : QVariant();
    if (role == Qt::AccessibleTextRole)
        return index.column() == ship ? QVariant(spoken(*each)) : data(index, Qt::DisplayRole);
    const bool strip = index.column() >= first_strip && index.column() < sentence;
    if (strip) {
        const auto number = static_cast<std::size_t>(index.column() - first_strip);
        if (number >= each->summary.strips.size())
            return {};
        const FleetStrip& shown = each->summary.strips[number];
        return role == Qt::DisplayRole    ? QVariant(level_text(shown.level))
               : role == Qt::ToolTipRole && !shown.title.isEmpty()
                   ? QVariant(tr("%1: %2").arg(shown.title, level_text(shown.level)))
                   : QVariant();
    }
    if (role != Qt::DisplayRole && role != Qt::ToolTipRole)
        return {};
    switch (index.column()) {
    case ship: return tr("%1, %2").arg(each->vessel_name, each->engine_name);
    case last_reading: return last_reading_words(*each);
    case sentence: return sentence_words(*each);
    default: return {};
    }
}

QVariant FleetModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation != Qt::Horizontal || role != Qt::DisplayRole)
        return {};
    if (section == ship)
        return tr("Ship, engine");
    if (section == last_reading)
        return tr("Last usable reading");
    if (section == sentence)
        return tr("What matters");
    return QCoreApplication::translate(
        "evenstroke", all_fleet_strips()[static_cast<std::size_t>(section - first_strip)].title.c_str());
}

} // namespace evenstroke
