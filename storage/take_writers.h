// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/audit_writer.h"
#include "storage/value_rows.h"

namespace evenstroke::storage {

/// The prepared statements of one taking-in, used for all its folders.
struct TakeWriters
{
    TakeWriters(History& history, const Signature& by)
        : audit(history, by), values(history), readings(history)
    {
    }
    /// A folder was taken back, or the next begins.
    void forget()
    {
        audit.forget();
        values.forget();
    }

    AuditWriter audit;
    ValueInserter values;
    ReadingInserter readings;
};

} // namespace evenstroke::storage
