// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/conditions.h"

#include <optional>
#include <string_view>
#include <vector>

/// Quantities worked out of one reading.
///
/// A quantity whose inputs are missing, or outside what its formula is good for, is not there. Several
/// turbochargers or coolers: the mean over those whose inputs were read. Without a barometer 1 bar is taken,
/// and the uncertainty of what depends on it is then not known.
///
///     indicated_power            kW     each cylinder; the engine: the sum, only with every cylinder
///     mean_effective_pressure    bar    from the shaft power as read, or torque and speed
///     mechanical_efficiency      1      the same power over the sum of the indicated ones
///     specific_fuel_consumption  g/kWh  corrected: at 42.7 MJ/kg, and at reference ambient where the engine has
///                                       coefficients for it
///     compressor_pressure_ratio  1      (scavenge + cooler drop) / (barometer - filter drop); a drop that was
///                                       not read counts as none. Not with an auxiliary blower running, which
///                                       stands between compressor and receiver
///     compressor_efficiency      1
///     turbocharger_efficiency    1
///     cooler_effectiveness       1      the scavenge temperature where the cooler's own outlet was not read
///     cooler_temperature_difference K
///     charge_air_condensate      g/kg   of dry air, an upper bound; no uncertainty where nothing condenses
///     compression_pressure_ratio 1      each cylinder, absolute pressures; corrected: both pressures corrected
///     apparent_slip              %      two-stroke engines (no gear) with a fixed propeller of known pitch
///
/// The indicator moves from cylinder to cylinder: its slip is common to all and does not average out of sums.
namespace evenstroke {

struct DerivedValue
{
    std::string_view quantity, unit; ///< as above
    Place place;                     ///< a cylinder or the engine
    double value = 0.0;
    std::optional<double> corrected, expected, deviation;
    std::optional<double> uncertainty; ///< half-width at 95 %, from those of the instruments
};

/// In the order above; cylinders before the engine.
std::vector<DerivedValue> derive(const Engine& engine, const Baseline& baseline, const Reading& reading);

} // namespace evenstroke
