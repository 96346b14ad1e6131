// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

namespace evenstroke {

/// Whether a quantity may be written in this unit: one of its own dimension, or one of the few that measure
/// the same thing in another way. What becomes of those is `own_value`'s matter: litres of fuel need the
/// density, wind force has its curve, and rack millimetres or litres of cylinder oil have no way to the
/// quantity's own unit, so that they are kept and shown as typed and compared with nothing.
bool may_be_written_in(const Quantity& quantity, UnitId written);

/// Whether a unit of this dimension becomes the quantity's own one by SI alone.
bool converts_by_si(const Quantity& quantity, Dimension dimension);

/// What stands against this unit for this quantity, in words; nothing where it fits.
std::optional<Problem> find_unit_problem(const Quantity& quantity, WrittenUnit written);

} // namespace evenstroke
