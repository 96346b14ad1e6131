// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/problem.h"
#include "core/units/quantity_types.h"

#include <span>

/// Mean indicated pressure of a card drawn by a mechanical indicator: mean height times the spring.
///
///     p_i = A/L · k        A area by the planimeter, L length of the card, k pressure for a height of the
///     pencil
///
/// Source: any text on indicators, such as D. A. Taylor, Introduction to Marine Engineering, appendix.
namespace evenstroke {

/// Pressure for a height of the pencil, Pa/m.
using IndicatorSpring = decltype(PressureDifference{} / Length{});

inline IndicatorSpring spring_of_bar_per_millimetre(double bar)
{
    return bar_difference(bar) / millimetres(1.0);
}
/// The other way round, as it is stamped on most springs: millimetres of height for a bar.
inline IndicatorSpring spring_of_millimetres_per_bar(double height)
{
    return bar_difference(1.0) / millimetres(height);
}
/// Pounds per square inch for an inch of height (NIST SP 811: 6894.757293168361 Pa, 25.4 mm).
inline IndicatorSpring spring_of_psi_per_inch(double psi)
{
    return psi * 6894.757293168361 * si::pascals / (0.0254 * si::metres);
}

/// @param area up to 0.1 m², negative where the loops run backwards; length 10 to 500 mm; spring so that the
///        result lies within ±200 bar (no card exceeds it, common practice)
/// @par Problems not_found: length or spring 0, so not entered; invalid_input: outside those ranges
Result<PressureDifference> planimeter_pressure(Area area, Length card_length, IndicatorSpring spring);

/// The same from heights read at equal distances, in the middle of equal parts of the card (mid-ordinates).
/// @par Problems invalid_input: fewer than 5 heights, one that is no number; not_found: spring not entered
Result<PressureDifference> mid_ordinate_pressure(std::span<const Length> heights, IndicatorSpring spring);

} // namespace evenstroke
