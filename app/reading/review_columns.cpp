// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/reading/review_columns.h"

#include "app/desk/number_text.h"
#include "app/desk/theme.h"

#include <QFontMetrics>
#include <QRect>

#include <algorithm>

namespace evenstroke {
namespace {

using namespace review_sizes;

constexpr int fewest_words = 168, fewest_words_narrow = 116, fewest_verdict = 88, name_margin = 4, verdict_margins = 12, head_margins = 10;

/// What the column of names must be wide for this row to have its name in one line.
int width_of_words(const ReviewRow& row, int place_width)
{
    if (!row.line || row.repeats)
        return 0;
    const bool no_number = row.line->place.kind == Place::Kind::engine && !row.line->spread;
    return indent + QFontMetrics(type(TypeSize::body)).horizontalAdvance(to_qstring(row.line->words)) +
           width_of_unit(*row.line) + name_margin + (no_number ? -place_width : 0);
}

int further_lines(const ReviewRow& row, const ReviewColumns& columns)
{
    if (!row.line || row.repeats)
        return 0;
    const int room = room_of_name(*row.line, columns) - width_of_unit(*row.line);
    return static_cast<int>(name_lines(to_qstring(row.line->words), room).size() - 1) * name_line;
}

/// Rows of one quantity have the same decimals: right-aligned they stand on the decimal sign.
void measure_number(const ReviewModel& model, int column, ReviewColumns& columns)
{
    const QFontMetrics metrics(type(TypeSize::body, column == ReviewModel::deviation || column == ReviewModel::from_usual)); // bold where it tells
    int& width = columns.width[static_cast<std::size_t>(column)];
    for (int row = 0; row < model.rowCount(); ++row)
        if (model.row(row)->line)
            width = std::max(width, metrics.horizontalAdvance(model.index(row, column).data().toString()) + gap);
}

void measure_small(const ReviewModel& model, int column, ReviewColumns& columns)
{
    const QFontMetrics metrics(type(TypeSize::label));
    int& width = columns.width[static_cast<std::size_t>(column)];
    for (int row = 0; row < model.rowCount(); ++row)
        if (model.row(row)->line)
            width = std::max(width, metrics.horizontalAdvance(model.index(row, column).data().toString()) + 8);
}

/// Height of the line under a row that its verdict needs; 0 where it has room in the row.
int note_height(const ReviewModel& model, int row, const ReviewColumns& columns, int room)
{
    const ReviewLine* line = model.row(row)->line;
    const QString words = line ? model.index(row, ReviewModel::verdict).data().toString() : QString();
    if (words.isEmpty())
        return 0;
    const QFontMetrics metrics(type(TypeSize::label));
    const int mark = has_mark(line->level) ? mark_side + 6 : 0;
    const int first = first_column_of_verdict(*line);
    // The columns may be wider than the view, which shows the first of them.
    const int seen = std::min(columns.between(first, ReviewModel::column_count), room - columns.between(0, first));
    const int in_row = columns.width[ReviewModel::verdict] == 0 ? 0 : seen - verdict_margins - mark;
    if (metrics.horizontalAdvance(words) <= in_row)
        return 0;
    const QRect under = note_room(room).adjusted(mark, 0, 0, 0);
    return metrics.boundingRect(under, Qt::TextWordWrap, words).height() + 4;
}

} // namespace

int ReviewColumns::between(int from, int to) const
{
    int sum = 0;
    for (int column = from; column < to; ++column)
        sum += width[static_cast<std::size_t>(column)];
    return sum;
}

int ReviewColumns::height(int row) const
{
    const std::size_t at = static_cast<std::size_t>(row);
    return row_height + (at < name.size() ? name[at] : 0) + (at < note.size() ? note[at] : 0);
}

QStringList name_lines(const QString& name, int width)
{
    const QFontMetrics metrics(type(TypeSize::body));
    QStringList lines;
    for (const QString& word : name.split(u' ')) {
        const bool fits = !lines.isEmpty() && metrics.horizontalAdvance(lines.back() + u' ' + word) <= width;
        if (fits)
            lines.back() += u' ' + word;
        else
            lines << word;
    }
    return lines;
}

int width_of_unit(const ReviewLine& line)
{
    const QString unit = to_qstring(line.unit);
    return unit.isEmpty() ? 0 : QFontMetrics(type(TypeSize::label)).horizontalAdvance(unit) + 6;
}

int room_of_name(const ReviewLine& line, const ReviewColumns& columns)
{
    const bool no_number = line.place.kind == Place::Kind::engine && !line.spread;
    return columns.width[ReviewModel::words] - indent - name_margin + (no_number ? columns.width[ReviewModel::place] : 0);
}

int first_column_of_verdict(const ReviewLine& line)
{
    return line.corrected || line.expected || line.deviation ? ReviewModel::verdict : ReviewModel::corrected;
}

QRect note_room(int room)
{
    return {2 * review_sizes::indent, 0, std::max(80, room - 2 * review_sizes::indent - 4), 1000};
}

ReviewColumns measure_columns(const ReviewModel& model, int room)
{
    ReviewColumns columns;
    const QFontMetrics heads(type(TypeSize::label));
    for (int column = ReviewModel::place; column < ReviewModel::verdict; ++column)
        columns.width[static_cast<std::size_t>(column)] =
            heads.horizontalAdvance(model.headerData(column, Qt::Horizontal).toString()) + head_margins;
    for (int column = ReviewModel::place; column < ReviewModel::verdict; ++column)
        if (ReviewModel::is_number(column))
            measure_number(model, column, columns);
        else
            measure_small(model, column, columns);
    // Where the room is short, what the workings beside the table say too goes first.
    for (const int spare : {ReviewModel::deviation_half_width, ReviewModel::corrected, ReviewModel::half_width, ReviewModel::expected})
        if (room - columns.between(ReviewModel::place, ReviewModel::verdict) < fewest_words + fewest_verdict)
            columns.width[static_cast<std::size_t>(spare)] = 0;
    // Where that is not enough, every verdict stands under its row.
    const bool narrow = room - columns.between(ReviewModel::place, ReviewModel::verdict) < fewest_words + fewest_verdict;
    const int least_words = narrow ? fewest_words_narrow : fewest_words, least_verdict = narrow ? 0 : fewest_verdict;
    const int place_width = columns.width[ReviewModel::place];
    int words = least_words;
    for (int row = 0; row < model.rowCount(); ++row)
        words = std::max(words, width_of_words(*model.row(row), place_width));
    const int left = room - columns.between(ReviewModel::place, ReviewModel::verdict);
    columns.width[ReviewModel::words] = std::clamp(words, least_words, std::max(least_words, left - least_verdict));
    columns.width[ReviewModel::verdict] = narrow ? 0 : std::max(least_verdict, left - columns.width[ReviewModel::words]);
    for (int row = 0; row < model.rowCount(); ++row) {
        columns.name.push_back(further_lines(*model.row(row), columns));
        columns.note.push_back(note_height(model, row, columns, room));
    }
    return columns;
}

} // namespace evenstroke
