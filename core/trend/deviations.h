// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/trend/conditions.h"
#include "core/trend/judgement.h"

#include <optional>
#include <vector>

/// From the typed value to the deviation. Every step is affine in the typed number, so that the typing
/// check can ask what a deviation would be had the number been another.
namespace evenstroke {

/// `corrected = scale * own + shift`, the ambient correction of one quantity at one reading.
struct Correction
{
    double scale = 1.0, shift = 0.0;
    Applied applied = Applied::none;
    std::string missing_input; ///< set where the correction could not be made; then nothing was corrected
    double per_inlet_air = 0.0, per_coolant = 0.0; ///< own unit per kelvin at this value, for the uncertainty
    bool known() const { return missing_input.empty() && applied != Applied::not_correctable; }
};

/// How the ambient correction treats `own` of this quantity at these conditions.
/// A quantity that ambient air does not move has scale 1 and applied none. The maximum pressure of an engine
/// whose control holds it is not corrected.
Correction find_correction(const Engine& engine, const Quantity& quantity, double own, const Conditions& conditions);

/// Half-width at 95 % of one instrument, own unit; nothing where neither engine nor catalogue states one.
std::optional<double> instrument_uncertainty(const Engine& engine, const Quantity& quantity, double own);

/// The coefficients that correct a quantity, its own or those of the one that it is corrected like; null where the
/// engine has none.
const CorrectionCoefficients* correction_coefficients(const Engine& engine, const Quantity& quantity);

/// What the half-width of one value's deviation is made of, in the quantity's own unit, with signs.
struct DeviationBudget
{
    std::optional<double> instrument; ///< of the typed number, corrected; empty: nobody states one
    double inlet_air = 0.0, cooler_coolant = 0.0; ///< what the uncertainty of the condition moves the correction by
    double load = 0.0;                ///< what that of the load moves the expected value by
    std::optional<double> half_width() const;
};
/// @param compared false: without an expected value the load does not count
DeviationBudget deviation_budget(const Engine& engine, const Baseline& baseline, const Quantity& quantity, double own,
                                 const Conditions& conditions, bool compared);

/// All numeric values of a reading, judged but for `doubtful`; walking order.
std::vector<JudgedValue> judge_values(const Engine& engine, const Baseline& baseline, const Reading& reading,
                                      const Conditions& conditions);

/// The heating value to which consumption is brought, MJ/kg (common practice).
inline constexpr double reference_heating_value = 42.7;

} // namespace evenstroke
