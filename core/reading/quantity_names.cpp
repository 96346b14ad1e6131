// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/reading/quantity_names.h"

namespace evenstroke {

QuantityId first_of_its_name(QuantityId id)
{
    static const std::vector<QuantityId> firsts = [] {
        std::vector<QuantityId> list;
        for (const Quantity& q : all_quantities())
            list.push_back(find_quantity(q.name).value_or(q.id));
        return list;
    }();
    return firsts[static_cast<std::size_t>(id)];
}

} // namespace evenstroke
