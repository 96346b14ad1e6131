// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/derived/derived.h"

#include "core/derived/derived_formulas.h"

#include <initializer_list>
#include <stdexcept>

namespace evenstroke {
namespace {

std::vector<DerivedFormula> formulas_in_order()
{
    std::vector<DerivedFormula> ordered;
    const auto lists = {power_formulas(), fuel_formulas(), turbocharger_formulas(), cooler_formulas(),
                        reference_flow_formulas(), charge_air_formulas(), cylinder_formulas(), ship_formulas()};
    for (const DerivedQuantity& quantity : derived_catalogue()) {
        const DerivedFormula* found = nullptr;
        for (const auto& list : lists)
            for (const DerivedFormula& formula : list)
                if (formula.name == quantity.name)
                    found = &formula;
        if (!found)
            throw std::logic_error("derived_quantities.csv: no formula for " + quantity.name);
        ordered.push_back(*found);
    }
    return ordered;
}

const DerivedFormula& formula_of(const DerivedQuantity& quantity)
{
    static const std::vector<DerivedFormula> ordered = formulas_in_order();
    return ordered[static_cast<std::size_t>(&quantity - derived_catalogue().data())];
}

/// What is compared with `expected`: that of the name's own baseline, else of the quantity that it is like. A
/// baseline's indicated power and mean pressure are those of one cylinder.
Number expected_of(const DerivedReading& of, const DerivedQuantity& quantity, Place place)
{
    if (!of.conditions.load_percent || (place == Place::engine() && evenstroke::quantity(quantity.id).per == Place::Kind::cylinder))
        return std::nullopt;
    const std::string& name =
        quantity.baseline_like.empty() || of.baseline.has(quantity.name) ? quantity.name : quantity.baseline_like;
    return of.expected(name, *of.conditions.load_percent);
}

template <typename Take> void for_each(const DerivedReading& of, bool trended_only, const Take& take)
{
    DerivedInputs inputs(of);
    for (const DerivedQuantity& quantity : derived_catalogue()) {
        if (trended_only && !quantity.trended)
            continue;
        for (const Place& place : derived_places(of, quantity))
            if (auto value = derive_one(inputs, quantity, place))
                take(inputs, quantity, *value);
    }
}

} // namespace

std::vector<Place> derived_places(const DerivedReading& of, const DerivedQuantity& quantity)
{
    std::vector<Place> places;
    for (const Place::Kind kind : quantity.places) {
        if (kind == Place::Kind::engine) {
            places.push_back(Place::engine());
        } else if (kind == Place::Kind::cylinder) {
            for (int i = 1; i <= of.engine.cylinders; ++i)
                places.push_back(Place::cylinder(i));
        } else if (const auto numbered = of.values.numbered(kind); numbered.size() > 1) {
            places.insert(places.end(), numbered.begin(), numbered.end());
        }
    }
    return places;
}

std::optional<DerivedValue> derive_one(DerivedInputs& inputs, const DerivedQuantity& quantity, Place place)
{
    const DerivedFormula& formula = formula_of(quantity);
    DerivedValue row{quantity.name, quantity.unit, place, 0.0, {}, {}, {}, {}, quantity.id, {}};
    row.corrected = derive_corrected(inputs, quantity, place);
    const Number value = inputs.run([&](DerivedInputs& of) { return formula.value(of, place); });
    if (!value)
        return std::nullopt;
    row.value = *value;
    row.expected = expected_of(inputs.of(), quantity, place);
    // The ambient moves it: what was not corrected is not compared.
    row.compared = formula.corrected ? row.corrected : value;
    if (row.expected && row.compared)
        row.deviation = *row.compared - *row.expected;
    if (!row.compared && formula.compared)
        row.compared = inputs.run([&](DerivedInputs& of) { return formula.compared(of, place); });
    return row;
}

Number derive_corrected(DerivedInputs& inputs, const DerivedQuantity& quantity, Place place)
{
    const DerivedFormula& formula = formula_of(quantity);
    return formula.corrected ? inputs.run([&](DerivedInputs& of) { return formula.corrected(of, place); }) : std::nullopt;
}

bool has_correction(const DerivedQuantity& quantity) { return formula_of(quantity).corrected != nullptr; }

bool is_exactly_none(const DerivedQuantity& quantity, double value)
{
    return quantity.name == "charge_air_condensate" && !(value > 0.0);
}

std::optional<Propagated> derive_uncertainty(DerivedInputs& inputs, const DerivedQuantity& quantity, Place place,
                                             bool of_corrected)
{
    const DerivedFormula& formula = formula_of(quantity);
    const DerivedValueOf used = of_corrected && formula.uncertainty_of_corrected ? formula.corrected : formula.value;
    return inputs.run_with_uncertainty([&](DerivedInputs& of) { return used(of, place); });
}

std::vector<DerivedValue> derive(const Engine& engine, const Baseline& baseline, const Reading& reading)
{
    std::vector<DerivedValue> rows;
    const DerivedReading of(engine, baseline, reading);
    for_each(of, false, [&](DerivedInputs& inputs, const DerivedQuantity& quantity, DerivedValue& row) {
        if (const auto solved = derive_uncertainty(inputs, quantity, row.place, row.corrected.has_value()))
            row.uncertainty = solved->half_width;
        if (is_exactly_none(quantity, row.value))
            row.uncertainty.reset();
        rows.push_back(row);
    });
    return rows;
}

std::vector<DerivedValue> derive_trended(const DerivedReading& of)
{
    std::vector<DerivedValue> rows;
    for_each(of, true, [&](DerivedInputs&, const DerivedQuantity&, DerivedValue& row) { rows.push_back(row); });
    return rows;
}

} // namespace evenstroke
