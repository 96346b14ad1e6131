// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/drift.h"
#include "core/trend/judgement.h"

#include <string>

/// The words of a flag: what moved, how much, since when, compared with what, how likely by chance.
namespace evenstroke {

/// "4 cylinders" as the engine names them: "Cylinder 4", "Cylinder A3", "The engine".
std::string subject_text(const Engine& engine, const Place& subject);

/// Fills sentence, chance sentence, next check, pattern words and cautions of a flag whose numbers are set.
void word_flag(Flag& flag, const Engine& engine, double years_by_chance);

/// For lists: what moved most, and the pattern.
std::string short_sentence(const Flag& flag, const Engine& engine);

/// "2 Dec 2026, A. Chief: rings looked at". @param day on which it was written, as the page or paper writes days
std::string note_text(const FlagNote& note, const std::string& day);

/// Sentence for a limit of the maker that a reading passed.
std::string limit_sentence(const Engine& engine, const Place& place, const Quantity& quantity, double value,
                           double limit, bool above, const std::string& source);

/// What looks mistyped, with the value as typed and the one probably meant.
std::string doubt_sentence(const Engine& engine, const Doubt& doubt, const std::string& typed_text);

/// "0.6", "12", "340": two significant digits, never an exponent.
std::string two_digits(double amount);

/// What to look at next for a pattern or a quantity: resources/catalogue/next_checks.csv.
std::string next_check(const std::string& pattern, const std::string& quantity);

} // namespace evenstroke
