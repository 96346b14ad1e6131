// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

/// Every quantity that is worked out and not typed, as data: resources/catalogue/derived_quantities.csv, one line
/// each. The formula that goes with a line stands under its name in one of the *_formulas.cpp.
namespace evenstroke {

struct DerivedQuantity
{
    std::string name;
    QuantityId id = 0; ///< of this name in the quantity catalogue
    std::string title, symbol, unit;
    int decimals = 1;
    std::vector<Place::Kind> places; ///< the finer one first; the engine's is the mean or sum over them
    bool trended = false;
    std::string baseline_like;       ///< takes this quantity's baseline where the engine has none of its own name
    std::vector<std::string> inputs; ///< names of typed quantities that it rests on
    std::string formula, source, validity;

    bool stands_at(Place::Kind place) const;
};

/// In the order of the rows of `derive`.
std::span<const DerivedQuantity> derived_catalogue();
/// Null where no derived quantity has this name. A name may be that of a typed quantity too: an indicated power
/// is typed, or worked out of a mean pressure.
const DerivedQuantity* find_derived(std::string_view name);
const DerivedQuantity* find_derived(QuantityId id, Place::Kind place);

} // namespace evenstroke
