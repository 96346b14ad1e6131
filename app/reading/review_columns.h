// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/reading/review_model.h"

#include <QStringList>

#include <array>
#include <vector>

/// How much room the columns of the page One reading take: what stands in them, so that nothing is cut while the
/// page is wide enough.
namespace evenstroke {

namespace review_sizes {
inline constexpr int row_height = 24, mark_side = 12, indent = 12;
/// Between a number and what follows it, px at 96 dots an inch.
inline constexpr int gap = 12;
/// Height of every further line of a long name.
inline constexpr int name_line = 16;
} // namespace review_sizes

struct ReviewColumns
{
    std::array<int, ReviewModel::column_count> width{}; ///< 0: left out, as the page is too narrow for it
    std::vector<int> note; ///< height of a line under the row for a verdict that has no room in it; 0: none. One a row
    std::vector<int> name; ///< height of the further lines of a long name; 0: it has one. One a row
    /// Height of a row of this number.
    int height(int row) const;
    /// From the left edge of one column to that of another.
    int between(int from, int to) const;
};

/// @param room width that is there for all columns
ReviewColumns measure_columns(const ReviewModel& model, int room);

/// A name cut between words into lines that have room in `width`; one word alone may be longer.
QStringList name_lines(const QString& name, int width);
/// The room of the name of a line in the column of names, which may reach into that of places.
int room_of_name(const ReviewLine& line, const ReviewColumns& columns);
/// Width of the unit behind a name, the space before it included.
int width_of_unit(const ReviewLine& line);

/// The first column of the room a verdict has: where nothing is compared, that of the comparison.
int first_column_of_verdict(const ReviewLine& line);
/// The room of a verdict under its row, its top at 0.
QRect note_room(int room);

} // namespace evenstroke
