// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/judgement.h"
#include "core/workings/workings.h"

namespace evenstroke {

/// The workings of one number of one reading, typed or derived, by the same functions that made the number:
/// of a typed value how it was brought to its own unit, corrected, compared with the baseline and with the
/// other cylinders; of a derived one its formula.
/// @param reading index in the judgement's readings
/// @return also where the number is not known: then `missing` says why. Nothing for words and choices, and for
///         a place that the quantity does not have.
std::optional<Workings> find_workings(const Judgement& judgement, std::size_t reading, QuantityId quantity,
                                      Place place);

} // namespace evenstroke
