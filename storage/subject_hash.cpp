// SPDX-License-Identifier: GPL-3.0-or-later
#include "storage/subject_hash.h"

#include "storage/content_hash.h"
#include "storage/names.h"

namespace evenstroke::storage {

std::string vessel_hash(const Vessel& vessel)
{
    ContentHash content;
    content.add(vessel.id)
        .add(vessel.name)
        .add(vessel.imo)
        .add(vessel.flag)
        .add(vessel.class_society)
        .add(vessel.class_number);
    return content.hex();
}

std::string engine_hash(const std::string& id, const std::string& name, const std::string& document)
{
    ContentHash content;
    content.add(id).add(name).add(document);
    return content.hex();
}

std::string event_hash(const Event& event, const std::string& engine_id)
{
    ContentHash content;
    content.add(event.id)
        .add(engine_id)
        .add(qint64{event.date.utc.time_since_epoch().count()})
        .add(qint64{event.date.offset_minutes});
    content.add(qint64{event.date_only}).add(qint64{place_code(event.place)}).add(event.kind).add(event.note);
    content.add(event.running_hours).add(event.done_by).add(event.part);
    return content.hex();
}

} // namespace evenstroke::storage
