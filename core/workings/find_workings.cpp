// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/workings/find_workings.h"

#include "core/workings/derived_workings.h"
#include "core/trend/usual_level.h"
#include "core/workings/typed_workings.h"

namespace evenstroke {
namespace {

/// The last step, from the others or the baseline to the place's own usual level: what the marks go by.
void add_usual_level(Workings& sheet, const Judgement& judgement, std::size_t reading, QuantityId id)
{
    const auto usual = sheet.value ? usual_level(judgement, reading, id, sheet.place) : std::nullopt;
    if (!usual)
        return;
    sheet.from_usual = usual->from_usual();
    const std::string in = difference_unit(quantity(id));
    sheet.steps.push_back({"Its own usual level, the middle of up to 12 readings before any change", usual->middle(), in});
    sheet.steps.push_back({"Usual range about it, either way", usual->high - usual->middle(), in});
    sheet.steps.push_back({"From its own usual level", usual->from_usual(), in});
}

bool has_place(const Engine& engine, Place place)
{
    return place.kind != Place::Kind::cylinder || (place.number >= 1 && place.number <= engine.cylinders);
}

bool was_typed(const Reading& reading, QuantityId id, Place place)
{
    const Value* value = reading.find(id, place);
    return value && value->number;
}

/// Whether somebody could type this quantity at this place.
bool can_be_typed(const Quantity& q, Place place)
{
    if (q.derived() || q.type != ValueType::number)
        return false;
    return find_quantity(q.name, place.kind) == std::optional(q.id);
}

} // namespace

std::optional<Workings> find_workings(const Judgement& judgement, std::size_t reading, QuantityId id, Place place)
{
    if (!judgement.record || reading >= judgement.readings.size() || reading >= judgement.record->readings.size())
        return std::nullopt;
    const EngineRecord& record = *judgement.record;
    const Quantity& q = quantity(id);
    if (!has_place(record.engine, place))
        return std::nullopt;
    const Baseline baseline(record.engine);
    const DerivedQuantity* derived = find_derived(id, place.kind);
    const bool worked_out = derived && (q.derived() || !was_typed(record.readings[reading], id, place));
    if (!worked_out && !can_be_typed(q, place))
        return std::nullopt;
    Workings sheet = worked_out ? derived_workings(DerivedReading(record.engine, baseline, record.readings[reading]), *derived, place)
                                : typed_workings(judgement, baseline, reading, q, place);
    add_usual_level(sheet, judgement, reading, id);
    return sheet;
}

} // namespace evenstroke
