// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/audit_writer.h"
#include "storage/engine_json.h"
#include "storage/vessel_store.h"

namespace evenstroke::storage {

/// What taking a document did to the vessel and the engine.
struct TakenDocument
{
    SavedEngine saved;
    std::vector<std::string> remarks; ///< what of it was not taken
};

/// Takes a document that was already read and found sound. Needs a transaction.
Result<TakenDocument> take_document(History& history, const EngineDocument& document, AuditWriter& audit);

} // namespace evenstroke::storage
