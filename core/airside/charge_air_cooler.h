// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <optional>

/// The charge-air cooler, and pressure drops of the air and gas path brought to one flow.
/// What moves together says where the dirt is (common practice): effectiveness down with the coolant's rise up:
/// little coolant; down with the pressure drop up: dirt on the air side; down with the drop as before: on the
/// coolant's side.
/// Problems everywhere: not_found: an input is missing (named). invalid_input: one cannot be.
namespace evenstroke {

struct CoolerTemperatures
{
    std::optional<Temperature> air_in, air_out;
    std::optional<Temperature> coolant_in, coolant_out;
};

/// (t_a,in - t_a,out) / (t_a,in - t_c,in). The coolant's outlet is not needed.
/// @par Source definition; common practice
/// @par Validity the air above the coolant at its inlet and not colder than it at the outlet, cooled and not
///      heated: a result of 0 to 1
Result<Ratio> cooler_effectiveness(const CoolerTemperatures& at);

/// Air out over coolant in. @par Source definition. Zero and below are handed back: they say that a
/// thermometer is wrong, by how much. (From a scavenge temperature: the difference that is trended.)
Result<TemperatureDifference> cooler_approach(const CoolerTemperatures& at);

/// Coolant out over coolant in. @par Source definition
Result<TemperatureDifference> coolant_rise(const CoolerTemperatures& at);

/// Logarithmic mean of the differences at the two ends, counter-flow: of (air in - coolant out) and (air out -
/// coolant in). @par Source any textbook of heat transfer @par Validity both differences above zero
Result<TemperatureDifference> mean_temperature_difference(const CoolerTemperatures& at);

/// The state of the air (or gas) at a pressure drop. `flow` may be in any one unit, for it only counts over the
/// reference's; where nobody knows it, `flow_figure` stands for it.
struct FlowState
{
    std::optional<AbsolutePressure> pressure;
    std::optional<Temperature> temperature;
    std::optional<double> flow;
};

/// A drop at the reference flow and density: Δp (ρ/ρ_ref) (m_ref/m)², ρ as p/T. For coolers, suction filters
/// and the exhaust's back pressure.
/// @par Source turbulent flow, square law; common practice @par Validity flows within a factor 2 of one another
///      (common practice)
Result<PressureDifference> drop_at_reference_flow(std::optional<PressureDifference> drop, const FlowState& now,
                                                  const FlowState& reference);

/// A figure in proportion to the air flow where it is not measured: p_scav/√T3 with the turbine as a nozzle
/// (common practice). To be shown as such. @param scavenge absolute @param before_turbine exhaust temperature
Result<double> flow_figure(std::optional<AbsolutePressure> scavenge, std::optional<Temperature> before_turbine);

} // namespace evenstroke
