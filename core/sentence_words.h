// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"

#include <string>
#include <vector>

/// How titles and lists stand inside a sentence, the same in every sentence of the program.
namespace evenstroke {

/// "Scavenge pressure" as the inside of a sentence has it; what begins with an abbreviation ("MIP") stays.
std::string lower_first(std::string text);
/// The first word of a sentence.
std::string upper_first(std::string text);
/// "a, b and c"
std::string and_list(const std::vector<std::string>& parts);
/// "a, b, c"
std::string comma_list(const std::vector<std::string>& parts);
/// "cylinder A3" by the maker's own mark, "turbocharger 2", "engine".
std::string place_words(const Engine& engine, const Place& place);

} // namespace evenstroke
