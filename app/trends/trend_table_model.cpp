// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/trend_table_model.h"

#include "app/desk/number_text.h"

namespace evenstroke {

void TrendTableModel::show_trend(std::shared_ptr<const Judgement> judgement, const Trend* trend)
{
    if (judgement == judgement_ && trend == trend_)
        return; // so that whoever walks through the table keeps the place
    beginResetModel();
    judgement_ = std::move(judgement);
    trend_ = trend;
    endResetModel();
}

int TrendTableModel::rowCount(const QModelIndex& parent) const
{
    return parent.isValid() || !trend_ ? 0 : static_cast<int>(trend_->points.size());
}

int TrendTableModel::columnCount(const QModelIndex& parent) const { return parent.isValid() ? 0 : column_count; }

const TrendPoint& TrendTableModel::point(int row) const
{
    return trend_->points[trend_->points.size() - 1 - static_cast<std::size_t>(row)];
}

std::size_t TrendTableModel::reading_of(int row) const { return point(row).reading; }

int TrendTableModel::row_of(std::size_t reading) const
{
    for (int row = 0; row < rowCount(); ++row)
        if (point(row).reading == reading)
            return row;
    return -1;
}

std::optional<double> TrendTableModel::number(const TrendPoint& value, int column) const
{
    switch (column) {
    case load:
        return value.reading < judgement_->readings.size() ? judgement_->readings[value.reading].load_percent
                                                           : std::nullopt;
    case read: return value.raw;
    case corrected: return value.corrected;
    case expected: return value.expected;
    case deviation: return value.deviation;
    case apart: return value.apart;
    case uncertainty: return value.uncertainty;
    default: return std::nullopt;
    }
}

QString TrendTableModel::remark_text(const TrendPoint& value) const
{
    QStringList words;
    if (value.unsteady)
        words.append(tr("not steady"));
    else if (value.reading < judgement_->readings.size() && judgement_->readings[value.reading].steadiness == Steadiness::usable_with_care)
        words.append(tr("usable with care"));
    if (value.doubtful)
        words.append(tr("in doubt"));
    return words.join(QStringLiteral(", "));
}

QVariant TrendTableModel::data(const QModelIndex& index, int role) const
{
    if (!checkIndex(index, CheckIndexOption::IndexIsValid) || !trend_)
        return {};
    const TrendPoint& value = point(index.row());
    if (role == Qt::TextAlignmentRole)
        return static_cast<int>(
            (index.column() == date || index.column() == remark ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    if (role != Qt::DisplayRole)
        return {};
    if (index.column() == date)
        return day_text(judgement_->record->readings.at(value.reading).taken_at.utc);
    if (index.column() == remark)
        return remark_text(value);
    const auto shown = number(value, index.column());
    if (!shown)
        return {};
    if (index.column() == load)
        return number_text(*shown, 0);
    const bool is_signed = index.column() == deviation || index.column() == apart;
    const int decimals = decimals_of(trend_->quantity);
    return is_signed ? signed_text(*shown, decimals) : number_text(*shown, decimals);
}

QVariant TrendTableModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation != Qt::Horizontal || role != Qt::DisplayRole)
        return {};
    const QString unit_symbol = trend_ ? unit_text(trend_->quantity) : QString();
    const auto with = [&](const QString& title) {
        return unit_symbol.isEmpty() ? title : tr("%1, %2").arg(title, unit_symbol);
    };
    switch (section) {
    case date: return tr("Date");
    case load: return tr("Load, %");
    case read: return with(tr("As read"));
    case corrected: return with(tr("Corrected"));
    case expected: return with(tr("Expected"));
    case deviation: return with(tr("Deviation"));
    case apart: return with(tr("Apart"));
    case uncertainty: return tr("±");
    case remark: return tr("Remark");
    default: return {};
    }
}

QString TrendTableModel::as_text() const
{
    QStringList lines, heading;
    for (int column = 0; column < column_count; ++column)
        heading.append(headerData(column, Qt::Horizontal).toString());
    lines.append(heading.join(u'\t'));
    for (int row = 0; row < rowCount(); ++row) {
        QStringList line;
        for (int column = 0; column < column_count; ++column)
            line.append(data(index(row, column)).toString());
        lines.append(line.join(u'\t'));
    }
    return lines.join(u'\n') + u'\n';
}

QByteArray TrendTableModel::as_csv() const
{
    QByteArray text = "taken_at,load_percent,value,corrected,expected,deviation,apart,uncertainty,unit,remark\r\n";
    for (int row = rowCount() - 1; row >= 0; --row) { // in order of time
        const TrendPoint& value = point(row);
        text += utc_text(judgement_->record->readings.at(value.reading).taken_at.utc).c_str();
        for (int column = load; column <= uncertainty; ++column) {
            text += ',';
            if (const auto shown = number(value, column))
                text += QByteArray::number(*shown, 'g', 10);
        }
        text += ',' + unit_text(trend_->quantity).toUtf8() + ",\"" + remark_text(value).toUtf8() + "\"\r\n";
    }
    return text;
}

} // namespace evenstroke
