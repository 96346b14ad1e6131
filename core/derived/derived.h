// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/derived/derived_catalogue.h"
#include "core/derived/derived_inputs.h"

#include <optional>
#include <string_view>
#include <vector>

/// Quantities worked out of one reading: what, in which unit and by which formula says the catalogue,
/// resources/catalogue/derived_quantities.csv.
///
/// A quantity whose inputs are missing, or outside what its formula is good for, is not there. Where several
/// turbochargers or coolers are fitted, each has its rows and the engine the mean over those whose inputs were
/// read. Without a barometer 1 bar is taken, and the uncertainty of what depends on it is then not known. A
/// pressure drop of filter or cooler that was not read counts as none in the compressor's pressure ratio.
namespace evenstroke {

struct DerivedValue
{
    std::string_view quantity, unit; ///< as in the catalogue, which outlives everything
    Place place;
    double value = 0.0;
    std::optional<double> corrected, expected, deviation;
    std::optional<double> uncertainty; ///< half-width at 95 %, from those of the instruments; of the corrected
                                       ///< number of the specific consumption, else of the value
    QuantityId id = 0;
    /// What a trend follows: at reference conditions where ambient or fuel move it, else as it is; nothing where it
    /// moves and a condition for the correction was not read. As typed values do, it stays as it is where the engine
    /// has no coefficients; and a consumption without a typed heating value is taken to be at 42.7 MJ/kg.
    std::optional<double> compared;
};

/// In the order of the catalogue; cylinders, turbochargers and coolers before the engine.
std::vector<DerivedValue> derive(const Engine& engine, const Baseline& baseline, const Reading& reading);

/// Those that are trended, without uncertainty: it is worked out where it is shown.
std::vector<DerivedValue> derive_trended(const DerivedReading& of);

/// One quantity at one place, without uncertainty. `inputs` keeps what was asked for and why there is no number.
std::optional<DerivedValue> derive_one(DerivedInputs& inputs, const DerivedQuantity& quantity, Place place);
/// The number at reference conditions alone; nothing too for a quantity that has none.
Number derive_corrected(DerivedInputs& inputs, const DerivedQuantity& quantity, Place place);
bool has_correction(const DerivedQuantity& quantity);
/// Where no water falls out there is none, and no half-width of it.
bool is_exactly_none(const DerivedQuantity& quantity, double value);
/// The uncertainty of one, as in `DerivedValue`, and what each input has in it; the inputs are those of `inputs`
/// afterwards.
std::optional<Propagated> derive_uncertainty(DerivedInputs& inputs, const DerivedQuantity& quantity, Place place,
                                             bool of_corrected);

/// The places at which a reading can have this quantity; of several turbochargers or coolers each, then the engine.
std::vector<Place> derived_places(const DerivedReading& of, const DerivedQuantity& quantity);

} // namespace evenstroke
