// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/audit_writer.h"
#include "storage/transaction.h"
#include "storage/value_rows.h"

namespace evenstroke::storage {

/// One reading under change, in one transaction.
class ReadingChange
{
public:
    ReadingChange(History& history, std::string undone)
        : history_(history), undone_(std::move(undone)), transaction_(history, undone_)
    {
    }

    /// Opens the transaction and reads the reading. @par Problems invalid_input: it is in another state
    Done begin(const std::string& reading_id, ReadingState state);
    /// The same for a draft or a closed reading, whichever it is. @par Problems invalid_input: it is withdrawn
    Done begin_unless_withdrawn(const std::string& reading_id);
    bool is_draft() const { return reading_.state == ReadingState::draft; }
    const ReadingRow& reading() const { return reading_; }
    const OwnerKeys& owner() const { return owner_; }
    std::vector<ValueRow>& values() { return values_; }
    ValueRow* find(const ValueRow& where);

    Done remove_value(const ValueRow& where);
    Done add_value(const ValueRow& value);
    Done set_state(ReadingState state);
    Done set_time(StampedTime taken_at);
    /// Notes the time of the change; for a closed or withdrawn reading also the trail and the revision.
    Done finish();
    Done finish(const char* action, const std::string& detail, const Signature& by);

private:
    Done touch();

    History& history_;
    std::string undone_;
    Transaction transaction_;
    ReadingRow reading_;
    OwnerKeys owner_;
    std::vector<ValueRow> values_;
};

/// A value whose number and SI value are worked out from the text where the caller left that open.
Value completed(Value value);
/// Keeps the old value of a closed reading beside the new one.
Done keep_correction(History& history, qint64 reading_key, const ValueRow& before, const ValueRow& after,
                     const Signature& by);
/// "112 bar", or the words, or why it is missing.
std::string value_text(const History::Names& names, const ValueRow& row);
/// A signature that will be kept for good. @par Problems invalid_input: nobody, or no reason
Done check_signature(const Signature& by, bool with_reason);
/// "maximum pressure of cylinder 4"
std::string value_name(const Value& value);

} // namespace evenstroke::storage
