// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/card_values.h"

#include "core/trend/conditions.h"

#include <array>
#include <cmath>

namespace evenstroke::indicator {
namespace {

struct Line
{
    const char* quantity;
    CardResult result;
};
constexpr std::array<Line, 5> lines{{{"mean_indicated_pressure", CardResult::mean_indicated_pressure},
                                     {"maximum_pressure", CardResult::maximum_pressure},
                                     {"compression_pressure", CardResult::compression_pressure},
                                     {"angle_of_maximum_pressure", CardResult::maximum_pressure_angle},
                                     {"expansion_pressure", CardResult::expansion_pressure}}};

} // namespace

std::vector<CardValue> card_values(const Engine& engine, const Reading& reading, int cylinder, const Evaluation& card)
{
    const evenstroke::Conditions read = find_conditions(engine, reading);
    const Place place = Place::cylinder(cylinder);
    std::vector<CardValue> values;
    for (const Line& line : lines) {
        const auto id = find_quantity(line.quantity, Place::Kind::cylinder);
        const auto& estimate = card[line.result];
        if (!id || !estimate || !std::isfinite(estimate->value))
            continue;
        CardValue value{line.result, *id, estimate->value, estimate->half_width, std::nullopt, 0.0};
        if (quantity(*id).kind == PressureKind::gauge) {
            value.taken_off = read.barometer.value_or(usual_barometer);
            value.number -= value.taken_off;
            if (!read.barometer && value.half_width)
                value.half_width = std::hypot(*value.half_width, usual_barometer_half_width);
        }
        if (const Value* typed = reading.find(*id, place); typed && typed->origin == Origin::read)
            if (const auto own = own_value(*typed, read); own && !own->outside_hard)
                value.hand_read = own->value;
        values.push_back(value);
    }
    return values;
}

} // namespace evenstroke::indicator
