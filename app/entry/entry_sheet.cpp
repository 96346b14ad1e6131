// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/entry_sheet.h"

#include <algorithm>

namespace evenstroke {
namespace {

auto find_in(std::vector<Value>& values, const LogBox& box)
{
    return std::find_if(values.begin(), values.end(),
                        [&](const Value& value) { return box_of(value) == box; });
}

const Value* find_in(const std::vector<Value>& values, const LogBox& box)
{
    const auto found =
        std::find_if(values.begin(), values.end(), [&](const Value& value) { return box_of(value) == box; });
    return found == values.end() ? nullptr : &*found;
}

} // namespace

LogBox box_of(const Value& value)
{
    return {value.quantity, value.place, value.phase};
}

bool says_something(const Value& value)
{
    return value.number || !value.words.empty() || !value.typed.empty() ||
           value.missing != MissingReason::none;
}

bool same_value(const Value& a, const Value& b)
{
    return box_of(a) == box_of(b) && a.typed == b.typed && a.unit == b.unit && a.kind == b.kind &&
           a.number == b.number && a.words == b.words && a.missing == b.missing && a.confirmed == b.confirmed &&
           a.origin == b.origin;
}

void EntrySheet::start(SheetStart start)
{
    start_ = std::move(start);
    sections_ = make_log_sheet(start_.engine, start_.layout);
    emit restarted();
}

void EntrySheet::set_head(const std::string& id, const std::string& name, StampedTime taken_at)
{
    start_.reading.id = id;
    start_.reading.name = name;
    start_.reading.taken_at = taken_at;
    emit head_changed();
}

void EntrySheet::set_ship(std::vector<Value> values, bool open)
{
    start_.ship = std::move(values);
    start_.ship_open = open;
    emit ship_changed();
}

WrittenUnit EntrySheet::row_unit(QuantityId quantity) const
{
    const auto chosen = start_.units.find(quantity);
    return chosen == start_.units.end() ? own_unit(quantity) : chosen->second;
}

void EntrySheet::set_row_unit(QuantityId quantity, WrittenUnit unit)
{
    start_.units[quantity] = unit;
    emit row_unit_changed(quantity);
}

const Value* EntrySheet::value(const LogBox& box) const
{
    if (const Value* own = find_in(start_.reading.values, box))
        return own;
    return box.place.kind == Place::Kind::ship ? find_in(start_.ship, box) : nullptr;
}

bool EntrySheet::lent(const LogBox& box) const
{
    return !start_.ship_open && box.place.kind == Place::Kind::ship && !find_in(start_.reading.values, box) &&
           find_in(start_.ship, box);
}

EntrySheet::Owner EntrySheet::owner_of(const LogBox& box) const
{
    return box.place.kind == Place::Kind::ship && start_.ship_open ? Owner::ship : Owner::reading;
}

std::vector<Value>& EntrySheet::values_of(Owner owner)
{
    return owner == Owner::ship ? start_.ship : start_.reading.values;
}

void EntrySheet::put(const Value& value)
{
    const LogBox box = box_of(value);
    const Owner owner = owner_of(box);
    std::vector<Value>& values = values_of(owner);
    const auto old = find_in(values, box);
    if (!says_something(value)) {
        if (old == values.end())
            return;
        values.erase(old);
    } else if (old != values.end()) {
        *old = value;
    } else {
        values.push_back(value);
    }
    emit value_put(box, owner);
}

void EntrySheet::keep_unreadable(const LogBox& box, const QString& text)
{
    start_.unreadable[box] = text;
    emit unreadable_changed(box);
}

bool EntrySheet::forget_unreadable(const LogBox& box)
{
    if (start_.unreadable.erase(box) == 0)
        return false;
    emit unreadable_changed(box);
    return true;
}

bool EntrySheet::empty() const
{
    return start_.reading.values.empty() && (!start_.ship_open || start_.ship.empty());
}

Reading EntrySheet::whole() const
{
    Reading all = start_.reading;
    for (const Value& value : start_.ship)
        if (!find_in(start_.reading.values, box_of(value)))
            all.values.push_back(value);
    for (const LogSection& section : sections_) {
        for (const LogRow& row : section.rows) {
            for (const LogBox& box : row.boxes) {
                if (value(box))
                    continue;
                Value none;
                none.quantity = box.quantity;
                none.place = box.place;
                none.phase = box.phase;
                none.unit = row_unit(box.quantity).id;
                none.kind = row_unit(box.quantity).kind;
                all.values.push_back(none);
            }
        }
    }
    return all;
}

} // namespace evenstroke
