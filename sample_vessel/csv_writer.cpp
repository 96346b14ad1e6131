// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/decimal_text.h"
#include "sample_vessel/file_writer.h"
#include "sample_vessel/reading_maker.h"

#include <algorithm>
#include <initializer_list>

namespace evenstroke::sample {
namespace {

/// Quoted only where it must be.
std::string field(const std::string& text)
{
    if (text.find_first_of(",\"\n\r") == std::string::npos)
        return text;
    std::string quoted = "\"";
    for (const char letter : text)
        quoted += letter == '"' ? std::string("\"\"") : std::string(1, letter);
    return quoted + "\"";
}

void add_row(std::string& csv, std::initializer_list<std::string> fields)
{
    bool first = true;
    for (const std::string& text : fields) {
        csv += first ? "" : ",";
        csv += field(text);
        first = false;
    }
    csv += "\n";
}

/// A change of fuel is an event of every engine that burns it.
std::vector<Work> with_fuel_changes(const Scenario& scenario, int engine)
{
    std::vector<Work> events;
    for (const Work& work : scenario.work)
        if (work.engine == engine)
            events.push_back(work);
    for (const FuelBatch& batch : scenario.fuel)
        if (day(batch.from) >= first_day(0))
            events.push_back({engine, batch.from, 0, "fuel_changed", batch.kind, "third engineer", "", {}});
    std::stable_sort(events.begin(), events.end(),
                     [](const Work& a, const Work& b) { return a.date < b.date; });
    return events;
}

} // namespace

std::string readings_csv(const std::vector<Sheet>& sheets)
{
    std::string csv = "reading,taken_at,quantity,cylinder,value,unit,phase,text,missing_reason\n";
    for (const Sheet& sheet : sheets)
        for (const Line& line : sheet.lines)
            add_row(csv, {sheet.name, sheet.time.text(), line.quantity, line.cylinder, line.value, line.unit,
                          line.phase, line.text, line.missing_reason});
    return csv;
}

std::string ship_readings_csv(const std::vector<Sheet>& sheets)
{
    std::string csv = "reading,taken_at,quantity,value,unit\n";
    for (const Sheet& sheet : sheets)
        for (const Line& line : sheet.lines)
            add_row(csv, {sheet.name, sheet.time.text(), line.quantity, line.value, line.unit});
    return csv;
}

std::string events_csv(const Scenario& scenario, int engine)
{
    std::string csv = "date,cylinder,kind,note,running_hours,done_by,part\n";
    for (const Work& work : with_fuel_changes(scenario, engine))
        add_row(csv,
                {work.date, work.cylinder == 0 ? "" : std::to_string(work.cylinder), work.kind, work.note,
                 decimal_text(running_hours(engine, day(work.date)), 0), work.done_by, work.part});
    return csv;
}

} // namespace evenstroke::sample
