// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/trend/fleet_strips.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"

#include <algorithm>

namespace evenstroke {
namespace {

bool holds(const std::vector<std::string>& names, const std::string& name)
{
    return std::find(names.begin(), names.end(), name) != names.end();
}

bool holds_group(const FleetStripKind& strip, const Quantity& quantity)
{
    return holds(strip.groups, quantity.group) &&
           (strip.dimension.empty() || strip.dimension == dimension_text(unit(quantity.unit).dimension));
}

} // namespace

std::span<const FleetStripKind> all_fleet_strips()
{
    static const std::vector<FleetStripKind> catalogue = [] {
        const CatalogueTable table(catalogue_text::fleet_strips);
        std::vector<FleetStripKind> strips;
        for (std::size_t row = 0; row < table.rows(); ++row)
            strips.push_back({table.cell(row, "strip"), split_list(table.cell(row, "quantities")),
                              split_list(table.cell(row, "groups")), table.cell(row, "dimension")});
        return strips;
    }();
    return catalogue;
}

std::optional<std::size_t> find_fleet_strip(const Quantity& quantity)
{
    const auto strips = all_fleet_strips();
    for (std::size_t i = 0; i < strips.size(); ++i)
        if (holds(strips[i].quantities, quantity.name))
            return i;
    for (std::size_t i = 0; i < strips.size(); ++i)
        if (holds_group(strips[i], quantity))
            return i;
    return std::nullopt;
}

} // namespace evenstroke
