// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <chrono>
#include <string>
#include <string_view>

namespace evenstroke::sample {

using Day = std::chrono::sys_days;

/// A moment on the ship's own clock.
struct ShipTime
{
    std::chrono::sys_seconds utc{};
    int offset_minutes = 0;

    std::string text() const; ///< "2023-03-14T09:40+09:00"
};

inline constexpr int month_count = 48; ///< December 2022 to November 2026

Day first_day(int month);          ///< of the month with this number, counted from December 2022
std::string month_name(int month); ///< "2022-12"
/// Number of the month with this name; the scenario's own tables only.
int month_number(std::string_view name);
Day day(std::string_view text); ///< "2023-03-14"; the scenario's own tables only
std::string day_text(Day day);
/// Months of 30.4375 days, the measure of slopes.
double months_between(Day from, std::chrono::sys_seconds to);

} // namespace evenstroke::sample
