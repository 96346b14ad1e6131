// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/heat/wall_problem.h"

#include "core/heat/wall_chain.h"
#include "core/plain_text.h"

namespace evenstroke {

std::optional<Problem> find_problem(const WallDescription& wall)
{
    if (!(wall.load_percent >= 0.0 && wall.load_percent <= 150.0))
        return invalid_input("The wall " + evenstroke::quoted(wall.part) + " is described at a load of " +
                                 short_number_text(wall.load_percent) + " %, which cannot be.",
                             "Give the load between 0 and 150 % of rated power.");
    if (wall.highest && wall.lowest && !(*wall.highest > *wall.lowest))
        return invalid_input("The marks of the wall " + evenstroke::quoted(wall.part) + " are exchanged: the lowest, " +
                                 short_number_text(in_celsius(*wall.lowest)) + " °C, is not below the highest, " +
                                 short_number_text(in_celsius(*wall.highest)) + " °C.",
                             "Give the lower temperature as the lowest.");
    WallChain chain;
    chain.gas = wall.gas;
    chain.gas_film = wall.gas_film;
    chain.wall = WallSlab{wall.thickness, wall.conductivity};
    chain.coolant_film = wall.coolant_film;
    chain.coolant = wall.coolant;
    const auto worked_out = work_out_wall(chain);
    return worked_out.has_value() ? std::nullopt : std::optional(worked_out.error());
}

} // namespace evenstroke
