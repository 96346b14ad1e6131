// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/heat/coolant_film.h"

/// Liquid fresh water as a coolant.
namespace evenstroke {

/// Density, conductivity, viscosity and Prandtl number of liquid water at its temperature.
///
/// Validity: 10 to 110 °C at up to 10 bar abs, below boiling; the pressure is left out (4 bar change density
/// by 0.015 %). Within 0.05 % of IAPWS-IF97 and its transport formulations at 4 bar abs, 0.1 % for the
/// Prandtl number. No additives: glycol or an inhibitor in more than traces changes all four.
/// @par Problems not_found: outside 10 to 110 °C
/// @par Source viscosity and conductivity: IAPWS SR6-08(2011), equations 7 and 8 (0.1 MPa); density: G. S.
///      Kell, J. Chem. Eng. Data 20 (1975) 97 (constants from memory, checked against IF97); specific heat: a
///      polynomial fitted here to IF97 at 4 bar abs
Result<LiquidProperties> fresh_water(Temperature temperature);

} // namespace evenstroke
