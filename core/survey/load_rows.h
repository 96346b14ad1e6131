// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/survey/survey_context.h"

/// What an engine may state beside its size and rating, for the section of reference conditions.
namespace evenstroke::report {

/// Limits of the load diagram and walls, a row each with its source.
Table load_and_walls_table(const Engine& engine);
/// The reference humidity, and whether anything depends on it.
std::string humidity_words(const Engine& engine);
std::string_view aspiration_words(AspirationClass aspiration);

} // namespace evenstroke::report
