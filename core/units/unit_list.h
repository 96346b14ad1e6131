// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/units/unit_catalogue.h"

/// How the unit catalogue finds a spelling. For find_unit only; everybody else calls find_unit.
namespace evenstroke::unit_list {

constexpr UnitId no_unit = -1;

/// The unit written exactly so, or `no_unit`.
UnitId find_exact(std::string_view spelling);

/// The unit whose spelling differs at most in upper and lower case, where the written case cannot mean
/// anything else; `no_unit` otherwise.
UnitId find_other_case(std::string_view spelling);

/// The unit that other case would have given had it been allowed: for the sentence that refuses it.
UnitId find_any_case(std::string_view spelling);

/// The unit with the spelling nearest to this one, or `no_unit` where none is near.
UnitId find_nearest(std::string_view spelling);

} // namespace evenstroke::unit_list
