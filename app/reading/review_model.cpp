// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/review_model.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"

#include <cmath>

namespace evenstroke {

namespace {

/// A half-width with two digits at most, never more decimals than the number it belongs to.
QString half_width_text(const std::optional<double>& half_width, int decimals)
{
    if (!half_width || !(*half_width > 0.0))
        return {};
    const int deserved = std::max(0, 1 - static_cast<int>(std::floor(std::log10(*half_width))));
    return QStringLiteral("±%1%2").arg(QChar(0x2009)).arg(number_text(*half_width, std::min(deserved, decimals)));
}

QString value_text(const std::optional<double>& value, int decimals)
{
    if (!value)
        return {};
    return decimals == 0 ? whole_text(*value) : number_text(*value, decimals);
}

bool same_quantity(const ReviewLine& a, const ReviewLine& b)
{
    return a.quantity && a.quantity == b.quantity && a.words == b.words;
}

} // namespace

bool ReviewModel::is_number(int column)
{
    return column == value || column == corrected || column == expected || column == deviation || column == from_usual;
}

void ReviewModel::show_review(std::shared_ptr<const ReadingReview> review, std::shared_ptr<const Judgement> judgement,
                              std::vector<storage::Correction> corrections)
{
    beginResetModel();
    corrections_ = std::move(corrections);
    review_ = std::move(review);
    judgement_ = std::move(judgement);
    rows_.clear();
    if (review_)
        for (const ReviewSection& section : review_->sections) {
            rows_.push_back({&section, nullptr, false});
            for (const ReviewLine& line : section.lines) {
                const ReviewLine* above = rows_.back().line;
                rows_.push_back({&section, &line, above && same_quantity(*above, line)});
            }
        }
    endResetModel();
}

int ReviewModel::rowCount(const QModelIndex& parent) const { return parent.isValid() ? 0 : static_cast<int>(rows_.size()); }
int ReviewModel::columnCount(const QModelIndex& parent) const { return parent.isValid() ? 0 : column_count; }

const ReviewRow* ReviewModel::row(int number) const
{
    return number >= 0 && number < rowCount() ? &rows_[static_cast<std::size_t>(number)] : nullptr;
}

QString ReviewModel::place_words(const ReviewLine& line) const
{
    if (line.spread)
        return tr("all");
    switch (line.place.kind) {
    case Place::Kind::cylinder: return to_qstring(judgement_->record->engine.cylinder_name(line.place.number));
    case Place::Kind::turbocharger:
    case Place::Kind::cooler: return QString::number(line.place.number);
    default: return {};
    }
}

const storage::Correction* ReviewModel::correction_of(const ReviewLine& line) const
{
    if (!line.quantity || !line.value || line.spread || line.estimate)
        return nullptr;
    for (auto one = corrections_.rbegin(); one != corrections_.rend(); ++one)
        if (one->new_value.quantity == *line.quantity && one->new_value.place == line.place &&
            one->new_value.phase == Phase::reading && !one->old_value.typed.empty())
            return &*one;
    return nullptr;
}

QString ReviewModel::text(const ReviewRow& row, int column) const
{
    if (!row.line)
        return column != words              ? QString()
               : row.section->sentence.empty() ? to_qstring(row.section->title)
                                               : QStringLiteral("%1. %2").arg(to_qstring(row.section->title),
                                                                              to_qstring(row.section->sentence));
    const ReviewLine& line = *row.line;
    switch (column) {
    case words: return with_unit(to_qstring(line.words) + (line.unit.empty() ? QString() : QStringLiteral(",")), to_qstring(line.unit));
    case place: return place_words(line);
    case value: return value_text(line.value, line.decimals);
    case half_width: return half_width_text(line.half_width, line.decimals);
    case corrected: return value_text(line.corrected, line.decimals);
    case expected: return value_text(line.expected, line.decimals);
    case deviation: return line.deviation ? signed_text(*line.deviation, line.decimals) : QString();
    case deviation_half_width: return line.deviation ? half_width_text(line.deviation_half_width, line.decimals) : QString();
    case from_usual: return line.from_usual ? signed_text(*line.from_usual, line.decimals) : QString();
    case verdict: {
        QStringList said;
        if (line.low && line.high)
            said.append(tr("%1 to %2").arg(number_text(*line.low, line.decimals), number_text(*line.high, line.decimals)));
        if (!line.verdict.empty())
            said.append(to_qstring(line.verdict));
        if (const storage::Correction* correction = correction_of(line))
            said.append(tr("corrected, was %1").arg(to_qstring(correction->old_value.typed)));
        return said.join(QStringLiteral(", "));
    }
    default: return {};
    }
}

QVariant ReviewModel::data(const QModelIndex& index, int role) const
{
    if (!checkIndex(index, CheckIndexOption::IndexIsValid))
        return {};
    const ReviewRow& shown = rows_[static_cast<std::size_t>(index.row())];
    const Level level = shown.line ? shown.line->level : shown.section->level;
    const bool of_words = index.column() == words || index.column() == verdict || !shown.line;
    switch (role) {
    case Qt::DisplayRole: return text(shown, index.column());
    case Qt::TextAlignmentRole: return static_cast<int>((of_words ? Qt::AlignLeft : Qt::AlignRight) | Qt::AlignVCenter);
    case Qt::AccessibleTextRole:
        if (index.column() == words || index.column() == verdict)
            return has_mark(level) ? QStringLiteral("%1: %2").arg(level_text(level), text(shown, index.column()))
                                   : text(shown, index.column());
        return text(shown, index.column());
    case Qt::ToolTipRole:
        if (const storage::Correction* correction = shown.line && index.column() == verdict ? correction_of(*shown.line) : nullptr)
            return tr("%1\nCorrected on %2 by %3: %4")
                .arg(text(shown, verdict), day_text(correction->at), to_qstring(correction->by.who), to_qstring(correction->by.why));
        return index.column() == verdict || index.column() == words || !shown.line ? text(shown, index.column()) : QVariant();
    default: return {};
    }
}

QVariant ReviewModel::headerData(int section, Qt::Orientation orientation, int role) const
{
    if (orientation == Qt::Horizontal && role == Qt::TextAlignmentRole)
        return static_cast<int>((section == words || section == half_width || section == deviation_half_width || section == verdict
                                     ? Qt::AlignLeft
                                     : Qt::AlignRight) |
                                Qt::AlignVCenter);
    if (orientation == Qt::Horizontal && role == Qt::ToolTipRole && section == from_usual)
        return tr("What the mark goes by. A cylinder: its deviation without what all cylinders share, less its own usual\n"
                  "distance from the others. The engine: its deviation less its own usual one. A cylinder that always ran\n"
                  "hot can be low here while its deviation is still above zero.");
    if (orientation != Qt::Horizontal || role != Qt::DisplayRole)
        return {};
    switch (section) {
    case words: return tr("Quantity");
    case place: return tr("no.");
    case value: return tr("as read");
    case half_width: return QStringLiteral("±");
    case corrected: return tr("corrected");
    case expected: return tr("expected");
    case deviation: return tr("deviation");
    case deviation_half_width: return QStringLiteral("±");
    case from_usual: return tr("from usual");
    case verdict: return tr("says");
    default: return {};
    }
}

int ReviewModel::row_of(QuantityId quantity, const Place& where) const
{
    for (int number = 0; number < rowCount(); ++number)
        if (const ReviewLine* line = row(number)->line; line && line->quantity == quantity && line->place == where && !line->spread)
            return number;
    return -1;
}

int ReviewModel::row_of(ReviewTopic topic) const
{
    for (int number = 0; number < rowCount(); ++number)
        if (!row(number)->line && row(number)->section->topic == topic)
            return number;
    return -1;
}

int ReviewModel::row_like(const ReviewRow& wanted) const
{
    for (int number = 0; number < rowCount() && wanted.line; ++number) {
        const ReviewLine* line = row(number)->line;
        if (line && line->quantity == wanted.line->quantity && line->place == wanted.line->place
            && line->words == wanted.line->words && line->spread == wanted.line->spread)
            return number;
    }
    return wanted.section ? std::max(0, row_of(wanted.section->topic)) : 0;
}

QString ReviewModel::as_text() const
{
    QStringList lines, heading;
    for (int column = 0; column < column_count; ++column)
        heading.append(headerData(column, Qt::Horizontal).toString());
    lines.append(heading.join(u'\t'));
    for (const ReviewRow& each : rows_) {
        QStringList line;
        for (int column = 0; column < (each.line ? static_cast<int>(column_count) : 1); ++column)
            line.append(text(each, column));
        lines.append(line.join(u'\t'));
    }
    return lines.join(u'\n') + u'\n';
}

} // namespace evenstroke
