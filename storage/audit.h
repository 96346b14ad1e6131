// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <string>
#include <vector>

/// The audit trail: rows that are only ever added, each carrying the SHA-256 of itself and of the row before,
/// so that a changed or missing row shows.
namespace evenstroke::storage {

struct AuditEntry
{
    qint64 number = 0; ///< counts from 1 without a gap
    TimePoint at{};
    std::string who, action, subject_kind, subject_id, detail, why;
    std::string content_hash; ///< SHA-256 of what the subject holds after the change; empty where it is gone
    std::string row_hash;
};

/// What the check of a history found.
struct AuditFindings
{
    qint64 entries = 0, readings = 0, values = 0;
    std::string last_hash; ///< of the newest row; printed in reports
    std::vector<std::string>
        sentences; ///< what does not fit, one sentence each; empty: all is as it was written
    bool sound() const { return sentences.empty(); }
};

/// Follows the chain from the first row and compares every closed reading, event and engine with what the
/// trail says of it; the file itself is checked first. @par Problems storage, or cancelled by `progress`
Result<AuditFindings> verify(History& history, const Progress& progress = {});

/// Newest first; `subject_id` empty: of everything.
Result<std::vector<AuditEntry>> audit_entries(History& history, const std::string& subject_id = {},
                                              int at_most = 1000);
/// The hash of the newest row, and how many there are.
Result<AuditFindings> audit_state(History& history);

} // namespace evenstroke::storage
