// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/entry/entry_sheet.h"

#include <QPointer>
#include <QUndoCommand>

namespace evenstroke {

/// What the engineer did to one box. The only writer of the sheet's values: every change can be taken back.
class PutValue : public QUndoCommand
{
public:
    /// The box must be that of `after`; an empty value empties it.
    PutValue(EntrySheet& sheet, Value after, const QString& what, QUndoCommand* parent = nullptr);
    void undo() override;
    void redo() override;

private:
    QPointer<EntrySheet> sheet_; ///< the page owns it and the stack; either may go first
    Value before_, after_;
};

} // namespace evenstroke
