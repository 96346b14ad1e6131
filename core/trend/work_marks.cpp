// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/work_marks.h"

#include "core/trend/drift_input.h"

#include <algorithm>

namespace evenstroke {
namespace {

using namespace std::chrono_literals;

class Marker
{
public:
    Marker(drift::Input& input, std::size_t reading) : input_(input), reading_(reading) {}

    void cylinder(int number)
    {
        const std::size_t index = static_cast<std::size_t>(number) - 1;
        if (index < input_.cylinders)
            input_.cylinder_work[reading_ * input_.cylinders + index] = 1;
    }
    void all_cylinders()
    {
        for (std::size_t j = 0; j < input_.cylinders; ++j)
            cylinder(static_cast<int>(j) + 1);
    }
    void engine_level() { input_.engine_work[reading_] = 1; }

    /// @return whether anything is read by an instrument of this quantity
    bool instrument(std::string_view quantity_name, const Place& place)
    {
        bool found = false;
        for (drift::Channel& channel : input_.channels) {
            if (channel.quantity != quantity_name)
                continue;
            found = true;
            channel.segment_starts.resize(input_.readings() * input_.cylinders, 0);
            for (std::size_t j = 0; j < input_.cylinders; ++j)
                if (place.kind != Place::Kind::cylinder || static_cast<std::size_t>(place.number) == j + 1)
                    channel.segment_starts[reading_ * input_.cylinders + j] = 1;
        }
        for (drift::EngineChannel& channel : input_.engine_channels) {
            if (channel.quantity != quantity_name && channel.typed_quantity != quantity_name)
                continue;
            found = true;
            start(channel);
        }
        // What is only shown begins anew with any instrument that it rests on.
        for (drift::EngineChannel& channel : input_.engine_channels) {
            const DerivedQuantity* derived = channel.in_scan ? nullptr : find_derived(channel.quantity);
            if (derived && std::find(derived->inputs.begin(), derived->inputs.end(), quantity_name) != derived->inputs.end())
                start(channel);
        }
        return found;
    }

private:
    void start(drift::EngineChannel& channel) const
    {
        channel.segment_starts.resize(input_.readings(), 0);
        channel.segment_starts[reading_] = 1;
    }

    drift::Input& input_;
    std::size_t reading_;
};

void mark_instrument(Marker& marker, const Event& event, const EventKind& kind)
{
    bool said_which = false;
    for (const std::string& name : kind.quantities) {
        if (name != "quantity_read")
            said_which = marker.instrument(name, event.place) || said_which;
        else if (!event.part.empty())
            said_which = marker.instrument(event.part, event.place) || said_which;
    }
    if (said_which)
        return;
    if (event.place.kind == Place::Kind::cylinder)
        return marker.cylinder(event.place.number);
    if (event.place.kind == Place::Kind::engine)
        marker.all_cylinders();
    marker.engine_level();
}

void mark_work(Marker& marker, const Event& event, const EventKind& kind)
{
    if (event.place.kind == Place::Kind::cylinder)
        return marker.cylinder(event.place.number);
    const bool of_air_side = kind.concerns == "turbocharger" || kind.concerns == "cooler" ||
                             event.place.kind == Place::Kind::turbocharger || event.place.kind == Place::Kind::cooler;
    if (!of_air_side)
        marker.all_cylinders();
    marker.engine_level();
}

} // namespace

std::size_t first_reading_after(const EngineRecord& record, const Event& event)
{
    const TimePoint from = event.date.utc + (event.date_only ? 12h : 0h);
    const auto first = std::upper_bound(record.readings.begin(), record.readings.end(), from,
                                        [](TimePoint time, const Reading& r) { return time < r.taken_at.utc; });
    return static_cast<std::size_t>(first - record.readings.begin());
}

void mark_recorded_work(const EngineRecord& record, drift::Input& input)
{
    input.cylinder_work.assign(input.readings() * input.cylinders, 0);
    input.engine_work.assign(input.readings(), 0);
    for (const Event& event : record.events) {
        const EventKind* kind = find_event_kind(event.kind);
        const std::size_t reading = first_reading_after(record, event);
        if (!kind || reading >= input.readings() || kind->concerns == "ship")
            continue;
        Marker marker(input, reading);
        if (kind->effect == EventKind::Effect::new_offset)
            mark_instrument(marker, event, *kind);
        else if (kind->effect == EventKind::Effect::new_segment)
            mark_work(marker, event, *kind);
    }
}

} // namespace evenstroke
