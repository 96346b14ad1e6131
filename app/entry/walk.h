// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/log_sheet_model.h"

namespace evenstroke {

/// Which way Enter goes: to the next cylinder of the same quantity, or to the next quantity of the same
/// cylinder. Tab goes the other way.
enum class WalkOrder { along_cylinders, along_quantities };

/// The box to write in next, passing over headings; an invalid index at the end of the walk.
///
/// The main direction passes from row to row and section to section, so that it comes to every box once; the
/// line after the walk is its end. Across it, one stays in the column.
QModelIndex next_box(const LogSheetModel& model, const QModelIndex& from, WalkOrder order, bool across,
                     bool forward);

/// First box of the next or previous section.
QModelIndex next_section(const LogSheetModel& model, const QModelIndex& from, bool forward);

/// The nearest box in the direction of an arrow key; `from` itself where there is none.
QModelIndex neighbour(const LogSheetModel& model, const QModelIndex& from, int rows, int columns);

} // namespace evenstroke
