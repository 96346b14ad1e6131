// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <string>
#include <vector>

namespace evenstroke::storage {

/// Work done and other events of an engine.
class EventStore
{
public:
    explicit EventStore(History& history) : history_(history) {}

    /// In order of time. Events that concern the ship are shared by all her engines.
    Result<std::vector<Event>> load(const std::string& engine_id) const;
    /// Only those written with this engine.
    Result<std::vector<Event>> load_own(const std::string& engine_id) const;
    /// Answers the new event's id. @par Problems invalid_input: unknown kind, a place the engine lacks
    Result<std::string> add(const std::string& engine_id, const Event& event, const Signature& by);
    /// Changes an event (by its id); what it was stays in the audit trail.
    Done change(const Event& event, const Signature& by);
    /// Takes an event out of use; it stays in the audit trail.
    Done remove(const std::string& event_id, const Signature& by);

private:
    History& history_;
};

} // namespace evenstroke::storage
