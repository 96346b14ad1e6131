// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/reading/reading.h"
#include "core/trend/judgement.h"

#include <string>

/// What an event does to the comparison, in words: the same that the judging does with it.
namespace evenstroke {

/// Whether what it concerns is compared anew from here on.
bool starts_anew(const Event& event);
/// "overhaul on 2 Dec 2026". @param place " of cylinder 4", or empty
std::string event_words(const Event& event, const std::string& place = {});
/// "compared anew", "its instrument anew", "mark only": for a table's cell.
std::string event_effect_word(const Event& event);
/// One sentence: "From here on cylinder 4 is compared anew: eight usable readings are needed before it can be flagged."
std::string event_effect_sentence(const Event& event, const Engine& engine);
/// Where an event without a time of day has a reading of the engine on its day: on which side of the work that counts, and
/// how to say otherwise. Empty where there is none, or where the kind starts nothing anew.
std::string same_day_sentence(const Event& event, const EngineRecord& record);
/// For kinds that touch the engine's technical file: where the entry belongs. Empty for the others.
/// @par Source NOx Technical Code 2008, 6.2.2 and 6.2.3 (record book of engine parameters)
std::string record_book_reminder(const Event& event);

/// Where an event of this kind belongs when a number was typed with it, or none.
/// @par Problems invalid_input: the number is asked for and missing, is not wanted, or the engine has no such part
Result<Place> place_of_event(const EventKind& kind, std::optional<int> number, const Engine& engine);
/// Whether a number may follow the kind.
bool takes_number(const EventKind& kind);

} // namespace evenstroke
