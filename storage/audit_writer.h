// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/audit.h"
#include "storage/sql.h"

#include <optional>

namespace evenstroke::storage {

/// One thing that was done to one subject.
struct AuditedChange
{
    const char* action;       ///< "closed", "corrected", "taken in", ...
    const char* subject_kind; ///< "reading", "event", "engine", "vessel", "card"
    std::string subject_id;
    std::string detail;       ///< for people: what changed
    std::string content_hash; ///< of the subject after the change; empty where it is gone
};

/// Hash of a row of the trail; the row before goes in, which makes the chain.
std::string audit_row_hash(const std::string& previous, const AuditedChange& change, qint64 number, qint64 at,
                           const Signature& by);

/// Adds rows to the trail. Lives within one transaction, or is told to forget, so that nobody else adds in
/// between.
class AuditWriter
{
public:
    AuditWriter(History& history, Signature by);
    const Signature& by() const { return by_; }
    Done add(const AuditedChange& change);
    /// What was added may have been taken back: asks for the last row again.
    void forget() { knows_last_ = false; }

private:
    History& history_;
    Signature by_;
    std::optional<Query> insert_;
    bool knows_last_ = false;
    qint64 number_ = 0;
    std::string last_hash_;
};

} // namespace evenstroke::storage
