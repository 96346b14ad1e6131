// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "sample_vessel/engine_design.h"

namespace evenstroke::sample {

/// What the curves of one engine are made from. Pressures in bar, temperatures in °C, load as a share.
/// All invented; the air side balances like a real one (turbine work = compressor work).
struct CurveShape
{
    double scavenge_at_full, scavenge_power;    ///< p_scav = at_full * load^power, gauge
    double compression_ratio_of_pressures;      ///< p_comp / p_scav, absolute
    double rise_top, rise_curvature, rise_load; ///< p_max - p_comp = top - curvature (load - rise_load)^2
    double exhaust_least, exhaust_rise, exhaust_load; ///< t = least + rise ((load - l)/(1 - l))^2
    double turbine_over_exhaust, turbine_over_exhaust_slope;
    double compressor_efficiency;
    double turbocharger_speed_at_full;                                 ///< 1/min
    double consumption_least, consumption_curvature, consumption_load; ///< g/kWh at 42.7 MJ/kg
    double fuel_index_idle_share, fuel_index_at_full;                  ///< % of the rack
    double friction;                                                   ///< mean pressure lost, bar
    double cooler_drop_at_full;                                        ///< mbar
    double approach_at_full;                                           ///< scavenge air over coolant, K
};

/// Points from 25 to 110 % load. A two-stroke engine runs on the propeller curve, a four-stroke one at
/// constant speed.
std::vector<DesignPoint> baseline_points(const EngineDesign& engine, const CurveShape& shape);

} // namespace evenstroke::sample
