// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/readings_csv.h"
#include "storage/take_writers.h"

namespace evenstroke::storage {

/// Brings what a file says of an owner's readings together with what the history holds: first only looks,
/// then writes. Both within the caller's transaction.
class ReadingMerge
{
public:
    ReadingMerge(History& history, OwnerKeys owner) : history_(history), owner_(owner) {}

    /// Sorts the values into new ones, known ones and contradictions.
    Done compare(ReadReadings& read, Refusals& refusals);
    const TakeCounts& counts() const { return counts_; } ///< `refused` is counted by the refusals
    /// Writes what is new, closed and audited. @par Problems storage; a stopped meter ends it early
    Done write(TakeWriters& writers, ProgressMeter& meter);

private:
    struct Target
    {
        ReadingRow head; ///< key 0: new
        std::vector<ValueRow> stored;
        std::vector<ValueRow> fresh;
        std::vector<ValueRow> replaced; ///< empty boxes of the history that the file fills
    };

    Done compare_reading(ReadReading& read, const ReadingRow* stored, Refusals& refusals);
    Result<bool> compare_value(const ReadReading& reading, const ReadValue& read, Target& target,
                               Refusals& refusals);
    Result<bool> was_corrected(qint64 reading_key, const ValueRow& row);
    Done write_target(Target& target, TakeWriters& writers, Query& remove);

    History& history_;
    OwnerKeys owner_;
    std::vector<Target> targets_;
    TakeCounts counts_;
};

} // namespace evenstroke::storage
