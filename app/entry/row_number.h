// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/typed_box.h"

#include <QString>

namespace evenstroke {

/// Decimals that show a quantity in another unit as finely as in its own: 2.95 bar, 0.295 MPa.
int decimals_in(QuantityId quantity, WrittenUnit row_unit);

/// A number of the quantity's own unit as its row writes it, without the unit; empty where it cannot be told.
QString row_number(QuantityId quantity, std::optional<double> own, WrittenUnit row_unit,
                   std::optional<AbsolutePressure> barometer);

} // namespace evenstroke
