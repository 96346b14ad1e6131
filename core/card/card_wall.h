// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/evaluation.h"

namespace evenstroke::indicator {

/// What two cards of one cylinder at one load say of the gas on its wall: ratios, in which the spread of the film
/// formulae and the errors that both cards share fall out.
struct GasSideChange
{
    double film_ratio = 1.0;     ///< film coefficient now over that of the healthy card
    double gas_ratio = 1.0;      ///< film-weighted mean gas temperature, kelvin over kelvin
    double angle_covered = 0.0;  ///< radians of the cycle that both cover
};

struct CardAtReading
{
    const Trace& trace;
    Conditions conditions;
};

/// By Woschni's film over the closed part of both cards, each worked out from its own speed and charge temperature.
/// @par Validity as card_gas_film
/// @par Problems not_found: compression ratio, closing, opening, speed or charge temperature; as `clean` and
///      card_gas_film
Result<GasSideChange> gas_side_change(const Engine& engine, const CardAtReading& now, const CardAtReading& healthy);

} // namespace evenstroke::indicator
