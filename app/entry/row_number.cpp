// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/entry/row_number.h"

#include "app/desk/number_text.h"

#include <algorithm>
#include <cmath>

namespace evenstroke {

int decimals_in(QuantityId id, WrittenUnit row_unit)
{
    const double finer = unit(row_unit.id).factor / unit(quantity(id).unit).factor;
    const int shift = finer > 0.0 ? static_cast<int>(std::lround(std::log10(finer))) : 0;
    return std::clamp(quantity(id).decimals + shift, 0, 6);
}

QString row_number(QuantityId id, std::optional<double> own, WrittenUnit row_unit,
                   std::optional<AbsolutePressure> barometer)
{
    const auto shown = own ? in_row_unit(id, *own, row_unit, barometer) : std::nullopt;
    return shown ? number_text(*shown, decimals_in(id, row_unit)) : QString();
}

} // namespace evenstroke
