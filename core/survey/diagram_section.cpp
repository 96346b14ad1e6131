// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/survey/survey_context.h"

#include <algorithm>

namespace evenstroke::report {

Section diagrams_section(const Context& context)
{
    Section section{"Indicator diagrams", false, {}};
    Table table{"Kept in the history with the readings of the period",
                {{"Reading", Column::Kind::words}, {"Date", Column::Kind::words}, {"Cylinders", Column::Kind::remark}}, {}, 1,
                "The traces are kept as they were taken."};
    for (const std::size_t i : context.readings) {
        const Reading& reading = context.record.readings[i];
        std::string cylinders;
        for (const DiagramLine& line : context.details.diagrams)
            if (line.reading_id == reading.id)
                cylinders += (cylinders.empty() ? "" : ", ") + context.engine.cylinder_name(line.cylinder);
        if (!cylinders.empty())
            table.rows.push_back({{reading.name, date_text(reading.taken_at.utc), cylinders}, true});
    }
    if (table.rows.empty())
        section.blocks.push_back(Paragraph{"None in this period: the history holds no indicator diagram with its readings.", {}});
    else
        section.blocks.push_back(std::move(table));
    add_cards(context, section);
    return section;
}

} // namespace evenstroke::report
