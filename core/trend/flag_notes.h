// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"
#include "core/trend/judgement.h"

/// What people said of flags, brought to the drift method and to the flags it raised.
namespace evenstroke {

/// Answers to questions: "no work was done" takes the supposed work back. "Work was done" is an event, not a note.
std::vector<drift::Answer> answers_from_notes(const EngineRecord& record);

/// Gives each flag what was last said of it. A flag that was seen comes up again where its evidence has since
/// grown by a whole unit, or its level has risen.
void add_notes(Judgement& judgement);

} // namespace evenstroke
