// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"
#include "storage/refusals.h"

#include <QString>

#include <vector>

namespace evenstroke::storage {

struct ReadEvents
{
    std::vector<Event> events;
    std::vector<std::string> unread_columns;
};

/// Reads events.csv. What cannot be taken is among the refusals; the rest is answered.
ReadEvents read_events_file(const QString& path, const Engine& engine, Refusals& refusals,
                            ProgressMeter& meter);

} // namespace evenstroke::storage
