// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/card/results.h"

/// What a card gives without the energy balance of its compression.
namespace evenstroke::indicator {

/// Work, maxima and slopes of the cycles; averages the cycles anew where one of them is far from the others.
DirectReadings read_directly(Evaluation& card, const SliderCrank& gear);

/// Pressures a tenth or ten times of what they can be, by how steeply the compression rises.
std::optional<Problem> find_unit_problem(const Engine& engine, const Conditions& conditions, const SliderCrank& gear,
                                         const ThinTrace& thin);

/// Whether the largest pressure lies near firing dead centre.
bool fires_where_it_should(const DirectReadings& direct);

/// Another cylinder's card, or samples too coarse: what little can be said.
void fill_misplaced(Evaluation& card, const DirectReadings& direct);

/// The straight line of ln p over ln V where the ratio is known; else the offset as the installation has it.
void fill_without_balance(Evaluation& card, const Engine& engine, const Conditions& conditions, const SliderCrank& gear,
                          const ThinTrace& thin, const DirectReadings& direct);

/// A compression that determines nothing: only what needs no angle.
void fill_undetermined(Evaluation& card, const DirectReadings& direct);

} // namespace evenstroke::indicator
