// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

namespace evenstroke {

/// Of all quantities with this one's name the one that find_quantity(name) finds: two are of one name where these are
/// equal, which costs no comparison of letters. A name may stand at two kinds of place.
QuantityId first_of_its_name(QuantityId id);

} // namespace evenstroke
