// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/json_reader.h"

/// What engine.json may hold without a JSON reader seeing anything amiss: half of a correction, a name that
/// no quantity has, a key that stands twice.
namespace evenstroke::storage {

/// Both coefficients of one quantity. Nothing where the key is null or was refused: half a correction would
/// be shown as if it were a whole one.
std::optional<CorrectionCoefficients> read_coefficients(JsonReader& correction, const char* quantity,
                                                        const std::string& common_source);

/// Says which names in correction, limits, instruments and baseline no quantity has, each once a place, with
/// the known name that is probably meant.
std::vector<std::string> unknown_quantity_remarks(const Engine& engine);

/// The quantity that a misspelt or shortened name probably means; empty where none is near.
std::string likely_quantity(const std::string& name);

struct RepeatedKey
{
    std::string key;
    std::size_t offset = 0; ///< of its second place
};
/// Keys that stand twice in one object. @param text  sound JSON
std::vector<RepeatedKey> find_repeated_keys(std::string_view text);

} // namespace evenstroke::storage
