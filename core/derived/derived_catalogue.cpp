// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived_catalogue.h"

#include "core/catalogue_table.h"
#include "core/catalogue_text.h"
#include "core/reading/place_kinds.h"

#include <algorithm>
#include <stdexcept>

namespace evenstroke {
namespace {

std::vector<DerivedQuantity> load()
{
    const CatalogueTable table(catalogue_text::derived_quantities);
    std::vector<DerivedQuantity> list;
    for (std::size_t row = 0; row < table.rows(); ++row) {
        DerivedQuantity each;
        each.name = table.cell(row, "name");
        const auto id = find_quantity(each.name);
        if (!id)
            throw std::logic_error("derived_quantities.csv: the quantity catalogue does not know " + each.name);
        each.id = *id;
        each.title = table.cell(row, "title");
        each.symbol = table.cell(row, "symbol");
        each.unit = table.cell(row, "unit");
        each.decimals = static_cast<int>(table.number(row, "decimals").value());
        for (const std::string& kind : split_list(table.cell(row, "per"), ' '))
            each.places.push_back(place_kind_named(kind));
        each.trended = table.cell(row, "trended") == "yes";
        each.baseline_like = table.cell(row, "baseline_like");
        each.inputs = split_list(table.cell(row, "inputs"), ' ');
        each.formula = table.cell(row, "formula");
        each.source = table.cell(row, "source");
        each.validity = table.cell(row, "validity");
        list.push_back(std::move(each));
    }
    return list;
}

} // namespace

bool DerivedQuantity::stands_at(Place::Kind place) const
{
    return std::find(places.begin(), places.end(), place) != places.end();
}

std::span<const DerivedQuantity> derived_catalogue()
{
    static const std::vector<DerivedQuantity> loaded = load();
    return loaded;
}

const DerivedQuantity* find_derived(std::string_view name)
{
    for (const DerivedQuantity& each : derived_catalogue())
        if (each.name == name)
            return &each;
    return nullptr;
}

const DerivedQuantity* find_derived(QuantityId id, Place::Kind place)
{
    for (const DerivedQuantity& each : derived_catalogue())
        if (quantity(each.id).name == quantity(id).name && each.stands_at(place))
            return &each;
    return nullptr;
}

} // namespace evenstroke
