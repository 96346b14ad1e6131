// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/refusals.h"
#include "storage/value_reader.h"

#include <QString>

#include <string>
#include <vector>

namespace evenstroke::storage {

struct ReadValue
{
    ValueRow row;
    qint64 line = 0;
};

/// What a file says of one reading, its values in the order of the file's numbering.
struct ReadReading
{
    std::string name;
    StampedTime taken_at;
    qint64 line = 0; ///< where it was first named
    std::vector<ReadValue> values;
};

struct ReadReadings
{
    std::vector<ReadReading> readings;
    TakeCounts counts; ///< `same`: rows that the file says twice
    std::vector<std::string> unread_columns;
};

/// Reads readings.csv, or ship_readings.csv where `engine` is null. What cannot be taken is among the
/// refusals; the rest is answered. Needs a transaction.
ReadReadings read_readings_file(const QString& path, const Engine* engine, History::Names& names,
                                Refusals& refusals, ProgressMeter& meter);

/// "112 bar", "not read", "residual": a stored value in a sentence.
std::string shown_value(const History::Names& names, const ValueRow& row);
/// Whether two rows say the same about the same place, however they write it.
bool means_the_same(const History::Names& names, const ValueRow& a, const ValueRow& b);
/// "maximum_pressure, cylinder 4"
std::string shown_place(const History::Names& names, const ValueRow& row);

} // namespace evenstroke::storage
