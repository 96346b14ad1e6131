// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/sheet.h"

#include "sample_vessel/decimal_text.h"

namespace evenstroke::sample {
namespace {

std::string cylinder_text(int cylinder)
{
    return cylinder == 0 ? std::string() : std::to_string(cylinder);
}

} // namespace

void Sheet::number(const std::string& quantity, double value, Writing writing, int cylinder)
{
    lines.push_back(
        {quantity, cylinder_text(cylinder), decimal_text(value, writing.decimals), writing.unit, "", "", ""});
}

void Sheet::quick(const char* phase, const std::string& quantity, double value, Writing writing)
{
    lines.push_back({quantity, "", decimal_text(value, writing.decimals), writing.unit, phase, "", ""});
}

void Sheet::words(const std::string& quantity, const std::string& text)
{
    lines.push_back({quantity, "", "", "", "", text, ""});
}

void Sheet::mark_missing(const std::string& quantity, int cylinder, const std::string& reason)
{
    if (Line* line = find(quantity, cylinder))
        *line = {line->quantity, line->cylinder, "", "", "", "", reason};
}

Line* Sheet::find(const std::string& quantity, int cylinder)
{
    const std::string where = cylinder_text(cylinder);
    for (Line& line : lines)
        if (line.quantity == quantity && line.cylinder == where && line.phase.empty())
            return &line;
    return nullptr;
}

} // namespace evenstroke::sample
