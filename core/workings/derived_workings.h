// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/derived/derived.h"
#include "core/workings/workings.h"

namespace evenstroke {

/// The sheet of a derived quantity, by the run of its formula that makes the number.
/// @param quantity of derived_catalogue()
Workings derived_workings(const DerivedReading& of, const DerivedQuantity& quantity, Place place);

/// What a formula asked for, with words, origin and share; also for formulas that are no catalogue's.
/// @param solved nothing where the number is not known
std::vector<WorkingInput> working_inputs(const DerivedInputs& inputs, const std::optional<Propagated>& solved);
std::vector<WorkingStep> working_steps(const DerivedInputs& inputs);
/// Why there is no number: the Problem that stood in its way, or what was not there. @param what with a capital
std::string missing_words(const DerivedInputs& inputs, const std::string& what);

} // namespace evenstroke
