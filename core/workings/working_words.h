// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/engine.h"
#include "core/sentence_words.h"
#include "core/reading/reading.h"

#include <string>
#include <string_view>
#include <vector>

/// The words of a sheet of workings.
namespace evenstroke {

/// As the formulas write it, "p_scav": resources/catalogue/quantity_symbols.csv; the short title where none is given.
std::string symbol_of(const Quantity& quantity);
/// "bar gauge", "°C"; empty for a bare number.
std::string unit_words(const Quantity& quantity);
/// "cylinder A3", "turbocharger 2"; empty for the engine and the ship.
std::string part_words(const Engine& engine, const Place& place);
/// "typed 2,51 bar", with the kind of pressure where it was typed.
std::string words_as_typed(const Value& value);
/// "was not read", "is not fitted", "is out of order": what the reading says of a value that is not there.
std::string why_missing(const Reading& reading, std::string_view name, const Place& place);

} // namespace evenstroke
