// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/units/heat_types.h"

#include <optional>
#include <string>

namespace evenstroke {

/// One spot of a cylinder's wall as the maker or a calculation gives it for the healthy engine at one load:
/// the baseline of what is said about its temperature. All of it is entered by the user; none is shipped.
struct WallDescription
{
    std::string part; ///< "liner", "cover": in the user's words
    double load_percent = 0.0;
    Temperature gas{};                  ///< film-weighted mean over the cycle
    HeatTransferCoefficient gas_film{}; ///< mean over the cycle
    Length thickness{};
    ThermalConductivity conductivity{};
    HeatTransferCoefficient coolant_film{}; ///< by convection alone
    Temperature coolant{};
    std::optional<Temperature> highest, lowest; ///< marks to warn at; empty: the customary one, none
    std::string source;
};

} // namespace evenstroke
