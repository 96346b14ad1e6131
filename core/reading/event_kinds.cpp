// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/reading/reading.h"

namespace evenstroke {
namespace {

EventKind::Effect effect_of(const std::string& text)
{
    if (text == "new_segment")
        return EventKind::Effect::new_segment;
    if (text == "new_offset")
        return EventKind::Effect::new_offset;
    return text == "mark_only" ? EventKind::Effect::mark_only : EventKind::Effect::other;
}

} // namespace

std::span<const EventKind> all_event_kinds()
{
    static const std::vector<EventKind> kinds = [] {
        std::vector<EventKind> list;
        const CatalogueTable table(catalogue_text::event_kinds);
        for (std::size_t row = 0; row < table.rows(); ++row)
            list.push_back({table.cell(row, "name"), table.cell(row, "title"), table.cell(row, "concerns"),
                            effect_of(table.cell(row, "effect")), split_list(table.cell(row, "quantities"), ' '),
                            table.cell(row, "record_book") == "yes", table.cell(row, "key").front()});
        return list;
    }();
    return kinds;
}

const EventKind* find_event_kind(std::string_view name)
{
    for (const EventKind& kind : all_event_kinds())
        if (kind.name == name)
            return &kind;
    return nullptr;
}

const Value* Reading::find(QuantityId quantity, Place place) const
{
    for (const Value& value : values)
        if (value.quantity == quantity && value.place == place && value.phase == Phase::reading && value.value_si)
            return &value;
    return nullptr;
}

} // namespace evenstroke
