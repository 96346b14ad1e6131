// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/reading/quantity_catalogue.h"

#include <optional>
#include <span>
#include <string>
#include <vector>

/// Which quantities share a strip of the fleet page: resources/catalogue/fleet_strips.csv, a line a strip.
namespace evenstroke {

struct FleetStripKind
{
    std::string title;
    std::vector<std::string> quantities; ///< named one by one: they go before the groups
    std::vector<std::string> groups;     ///< of the log sheet
    std::string dimension;               ///< only quantities of this dimension, of those groups; empty: all
};

std::span<const FleetStripKind> all_fleet_strips();
/// Index of the strip; the first whose line names the quantity, else the first whose groups hold it.
std::optional<std::size_t> find_fleet_strip(const Quantity& quantity);

} // namespace evenstroke
