// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/calendar.h"

#include <string>
#include <vector>

namespace evenstroke::sample {

/// One row of a readings file as it was typed.
struct Line
{
    std::string quantity, cylinder, value, unit, phase, text, missing_reason;
};

/// How a number is written down: its unit and the places its instrument shows.
struct Writing
{
    const char* unit = "";
    int decimals = 0;
};

/// One reading on paper: its name, its time and its rows in walking order.
struct Sheet
{
    std::string name;
    ShipTime time;
    std::vector<Line> lines;

    void number(const std::string& quantity, double value, Writing writing, int cylinder = 0);
    void quick(const char* phase, const std::string& quantity, double value, Writing writing);
    void words(const std::string& quantity, const std::string& text);
    /// The row of a value already written becomes an admitted gap.
    void mark_missing(const std::string& quantity, int cylinder, const std::string& reason);
    /// The ordinary row of a quantity; null where there is none.
    Line* find(const std::string& quantity, int cylinder);
};

} // namespace evenstroke::sample
