// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

namespace evenstroke {

/// Of all quantities with this one's name the one that find_quantity(name) finds: two are of one name where these are
/// equal, which costs no comparison of letters. A name may stand at two kinds of place.
QuantityId first_of_its_name(QuantityId id);

/// Letters to add, leave out or change until one text is the other (V. I. Levenshtein, 1966).
std::size_t edit_distance(std::string_view a, std::string_view b);

/// As nearest_quantity_names, derived ones too, which nobody types: for a baseline or a limit.
std::vector<std::string> nearest_names_of_all(std::string_view name, std::size_t count = 3);

} // namespace evenstroke
