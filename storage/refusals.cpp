// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/refusals.h"

#include "core/plain_text.h"

#include <algorithm>

namespace evenstroke::storage {

void Refusals::add(qint64 line, std::string_view value, std::string reason, std::string expected)
{
    if (++count_ > most)
        return;
    // Quoted and unquoted again: shortened, without control characters, always UTF-8.
    std::string shown = evenstroke::quoted(value);
    shown = shown.substr(1, shown.size() - 2);
    rows_.push_back({file_, line, std::move(shown), std::move(reason), std::move(expected)});
}

bool ProgressMeter::add(qint64 bytes)
{
    done_ += bytes;
    if (!stopped_ && progress_ && !progress_(std::min(done_, total_), total_))
        stopped_ = true;
    return !stopped_;
}

std::string RefusedRow::text() const
{
    std::string text = file;
    if (line > 0)
        text += ", line " + std::to_string(line);
    return text + ": " + reason + (expected.empty() ? "" : " " + expected);
}

TakeCounts& TakeCounts::operator+=(const TakeCounts& other)
{
    fresh += other.fresh;
    same += other.same;
    refused += other.refused;
    return *this;
}

TakeCounts FolderReport::rows() const
{
    TakeCounts all = values;
    all += events;
    all += cards;
    return all;
}

bool TakeReport::anything_taken() const
{
    return std::any_of(folders.begin(), folders.end(),
                       [](const FolderReport& folder) { return folder.taken; });
}

bool TakeReport::anything_refused() const
{
    return std::any_of(folders.begin(), folders.end(),
                       [](const FolderReport& folder) { return folder.anything_refused(); });
}

} // namespace evenstroke::storage
