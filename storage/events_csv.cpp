// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/events_csv.h"

#include "core/plain_text.h"
#include "storage/csv_table.h"
#include "storage/event_rows.h"
#include "storage/value_reader.h"

#include <QFile>

namespace evenstroke::storage {
namespace {

enum Column : std::size_t { date, cylinder, kind, note, running_hours, done_by, part };

std::optional<Event> read_row(const CsvTable& table, const Engine& engine, Refusals& refusals)
{
    Event event;
    const std::string_view when = table.cell(date);
    const auto at = parse_date(when);
    if (!at.has_value()) {
        refusals.add(table.line(), when, at.error());
        return std::nullopt;
    }
    event.date = at.value();
    event.date_only = when.find('T') == std::string_view::npos;
    const std::string_view where = table.cell(cylinder);
    const auto place = read_file_place(where, &engine);
    if (!place) {
        refusals.add(table.line(), where, "The engine has no cylinder " + evenstroke::quoted(where) + ".",
                     "Write " + cylinders_expected(engine) +
                         ", or tc1, cooler1 and so on, or leave it empty for the engine.");
        return std::nullopt;
    }
    event.place = *place;
    event.kind = table.cell(kind);
    event.note = table.cell(note);
    event.done_by = table.cell(done_by);
    event.part = table.cell(part);
    if (const std::string_view hours = table.cell(running_hours); !hours.empty()) {
        const auto number = parse_number(hours);
        if (!number.has_value()) {
            refusals.add(table.line(), hours, number.error());
            return std::nullopt;
        }
        event.running_hours = number.value();
    }
    if (const auto problem = find_event_problem(event, engine)) {
        refusals.add(table.line(), find_event_kind(event.kind) ? table.cell(running_hours) : table.cell(kind),
                     *problem);
        return std::nullopt;
    }
    return event;
}

} // namespace

ReadEvents read_events_file(const QString& path, const Engine& engine, Refusals& refusals,
                            ProgressMeter& meter)
{
    ReadEvents result;
    QFile file(path);
    if (!file.open(QIODevice::ReadOnly)) {
        refusals.add(0, "", "The file cannot be opened.", "Check that you have the right to read it.");
        return result;
    }
    CsvTable table(file,
                   {{"date"},
                    {"cylinder"},
                    {"kind"},
                    {"note"},
                    {"running_hours", false},
                    {"done_by", false},
                    {"part", false}},
                   refusals);
    if (!table.read_header())
        return result;
    result.unread_columns = table.unread_columns();
    while (table.next_row())
        if (auto event = read_row(table, engine, refusals))
            result.events.push_back(std::move(*event));
    meter.add(table.bytes_read());
    return result;
}

} // namespace evenstroke::storage
