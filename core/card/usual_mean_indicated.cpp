// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/card/usual_mean_indicated.h"

#include "core/trend/conditions.h"
#include "core/trend/robust.h"

#include <vector>

namespace evenstroke::indicator {
namespace {

constexpr const char* quantity_name = "mean_indicated_pressure";

std::optional<double> middle_of_the_others(const Engine& engine, const Reading& reading, int cylinder,
                                           const evenstroke::Conditions& conditions)
{
    const auto id = find_quantity(quantity_name, Place::Kind::cylinder);
    std::vector<double> others;
    for (int other = 1; id && other <= engine.cylinders; ++other) {
        const Value* const value = other == cylinder ? nullptr : reading.find(*id, Place::cylinder(other));
        const auto own = value ? own_value(*value, conditions) : std::nullopt;
        if (own && !own->outside_hard)
            others.push_back(own->value);
    }
    if (others.empty())
        return std::nullopt;
    return drift::median_in_place(others);
}

} // namespace

std::optional<UsualMeanIndicated> usual_mean_indicated(const Engine& engine, const Reading& reading,
                                                       int cylinder)
{
    const evenstroke::Conditions conditions = find_conditions(engine, reading);
    if (conditions.load_percent) {
        const Baseline baseline(engine);
        const BaselineCurve* const curve = baseline.curve(conditions.mode, quantity_name);
        if (const auto usual = curve ? curve->at(*conditions.load_percent) : std::nullopt;
            usual && *usual > 0.0)
            return UsualMeanIndicated{*usual, true};
    }
    if (const auto usual = middle_of_the_others(engine, reading, cylinder, conditions); usual && *usual > 0.0)
        return UsualMeanIndicated{*usual, false};
    return std::nullopt;
}

bool far_from(const UsualMeanIndicated& usual, double bar)
{
    return bar < 0.5 * usual.bar || bar > 2.0 * usual.bar;
}

} // namespace evenstroke::indicator
