// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/baseline.h"
#include "core/trend/drift.h"
#include "core/trend/drift_catalogue.h"
#include "core/trend/drift_input.h"
#include "core/trend/judgement.h"

/// Which limit a drift runs towards, and when it is there if it goes on.
///
/// A limit that the engine's particulars hold counts; without one the trade's custom, which is said to be no
/// maker's figure.
namespace evenstroke {

/// The custom for one watched quantity, in the unit of its deviation; empty where there is none, or none that
/// this baseline lets convert.
drift::Marks customary_marks(const Engine& engine, const Baseline& baseline, const drift::CatalogueChannel& channel);

/// Enters the engine's own limits of a quantity as deviations at one reading.
/// @param readings T
void add_own_marks(drift::Marks& marks, const Engine& engine, std::string_view quantity, std::size_t reading,
                   std::size_t readings, const DeviationForm& form);

/// For the quantity that leads the flag; nothing for a step, a question, or where there is no limit ahead.
std::optional<TimeToLimit> limit_ahead(const Engine& engine, const drift::Input& input, const drift::Output& output,
                                       const Flag& flag, const drift::Flag& from);

/// The same for any quantity that moves with a flag.
/// @param cylinder from 0; nothing: the engine
/// @param reading  the last that carries the flag
std::optional<TimeToLimit> limit_ahead_of(const Engine& engine, const drift::Input& input, const drift::Output& output,
                                          std::optional<std::size_t> cylinder, std::size_t reading, std::size_t onset,
                                          const MovedQuantity& moved);

} // namespace evenstroke
