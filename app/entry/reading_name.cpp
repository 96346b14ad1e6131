// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/reading_name.h"

#include <algorithm>

namespace evenstroke {

std::string free_name(const Result<std::vector<storage::ReadingEntry>>& taken, StampedTime time,
                      const std::string& own)
{
    const auto is_taken = [&](const std::string& name) {
        return taken && std::any_of(taken.value().begin(), taken.value().end(),
                                    [&](const storage::ReadingEntry& entry) {
                                        return entry.name == name && (own.empty() || entry.id != own);
                                    });
    };
    const std::string day = date_text(time.utc + std::chrono::minutes(time.offset_minutes));
    const std::string month = day.substr(0, 7);
    if (!is_taken(month))
        return month;
    std::string name = day;
    for (int number = 2; is_taken(name); ++number)
        name = day + "-" + std::to_string(number);
    return name;
}

int last_offset(const std::vector<storage::ReadingEntry>& readings)
{
    return readings.empty() ? 0 : readings.front().taken_at.offset_minutes;
}

} // namespace evenstroke
