// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/log_sheet_model.h"

#include <QItemSelection>
#include <QString>
#include <QStringList>

#include <vector>

/// Blocks of boxes as spreadsheets exchange them: rows end with a line feed, cells are parted by tabs.
namespace evenstroke {

/// Cells of a block; quoted cells may hold tabs and line ends, a trailing line end makes no further row.
std::vector<QStringList> split_block(const QString& text);

/// The selected boxes, in the sheet's order; columns and rows without a box are left out.
/// @param decimal_sign the sign the spreadsheet beside expects
QString block_of(const LogSheetModel& model, const QItemSelection& selection, QChar decimal_sign);

/// The whole reading: section, quantity, unit, then a column a place, as it can be pasted into a spreadsheet.
QString whole_block(const EntrySheet& sheet, QChar decimal_sign);

/// One cell of a block that cannot go into its box.
struct RefusedCell
{
    int row = 0, column = 0; ///< in the block, from 1
    QString text;
    Problem problem; ///< names the box
};

/// What pasting a block would do; nothing is changed by planning it.
struct PastePlan
{
    std::vector<Value> values;        ///< what can be read
    std::vector<RefusedCell> refused; ///< what cannot
    QModelIndexList boxes;            ///< of `values`, to be selected afterwards
};
/// Lays a block out from a box on: its rows on the rows below, headings passed over; empty cells leave what
/// is there. A cell that falls outside the sheet is refused like one that cannot be read.
PastePlan plan_paste(const LogSheetModel& model, const QModelIndex& from, const QString& text);

/// Applies a plan's readable values as one undoable step.
void apply_paste(LogSheetModel& model, const PastePlan& plan);

/// One or two sentences for all that was refused: the first cell by name, value and remedy, then how many
/// more.
QString refusal_text(const PastePlan& plan);

} // namespace evenstroke
