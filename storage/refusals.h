// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/take_in.h"

#include <string>
#include <string_view>
#include <vector>

namespace evenstroke::storage {

/// What of one file cannot be taken. Keeps the first thousand, counts all.
class Refusals
{
public:
    Refusals(std::string file, std::vector<RefusedRow>& rows) : file_(std::move(file)), rows_(rows) {}

    /// @param line  counts from 1; 0: the file as a whole
    void add(qint64 line, std::string_view value, std::string reason, std::string expected);
    void add(qint64 line, std::string_view value, const Problem& problem)
    {
        add(line, value, problem.what_happened, problem.what_to_do);
    }
    qint64 count() const { return count_; }
    const std::string& file() const { return file_; }

private:
    static constexpr qint64 most = 1000;
    std::string file_;
    std::vector<RefusedRow>& rows_;
    qint64 count_ = 0;
};

/// Counts the bytes that were read against the bytes there are, and hears whether to go on.
class ProgressMeter
{
public:
    ProgressMeter(const Progress& progress, qint64 total) : progress_(progress), total_(total) {}
    /// False: stop.
    bool add(qint64 bytes);
    bool stopped() const { return stopped_; }

private:
    const Progress& progress_;
    qint64 done_ = 0, total_ = 0;
    bool stopped_ = false;
};

} // namespace evenstroke::storage
