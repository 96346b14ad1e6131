// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"
#include "storage/history.h"

namespace evenstroke::storage {

Result<std::vector<FlagNote>> load_flag_notes(History& history, qint64 engine_key);
/// What the trail holds of a note.
std::string flag_note_hash(const FlagNote& note, const std::string& engine_id);

} // namespace evenstroke::storage
