// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"

#include <string>

/// Hashes of what the subjects of the audit trail hold; the same whoever computes them.
namespace evenstroke::storage {

std::string vessel_hash(const Vessel& vessel);
std::string engine_hash(const std::string& id, const std::string& name, const std::string& document);
std::string event_hash(const Event& event, const std::string& engine_id);

} // namespace evenstroke::storage
