// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/entry_commands.h"

namespace evenstroke {

PutValue::PutValue(EntrySheet& sheet, Value after, const QString& what, QUndoCommand* parent)
    : QUndoCommand(what, parent), sheet_(&sheet), after_(std::move(after))
{
    const LogBox box = box_of(after_);
    const Value* old = sheet.lent(box) ? nullptr : sheet.value(box);
    before_ = old ? *old : without_value(box, MissingReason::none);
}

void PutValue::undo()
{
    if (sheet_)
        sheet_->put(before_);
}

void PutValue::redo()
{
    if (sheet_)
        sheet_->put(after_);
}

} // namespace evenstroke
