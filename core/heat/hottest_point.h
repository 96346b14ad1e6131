// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/uncertainty.h"
#include "core/units/heat_types.h"

#include <optional>
#include <string>

/// The hottest point of the wall, relative to the engine's own baseline. It makes no claim of its own about a
/// temperature: it carries the baseline's over to another heat flux and coolant.
///
///     T_inner = T_w + (T_inner,base - T_w,base) q/q_base
///     q/q_base = h_g (T_g - T_inner) / [h_g (T_g - T_inner)]_base
///
/// Both together are linear in T_inner and solved at once. Good while wall, deposits, scale and coolant film
/// are those of the baseline: with T_inner known from outside, a difference to this estimate tells of them.
namespace evenstroke {

/// A value with its half-width at 95 %, where it has one.
template <typename Quantity, typename Difference = Quantity> struct WithUncertainty
{
    Quantity value{};
    std::optional<Difference> half_width;
    int instrument =
        UncertainInput::own; ///< inputs of one instrument share its number, and its one unknown slip
};
using UncertainTemperature = WithUncertainty<Temperature, TemperatureDifference>;

struct HottestPointInputs
{
    std::optional<UncertainTemperature> coolant, gas;                                  ///< now
    std::optional<UncertainTemperature> baseline_wall, baseline_coolant, baseline_gas; ///< of the baseline
    std::optional<WithUncertainty<double>>
        film_ratio; ///< gas film now over that of the baseline, by one formula
};

struct HottestPoint
{
    Temperature wall{};
    double flux_ratio = 1.0; ///< q / q_base
    /// At 95 %, from the inputs that have one (uncertainty.h). Empty where no input has one.
    std::optional<TemperatureDifference> half_width;
    bool half_width_complete = false; ///< every input had one; else say "at least"
};

/// Validity: coolant below wall below gas in the baseline, gas above coolant now; temperatures 273 to 3000 K;
///   film ratio 0.2 to 5 and flux ratio 0.2 to 5 (further from the baseline a ratio says little; common
///   practice). The wall's own conductivity is taken as constant.
/// @par Problems not_found: an input is missing, or a ratio lies outside the validity; invalid_input: an
///      input cannot be, or a half-width is negative
Result<HottestPoint> hottest_point(const HottestPointInputs& inputs);

/// The first equation alone, where the flux ratio comes from elsewhere. @par Problems as hottest_point
Result<Temperature> hottest_point_at_flux_ratio(Temperature coolant, Temperature baseline_wall,
                                                Temperature baseline_coolant, double flux_ratio);

/// Marks on both sides, for a page to warn at. Too hot and cast iron weakens and the oil film on a liner
/// deteriorates: noticeably above about 300 °C (common practice, no source). Too cold and acid from the
/// fuel's sulphur condenses on the liner: no number is shipped, as it depends on fuel, pressure and feed of
/// oil.
struct WallLimits
{
    std::optional<Temperature> highest = celsius(300.0);
    std::optional<Temperature> lowest;
};

enum class WallVerdict { too_cold, may_be_too_cold, within, may_be_too_hot, too_hot, no_limits };

/// Against the limits, the hot side first, with the half-width on either side ("may be").
struct WallWarning
{
    WallVerdict verdict = WallVerdict::within;
    std::string sentence;
};
WallWarning judge_wall(const HottestPoint& point, const WallLimits& limits = {});

} // namespace evenstroke
