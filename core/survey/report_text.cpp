// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/rounding.h"
#include "core/survey/survey_report.h"

#include <chrono>

namespace evenstroke {
namespace {

using namespace report;

std::string across_text(const Plot& plot, double across)
{
    if (plot.across == Plot::Across::load)
        return rounded_text(across, 1) + " %";
    if (plot.across == Plot::Across::angle)
        return rounded_text(across, 0) + "°";
    return date_text(TimePoint(std::chrono::seconds(static_cast<long long>(across))));
}

std::string line_of(const std::vector<std::string>& cells)
{
    std::string line;
    for (std::size_t i = 0; i < cells.size(); ++i)
        line += (i == 0 ? "" : "\t") + cells[i];
    return line + "\n";
}

struct AsText
{
    std::string operator()(const Paragraph& paragraph) const
    {
        return with_page_references(paragraph.text, [](const std::string&) { return std::string(); }) + "\n"; // text has no pages
    }
    std::string operator()(const Heading& heading) const { return "\n" + heading.text + "\n"; }
    std::string operator()(const FieldList& list) const
    {
        std::string text;
        for (const auto& field : list.fields)
            text += field.name + ":\t" + field.value + "\n";
        return text;
    }
    std::string operator()(const Table& table) const
    {
        std::vector<std::string> titles;
        for (const Column& column : table.columns)
            titles.push_back(column.title);
        std::string text = (table.caption.empty() ? "" : table.caption + "\n") + line_of(titles);
        for (const Row& row : table.rows)
            text += line_of(row.cells);
        return text + (table.note.empty() ? "" : table.note + "\n");
    }
    std::string operator()(const Plot& plot) const
    {
        std::string text = plot.title + " (" + plot.value_title + ")\n";
        for (const PlotLine& line : plot.lines)
            for (const PlotPoint& point : line.points)
                text += line.label + "\t" + across_text(plot, point.across) + "\t" + rounded_text(point.value, 3) + "\n";
        for (const Plot::At& event : plot.events)
            text += across_text(plot, event.across) + "\t" + event.text + "\n";
        for (const Plot::Limit& limit : plot.limits)
            text += limit.text + "\t" + rounded_text(limit.value, 3) + "\n";
        return text;
    }
    std::string operator()(const Strips& strips) const
    {
        std::vector<std::string> titles{""};
        titles.insert(titles.end(), strips.columns.begin(), strips.columns.end());
        std::string text = line_of(titles);
        for (const Strips::Row& row : strips.rows) {
            std::vector<std::string> cells{row.title + ", " + row.unit};
            for (const Strips::Cell& cell : row.cells)
                cells.push_back(cell.newest + (cell.remark.empty() ? "" : " " + cell.remark));
            text += line_of(cells);
        }
        return text;
    }
    std::string operator()(const SignOff& sign) const
    {
        std::string text = sign.role + ": " + sign.statement + "\n";
        for (const auto& field : sign.fields)
            text += field.name + ":\t" + field.value + "\n";
        return text;
    }
};

} // namespace

std::string report::page_reference(const std::string& section_title) { return "\x01" + section_title + "\x02"; }

std::string report_as_text(const SurveyReport& report)
{
    std::string text = report.ship + ", " + report.engine + ", " + date_text(report.period.from) + " to "
                       + date_text(report.period.to) + ", report " + report.number + "\n";
    for (const Section& section : report.sections) {
        text += "\n" + section.title + "\n";
        for (const Block& block : section.blocks)
            text += std::visit(AsText{}, block);
    }
    return text;
}

} // namespace evenstroke
