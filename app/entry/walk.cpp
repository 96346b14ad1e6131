// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/walk.h"

#include <algorithm>

namespace evenstroke {
namespace {

/// Every box in the order of the walk. The line before the walk comes first, the line after it last;
/// cylinders and the like row by row or column by column.
QModelIndexList walk_of(const LogSheetModel& model, WalkOrder order)
{
    QModelIndexList boxes, after_the_walk;
    const auto add = [&](int row, int column) {
        const QModelIndex index = model.index(row, column);
        if (const auto box = model.box(index))
            (box->phase == Phase::after ? after_the_walk : boxes) << index;
    };
    for (int first = 0; first < model.rowCount();) {
        int end = first + 1;
        while (end < model.rowCount() && model.section_of(end) == model.section_of(first))
            ++end;
        if (order == WalkOrder::along_cylinders) {
            for (int row = first; row < end; ++row)
                for (int column = 0; column < model.columnCount(); ++column)
                    add(row, column);
        } else {
            for (int column = 0; column < model.columnCount(); ++column)
                for (int row = first; row < end; ++row)
                    add(row, column);
        }
        first = end;
    }
    return boxes + after_the_walk;
}

QModelIndex first_after_the_walk(const LogSheetModel& model)
{
    for (int row = 0; row < model.rowCount(); ++row)
        for (int column = 0; column < model.columnCount(); ++column)
            if (const auto box = model.box(model.index(row, column)); box && box->phase == Phase::after)
                return model.index(row, column);
    return {};
}

} // namespace

QModelIndex next_box(const LogSheetModel& model, const QModelIndex& from, WalkOrder order, bool across,
                     bool forward)
{
    const auto other =
        order == WalkOrder::along_cylinders ? WalkOrder::along_quantities : WalkOrder::along_cylinders;
    const auto box = model.box(from);
    // Down a column that is not the walk's own direction: the same column of the next row, not the next
    // cylinder.
    if (across && order == WalkOrder::along_cylinders && box && box->phase == Phase::reading) {
        for (int row = from.row() + (forward ? 1 : -1); row >= 0 && row < model.rowCount();
             row += forward ? 1 : -1)
            if (const LogRow* in_row = model.row(row))
                return model.index(row, std::min(from.column(), static_cast<int>(in_row->boxes.size()) - 1));
        return forward ? first_after_the_walk(model) : QModelIndex();
    }
    const QModelIndexList walk = walk_of(model, across ? other : order);
    const auto at = walk.indexOf(from) + (forward ? 1 : -1);
    return at >= 0 && at < walk.size() ? walk[at] : QModelIndex();
}

QModelIndex next_section(const LogSheetModel& model, const QModelIndex& from, bool forward)
{
    const int here = from.isValid() ? model.section_of(from.row()) : -1;
    if (forward) {
        for (int row = 0; row < model.rowCount(); ++row)
            if (model.section_of(row) > here && model.row(row))
                return model.index(row, 0);
        return {};
    }
    QModelIndex found;
    for (int row = from.row(); row >= 0; --row) {
        if (!model.row(row))
            continue;
        if (found.isValid() && model.section_of(found.row()) < here &&
            model.section_of(row) != model.section_of(found.row()))
            break;
        if (model.section_of(row) < here)
            found = model.index(row, 0);
    }
    return found;
}

QModelIndex neighbour(const LogSheetModel& model, const QModelIndex& from, int rows, int columns)
{
    if (columns != 0) {
        const QModelIndex beside = model.index(from.row(), from.column() + columns);
        return model.box(beside) ? beside : from;
    }
    for (int row = from.row() + rows; row >= 0 && row < model.rowCount(); row += rows)
        if (const LogRow* in_row = model.row(row))
            return model.index(row, std::min(from.column(), static_cast<int>(in_row->boxes.size()) - 1));
    return from;
}

} // namespace evenstroke
