// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "storage/history.h"

namespace evenstroke::storage {

/// What cannot be about an event, in words; nothing where all is possible.
std::optional<Problem> find_event_problem(const Event& event, const Engine& engine);
/// Whether two events are the same but for their identifiers.
bool same_event(const Event& a, const Event& b);
/// Adds the row; the caller writes the trail. Answers nothing: the event brings its id.
Done insert_event(History& history, qint64 engine_key, const Event& event);
/// Revision of the engine, or of all engines of the vessel where the event concerns the ship.
Done count_event(History& history, qint64 vessel_key, qint64 engine_key, const Event& event);
Result<std::vector<Event>> load_events(History& history, qint64 engine_key);

} // namespace evenstroke::storage
