// SPDX-License-Identifier: GPL-3.0-or-later
#include "sample_vessel/engine_values.h"

#include <array>

namespace evenstroke::sample {
namespace {

/// How far a value wanders in the half hour of a steady walk, as a share of it or in its unit.
struct Wander
{
    const char* quantity;
    Writing writing;
    double steady, unsteady; ///< one standard deviation; distance of each line from the middle
    bool share;
};

constexpr std::array<Wander, 6> wanders{{
    {"speed", {"r/min", 1}, 0.0012, 0.013, true},
    {"fuel_index", {"%", 1}, 0.0035, 0.055, true},
    {"scavenge_pressure", {"bar", 2}, 0.0025, 0.035, true},
    {"turbocharger_speed", {"r/min", 0}, 0.0015, 0.016, true},
    {"exhaust_before_turbine", {"°C", 0}, 0.9, 8.0, false},
    {"scavenge_temperature", {"°C", 1}, 0.3, 1.2, false},
}};

/// +1 after the walk, -1 before it; a fresh breeze makes a steady engine wander three times as far.
double distance(const SheetInputs& in, const Wander& wander, int side)
{
    const EngineMoment& moment = in.moment;
    const int place = side > 0 ? 2 : 1;
    const double normal =
        moment.chance->normal({wander.quantity, moment.engine->number, 100 + place, moment.month});
    if (moment.unsteady)
        return side * wander.unsteady * (1.0 + 0.1 * normal);
    return (in.rough ? 3.0 : 1.0) * wander.steady * normal;
}

} // namespace

void write_quick_lines(Sheet& sheet, const SheetInputs& in)
{
    if (!in.quick_lines)
        return;
    for (const int side : {-1, 1}) {
        const char* phase = side < 0 ? "before" : "after";
        for (const Wander& wander : wanders) {
            const bool constant_speed =
                !in.moment.engine->two_stroke && std::string(wander.quantity) == "speed";
            const double middle = as_read(in, wander.quantity);
            const double moved =
                distance(in, wander, side) * (wander.share ? middle : 1.0) * (constant_speed ? 0.3 : 1.0);
            sheet.quick(phase, wander.quantity, middle + moved, wander.writing);
        }
    }
}

} // namespace evenstroke::sample
