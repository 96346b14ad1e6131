// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/running_hours.h"

namespace evenstroke {

std::optional<double> running_hours_at(std::span<const Reading> readings, TimePoint time)
{
    const auto counter = find_quantity("engine_running_hours", Place::Kind::engine);
    if (!counter)
        return std::nullopt;
    const Reading* before = nullptr;
    for (const Reading& reading : readings) {
        const Value* value = reading.find(*counter, Place::engine());
        if (!value)
            continue;
        if (reading.taken_at.utc <= time) {
            before = &reading;
            if (reading.taken_at.utc == time)
                return *value->value_si / 3600.0;
            continue;
        }
        if (!before)
            return std::nullopt;
        const double first = *before->find(*counter, Place::engine())->value_si / 3600.0, second = *value->value_si / 3600.0;
        if (second < first)
            return std::nullopt; // another counter
        const auto span = static_cast<double>((reading.taken_at.utc - before->taken_at.utc).count());
        return first + (second - first) * static_cast<double>((time - before->taken_at.utc).count()) / span;
    }
    return std::nullopt;
}

} // namespace evenstroke
