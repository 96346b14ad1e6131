// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "storage/history.h"

#include <optional>
#include <string>
#include <vector>

namespace evenstroke::storage {

/// One line of the list of engines.
struct EngineEntry
{
    std::string id, name;
    std::string vessel_id, vessel_name;
    qint64 input_revision =
        0; ///< grows with every change of what is judged: engine, readings, events, ship's readings
};

/// An engine as it is in force.
struct StoredEngine
{
    Engine engine;
    Vessel vessel;
    std::string document; ///< engine.json as text, unknown keys and all
    int revision = 1;
    std::vector<std::string> unknown_keys;
};

/// One state of an engine's particulars; the newest is in force.
struct EngineRevision
{
    int revision = 1;
    std::string document;
    TimePoint at{};
    Signature by;
};

struct SavedEngine
{
    std::string engine_id, vessel_id;
    int revision = 1;
    enum class Outcome {
        made,
        changed,
        same,
        earlier
    } outcome = Outcome::made; ///< earlier: the text is a former revision, the newer stays in force
};

/// Vessels and their engines. Identity is the vessel's name with the engine's name.
class VesselStore
{
public:
    explicit VesselStore(History& history) : history_(history) {}

    Result<std::vector<Vessel>> vessels() const;
    Result<Vessel> vessel(const std::string& vessel_id) const;
    /// Ordered by vessel, then engine.
    Result<std::vector<EngineEntry>> engines() const;
    Result<std::vector<EngineEntry>> engines_of(const std::string& vessel_id) const;
    /// The one engine of this name. @par Problems not_found; invalid_input: several, the candidates are named
    Result<EngineEntry> find_engine(const std::string& engine_name,
                                    const std::optional<std::string>& vessel_name = {}) const;
    /// @par Problems not_found, with the vessels there are
    Result<Vessel> find_vessel(const std::string& vessel_name) const;
    Result<StoredEngine> engine(const std::string& engine_id) const;
    Result<std::vector<EngineRevision>> revisions(const std::string& engine_id) const;

    /// Changes a vessel's particulars (by id), or adds a vessel (id empty). Answers its id.
    Result<std::string> save_vessel(const Vessel& vessel, const Signature& by);
    /// Writes the engine's known keys over its document, keeps the others, and makes that the revision in
    /// force. An engine without id is added to the vessel.
    Result<SavedEngine> save_engine(const std::string& vessel_id, const Engine& engine, const Signature& by);
    /// Takes an engine.json as it stands: vessel and engine are added where they are new. Taking a former
    /// revision again changes nothing.
    Result<SavedEngine> save_document(const std::string& document, const Signature& by);

private:
    History& history_;
};

} // namespace evenstroke::storage
